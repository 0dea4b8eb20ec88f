import { type Matrix, pickColumns, product, within, zeros } from './matrix.ts';
import { symmetricEigen } from './symmetric-eigen.ts';

/** Part of a space in which an operator has one value; orthonormal columns. */
export interface Eigenspace {
  value: number;
  basis: Matrix;
}

/** Eigenvalues of S², L² and of projectors lie at least 0.75 apart. */
const APART = 0.1;

/**
 * Splits the space of the columns of `basis` by an operator that keeps it whole and whose distinct eigenvalues lie well
 * apart (S², L²); ascending.
 */
export function splitBy(operator: Matrix, basis: Matrix): Eigenspace[] {
  const { values, vectors } = symmetricEigen(within(basis, operator));
  const starts = values.flatMap((value, i) => (i === 0 || value - values[i - 1]! > APART ? [i] : []));
  return starts.map((start, k) => {
    const end = starts[k + 1] ?? values.length;
    const indices = Array.from({ length: end - start }, (_, i) => start + i);
    return { value: values[start]!, basis: product(basis, pickColumns(vectors, indices)) };
  });
}

/** Orthonormal columns that span the range of a symmetric projector, by elimination with the largest diagonal first. */
export function rangeOf(projector: Matrix): Matrix {
  const n = projector.rows;
  const rest = projector.data.slice();
  const diagonal = (i: number): number => rest[i * n + i]!;
  const rank = Math.round(Array.from({ length: n }, (_, i) => diagonal(i)).reduce((sum, x) => sum + x, 0));
  const basis = zeros(n, rank);
  for (let column = 0; column < rank; column++) {
    let pivot = 0;
    for (let i = 1; i < n; i++) if (diagonal(i) > diagonal(pivot)) pivot = i;
    const norm = Math.sqrt(diagonal(pivot));
    const vector = Float64Array.from({ length: n }, (_, i) => rest[i * n + pivot]! / norm);
    for (let i = 0; i < n; i++) {
      basis.data[i * rank + column] = vector[i]!;
      for (let j = 0; j < n; j++) rest[i * n + j]! -= vector[i]! * vector[j]!;
    }
  }
  return basis;
}

/** The S of S² = S(S+1), or the L of L² = L(L+1), as a whole or half number. */
export function quantumNumber(square: number): number {
  return Math.round(Math.sqrt(1 + 4 * Math.max(0, square)) - 1) / 2;
}
