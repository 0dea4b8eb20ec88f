import type { Matrix3, Vector3 } from '../geometry/vector.ts';
import { apply, determinant, multiply, scale, transpose } from '../geometry/vector.ts';

/** A named function of the coordinates as a 3 × 3 symmetric form, a polar or an axial vector. */
type Form = { name: string } & ({ quadratic: Matrix3 } | { polar: Vector3 } | { axial: Vector3 });

const square = (a: number, b: number, c: number): Matrix3 => [
  [a, 0, 0],
  [0, b, 0],
  [0, 0, c],
];
const mixed = (i: number, j: number): Matrix3 =>
  [0, 1, 2].map((r) => [0, 1, 2].map((c) => Number((r === i && c === j) || (r === j && c === i)))) as Matrix3;

const vectors: Form[] = [
  { name: 'x', polar: [1, 0, 0] },
  { name: 'y', polar: [0, 1, 0] },
  { name: 'z', polar: [0, 0, 1] },
  { name: 'Rx', axial: [1, 0, 0] },
  { name: 'Ry', axial: [0, 1, 0] },
  { name: 'Rz', axial: [0, 0, 1] },
];
const products: Form[] = [
  { name: 'xy', quadratic: mixed(0, 1) },
  { name: 'xz', quadratic: mixed(0, 2) },
  { name: 'yz', quadratic: mixed(1, 2) },
];
/** Squares, the set that a group leaves most apart first; the first set whose members all belong to one irrep each. */
const squareSets: Form[][] = [
  [
    { name: 'x2', quadratic: square(1, 0, 0) },
    { name: 'y2', quadratic: square(0, 1, 0) },
    { name: 'z2', quadratic: square(0, 0, 1) },
  ],
  [
    { name: 'x2+y2', quadratic: square(1, 1, 0) },
    { name: 'z2', quadratic: square(0, 0, 1) },
    { name: 'x2-y2', quadratic: square(1, -1, 0) },
  ],
  [
    { name: 'x2+y2+z2', quadratic: square(1, 1, 1) },
    { name: '2z2-x2-y2', quadratic: square(-1, -1, 2) },
    { name: 'x2-y2', quadratic: square(1, -1, 0) },
  ],
];

/** The five d functions, by the names of the orbitals. */
export const dFunctions: readonly Form[] = [
  { name: 'z2', quadratic: square(-1, -1, 2) },
  { name: 'x2-y2', quadratic: square(1, -1, 0) },
  ...products,
];

/**
 * Sorts the vectors, rotations and quadratic functions among irreps by projection.
 *
 * @param operations - every operation of the group
 * @param irreps - dimension (2 for a pair) and the character of each operation
 * @returns names by irrep: x, y, z, Rx, Ry, Rz, then quadratic ones
 */
export function sortFunctions(operations: readonly Matrix3[], irreps: readonly ProjectingIrrep[]): string[][] {
  const known = new Map<string, number>();
  const belongs = (form: Form): number => {
    const found = known.get(form.name) ?? irrepOf(form, operations, irreps);
    known.set(form.name, found);
    return found;
  };
  const squares = squareSets.find((set) => set.every((form) => belongs(form) >= 0)) ?? [];
  const all = [...vectors, ...squares, ...products].map((form) => ({ name: form.name, irrep: belongs(form) }));
  return irreps.map((_, k) => all.filter(({ irrep }) => irrep === k).map(({ name }) => name));
}

/** An irrep as its projector needs it. */
export interface ProjectingIrrep {
  dimension: number;
  /** Whether it stands for a complex-conjugate pair. */
  pair: boolean;
  /** By operation. */
  characters: number[];
}

/** Index of the irrep that a function belongs to wholly, or −1 when it is spread over several. */
export function irrepOf(form: Form, operations: readonly Matrix3[], irreps: readonly ProjectingIrrep[]): number {
  const start = components(form);
  const images = operations.map((m) => components(transformed(form, m)));
  return irreps.findIndex(({ dimension, pair, characters }) => {
    const factor = dimension / (pair ? 2 : 1) / operations.length;
    return start.every((x, c) => {
      const projected = images.reduce((sum, image, g) => sum + characters[g]! * image[c]!, 0) * factor;
      return Math.abs(projected - x) < 1e-6;
    });
  });
}

function transformed(form: Form, m: Matrix3): Form {
  if ('polar' in form) return { ...form, polar: apply(m, form.polar) };
  if ('axial' in form) return { ...form, axial: scale(apply(m, form.axial), Math.sign(determinant(m))) };
  return { ...form, quadratic: multiply(m, multiply(form.quadratic, transpose(m))) };
}

function components(form: Form): number[] {
  if ('polar' in form) return form.polar;
  if ('axial' in form) return form.axial;
  const [[xx, xy, xz], [, yy, yz], [, , zz]] = form.quadratic;
  return [xx, yy, zz, xy, xz, yz];
}
