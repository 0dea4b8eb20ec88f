/** What a model gives at some parameters. */
export interface ModelValues {
  /** One value per observation. */
  values: readonly number[];
  /** Derivative of each value by each parameter. */
  gradients: readonly (readonly number[])[];
}

export interface LeastSquaresProblem {
  model: (parameters: readonly number[]) => ModelValues;
  observed: readonly number[];
  /** 1/u² of each observation. */
  weights: readonly number[];
  start: readonly number[];
  /** Parameters stay within these. */
  lower: readonly number[];
  upper: readonly number[];
}

export interface LeastSquares {
  parameters: number[];
  /** Observed − calculated. */
  residuals: number[];
  gradients: readonly (readonly number[])[];
  /** Σ weight · residual². */
  sum: number;
  converged: boolean;
}

const MOST_STEPS = 100;
/** Relative change of all parameters, and of the sum, below which the search rests. */
const ENOUGH = 1e-10;

/**
 * Weighted least squares by the damped Gauss–Newton method with the model's own derivatives.
 *
 * @returns never NaN for a model that gives finite values within the bounds; `converged` tells whether the steps died out
 * @see D. W. Marquardt, J. Soc. Ind. Appl. Math. 11 (1963) 431 (from memory)
 */
export function leastSquares(problem: LeastSquaresProblem): LeastSquares {
  const { observed, weights, lower, upper } = problem;
  const evaluate = (parameters: number[]): LeastSquares => {
    const { values, gradients } = problem.model(parameters);
    const residuals = observed.map((y, i) => y - values[i]!);
    const sum = residuals.reduce((total, r, i) => total + weights[i]! * r * r, 0);
    return { parameters, residuals, gradients, sum, converged: false };
  };
  const within = (p: readonly number[]) => p.map((x, i) => Math.min(upper[i]!, Math.max(lower[i]!, x)));
  let best = evaluate(within(problem.start));
  let damping = 1e-3;
  for (let step = 0; step < MOST_STEPS; step++) {
    const { normal, slope } = normalEquations(best.gradients, weights, best.residuals);
    const damped = normal.map((row, i) => row.map((x, j) => (i === j ? x * (1 + damping) + Number.MIN_VALUE : x)));
    const inverse = invertSymmetric(damped);
    const move = inverse?.map((row) => row.reduce((total, x, j) => total + x * slope[j]!, 0));
    const next = move && evaluate(within(best.parameters.map((p, i) => p + move[i]!)));
    if (next && next.sum <= best.sum) {
      const still = next.parameters.every((p, i) => Math.abs(p - best.parameters[i]!) <= ENOUGH * (Math.abs(p) + 1));
      const flat = best.sum - next.sum <= ENOUGH * best.sum;
      best = next;
      damping = Math.max(damping / 10, 1e-12);
      if (still || (flat && damping <= 1e-3)) return { ...best, converged: true };
    } else {
      damping *= 10;
      if (damping > 1e12) return { ...best, converged: next !== undefined };
    }
  }
  return best;
}

/** JᵀWJ and JᵀWr. */
function normalEquations(
  gradients: ModelValues['gradients'],
  weights: readonly number[],
  residuals: readonly number[],
) {
  const size = gradients[0]?.length ?? 0;
  const normal = Array.from({ length: size }, () => new Array<number>(size).fill(0));
  const slope = new Array<number>(size).fill(0);
  gradients.forEach((gradient, k) => {
    gradient.forEach((x, i) => {
      slope[i]! += weights[k]! * x * residuals[k]!;
      gradient.forEach((y, j) => {
        normal[i]![j]! += weights[k]! * x * y;
      });
    });
  });
  return { normal, slope };
}

/**
 * Covariance of the parameters for observations whose weights are 1/u²: (JᵀWJ)⁻¹.
 *
 * @returns null where the observations do not bear all parameters
 */
export function covariance(gradients: ModelValues['gradients'], weights: readonly number[]): number[][] | null {
  return invertSymmetric(
    normalEquations(
      gradients,
      weights,
      weights.map(() => 0),
    ).normal,
  );
}

/** A correlation nearer to ±1 than this leaves the parameters undetermined. */
const SINGULAR = 1e-12;

/** Inverse of a symmetric positive matrix, scaled to a unit diagonal first; null where it is singular. */
export function invertSymmetric(matrix: readonly (readonly number[])[]): number[][] | null {
  const n = matrix.length;
  const scale = matrix.map((row, i) => (row[i]! > 0 ? 1 / Math.sqrt(row[i]!) : 0));
  if (scale.some((s) => !(s > 0 && Number.isFinite(s)))) return null;
  const a = matrix.map((row, i) => [
    ...row.map((x, j) => x * scale[i]! * scale[j]!),
    ...row.map((_, j) => (i === j ? 1 : 0)),
  ]);
  for (let i = 0; i < n; i++) {
    const pivot = a[i]![i]!;
    if (!(pivot > SINGULAR)) return null;
    a[i] = a[i]!.map((x) => x / pivot);
    for (let k = 0; k < n; k++) {
      const factor = a[k]![i]!;
      if (k !== i) a[k] = a[k]!.map((x, j) => x - factor * a[i]![j]!);
    }
  }
  return a.map((row, i) => row.slice(n).map((x, j) => x * scale[i]! * scale[j]!));
}
