import { determinant, type Matrix3, type Vector3 } from '../geometry/vector.ts';
import { rotateOrbitals } from './d-orbitals.ts';
import type { Matrix } from './matrix.ts';

/** Irreps of the group O; those of Td bear the same names, those of Oh that are even take a `g`. */
export const CUBIC_IRREPS = ['A1', 'A2', 'E', 'T1', 'T2'] as const;

export type CubicIrrep = (typeof CUBIC_IRREPS)[number];

export const IRREP_DIMENSION: Record<CubicIrrep, number> = { A1: 1, A2: 1, E: 2, T1: 3, T2: 3 };

export interface CubicRotation {
  /** What it does to the d orbitals. */
  orbitals: Matrix;
  /** Diagonal element of its matrix in each irrep, for one chosen row (z² of E, z of T1, xy of T2). */
  row: Record<CubicIrrep, number>;
}

/**
 * The 24 rotations of the cube with axes x, y and z.
 *
 * They serve Oh, whose inversion leaves d orbitals as they are, and Td, whose S4 and σd are C4 and C2′ times that
 * inversion.
 */
export const CUBIC_ROTATIONS: readonly CubicRotation[] = signedPermutations()
  .filter((matrix) => determinant(matrix) > 0)
  .map((matrix) => {
    const orbitals = rotateOrbitals(matrix);
    const at = (i: number, j: number): number => orbitals.data[i * 5 + j]!;
    return {
      orbitals,
      row: {
        A1: 1,
        // A2 is the antisymmetric square of E, which z² and x²−y² span.
        A2: Math.round(at(0, 0) * at(1, 1) - at(0, 1) * at(1, 0)),
        E: at(0, 0),
        T1: matrix[2][2],
        T2: at(2, 2),
      },
    };
  });

function signedPermutations(): Matrix3[] {
  const signs = [1, -1];
  const axes = [0, 1, 2];
  const row = (axis: number, sign: number): Vector3 => [
    axis === 0 ? sign : 0,
    axis === 1 ? sign : 0,
    axis === 2 ? sign : 0,
  ];
  const orders = axes.flatMap((i) =>
    axes.filter((j) => j !== i).map((j): [number, number, number] => [i, j, 3 - i - j]),
  );
  return orders.flatMap(([i, j, k]) =>
    signs.flatMap((a) => signs.flatMap((b) => signs.map((c): Matrix3 => [row(i, a), row(j, b), row(k, c)]))),
  );
}
