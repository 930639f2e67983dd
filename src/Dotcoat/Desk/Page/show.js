// Puts figures and charts on the page.

export function element(name, properties, ...children) {
  const made = Object.assign(document.createElement(name), properties);
  made.append(...children);
  return made;
}

export function table(figures, caption) {
  const made = element('table', {});
  if (caption) made.append(element('caption', {}, caption));
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

// The program drew the picture: the same marks as in its report.
export function chart(figure, svg) {
  const holder = figure.querySelector('.picture') ?? figure.insertBefore(element('div', { className: 'picture' }), figure.firstChild);
  holder.innerHTML = svg;
}

export function list(place, parts) {
  const key = JSON.stringify(parts);
  if (place.dataset.shown === key) return;
  place.dataset.shown = key;
  place.replaceChildren(...parts.filter(part => part.lines.length > 0).flatMap(part =>
    [element('h3', {}, part.heading), element('ul', {}, ...part.lines.map(line => element('li', {}, line)))]));
}
