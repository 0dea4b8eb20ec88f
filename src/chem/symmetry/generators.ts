import type { Matrix3, Vector3 } from '../geometry/vector.ts';
import { multiply } from '../geometry/vector.ts';
import { INVERSION, rotation } from './matrices.ts';

/** Family and order read from a Schoenflies symbol: `D4h` is D, 4, h; `Td` is T, 0, d. */
export interface SymbolParts {
  family: 'C' | 'D' | 'S' | 'T' | 'O' | 'I';
  n: number;
  suffix: '' | 'v' | 'h' | 'd' | 's' | 'i';
}

const orders = [2, 3, 4, 5, 6, 7, 8];

/** Every finite group in the list, from low to high. */
export const finiteSymbols: readonly string[] = [
  ...['C1', 'Cs', 'Ci'],
  ...['C#', 'D#', 'C#v', 'C#h', 'D#h', 'D#d'].flatMap((form) => orders.map((n) => form.replace('#', `${n}`))),
  ...['S4', 'S6', 'S8', 'T', 'Td', 'Th', 'O', 'Oh', 'I', 'Ih'],
];

/** Takes a symbol of `finiteSymbols` apart. */
export function symbolParts(symbol: string): SymbolParts {
  const [, family, n, suffix] = /^([CDSTOI])(\d*)([vhdsi]?)$/.exec(symbol) ?? [];
  return { family: family as SymbolParts['family'], n: Number(n), suffix: suffix as SymbolParts['suffix'] };
}

const x: Vector3 = [1, 0, 0];
const z: Vector3 = [0, 0, 1];
/** Cn about z. */
export const turn = (n: number): Matrix3 => rotation(z, (2 * Math.PI) / n);
/** Reflection in the plane xy. */
export const acrossZ: Matrix3 = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, -1],
];
/** Reflection in the plane xz. */
export const acrossY: Matrix3 = [
  [1, 0, 0],
  [0, -1, 0],
  [0, 0, 1],
];
/** Sn about z. */
export const turnReflect = (n: number): Matrix3 => multiply(acrossZ, turn(n));
const cubeDiagonal = rotation([1, 1, 1], (2 * Math.PI) / 3);
/** A fivefold axis of the icosahedron whose twofold axes are x, y and z: (0, 1, golden ratio). */
export const fivefold = rotation([0, 1, (1 + Math.sqrt(5)) / 2], (2 * Math.PI) / 5);

/**
 * Operations that generate a group in its standard setting: principal axis z; Dn, Dnh, Dnd with a C2′ along x; Cnv
 * with the mirror xz; Cs with the mirror xy; cubic groups with C4, S4 or C2, and I with C2, along x, y and z.
 */
export function generatorsOf({ family, n, suffix }: SymbolParts): Matrix3[] {
  const axial = (): Matrix3[] => {
    if (suffix === 's') return [acrossZ];
    if (suffix === 'i') return [INVERSION];
    const more = { '': [], v: [acrossY], h: [acrossZ], d: [turnReflect(2 * n)] }[suffix];
    return [turn(n), ...more];
  };
  switch (family) {
    case 'C':
      return axial();
    case 'S':
      return [turnReflect(n)];
    case 'D':
      return [...axial(), rotation(x, Math.PI)];
    case 'T':
      return [turn(2), cubeDiagonal, ...(suffix === 'd' ? [turnReflect(4)] : suffix === 'h' ? [INVERSION] : [])];
    case 'O':
      return [turn(4), cubeDiagonal, ...(suffix === 'h' ? [INVERSION] : [])];
    case 'I':
      return [turn(2), cubeDiagonal, fivefold, ...(suffix === 'h' ? [INVERSION] : [])];
  }
}
