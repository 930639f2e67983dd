// What this page asks the program. Every address is below the token that the page itself was loaded from.

export class Refusal extends Error {
  constructor(status, faults) {
    super(faults.map(fault => fault.message).join(' '));
    this.status = status;
    this.faults = faults;
  }
}

async function ask(path, options) {
  let answer;
  try {
    answer = await fetch(path, options);
  } catch {
    throw new Refusal(0, [{ field: null, message: 'The program does not answer. Start dotcoat desk again: what is not saved is offered there.' }]);
  }
  if (answer.status === 204) return null;
  const body = await answer.json().catch(() => null);
  if (answer.ok) return body;
  throw new Refusal(answer.status, body?.faults ?? [{ field: null, message: `The program answered ${answer.status}.` }]);
}

export const get = path => ask(path);
export const remove = path => ask(path, { method: 'DELETE' });
export const post = (path, body) =>
  ask(path, { method: 'POST', headers: { 'Content-Type': 'application/json' }, body: JSON.stringify(body) });
export const drop = file =>
  ask(`spectrum?name=${encodeURIComponent(file.name)}`, { method: 'POST', headers: { 'Content-Type': 'text/csv' }, body: file });
