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
  let [all, off] = [0, 0];
  for (const [i, row] of a.entries()) {
    for (const [j, x] of row.entries()) {
      all += x * x;
      if (i !== j) off += x * x;
    }
  }
  return off / (all || 1);
}

/** Turns rows and columns p and q so that a[p][q] vanishes. Written in place: this is the innermost loop of a search. */
function rotate(a: number[][], v: number[][], p: number, q: number): void {
  const off = a[p]![q]!;
  if (off === 0) return;
  const theta = (a[q]![q]! - a[p]![p]!) / (2 * off);
  const t = (theta < 0 ? -1 : 1) / (Math.abs(theta) + Math.sqrt(theta * theta + 1));
  const c = 1 / Math.sqrt(t * t + 1);
  const s = t * c;
  for (const row of a) {
    const [x, y] = [row[p]!, row[q]!];
    row[p] = c * x - s * y;
    row[q] = s * x + c * y;
  }
  for (const m of [a, v]) {
    const [rowP, rowQ] = [m[p]!, m[q]!];
    for (let k = 0; k < rowP.length; k++) {
      const [x, y] = [rowP[k]!, rowQ[k]!];
      rowP[k] = c * x - s * y;
      rowQ[k] = s * x + c * y;
    }
  }
}
