// The desk: sends the page's film to the program and shows what comes back. One request at a time; the newest film is sent next.
import { Refusal, drop, get, post, remove } from './api.js';
import { open, wire } from './dialogs.js';
import { Film, nameOfTab } from './film.js';
import { Inputs } from './inputs.js';
import { chart, element, list, table, update, watchWidth } from './show.js';

const by = id => document.getElementById(id);
const tableNames = ['fates', 'gamut', 'colours', 'efficiency', 'bands', 'layers'];

const [description, tab] = await Promise.all([get('film'), nameOfTab()]);
const film = new Film(description, tab);
let theme = sessionStorage.getItem('theme') ?? (matchMedia('(prefers-color-scheme: dark)').matches ? 'dark' : 'light');
let diagram = sessionStorage.getItem('diagram') ?? 'chromaticity-1976';
let shown = null;
let good = null;
let isAsking = false;
let isStale = false;
let wanted = 0;

by('title').textContent = description.title;
document.title = `${description.title} – film desk`;

const inputs = new Inputs(by('inputs'), description.groups, {
  move(key, text) {
    film.move(key, text);
    inputs.mark(key, film.written.get(key) !== film.text(key));
    solve();
  },
  commit() { film.commit(); buttons(); },
  back(key) { film.place(key, null); changed(); },
  async drop(lot, file) {
    inputs.say(lot, '');
    try {
      const dropped = await drop(file);
      film.place(`lots[${lot}].${dropped.quantity}`, dropped.name);
      say(`${lot} with ${file.name}: ${dropped.words}.`);
      changed();
    } catch (refused) {
      if (!(refused instanceof Refusal)) throw refused;
      inputs.say(lot, refused.message);
    }
  },
});

// A file that misses its lot must not replace the page.
for (const kind of ['dragover', 'drop']) addEventListener(kind, event => event.preventDefault());

function request(extra) {
  return { tab: film.tab, state: film.live, dark: theme === 'dark', ...extra };
}

function changed() {
  film.commit();
  inputs.show(film);
  buttons();
  solve();
}

function say(text, isWrong = false) {
  by('message').textContent = text;
  by('message').classList.toggle('wrong', isWrong);
}

function buttons() {
  by('undo').disabled = !film.canUndo;
  by('redo').disabled = !film.canRedo;
  by('to-target').disabled = !description.hasTarget;
  const count = Object.keys(film.live.fields).length + Object.keys(film.live.spectra).length;
  by('file').textContent = `${description.file}${count === 0 ? ', as on the disk' : `, ${count} changed${film.isUnsaved ? ', not saved' : ', saved'}`}`;
}

async function solve() {
  // The page says which of its films it shows: tests and measurements wait for it.
  document.body.dataset.wanted = String(++wanted);
  if (isAsking) { isStale = true; return; }
  isAsking = true;
  do {
    isStale = false;
    const round = wanted;
    const asked = request({ charts: ['spectrum', diagram] });
    const state = structuredClone(film.live);
    try {
      show(await post('solve', asked));
      good = state;
      document.body.dataset.shown = String(round);
    } catch (refused) {
      if (!(refused instanceof Refusal)) throw refused;
      const rest = inputs.faults(refused.faults);
      by('answer').textContent = rest.length > 0 ? rest.map(fault => fault.message).join(' ') : 'A field holds no value that the film can have; the figures are those of the last film that could be solved.';
      by('answer').classList.add('wrong');
      by('answer').dataset.state = 'refused';
      await redraw();
    }
    await new Promise(resolve => requestAnimationFrame(resolve));
  } while (isStale);
  isAsking = false;
}

// Another diagram or theme while a field is wrong: drawn of the last film that could be solved.
async function redraw() {
  if (good === null || by('diagram').dataset.drawn === `${theme} ${diagram}`) return;
  draw((await post('solve', request({ state: good, charts: ['spectrum', diagram] }))).charts);
}

function draw(charts) {
  for (const [name, svg] of Object.entries(charts)) {
    if (name === 'spectrum') chart(by('spectrum'), name, theme, svg);
    else if (name === diagram) {
      chart(by('diagram'), name, theme, svg);
      by('diagram').dataset.drawn = `${theme} ${name}`;
    }
  }
}

