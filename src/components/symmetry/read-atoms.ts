import { findElement } from '#src/chem/elements.ts';
import type { Atom } from '#src/chem/symmetry/index.ts';

/** Atoms read from pasted text, or what is wrong and in which line. */
export type AtomsRead = { atoms: Atom[]; error: null } | { atoms: null; error: string };

const NUMBER = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d+)?$/;
const ISOTOPES = ['D', 'T'];

/**
 * Reads an atom a line, `N 1.96 0 0` in Å; a slash or semicolon ends a line as well. The two head lines of an XYZ file
 * (number of atoms, comment) are passed over, labels such as `N1` count as N, and tabs or commas may stand between.
 */
export function readAtoms(text: string): AtomsRead {
  const lines = text
    .replace(/\r/g, '')
    .split(/[\n/;]/)
    .map((line, i) => ({ text: line.trim(), number: i + 1 }));
  const filled = lines.filter((line) => line.text !== '');
  const isXyz = /^\d+$/.test(filled[0]?.text ?? '');
  const start = isXyz ? lines.indexOf(filled[0]!) + 2 : 0;
  const atoms: Atom[] = [];
  for (const { text: line, number } of lines.slice(start)) {
    if (line === '') continue;
    const [label = '', ...rest] = line.split(/[\s,]+/).filter((part) => part !== '');
    const letters = /^[A-Za-z]+/.exec(label)?.[0] ?? '';
    const element = [letters.slice(0, 2), letters.slice(0, 1)]
      .map((part) => part.charAt(0).toUpperCase() + part.slice(1).toLowerCase())
      .find((part) => findElement(part) || ISOTOPES.includes(part));
    if (!element) return failed(`Line ${number}, “${line}”: “${label}” is no element. Write N 1.96 0 0.`);
    const [x, y, z] = rest.slice(0, 3).map((part) => (NUMBER.test(part) ? Number(part) : Number.NaN));
    if (x === undefined || y === undefined || z === undefined || [x, y, z].some(Number.isNaN)) {
      return failed(`Line ${number}, “${line}”: three numbers in Å must follow the element. Write N 1.96 0 0.`);
    }
    atoms.push({ element, x, y, z });
  }
  return atoms.length > 0 ? { atoms, error: null } : failed('There are no atoms yet. Write one a line: N 1.96 0 0.');
}

const failed = (error: string): AtomsRead => ({ atoms: null, error });
