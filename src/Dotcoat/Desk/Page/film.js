// The page's film: what was changed of the file, with undo. Kept over a reload, for this browser tab alone.

const empty = () => ({ fields: {}, spectra: {} });
const copy = state => ({ fields: { ...state.fields }, spectra: { ...state.spectra } });
const same = (a, b) => JSON.stringify([sorted(a.fields), sorted(a.spectra)]) === JSON.stringify([sorted(b.fields), sorted(b.spectra)]);
const sorted = record => Object.entries(record).sort(([a], [b]) => (a < b ? -1 : 1));
const mostSteps = 200;

export class Film {
  constructor(description, tab) {
    this.written = new Map(description.groups.flatMap(group => group.fields).map(field => [field.key, field.text]));
    this.tab = tab;
    this.steps = [empty()];
    this.at = 0;
    this.live = empty();
    this.pins = [];
    this.seen = {};
    this.saved = null;
    this.restore();
  }

  get canUndo() { return this.at > 0; }
  get canRedo() { return this.at < this.steps.length - 1; }
  get isUnsaved() { return !same(this.live, empty()) && !(this.saved && same(this.live, this.saved)); }

  text(key) { return this.live.fields[key] ?? this.written.get(key); }

  // While a slider moves: shown, but no step of its own.
  move(key, text) {
    if (text === this.written.get(key)) delete this.live.fields[key];
    else this.live.fields[key] = text;
  }

  place(key, name) {
    if (name === null) delete this.live.spectra[key];
    else this.live.spectra[key] = name;
  }

  commit() {
    if (same(this.live, this.steps[this.at])) return;
    this.steps = [...this.steps.slice(0, this.at + 1), copy(this.live)].slice(-mostSteps);
    this.at = this.steps.length - 1;
    this.keep();
  }

  undo() { if (this.canUndo) this.go(this.at - 1); }
  redo() { if (this.canRedo) this.go(this.at + 1); }

  go(at) {
    this.at = at;
    this.live = copy(this.steps[at]);
    this.keep();
  }

  use(state) {
    this.live = copy(state);
    this.commit();
  }

  pin(name, key) {
    this.pins.push({ name, state: copy(this.live), key });
    this.keep();
  }

  unpin(index) {
    this.pins.splice(index, 1);
    this.keep();
  }

  markSaved(name, check) {
    this.saved = copy(this.live);
    this.seen[name] = check;
    this.keep();
  }

  keep() {
    const { steps, at, pins, seen, saved } = this;
    try {
      sessionStorage.setItem('film', JSON.stringify({ tab: this.tab, steps, at, pins, seen, saved }));
    } catch { /* no room: undo and pins do not outlive a reload, the film does by the program's recovery file */ }
  }

  restore() {
    let kept = null;
    try { kept = JSON.parse(sessionStorage.getItem('film')); } catch { /* nothing kept */ }
    if (kept?.tab !== this.tab || !Array.isArray(kept.steps) || !kept.steps[kept.at]) return;
    Object.assign(this, { steps: kept.steps, at: kept.at, pins: kept.pins, seen: kept.seen, saved: kept.saved });
    this.live = copy(this.steps[this.at]);
  }
}

// A copied browser tab brings its storage along: the lock tells it that the name is taken.
export async function nameOfTab() {
  const fresh = () => Array.from(crypto.getRandomValues(new Uint8Array(8)), byte => byte.toString(16).padStart(2, '0')).join('');
  let kept = null;
  try { kept = JSON.parse(sessionStorage.getItem('film'))?.tab; } catch { /* nothing kept */ }
  for (const name of [kept, fresh()]) {
    if (!/^[0-9a-f]{16}$/.test(name ?? '')) continue;
    const isMine = await new Promise(resolve => {
      if (!navigator.locks) { resolve(true); return; }
      navigator.locks.request(`film-${name}`, { ifAvailable: true }, lock => {
        resolve(lock !== null);
        return lock === null ? undefined : new Promise(() => {});
      });
    });
    if (isMine) return name;
  }
  return fresh();
}
