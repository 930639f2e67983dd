// The column of inputs: a slider and a number field for each value, and a place to drop spectra for each lot.
import { element } from './show.js';

const idOf = key => `field-${key.replace(/[^A-Za-z0-9]+/g, '-')}`;

export class Inputs {
  // on: { move(key, text), commit(), drop(lot, file), back(key) }
  constructor(form, groups, on) {
    this.fields = new Map();
    this.lots = new Map();
    form.addEventListener('submit', event => event.preventDefault());
    for (const group of groups) form.append(this.group(group, on));
  }

  group(group, on) {
    const box = element('details', { className: 'group', open: !group.folded }, element('summary', {}, group.name));
    for (const field of group.fields) box.append(this.field(field, on));
    if (group.lot !== null) box.append(this.lot(group.lot, box, on));
    return box;
  }

  field(field, on) {
    const id = idOf(field.key);
    const label = element('label', { htmlFor: id, id: `${id}-label` }, field.label);
    const reading = element('span', { className: 'reading' });
    const number = element('input', { id, inputMode: 'decimal', spellcheck: false, value: field.text, title: `Allowed: ${field.allowed}` });
    number.setAttribute('aria-describedby', `${id}-fault ${id}-unit`);
    const slider = element('input', { type: 'range', min: field.low, max: field.high, step: field.step, value: field.text, id: `${id}-slider` });
    slider.setAttribute('aria-label', `${field.label}, slider`);
    const unit = element('span', { className: 'unit', id: `${id}-unit` }, field.unit);
    const fault = element('p', { className: 'fault', id: `${id}-fault` });
    fault.setAttribute('role', 'alert');
    slider.addEventListener('input', () => {
      number.value = plain(slider.value, field.step);
      on.move(field.key, number.value);
    });
    slider.addEventListener('change', () => on.commit());
    number.addEventListener('input', () => {
      const text = number.value.trim().replace(/^([^.,]*),([^.,]*)$/, '$1.$2');
      if (Number.isFinite(Number(text)) && text !== '') slider.value = text;
      on.move(field.key, text);
    });
    number.addEventListener('change', () => on.commit());
    const box = element('div', { className: 'field' },
      element('div', { className: 'top' }, label, reading), element('div', { className: 'row' }, slider, number, unit), fault);
    this.fields.set(field.key, { box, number, slider, fault, reading });
    return box;
  }

  lot(lot, box, on) {
    const list = element('ul', {});
    const said = element('p', { className: 'said' });
    said.setAttribute('role', 'alert');
    const picker = element('input', { type: 'file', accept: '.csv,text/csv,text/plain', id: idOf(`drop ${lot}`), tabIndex: -1 });
    picker.setAttribute('aria-label', `Spectrum file for ${lot}`);
    const choose = element('button', { type: 'button', className: 'quiet' }, 'Try a measured file…');
    choose.setAttribute('aria-label', `Try a measured file for ${lot}`);
    choose.addEventListener('click', () => picker.click());
    picker.addEventListener('change', () => {
      for (const file of picker.files) on.drop(lot, file);
      picker.value = '';
    });
    for (const kind of ['dragenter', 'dragover']) {
      box.addEventListener(kind, event => {
        if (!event.dataTransfer?.types.includes('Files')) return;
        event.preventDefault();
        box.classList.add('over');
      });
    }
    box.addEventListener('dragleave', event => { if (!box.contains(event.relatedTarget)) box.classList.remove('over'); });
    box.addEventListener('drop', event => {
      event.preventDefault();
      box.classList.remove('over');
      box.open = true;
      for (const file of event.dataTransfer.files) on.drop(lot, file);
    });
    this.lots.set(lot, { list, said, on });
    return element('div', { className: 'spectra' }, element('p', {}, 'Drop an absorbance or emission file here, or '), choose, picker, list, said);
  }

  // Puts the film's values into the fields; one that is being typed in keeps its text.
  show(film) {
    for (const [key, { box, number, slider }] of this.fields) {
      const text = film.text(key);
      if (document.activeElement !== number || Number(number.value.replace(',', '.')) !== Number(text)) number.value = text;
      slider.value = text;
      box.classList.toggle('changed', film.written.get(key) !== text);
    }
    for (const [lot, { list, on }] of this.lots) {
      list.replaceChildren(...['absorbance', 'emission'].map(quantity => [`lots[${lot}].${quantity}`, quantity])
        .filter(([key]) => key in film.live.spectra)
        .map(([key, quantity]) => {
          const back = element('button', { type: 'button', className: 'quiet' }, 'Back');
          back.setAttribute('aria-label', `Back to the film file's ${quantity} of ${lot}`);
          back.addEventListener('click', () => on.back(key));
          return element('li', {}, element('span', {}, `${quantity}: ${film.live.spectra[key]}`), back);
        }));
    }
  }

  mark(key, isChanged) { this.fields.get(key)?.box.classList.toggle('changed', isChanged); }

  read(readings) {
    for (const [key, { reading }] of this.fields) {
      const text = readings[key] ?? '';
      if (reading.textContent !== text) reading.textContent = text;
    }
  }

  // Shows each fault at its field and returns those that have none.
  faults(faults) {
    const at = new Map();
    const rest = [];
    for (const fault of faults) {
      if (this.fields.has(fault.field) && !at.has(fault.field)) at.set(fault.field, fault.message);
      else rest.push(fault);
    }
    for (const [key, { number, fault, box }] of this.fields) {
      const text = at.get(key) ?? '';
      if (fault.textContent !== text) fault.textContent = text;
      if (text) {
        number.setAttribute('aria-invalid', 'true');
        const group = box.closest('details');
        if (group) group.open = true;
      } else number.removeAttribute('aria-invalid');
    }
    return rest;
  }

  say(lot, text) {
    const place = this.lots.get(lot);
    if (place) place.said.textContent = text;
  }
}

// A slider's value with the digits of its step and no more.
function plain(text, step) {
  const digits = Math.max(0, Math.ceil(-Math.log10(step) - 1e-9));
  return String(Number(Number(text).toFixed(digits)));
}
