// Saving, reporting and tracing: each in a dialog that says what came of it.
import { Refusal, get, post, remove } from './api.js';
import { element, table } from './show.js';

export function open(id) {
  const dialog = document.getElementById(id);
  dialog.showModal();
  return dialog;
}

for (const dialog of document.querySelectorAll('dialog')) {
  dialog.querySelector('button[value="cancel"]').addEventListener('click', () => dialog.close());
}

function onGo(id, work) {
  const dialog = document.getElementById(id);
  const go = dialog.querySelector('button[value="go"]');
  dialog.querySelector('form').addEventListener('submit', async event => {
    event.preventDefault();
    if (go.disabled) return;
    go.disabled = true;
    const said = dialog.querySelector('.said');
    said.textContent = '';
    try {
      await work(dialog);
    } catch (refused) {
      if (!(refused instanceof Refusal)) throw refused;
      said.textContent = refused.message;
    } finally {
      go.disabled = false;
    }
  });
}

// request: extra => the page's film with extra keys.
export function wire(film, description, request, say) {
  const saveName = document.getElementById('save-name');
  saveName.value = `${description.name}-2.film.yaml`;
  onGo('save-dialog', async dialog => {
    const name = saveName.value.trim();
    const known = film.seen[name] ?? film.seen[`${name}.film.yaml`] ?? null;
    const answer = await post('save', request({ name, seen: known }));
    film.markSaved(answer.name, answer.check);
    saveName.value = answer.name;
    dialog.close();
    say(`Saved as ${answer.name}.`);
  });

  const reportName = document.getElementById('report-name');
  reportName.value = description.name;
  onGo('report-dialog', async dialog => {
    const made = document.getElementById('report-made');
    made.replaceChildren('Drawing the report…');
    try {
      const answer = await post('report', request({ name: reportName.value.trim() }));
      const link = file => {
        const anchor = element('a', { href: `report/${encodeURIComponent(answer.name)}/${encodeURIComponent(file)}`, target: '_blank' }, file);
        anchor.rel = 'noopener';
        return anchor;
      };
      const pages = answer.files.filter(file => /\.(html|pdf)$/.test(file));
      made.replaceChildren(element('p', {}, `${answer.files.length} files in ${answer.folder}:`), ...pages.flatMap(file => [link(file), ' ']));
      say(`Report in ${answer.folder}.`);
    } catch (refused) {
      made.replaceChildren();
      throw refused;
    }
  });

  wireTrace(request);
}

function wireTrace(request) {
  const [photons, seed, progress, stop, result] =
    ['trace-photons', 'trace-seed', 'trace-progress', 'trace-stop', 'trace-result'].map(id => document.getElementById(id));
  let running = null;
  stop.addEventListener('click', () => { if (running) remove(`trace/${running}`); });
  onGo('trace-dialog', async () => {
    const whole = text => (/^\d{1,15}$/.test(text.replace(/[ _]/g, '')) ? Number(text.replace(/[ _]/g, '')) : null);
    result.replaceChildren();
    progress.value = 0;
    let run = await post('trace', request({ photons: whole(photons.value) ?? 0, seed: whole(seed.value) ?? 1 }));
    running = run.id;
    stop.disabled = false;
    try {
      while (!run.finished) {
        await new Promise(resolve => setTimeout(resolve, 250));
        run = await get(`trace/${running}`);
        progress.value = run.doneShare;
      }
    } finally {
      running = null;
      stop.disabled = true;
    }
    result.replaceChildren(element('p', {}, run.message ?? ''), ...(run.table ? [table(run.table)] : []));
  });
}
