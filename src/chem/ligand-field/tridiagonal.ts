/** Squares below this are the dregs of underflow. */
export const NOTHING = 1e-280;
/** Far above what a value needs: two or three turns are the rule. */
const MOST_TURNS = 60;

/**
 * Brings a real symmetric matrix to tridiagonal form by Householder's reflections, in place and without allocating.
 *
 * @param a - n × n, row after row, of which the lower triangle is read; row i then holds the vector of reflection i
 * @param diagonal - n diagonal elements, filled in
 * @param off - element i, for i ≥ 1, couples i − 1 with i, filled in
 * @param scales - half the squared length of each reflection's vector (0: none was needed), filled in
 * @see R. S. Martin, C. Reinsch, J. H. Wilkinson, Numer. Math. 11 (1968) 181 (from memory)
 */
export function tridiagonalise(
  a: Float64Array,
  n: number,
  diagonal: Float64Array,
  off: Float64Array,
  scales: Float64Array,
): void {
  for (let i = n - 1; i > 0; i--) {
    const row = i * n;
    const last = row + i - 1;
    let rest = 0;
    for (let k = row; k < last; k++) rest += a[k]! * a[k]!;
    diagonal[i] = a[row + i]!;
    if (rest < NOTHING) {
      off[i] = a[last]!;
      scales[i] = 0;
      continue;
    }
    const f = a[last]!;
    const g = f > 0 ? -Math.sqrt(rest + f * f) : Math.sqrt(rest + f * f);
    const h = rest + f * f - f * g;
    off[i] = g;
    scales[i] = h;
    a[last] = f - g;
    reflect(a, n, i, h, diagonal);
  }
  diagonal[0] = a[0]!;
}

/** A − u qᵀ − q uᵀ on the leading i rows, u being row i; `q` is scratch of which the first i elements are used. */
function reflect(a: Float64Array, n: number, i: number, h: number, q: Float64Array): void {
  const u = i * n;
  for (let j = 0; j < i; j++) {
    const row = j * n;
    const uj = a[u + j]!;
    let sum = 0;
    for (let k = 0; k < j; k++) {
      const x = a[row + k]!;
      sum += x * a[u + k]!;
      q[k] = q[k]! + x * uj;
    }
    q[j] = sum + a[row + j]! * uj;
  }
  let projection = 0;
  for (let j = 0; j < i; j++) projection += q[j]! * a[u + j]!;
  const shift = projection / h / (2 * h);
  for (let j = 0; j < i; j++) q[j] = q[j]! / h - shift * a[u + j]!;
  for (let j = 0; j < i; j++) {
    const row = j * n;
    const uj = a[u + j]!;
    const qj = q[j]!;
    for (let k = 0; k <= j; k++) a[row + k] = a[row + k]! - uj * q[k]! - qj * a[u + k]!;
  }
}

/**
 * Eigenvalues of a symmetric tridiagonal matrix by the QL method with implicit shifts, in place; not sorted.
 *
 * @param diagonal - n elements; becomes the eigenvalues
 * @param off - element i, for i ≥ 1, couples i − 1 with i; is used up
 * @param rows - n × width matrices whose rows are turned with the values: row k then belongs to value k
 * @see A. Dubrulle, R. S. Martin, J. H. Wilkinson, Numer. Math. 12 (1968) 377 (from memory)
 */
export function implicitQl(
  diagonal: Float64Array,
  off: Float64Array,
  n: number,
  rows: readonly Float64Array[] = [],
  width = n,
): void {
  for (let i = 1; i < n; i++) off[i - 1] = off[i]!;
  off[n - 1] = 0;
  for (let l = 0; l < n; l++) {
    for (let turn = 0; turn < MOST_TURNS; turn++) {
      let m = l;
      for (; m < n - 1; m++) {
        const size = Math.abs(diagonal[m]!) + Math.abs(diagonal[m + 1]!);
        if (Math.abs(off[m]!) <= Number.EPSILON * size) break;
      }
      if (m === l) break;
      sweep(diagonal, off, l, m, rows, width);
    }
  }
}

function sweep(
  diagonal: Float64Array,
  off: Float64Array,
  l: number,
  m: number,
  rows: readonly Float64Array[],
  width: number,
): void {
  const lean = (diagonal[l + 1]! - diagonal[l]!) / (2 * off[l]!);
  const root = Math.sqrt(lean * lean + 1);
  let g = diagonal[m]! - diagonal[l]! + off[l]! / (lean + (lean < 0 ? -root : root));
  let s = 1;
  let c = 1;
  let p = 0;
  for (let i = m - 1; i >= l; i--) {
    const f = s * off[i]!;
    const b = c * off[i]!;
    const r = Math.sqrt(f * f + g * g);
    off[i + 1] = r;
    if (r === 0) {
      diagonal[i + 1] = diagonal[i + 1]! - p;
      off[m] = 0;
      return;
    }
    s = f / r;
    c = g / r;
    g = diagonal[i + 1]! - p;
    const t = (diagonal[i]! - g) * s + 2 * c * b;
    p = s * t;
    diagonal[i + 1] = g + p;
    g = c * t - b;
    for (const matrix of rows) turnRows(matrix, i * width, width, c, s);
  }
  diagonal[l] = diagonal[l]! - p;
  off[l] = g;
  off[m] = 0;
}

function turnRows(matrix: Float64Array, start: number, width: number, c: number, s: number): void {
  const next = start + width;
  for (let k = 0; k < width; k++) {
    const x = matrix[start + k]!;
    const y = matrix[next + k]!;
    matrix[next + k] = s * x + c * y;
    matrix[start + k] = c * x - s * y;
  }
}
