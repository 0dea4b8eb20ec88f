import { MINUS, type Run, RunBuilder, toPrimes } from './runs.ts';
import { parseTerm, termLabel } from './term.ts';

/** R for the full turn, the kind, the order, the power, what tells like classes apart */
const OPERATION = /^(R)?(E|i|C|S|sigma)?(\d+|\(phi\))?(?:\^(\d+))?(?:_?([hvd]))?('{1,2})?(\([a-z]+\))?$/;

/**
 * Sets the label of a class of operations: `C4^3`, `C2''`, `C2(z)`, `sigma_h`, `S(phi)`, and of a double group `RC3`.
 * Operations are italic, as operators are, their indices upright; R is the turn by 2π.
 */
export function parseOperation(label: string): Run[] {
  const found = OPERATION.exec(label);
  if (!found) return [{ text: label, style: 'normal' }];
  const [, full = '', kind = '', order = '', power = '', plane = '', primes = '', axes = ''] = found;
  const out = new RunBuilder().add(full, 'italic').add(kind === 'sigma' ? 'σ' : kind, 'italic');
  if (order === '(phi)') out.add('(').add('φ', 'italic').add(')');
  else out.add(order, 'sub');
  out.add(power, 'sup').add(plane, 'sub').add(toPrimes(primes));
  if (axes) out.add('(').add(axes.slice(1, -1), 'italic').add(')');
  return out.runs;
}

/** The label of a class read aloud: "C 4 to the 3", "sigma h". */
export const operationLabel = (label: string): string =>
  label
    .replace(/^R(?=.)/, 'R ')
    .replace(/([CS])(\d)/, '$1 $2')
    .replace(/\^(\d+)/, ' to the $1')
    .replace('_', ' ')
    .replace(/\((.+)\)/, ' $1')
    .replace("''", ' double prime')
    .replace("'", ' prime');

/** Sets a function of the coordinates: `x2-y2`, `2z2-x2-y2`, `Rz`. */
export function parseFunction(name: string): Run[] {
  const out = new RunBuilder();
  for (const [part] of name.matchAll(/R[xyz]|[xyz]\d?|[+-]|\d/g)) {
    if (part.startsWith('R')) out.add('R', 'italic').add(part.slice(1), 'sub');
    else if (/^[xyz]/.test(part)) out.add(part[0]!, 'italic').add(part.slice(1), 'sup');
    else out.add(part === '-' ? ` ${MINUS} ` : part === '+' ? ' + ' : part);
  }
  return out.runs;
}

/** A function read aloud: "x squared minus y squared". */
export const functionLabel = (name: string): string =>
  name
    .replace(/R([xyz])/, 'rotation about $1')
    .replace(/([xyz])2/g, '$1 squared')
    .replace(/-/g, ' minus ')
    .replace(/\+/g, ' plus ')
    .replace(/^2/, '2 ');

/** An irrep, or the pair that two numbers after Bethe name: `Γ5,Γ6`. */
export function parseIrrep(label: string): Run[] {
  const out = new RunBuilder();
  for (const [i, part] of label.split(',').entries()) out.add(i > 0 ? ', ' : '').addAll(parseTerm(part));
  return out.runs;
}

/** Sets a direct sum: `A1g + 2T2g`; 0 where it is empty. */
export function parseSum(terms: readonly { irrep: string; count: number }[]): Run[] {
  const out = new RunBuilder();
  if (terms.length === 0) return out.add('0').runs;
  for (const [i, { irrep, count }] of terms.entries()) {
    out.add(i > 0 ? ' + ' : '').add(count > 1 ? `${count}\u2009` : '');
    if (irrep.includes(',')) out.add('(').addAll(parseIrrep(irrep)).add(')');
    else out.addAll(parseIrrep(irrep));
  }
  return out.runs;
}

/** A direct sum read aloud. */
export const sumLabel = (terms: readonly { irrep: string; count: number }[]): string =>
  terms.map(({ irrep, count }) => `${count > 1 ? `${count} times ` : ''}${termLabel(irrep)}`).join(' plus ') || '0';

/** Roots and golden ratios that characters are, to be told exactly. */
const EXACT: readonly [number, string][] = [
  [Math.SQRT2, '√2'],
  [Math.sqrt(3), '√3'],
  [(Math.sqrt(5) + 1) / 2, '½(√5 + 1)'],
  [(Math.sqrt(5) - 1) / 2, `½(√5 ${MINUS} 1)`],
];

/** Sets a character: an integer, a root, or a multiple of a cosine; of a linear group also `2cos(2phi)`. */
export function parseCharacter(value: number | string): Run[] {
  if (typeof value === 'string') return angular(value);
  const sign = value < -1e-9 ? MINUS : '';
  const size = Math.abs(value);
  if (Math.abs(size - Math.round(size)) < 1e-6) return [{ text: `${sign}${Math.round(size)}`, style: 'normal' }];
  const exact = EXACT.find(([number]) => Math.abs(number - size) < 1e-6);
  if (exact) return [{ text: `${sign}${exact[1]}`, style: 'normal' }];
  for (let q = 5; q <= 16; q++)
    for (let p = 1; 2 * p < q; p++)
      if (Math.abs(size - 2 * Math.cos((p * Math.PI) / q)) < 1e-6)
        return [{ text: `${sign}2 cos ${p > 1 ? p : ''}π/${q}`, style: 'normal' }];
  return [{ text: `${sign}${size.toFixed(3)}`, style: 'normal' }];
}

function angular(text: string): Run[] {
  const [, sign = '', times = ''] = /^(-?)2cos\((\d*)phi\)$/.exec(text) ?? [];
  return new RunBuilder().add(`${sign && MINUS}2 cos ${times}`).add('φ', 'italic').runs;
}
