import { expect, test } from 'vitest';
import {
  functionLabel,
  operationLabel,
  parseCharacter,
  parseFunction,
  parseIrrep,
  parseOperation,
  parseSum,
} from '#src/components/notation/symmetry.ts';

const html = (runs: readonly { text: string; style: string }[]) =>
  runs.map(({ text, style }) => (style === 'normal' ? text : `<${style}>${text}</${style}>`)).join('');

test.each([
  ['E', '<italic>E</italic>'],
  ['C4^3', '<italic>C</italic><sub>4</sub><sup>3</sup>'],
  ["C2''", '<italic>C</italic><sub>2</sub>″'],
  ['C2(z)', '<italic>C</italic><sub>2</sub>(<italic>z</italic>)'],
  ['sigma_h', '<italic>σ</italic><sub>h</sub>'],
  ['sigma(xy)', '<italic>σ</italic>(<italic>xy</italic>)'],
  ['S(phi)', '<italic>S</italic>(<italic>φ</italic>)'],
  ['i', '<italic>i</italic>'],
  ['R', '<italic>R</italic>'],
  ['RC3', '<italic>RC</italic><sub>3</sub>'],
  ['Rsigma_v', '<italic>Rσ</italic><sub>v</sub>'],
])('the class %s', (label, set) => {
  expect(html(parseOperation(label))).toBe(set);
});

test('a class and a function are read aloud', () => {
  expect(operationLabel("C2''")).toBe('C 2 double prime');
  expect(operationLabel('C4^3')).toBe('C 4 to the 3');
  expect(functionLabel('x2-y2')).toBe('x squared minus y squared');
  expect(functionLabel('Rz')).toBe('rotation about z');
});

test.each([
  ['x2-y2', '<italic>x</italic><sup>2</sup> − <italic>y</italic><sup>2</sup>'],
  ['2z2-x2-y2', '2<italic>z</italic><sup>2</sup> − <italic>x</italic><sup>2</sup> − <italic>y</italic><sup>2</sup>'],
  ['Rz', '<italic>R</italic><sub>z</sub>'],
  ['xy', '<italic>xy</italic>'],
])('the function %s', (name, set) => {
  expect(html(parseFunction(name))).toBe(set);
});

test.each([
  [2, '2'],
  [-1, '−1'],
  [0, '0'],
  [Math.SQRT2, '√2'],
  [-Math.sqrt(3), '−√3'],
  [(1 - Math.sqrt(5)) / 2, '−½(√5 − 1)'],
  [2 * Math.cos((2 * Math.PI) / 7), '2 cos 2π/7'],
  ['-2cos(2phi)', '−2 cos 2<italic>φ</italic>'],
])('the character %s is told exactly', (value, set) => {
  expect(html(parseCharacter(value))).toBe(set);
});

test('a pair of Bethe’s numbers and a sum', () => {
  expect(html(parseIrrep('Γ5+,Γ6+'))).toBe('Γ<sub>5</sub><sup>+</sup>, Γ<sub>6</sub><sup>+</sup>');
  const sum = [
    { irrep: 'A1g', count: 1 },
    { irrep: 'T2g', count: 2 },
  ];
  expect(html(parseSum(sum))).toBe('A<sub>1g</sub> + 2\u2009T<sub>2g</sub>');
  expect(html(parseSum([]))).toBe('0');
});
