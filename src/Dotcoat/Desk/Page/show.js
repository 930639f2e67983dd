// Puts figures and charts on the page.

export function element(name, properties, ...children) {
  const made = Object.assign(document.createElement(name), properties);
  made.append(...children);
  return made;
}

export function table(figures) {
  const made = element('table', {});
  made.append(element('thead', {}, element('tr', {}, ...figures.header.map(text => {
    const cell = element('th', {}, text);
    cell.scope = 'col';
    return cell;
  }))));
  made.append(element('tbody', {}, ...figures.rows.map(row => element('tr', {}, ...row.map((text, i) => {
    const cell = element(i === 0 ? 'th' : 'td', {}, text);
    if (i === 0) cell.scope = 'row';
    return cell;
  })))));
  return made;
}

// Rewrites the cells that changed; builds the table anew only where its shape did.
export function update(place, figures) {
  const old = place.querySelector('table');
  const rows = [figures.header, ...figures.rows];
  const lines = old ? [...old.tHead.rows, ...old.tBodies[0].rows] : [];
  if (lines.length !== rows.length || lines[0].cells.length !== figures.header.length) {
    place.replaceChildren(table(figures));
    return;
  }
  rows.forEach((row, i) => row.forEach((text, j) => {
    const cell = lines[i].cells[j];
    if (cell.textContent !== text) cell.textContent = text;
  }));
}

// The program drew the picture: the same marks as in its report. Those that move lie over a ground that stays.
export function chart(figure, name, theme, svg) {
  let holder = figure.querySelector('.picture');
  if (!holder) figure.prepend(holder = element('div', { className: 'picture' }));
  const ground = name.startsWith('chromaticity') ? `ground/${theme}/${name}` : '';
  if (holder.dataset.ground !== ground) {
    holder.dataset.ground = ground;
    holder.replaceChildren(...(ground ? [element('img', { src: ground, alt: '' })] : []), element('div', { className: 'marks' }));
  }
  holder.lastElementChild.innerHTML = svg;
}

export function list(place, parts) {
  const key = JSON.stringify(parts);
  if (place.dataset.shown === key) return;
  place.dataset.shown = key;
  place.replaceChildren(...parts.filter(part => part.lines.length > 0).flatMap(part =>
    [element('h3', {}, part.heading), element('ul', {}, ...part.lines.map(line => element('li', {}, line)))]));
}

// What can be scrolled sideways can be reached by keyboard; what cannot is no stop on the way.
const widths = new ResizeObserver(entries => {
  for (const { target } of entries) {
    if (target.scrollWidth > target.clientWidth) target.tabIndex = 0;
    else target.removeAttribute('tabindex');
  }
});

export function watchWidth(place) { widths.observe(place); }
