/**
 * Eigenvectors of a real symmetric matrix by Jacobi's rotations, one per row of the answer, each of length 1.
 *
 * @param matrix - square and symmetric; left as it is
 */
export function eigenvectors(matrix: readonly (readonly number[])[]): number[][] {
  const a = matrix.map((row) => [...row]);
  const v = a.map((_, i) => a.map((_, j) => Number(i === j)));
  for (let sweep = 0; sweep < 100 && offDiagonal(a) > 1e-26; sweep++) {
    for (let p = 0; p < a.length; p++) for (let q = p + 1; q < a.length; q++) rotate(a, v, p, q);
  }
  return v;
}

function offDiagonal(a: readonly (readonly number[])[]): number {
  const square = (x: number): number => x * x;
  const all = a.flat().reduce((sum, x) => sum + square(x), 0);
  const off = a.reduce((sum, row, i) => sum + row.reduce((s, x, j) => (i === j ? s : s + square(x)), 0), 0);
  return off / (all || 1);
}

/** Turns rows and columns p and q so that a[p][q] vanishes. */
function rotate(a: number[][], v: number[][], p: number, q: number): void {
  const off = a[p]![q]!;
  if (off === 0) return;
  const theta = (a[q]![q]! - a[p]![p]!) / (2 * off);
  const t = (theta < 0 ? -1 : 1) / (Math.abs(theta) + Math.hypot(theta, 1));
  const c = 1 / Math.hypot(t, 1);
  const s = t * c;
  for (const row of a) [row[p], row[q]] = [c * row[p]! - s * row[q]!, s * row[p]! + c * row[q]!];
  for (const m of [a, v]) {
    const [rowP, rowQ] = [m[p]!, m[q]!];
    m[p] = rowP.map((x, k) => c * x - s * rowQ[k]!);
    m[q] = rowP.map((x, k) => s * x + c * rowQ[k]!);
  }
}
