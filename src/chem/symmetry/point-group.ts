import type { Matrix3, Vector3 } from '../geometry/vector.ts';
import { add, apply, determinant, length, multiply, normalise, trace } from '../geometry/vector.ts';
import type { PermutingOperation } from './permuting-operations.ts';

/** Points with a kind each and links between them, such as donor atoms and chelate edges. */
export interface ColouredPoints {
  /** Kind of each point; only equality matters. */
  colours: readonly (string | number)[];
  /** Linked pairs of points; the order within a pair has no meaning. */
  links: readonly (readonly [number, number])[];
}

/** Those operations that carry kinds into like kinds and links into links. */
export function stabiliser(operations: readonly PermutingOperation[], points: ColouredPoints): PermutingOperation[] {
  const linked = new Set(points.links.flatMap(([i, j]) => [`${i} ${j}`, `${j} ${i}`]));
  return operations.filter(
    ({ permutation }) =>
      points.colours.every((colour, i) => points.colours[permutation[i]!] === colour) &&
      points.links.every(([i, j]) => linked.has(`${permutation[i]} ${permutation[j]}`)),
  );
}

/**
 * Schoenflies symbol, in plain text, of the group that keeps a coloured arrangement.
 *
 * @param operations - all operations of the bare points, from `permutingOperations`
 * @param linear - whether the points lie on one line (gives Dinfh or Cinfv)
 * @returns for instance `Oh`, `D4h`, `S4`, `Cinfv`
 */
export function pointGroup(operations: readonly PermutingOperation[], points: ColouredPoints, linear: boolean): string {
  const kept = stabiliser(operations, points);
  if (!linear) return schoenflies(kept.map(({ matrix }) => matrix));
  return kept.some(({ permutation }) => permutation.some((image, i) => image !== i)) ? 'Dinfh' : 'Cinfv';
}

/**
 * Schoenflies symbol of a finite group given by all its matrices.
 *
 * The rotations alone form one of Cn, Dn, T, O, I; the improper operations then decide which group over it.
 */
export function schoenflies(matrices: readonly Matrix3[]): string {
  const rotations = matrices.filter((m) => !isImproper(m));
  const improper = matrices.filter(isImproper);
  const { family, n, axis } = rotationFamily(rotations);
  if (improper.length === 0) return `${family}${n || ''}`;

  const inversion = improper.some((m) => Math.abs(trace(m) + 3) < 1e-3);
  const mirrors = improper.filter((m) => Math.abs(trace(m) - 1) < 1e-3);
  const horizontal = mirrors.some((m) => length(add(apply(m, axis), axis)) < 1e-3);
  if (family === 'T') return inversion ? 'Th' : 'Td';
  if (family === 'O' || family === 'I') return `${family}h`;
  if (family === 'D') return `D${n}${(n === 2 ? inversion : horizontal) ? 'h' : 'd'}`;
  if (n === 1) return inversion ? 'Ci' : 'Cs';
  if (horizontal) return `C${n}h`;
  return mirrors.length > 0 ? `C${n}v` : `S${2 * n}`;
}

function rotationFamily(rotations: readonly Matrix3[]): { family: string; n: number; axis: Vector3 } {
  const orders = rotations.map(orderOf);
  const n = Math.max(...orders);
  const axis = axisOf(rotations[orders.indexOf(n)]!, n);
  if (rotations.length === n) return { family: 'C', n, axis };
  if (rotations.length === 2 * n) return { family: 'D', n, axis };
  const family = { 12: 'T', 24: 'O', 60: 'I' }[rotations.length];
  if (!family) throw new Error(`${rotations.length} rotations, highest order ${n}, form no point group`);
  return { family, n: 0, axis };
}

const isImproper = (m: Matrix3): boolean => determinant(m) < 0;

function orderOf(m: Matrix3): number {
  let power = m;
  let order = 1;
  while (Math.abs(trace(power) - 3) > 1e-3) {
    power = multiply(power, m);
    order++;
  }
  return order;
}

/** Direction that a rotation leaves alone: the sum of a vector over its powers, for the best of three. */
function axisOf(rotation: Matrix3, order: number): Vector3 {
  const unit: Vector3[] = [
    [1, 0, 0],
    [0, 1, 0],
    [0, 0, 1],
  ];
  const sums = unit.map((start) => {
    let image = start;
    let sum: Vector3 = [0, 0, 0];
    for (let k = 0; k < order; k++) {
      sum = add(sum, image);
      image = apply(rotation, image);
    }
    return sum;
  });
  return normalise(sums.reduce((a, b) => (length(b) > length(a) + 1e-9 ? b : a)));
}