function show(reply) {
  shown = reply;
  inputs.faults([]);
  inputs.read(reply.readings);
  by('answer').textContent = reply.answer;
  by('answer').classList.remove('wrong');
  by('answer').dataset.state = reply.onTarget === null ? 'none' : reply.onTarget ? 'on' : 'off';
  draw(reply.charts);
  figures();
  for (const name of tableNames) {
    const found = reply.tables.find(one => one.name === name);
    let place = by(`table-${name}`);
    if (!place) {
      by('tables').append(place = element('div', { id: `table-${name}`, className: 'wide' }));
      watchWidth(place);
    }
    if (found) update(place, found);
    else place.replaceChildren();
  }
  list(by('notes'), [{ heading: 'Warnings', lines: reply.warnings }, { heading: 'Cautions', lines: reply.cautions }]);
  by('command').textContent = reply.command ?? 'Save first: a dropped file is not on the disk yet.';
}

function figures() {
  if (!shown) return;
  const pins = film.pins;
  const header = ['', 'this film', ...pins.map(pin => pin.name)];
  const rows = shown.key.map(figure => [figure.name, figure.value, ...pins.map(pin => pin.key.find(other => other.name === figure.name)?.value ?? '–')]);
  const place = by('figures');
  update(place, { header, rows });
  if (place.dataset.pins === JSON.stringify(pins.map(pin => pin.name)) && place.querySelector('tfoot')) return;
  place.dataset.pins = JSON.stringify(pins.map(pin => pin.name));
  place.replaceChildren(table({ header, rows }));
  const foot = element('tfoot', {}, element('tr', {}, element('th', {}, pins.length === 0 ? 'Pin a film to compare it with later ones.' : ''), element('td', {}),
    ...pins.map((pin, i) => {
      const use = element('button', { type: 'button', className: 'quiet' }, 'Use');
      use.setAttribute('aria-label', `Use ${pin.name}`);
      use.addEventListener('click', () => { film.use(pin.state); changed(); });
      const gone = element('button', { type: 'button', className: 'quiet' }, 'Unpin');
      gone.setAttribute('aria-label', `Unpin ${pin.name}`);
      gone.addEventListener('click', () => { film.unpin(i); figures(); by('pin').focus(); });
      return element('td', {}, use, gone);
    })));
  place.querySelector('table').append(foot);
}

function choose(name) {
  diagram = name;
  sessionStorage.setItem('diagram', name);
  for (const one of document.querySelectorAll('[role="tab"]')) {
    const isChosen = one.id === `tab-${name}`;
    one.setAttribute('aria-selected', String(isChosen));
    one.tabIndex = isChosen ? 0 : -1;
  }
  by('diagram').setAttribute('aria-labelledby', `tab-${name}`);
}

function paint() {
  document.documentElement.dataset.theme = theme;
  by('theme').setAttribute('aria-pressed', String(theme === 'dark'));
}

for (const one of document.querySelectorAll('[role="tab"]')) {
  one.addEventListener('click', () => { choose(one.id.slice(4)); solve(); });
  one.addEventListener('keydown', event => {
    const all = [...document.querySelectorAll('[role="tab"]')];
    const step = { ArrowRight: 1, ArrowLeft: -1 }[event.key];
    if (!step) return;
    event.preventDefault();
    const next = all[(all.indexOf(one) + step + all.length) % all.length];
    next.focus();
    next.click();
  });
}

for (const id of ['spectrum', 'diagram']) {
  by(`enlarge-${id}`).addEventListener('click', () => {
    const picture = by(id).querySelector('.picture')?.cloneNode(true);
    const svg = picture?.querySelector('svg');
    if (!svg) return;
    // Names inside the picture stay the page's own.
    for (const part of svg.querySelectorAll('[id]')) part.id = `large-${part.id}`;
    for (const part of svg.querySelectorAll('[clip-path]')) part.setAttribute('clip-path', part.getAttribute('clip-path').replace('#', '#large-'));
    svg.setAttribute('aria-labelledby', svg.getAttribute('aria-labelledby').replace(/(^| )/g, '$1large-'));
    by('large-chart').replaceChildren(picture);
    open('large');
  });
}

