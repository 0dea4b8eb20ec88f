import { expect, test } from 'vitest';
import { fromRows, product, transpose, within } from '#src/chem/ligand-field/matrix.ts';
import { symmetricEigen, symmetricEigenvalues } from '#src/chem/ligand-field/symmetric-eigen.ts';

// Second differences: eigenvalues 2 − 2 cos(kπ/(n + 1)), common knowledge.
test('finds the known eigenvalues of the second-difference matrix', () => {
  const n = 30;
  const rows = Array.from({ length: n }, (_, i) =>
    Array.from({ length: n }, (_, j) => (i === j ? 2 : Math.abs(i - j) === 1 ? -1 : 0)),
  );
  const values = symmetricEigenvalues(fromRows(rows));
  for (const [k, value] of values.entries()) {
    expect(value).toBeCloseTo(2 - 2 * Math.cos(((k + 1) * Math.PI) / (n + 1)), 12);
  }
});

test('gives orthonormal vectors that diagonalise, degenerate ones too', () => {
  const n = 12;
  // A reflection I − 2vvᵀ has −1 once and 1 eleven times.
  const v = Array.from({ length: n }, (_, i) => i + 1);
  const norm = v.reduce((sum, x) => sum + x * x, 0);
  const matrix = fromRows(v.map((x, i) => v.map((y, j) => (i === j ? 1 : 0) - (2 * x * y) / norm)));
  const { values, vectors } = symmetricEigen(matrix);
  for (const [i, value] of values.entries()) expect(value).toBeCloseTo(i === 0 ? -1 : 1, 12);
  const overlap = product(transpose(vectors), vectors);
  const diagonal = within(vectors, matrix);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      expect(overlap.data[i * n + j]).toBeCloseTo(i === j ? 1 : 0, 12);
      expect(diagonal.data[i * n + j]).toBeCloseTo(i === j ? values[i]! : 0, 12);
    }
  }
});
