import { implicitQl, NOTHING } from './tridiagonal.ts';

/** Eigenvalues and eigenvectors of a Hermitian matrix. */
export interface HermitianEigen {
  /** Ascending. */
  values: Float64Array;
  /** Vector k in row k: its real and imaginary parts at k·n + i. */
  re: Float64Array;
  im: Float64Array;
}

/**
 * Diagonalises a complex Hermitian matrix by Householder's reflections to a real tridiagonal one and the QL method.
 *
 * @param re - n × n, row after row, symmetric; is used up
 * @param im - likewise, antisymmetric
 * @see D. J. Mueller, Numer. Math. 8 (1966) 72, for the reduction (from memory)
 */
export function hermitianEigen(re: Float64Array, im: Float64Array, n: number): HermitianEigen {
  const [diagonal, off, scales] = [new Float64Array(n), new Float64Array(n), new Float64Array(n)];
  // Element (i − 1, i) of the tridiagonal matrix, whose phase is taken off afterwards.
  const [linkRe, linkIm] = [new Float64Array(n), new Float64Array(n)];
  const [qRe, qIm] = [new Float64Array(n), new Float64Array(n)];
  for (let i = n - 1; i > 0; i--) {
    const row = i * n;
    const last = row + i - 1;
    // Column i above the diagonal is the conjugate of row i before it; from here on the row holds the column.
    let rest = 0;
    for (let k = row; k <= last; k++) {
      im[k] = -im[k]!;
      if (k < last) rest += re[k]! * re[k]! + im[k]! * im[k]!;
    }
    diagonal[i] = re[row + i]!;
    const size = Math.hypot(re[last]!, im[last]!);
    if (rest < NOTHING) {
      [linkRe[i], linkIm[i]] = [re[last]!, im[last]!];
      continue;
    }
    const norm = Math.sqrt(rest + size * size);
    const [cos, sin] = size === 0 ? [1, 0] : [re[last]! / size, im[last]! / size];
    [linkRe[i], linkIm[i]] = [-cos * norm, -sin * norm];
    re[last] = re[last]! + cos * norm;
    im[last] = im[last]! + sin * norm;
    scales[i] = norm * norm + norm * size;
    reflect(re, im, n, i, scales[i]!, qRe, qIm);
  }
  diagonal[0] = re[0]!;
  const rows = reflections(re, im, n, scales, linkRe, linkIm);
  for (let i = 1; i < n; i++) off[i] = Math.hypot(linkRe[i]!, linkIm[i]!);
  implicitQl(diagonal, off, n, [rows.re, rows.im]);
  return sorted(diagonal, rows, n);
}

/** A − u q† − q u† on the leading i rows, lower triangle; u is row i. */
function reflect(
  re: Float64Array,
  im: Float64Array,
  n: number,
  i: number,
  h: number,
  qRe: Float64Array,
  qIm: Float64Array,
): void {
  const u = i * n;
  for (let j = 0; j < i; j++) {
    const row = j * n;
    const ur = re[u + j]!;
    const ui = im[u + j]!;
    let sr = 0;
    let si = 0;
    for (let k = 0; k < j; k++) {
      const ar = re[row + k]!;
      const ai = im[row + k]!;
      const vr = re[u + k]!;
      const vi = im[u + k]!;
      sr += ar * vr - ai * vi;
      si += ar * vi + ai * vr;
      // Element (k, j) is the conjugate of (j, k).
      qRe[k] = qRe[k]! + ar * ur + ai * ui;
      qIm[k] = qIm[k]! + ar * ui - ai * ur;
    }
    qRe[j] = sr + re[row + j]! * ur;
    qIm[j] = si + re[row + j]! * ui;
  }
  let projection = 0;
  for (let j = 0; j < i; j++) projection += re[u + j]! * qRe[j]! + im[u + j]! * qIm[j]!;
  const shift = projection / h / (2 * h);
  for (let j = 0; j < i; j++) {
    qRe[j] = qRe[j]! / h - shift * re[u + j]!;
    qIm[j] = qIm[j]! / h - shift * im[u + j]!;
  }
  for (let j = 0; j < i; j++) {
    const row = j * n;
    const ur = re[u + j]!;
    const ui = im[u + j]!;
    const pr = qRe[j]!;
    const pi = qIm[j]!;
    for (let k = 0; k <= j; k++) {
      const vr = re[u + k]!;
      const vi = im[u + k]!;
      const wr = qRe[k]!;
      const wi = qIm[k]!;
      re[row + k] = re[row + k]! - (ur * wr + ui * wi) - (pr * vr + pi * vi);
      im[row + k] = im[row + k]! - (ui * wr - ur * wi) - (pi * vr - pr * vi);
    }
  }
}

/** (Q D)ᵀ, D being the phases that make the tridiagonal matrix real. */
function reflections(
  re: Float64Array,
  im: Float64Array,
  n: number,
  scales: Float64Array,
  linkRe: Float64Array,
  linkIm: Float64Array,
): { re: Float64Array; im: Float64Array } {
  const rows = { re: new Float64Array(n * n), im: new Float64Array(n * n) };
  let [cos, sin] = [1, 0];
  for (let i = 0; i < n; i++) {
    const size = i > 0 ? Math.hypot(linkRe[i]!, linkIm[i]!) : 0;
    if (size > 0) {
      const c = linkRe[i]! / size;
      const s = -linkIm[i]! / size;
      [cos, sin] = [cos * c - sin * s, cos * s + sin * c];
    }
    rows.re[i * n + i] = cos;
    rows.im[i * n + i] = sin;
  }
  for (let i = 1; i < n; i++) {
    const h = scales[i]!;
    if (h === 0) continue;
    for (let r = 0; r < i; r++) {
      let sr = 0;
      let si = 0;
      for (let k = 0; k < i; k++) {
        const xr = rows.re[r * n + k]!;
        const xi = rows.im[r * n + k]!;
        const ur = re[i * n + k]!;
        const ui = im[i * n + k]!;
        sr += xr * ur + xi * ui;
        si += xi * ur - xr * ui;
      }
      sr /= h;
      si /= h;
      for (let k = 0; k < i; k++) {
        const ur = re[i * n + k]!;
        const ui = im[i * n + k]!;
        rows.re[r * n + k] = rows.re[r * n + k]! - (sr * ur - si * ui);
        rows.im[r * n + k] = rows.im[r * n + k]! - (sr * ui + si * ur);
      }
    }
  }
  return rows;
}

function sorted(values: Float64Array, rows: { re: Float64Array; im: Float64Array }, n: number): HermitianEigen {
  const order = [...values.keys()].sort((i, j) => values[i]! - values[j]!);
  const [re, im] = [new Float64Array(n * n), new Float64Array(n * n)];
  order.forEach((from, to) => {
    re.set(rows.re.subarray(from * n, (from + 1) * n), to * n);
    im.set(rows.im.subarray(from * n, (from + 1) * n), to * n);
  });
  return { values: Float64Array.from(order, (i) => values[i]!), re, im };
}