by('undo').addEventListener('click', () => { film.undo(); inputs.show(film); buttons(); solve(); });
by('redo').addEventListener('click', () => { film.redo(); inputs.show(film); buttons(); solve(); });
by('pin').addEventListener('click', () => {
  if (!shown) return;
  film.pin(`pin ${film.pins.length === 0 ? 1 : Math.max(...film.pins.map(pin => Number(pin.name.slice(4)) || 0)) + 1}`, shown.key);
  figures();
  say('Pinned: its figures stay beside those of the film.');
});
by('to-target').addEventListener('click', async () => {
  const button = by('to-target');
  if (button.getAttribute('aria-busy') === 'true') return;
  button.setAttribute('aria-busy', 'true');
  say('Searching the loadings that put white on target…');
  const before = JSON.stringify(film.live);
  try {
    const found = await post('formulate', request({}));
    if (JSON.stringify(film.live) !== before) {
      say('The film was changed during the search, so its result is not taken.', true);
      return;
    }
    for (const [key, text] of Object.entries(found.fields)) film.move(key, text);
    say(found.message, !found.reached);
    changed();
  } catch (refused) {
    if (!(refused instanceof Refusal)) throw refused;
    const rest = inputs.faults(refused.faults);
    say(rest.map(fault => fault.message).join(' '), true);
  } finally {
    button.removeAttribute('aria-busy');
  }
});
by('save').addEventListener('click', () => { by('save-name-fault').textContent = ''; open('save-dialog'); by('save-name').select(); });
by('report').addEventListener('click', () => open('report-dialog'));
by('trace').addEventListener('click', () => open('trace-dialog'));
by('theme').addEventListener('click', () => {
  theme = theme === 'dark' ? 'light' : 'dark';
  sessionStorage.setItem('theme', theme);
  paint();
  solve();
});
by('drawer').addEventListener('click', () => drawer(!by('inputs').classList.contains('open')));
addEventListener('keydown', event => {
  if (event.key === 'Escape' && by('inputs').classList.contains('open') && !document.querySelector('dialog[open]')) {
    drawer(false);
    by('drawer').focus();
  }
  const isText = event.target instanceof HTMLInputElement && event.target.type !== 'range';
  if (!(event.ctrlKey || event.metaKey) || isText || document.querySelector('dialog[open]')) return;
  const key = event.key.toLowerCase();
  if (key === 'z' && !event.shiftKey) { event.preventDefault(); by('undo').click(); }
  else if (key === 'y' || (key === 'z' && event.shiftKey)) { event.preventDefault(); by('redo').click(); }
  else if (key === 's') { event.preventDefault(); by('save').click(); }
});
addEventListener('beforeunload', () => film.keep());

function drawer(isOpen) {
  by('inputs').classList.toggle('open', isOpen);
  by('drawer').setAttribute('aria-expanded', String(isOpen));
  if (isOpen) by('inputs').querySelector('summary').focus();
}

function offers() {
  const place = by('offer');
  const all = description.unsaved.filter(one => one.tab !== film.tab);
  place.hidden = all.length === 0;
  place.replaceChildren(...all.flatMap(one => {
    const count = Object.keys(one.state.fields).length + Object.keys(one.state.spectra).length;
    const done = () => {
      description.unsaved = description.unsaved.filter(other => other !== one);
      offers();
    };
    const take = element('button', { type: 'button' }, 'Take it up');
    take.addEventListener('click', async () => { film.use(one.state); changed(); await remove(`unsaved/${one.tab}`); done(); });
    const discard = element('button', { type: 'button' }, 'Discard');
    discard.addEventListener('click', async () => { await remove(`unsaved/${one.tab}`); done(); });
    return [element('span', {}, `A film of an earlier run was not saved (${count} changed).`), take, discard];
  }));
}

watchWidth(by('figures'));
wire(film, description, request, text => { say(text); buttons(); });
choose(diagram);
paint();
inputs.show(film);
buttons();
offers();
solve();
