import type { Matrix3 } from '../geometry/vector.ts';
import { multiply, trace, transpose } from '../geometry/vector.ts';
import { fromRows, type Matrix } from './matrix.ts';

/** The real d orbitals, in the order of every 5 × 5 matrix of this folder. */
export const D_ORBITALS = ['z2', 'x2-y2', 'xy', 'xz', 'yz'] as const;

export type DOrbital = (typeof D_ORBITALS)[number];

const [r2, r6] = [Math.SQRT1_2, 1 / Math.sqrt(6)];

/**
 * Each orbital as a traceless symmetric tensor T of norm 1: its angular part is √(15/2) nᵀTn for a unit vector n (mean
 * square over the sphere 1).
 */
export const D_TENSORS: readonly Matrix3[] = [
  [
    [-r6, 0, 0],
    [0, -r6, 0],
    [0, 0, 2 * r6],
  ],
  [
    [r2, 0, 0],
    [0, -r2, 0],
    [0, 0, 0],
  ],
  [
    [0, r2, 0],
    [r2, 0, 0],
    [0, 0, 0],
  ],
  [
    [0, 0, r2],
    [0, 0, 0],
    [r2, 0, 0],
  ],
  [
    [0, 0, 0],
    [0, 0, r2],
    [0, r2, 0],
  ],
];

/**
 * What a rotation (or any orthogonal 3 × 3 matrix; d is even) does to the d orbitals: column b holds the turned orbital
 * b in terms of those that stand still.
 */
export function rotateOrbitals(rotation: Matrix3): Matrix {
  const turned = D_TENSORS.map((tensor) => multiply(multiply(rotation, tensor), transpose(rotation)));
  return fromRows(D_TENSORS.map((a) => turned.map((b) => trace(multiply(a, b)))));
}

/** Generators of turns about x, y and z. */
const TURNS: readonly Matrix3[] = [
  [
    [0, 0, 0],
    [0, 0, -1],
    [0, 1, 0],
  ],
  [
    [0, 0, 1],
    [0, 0, 0],
    [-1, 0, 0],
  ],
  [
    [0, -1, 0],
    [1, 0, 0],
    [0, 0, 0],
  ],
];

/** Antisymmetric real matrices a with l = i·a for the orbital angular momentum about x, y and z, in units of ħ. */
export const ANGULAR_MOMENTUM: readonly Matrix[] = TURNS.map((turn) =>
  // T → JT − TJ, as J is antisymmetric
  fromRows(
    D_TENSORS.map((a) =>
      D_TENSORS.map((b) => trace(multiply(a, multiply(turn, b))) - trace(multiply(a, multiply(b, turn)))),
    ),
  ),
);
