import { type Matrix, zeros } from './matrix.ts';
import { implicitQl, tridiagonalise } from './tridiagonal.ts';

export interface Eigen {
  /** Eigenvalues, ascending. */
  values: number[];
  /** Orthonormal eigenvectors as columns, in the order of the values. */
  vectors: Matrix;
}

/**
 * Eigenvalues and eigenvectors of a real symmetric matrix by Householder's reduction and the QL method: accurate to a
 * few units of rounding of the largest value, which for degenerate levels of d electrons is far below 1e-6 cm⁻¹.
 *
 * @param matrix - square and symmetric; it is left as it is
 */
export function symmetricEigen(matrix: Matrix): Eigen {
  const n = matrix.rows;
  const a = matrix.data.slice();
  const [diagonal, off, scales] = [new Float64Array(n), new Float64Array(n), new Float64Array(n)];
  tridiagonalise(a, n, diagonal, off, scales);
  const rows = reflections(a, n, scales);
  implicitQl(diagonal, off, n, [rows]);
  const order = [...diagonal.keys()].sort((i, j) => diagonal[i]! - diagonal[j]!);
  const vectors = zeros(n);
  order.forEach((from, column) => {
    for (let i = 0; i < n; i++) vectors.data[i * n + column] = rows[from * n + i]!;
  });
  return { values: order.map((i) => diagonal[i]!), vectors };
}

/** Product of the reflections, transposed, so that what QL turns are rows. */
function reflections(a: Float64Array, n: number, scales: Float64Array): Float64Array {
  const rows = new Float64Array(n * n);
  for (let i = 0; i < n; i++) rows[i * n + i] = 1;
  for (let i = 1; i < n; i++) {
    const h = scales[i]!;
    if (h === 0) continue;
    for (let r = 0; r < i; r++) {
      let sum = 0;
      for (let k = 0; k < i; k++) sum += rows[r * n + k]! * a[i * n + k]!;
      const factor = sum / h;
      for (let k = 0; k < i; k++) rows[r * n + k] = rows[r * n + k]! - factor * a[i * n + k]!;
    }
  }
  return rows;
}

/** Eigenvalues alone, ascending. */
export function symmetricEigenvalues(matrix: Matrix): number[] {
  const values = new Float64Array(matrix.rows);
  new EigenvalueSolver(matrix.rows).solve(matrix.data.slice(), matrix.rows, values);
  return [...values];
}

/** Eigenvalues of many small matrices, one after another, in memory that is set aside once. */
export class EigenvalueSolver {
  readonly #off: Float64Array;
  readonly #scales: Float64Array;

  /** @param size - rows of the largest matrix to come */
  constructor(size: number) {
    this.#off = new Float64Array(size);
    this.#scales = new Float64Array(size);
  }

  /**
   * @param a - n × n symmetric, lower triangle read; is used up
   * @param values - n eigenvalues, ascending, filled in
   */
  solve(a: Float64Array, n: number, values: Float64Array): void {
    if (n === 1) {
      values[0] = a[0]!;
    } else if (n === 2) {
      const mean = (a[0]! + a[3]!) / 2;
      const half = Math.hypot((a[0]! - a[3]!) / 2, a[2]!);
      values[0] = mean - half;
      values[1] = mean + half;
    } else {
      tridiagonalise(a, n, values, this.#off, this.#scales);
      implicitQl(values, this.#off, n);
      insertionSort(values, n);
    }
  }
}

function insertionSort(values: Float64Array, n: number): void {
  for (let i = 1; i < n; i++) {
    const value = values[i]!;
    let j = i - 1;
    for (; j >= 0 && values[j]! > value; j--) values[j + 1] = values[j]!;
    values[j + 1] = value;
  }
}
