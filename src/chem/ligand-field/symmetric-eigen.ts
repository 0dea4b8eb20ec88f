import { identity, type Matrix, pickColumns } from './matrix.ts';

export interface Eigen {
  /** Eigenvalues, ascending. */
  values: number[];
  /** Orthonormal eigenvectors as columns, in the order of the values. */
  vectors: Matrix;
}

/** Far above what a symmetric matrix needs: six to ten sweeps are the rule. */
const MOST_SWEEPS = 60;

/**
 * Eigenvalues and eigenvectors of a real symmetric matrix by the cyclic Jacobi method.
 *
 * Chosen over Householder and QL for its accuracy in degenerate levels; our matrices have at most 100 rows.
 *
 * @param matrix - square and symmetric; it is left as it is
 * @see G. H. Golub, C. F. Van Loan, Matrix Computations, 4th ed., section 8.5 (from memory)
 */
export function symmetricEigen(matrix: Matrix): Eigen {
  const size = matrix.rows;
  const vectors = identity(size);
  const diagonal = rotateToDiagonal(matrix, vectors);
  const order = [...diagonal.keys()].sort((i, j) => diagonal[i]! - diagonal[j]!);
  return { values: order.map((i) => diagonal[i]!), vectors: pickColumns(vectors, order) };
}

/** Eigenvalues alone, ascending. */
export function symmetricEigenvalues(matrix: Matrix): number[] {
  return rotateToDiagonal(matrix, null).sort((a, b) => a - b);
}

function rotateToDiagonal(matrix: Matrix, vectors: Matrix | null): number[] {
  const n = matrix.rows;
  const a = matrix.data.slice();
  const smallest = Number.EPSILON * Math.sqrt(a.reduce((sum, x) => sum + x * x, 0)) * 1e-2;
  for (let sweep = 0; sweep < MOST_SWEEPS; sweep++) {
    let rotated = false;
    for (let p = 0; p < n - 1; p++) {
      for (let q = p + 1; q < n; q++) {
        const off = a[p * n + q]!;
        if (Math.abs(off) <= smallest) continue;
        rotated = true;
        const theta = (a[q * n + q]! - a[p * n + p]!) / (2 * off);
        const t = (theta < 0 ? -1 : 1) / (Math.abs(theta) + Math.hypot(theta, 1));
        const c = 1 / Math.hypot(t, 1);
        const s = t * c;
        rotateColumns(a, n, p, q, c, s);
        rotateRows(a, n, p, q, c, s);
        if (vectors) rotateColumns(vectors.data, n, p, q, c, s);
      }
    }
    if (!rotated) break;
  }
  return Array.from({ length: n }, (_, i) => a[i * n + i]!);
}

function rotateColumns(a: Float64Array, n: number, p: number, q: number, c: number, s: number): void {
  for (let i = 0; i < n * n; i += n) {
    const [x, y] = [a[i + p]!, a[i + q]!];
    a[i + p] = c * x - s * y;
    a[i + q] = s * x + c * y;
  }
}

function rotateRows(a: Float64Array, n: number, p: number, q: number, c: number, s: number): void {
  for (let j = 0; j < n; j++) {
    const [x, y] = [a[p * n + j]!, a[q * n + j]!];
    a[p * n + j] = c * x - s * y;
    a[q * n + j] = s * x + c * y;
  }
}
