/** A model that is fitted: the value at point i, and its derivative by every parameter into `gradient`. */
export type Model = (i: number, parameters: Float64Array, gradient?: Float64Array) => number;

export interface LeastSquaresOptions {
  /** Parameters that stay as they are. */
  locked?: readonly boolean[];
  maxIterations?: number;
}

export interface LeastSquaresFit {
  parameters: Float64Array;
  residualSumOfSquares: number;
  /** Row-major, all parameters; rows and columns of locked ones are zero. Null where the data do not fix them. */
  covariance: Float64Array | null;
  stoppedBy: 'converged' | 'stuck' | 'max-iterations';
  iterations: number;
}

/**
 * Non-linear least squares by the Levenberg–Marquardt method with analytic derivatives.
 *
 * @param data - n ordinates with equal weights
 * @param start - p parameters
 * @returns the parameters at the minimum found; the covariance is s² (JᵀJ)⁻¹ with s² = RSS / (n − p)
 * @see D. W. Marquardt, J. Soc. Ind. Appl. Math. 11 (1963) 431
 */
export function leastSquares(
  model: Model,
  data: ArrayLike<number>,
  start: ArrayLike<number>,
  { locked = [], maxIterations = 200 }: LeastSquaresOptions = {},
): LeastSquaresFit {
  const free = Array.from({ length: start.length }, (_, k) => k).filter((k) => !locked[k]);
  const p = free.length;
  let parameters = Float64Array.from(start);
  let best = sumOfSquares(model, data, parameters);
  let damping = 1e-3;
  let stoppedBy: LeastSquaresFit['stoppedBy'] = 'max-iterations';
  let iterations = 0;
  for (; iterations < maxIterations && p > 0; iterations++) {
    const { normal, gradient } = normalEquations(model, data, parameters, free);
    let improved = false;
    for (let attempt = 0; attempt < 12 && !improved; attempt++) {
      const step = solveDamped(normal, gradient, p, damping);
      if (step) {
        const next = Float64Array.from(parameters);
        free.forEach((k, i) => {
          next[k]! += step[i]!;
        });
        const trial = sumOfSquares(model, data, next);
        if (trial <= best) {
          improved = true;
          const gain = (best - trial) / (best || 1);
          parameters = next;
          best = trial;
          damping = Math.max(damping / 9, 1e-12);
          if (gain < 1e-10) stoppedBy = 'converged';
          break;
        }
      }
      damping *= 7;
    }
    if (stoppedBy === 'converged') break;
    if (!improved) {
      stoppedBy = damping > 1e6 ? 'converged' : 'stuck';
      break;
    }
  }
  if (p === 0) stoppedBy = 'converged';
  const covariance = covarianceOf(model, data, parameters, free, best);
  return { parameters, residualSumOfSquares: best, covariance, stoppedBy, iterations };
}

function sumOfSquares(model: Model, data: ArrayLike<number>, parameters: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < data.length; i++) {
    const difference = data[i]! - model(i, parameters);
    sum += difference * difference;
  }
  return Number.isFinite(sum) ? sum : Number.POSITIVE_INFINITY;
}

function normalEquations(model: Model, data: ArrayLike<number>, parameters: Float64Array, free: readonly number[]) {
  const p = free.length;
  const normal = new Float64Array(p * p);
  const gradient = new Float64Array(p);
  const row = new Float64Array(parameters.length);
  for (let i = 0; i < data.length; i++) {
    const difference = data[i]! - model(i, parameters, row);
    for (let a = 0; a < p; a++) {
      const ja = row[free[a]!]!;
      if (ja === 0) continue;
      gradient[a]! += ja * difference;
      for (let b = 0; b <= a; b++) normal[a * p + b]! += ja * row[free[b]!]!;
    }
  }
  for (let a = 0; a < p; a++) for (let b = 0; b < a; b++) normal[b * p + a] = normal[a * p + b]!;
  return { normal, gradient };
}

/** (N + λ diag N) δ = g by Cholesky on the scaled matrix; null where it is not positive definite. */
function solveDamped(normal: Float64Array, gradient: Float64Array, p: number, damping: number): Float64Array | null {
  const scale = Float64Array.from({ length: p }, (_, a) => Math.sqrt(normal[a * p + a]!) || 1);
  const scaled = Float64Array.from(normal, (v, k) => v / (scale[Math.floor(k / p)]! * scale[k % p]!));
  for (let a = 0; a < p; a++) scaled[a * p + a]! += damping;
  const factor = cholesky(scaled, p);
  if (!factor) return null;
  const solution = solveCholesky(
    factor,
    Float64Array.from(gradient, (g, a) => g / scale[a]!),
    p,
  );
  return solution.map((v, a) => v / scale[a]!);
}

function covarianceOf(
  model: Model,
  data: ArrayLike<number>,
  parameters: Float64Array,
  free: readonly number[],
  rss: number,
): Float64Array | null {
  const p = free.length;
  const all = parameters.length;
  const covariance = new Float64Array(all * all);
  if (p === 0) return covariance;
  if (data.length <= p) return null;
  const { normal } = normalEquations(model, data, parameters, free);
  const scale = Float64Array.from({ length: p }, (_, a) => Math.sqrt(normal[a * p + a]!));
  if (scale.some((s) => s === 0)) return null;
  const factor = cholesky(
    Float64Array.from(normal, (v, k) => v / (scale[Math.floor(k / p)]! * scale[k % p]!)),
    p,
  );
  if (!factor) return null;
  const variance = rss / (data.length - p);
  for (let a = 0; a < p; a++) {
    const unit = new Float64Array(p);
    unit[a] = 1;
    const column = solveCholesky(factor, unit, p);
    for (let b = 0; b < p; b++)
      covariance[free[b]! * all + free[a]!] = (variance * column[b]!) / (scale[a]! * scale[b]!);
  }
  return covariance;
}

function cholesky(matrix: Float64Array, p: number): Float64Array | null {
  const factor = new Float64Array(p * p);
  for (let i = 0; i < p; i++)
    for (let j = 0; j <= i; j++) {
      let sum = matrix[i * p + j]!;
      for (let k = 0; k < j; k++) sum -= factor[i * p + k]! * factor[j * p + k]!;
      if (i === j) {
        if (!(sum > 1e-13)) return null;
        factor[i * p + i] = Math.sqrt(sum);
      } else factor[i * p + j] = sum / factor[j * p + j]!;
    }
  return factor;
}

function solveCholesky(factor: Float64Array, right: Float64Array, p: number): Float64Array {
  const y = new Float64Array(p);
  for (let i = 0; i < p; i++) {
    let sum = right[i]!;
    for (let k = 0; k < i; k++) sum -= factor[i * p + k]! * y[k]!;
    y[i] = sum / factor[i * p + i]!;
  }
  for (let i = p - 1; i >= 0; i--) {
    let sum = y[i]!;
    for (let k = i + 1; k < p; k++) sum -= factor[k * p + i]! * y[k]!;
    y[i] = sum / factor[i * p + i]!;
  }
  return y;
}
