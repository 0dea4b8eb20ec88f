import { dot, type Matrix3, normalise, subtract, type Vector3 } from '../geometry/vector.ts';

/** Springs: along a bond, and between two atoms bound to the same one, which is what an angle comes to. */
const STRETCH = 1;
const BEND = 0.12;
/** Partners are told apart by z first; x and y differ by so little that they do not mix what z tells. */
const SLIGHTLY = 1e-4;
const LEAN = [2 + SLIGHTLY, 2, 1];

export const unit = (n: number, at: number): number[] => Array.from({ length: n }, (_, k) => Number(k === at));
export const inner = (a: readonly number[], b: readonly number[]): number =>
  a.reduce((sum, x, k) => sum + x * b[k]!, 0);

/** Force constants of a plain model, as forms on the displacements of all atoms. */
export interface Springs {
  stretch: number[][];
  all: number[][];
  /** Tells partners apart by the axes of the labels. */
  axes: number[][];
}

/** Force constants of equal springs, and a form that is different along x, y and z of the labels. */
export function springMatrix(
  positions: readonly Vector3[],
  bonds: readonly (readonly [number, number])[],
  frame: Matrix3,
): Springs {
  const n = 3 * positions.length;
  const empty = () => Array.from({ length: n }, () => Array.from({ length: n }, () => 0));
  const [stretch, all, axes] = [empty(), empty(), empty()];
  const spring = (matrix: number[][], i: number, j: number, constant: number): void => {
    const d = normalise(subtract(positions[i]!, positions[j]!));
    const row = unit(n, -1);
    for (let k = 0; k < 3; k++) {
      row[3 * i + k]! += d[k]!;
      row[3 * j + k]! -= d[k]!;
    }
    for (const [a, x] of row.entries()) {
      if (x !== 0) for (const [b, y] of row.entries()) matrix[a]![b]! += constant * x * y;
    }
  };
  for (const [i, j] of bonds) {
    spring(stretch, i, j, STRETCH);
    spring(all, i, j, STRETCH);
  }
  const near = positions.map((_, i) => bonds.flatMap(([a, b]) => (a === i ? [b] : b === i ? [a] : [])));
  for (const around of near)
    around.forEach((i, k) => {
      for (const j of around.slice(k + 1)) spring(all, i, j, BEND);
    });
  positions.forEach((p, i) => {
    const [x, y, z] = frame.map((axis) => dot(p, axis)) as Vector3;
    const place = x * x * (1 + SLIGHTLY) + y * y + (z * z) / 2;
    for (let a = 0; a < 3; a++)
      for (let b = 0; b < 3; b++) {
        const along = frame.reduce((sum, axis, k) => sum + LEAN[k]! * axis[a]! * axis[b]!, 0);
        axes[3 * i + a]![3 * i + b] = along + (a === b ? place : 0);
      }
  });
  return { stretch, all, axes };
}

/** Value of a form, that is uᵀ M u. */
export const form = (matrix: readonly (readonly number[])[], u: readonly number[]): number =>
  u.reduce((sum, x, a) => (x === 0 ? sum : sum + x * inner(matrix[a]!, u)), 0);

/** What the springs of the bonds hold of the energy of a displacement, 0 to 1. */
export const stretchShare = (u: readonly number[], { stretch, all }: Springs): number => {
  const whole = form(all, u);
  return whole < 1e-9 ? 0 : Math.max(0, form(stretch, u) / whole);
};
