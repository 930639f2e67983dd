// Makes second-library.csv beside this file: npm install colorjs.io@0.7.1, then node second-library.mjs > second-library.csv
import Color from 'colorjs.io';

const version = '0.7.1';
let state = 12345;
const random = () => (state = (state * 1103515245 + 12345) % 2147483648) / 2147483648;
const triples = Array.from({ length: 24 }, () => [random(), random(), random()].map(x => +x.toFixed(3)));
const row = (check, inputs, outputs) => console.log([check, inputs.join(';'), outputs.map(x => x.toFixed(6)).join(';'), `colorjs.io ${version}`].join(','));
console.log(`# Lab, Luv and CIEDE2000 of the general colour library colorjs.io ${version} (npm registry, MIT); made by second-library.mjs beside this file; white x 0.3127, y 0.3290`);
console.log('check,arguments,expected,source');
for (const t of triples) {
  const xyz = t.map((x, k) => +(x * [0.95, 1, 1.08][k]).toFixed(6));
  const colour = new Color('xyz-d65', xyz);
  row('lab', xyz, colour.to('lab-d65').coords);
  row('luv', xyz, colour.to('luv').coords);
}
for (let i = 0; i + 1 < triples.length; i++) {
  const lab = t => [t[0] * 100, t[1] * 120 - 60, t[2] * 120 - 60].map(x => +x.toFixed(4));
  const [a, b] = [lab(triples[i]), lab(triples[i + 1])];
  row('de2000', [...a, ...b], [new Color('lab', a).deltaE(new Color('lab', b), '2000')]);
}
