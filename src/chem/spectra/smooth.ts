/** A curve with a parabola laid round each point by least squares. */
export interface LocalFit {
  x: Float64Array;
  y: Float64Array;
  /** Second derivative. */
  second: Float64Array;
  /** Standard deviation of noise in each smoothed y, and in each second derivative. */
  noise: Float64Array;
  secondNoise: Float64Array;
  /** Highest minus lowest smoothed y. */
  range: number;
}

/** More points than these are averaged in groups first; bands are broader by far. */
const MOST_POINTS = 4000;
const LEAST_SIDE = 4;
const MOST_SIDE = 40;

/**
 * Smoothed values and second derivatives on uneven abscissae.
 *
 * @param x - ascending
 * @param halfWidth - of the stretch about each point, in units of x; at least 4 points a side are taken, at most 40
 */
export function smooth(x: ArrayLike<number>, y: ArrayLike<number>, halfWidth: number): LocalFit {
  const points = thinned(x, y);
  const n = points.x.length;
  const [fitted, second] = [new Float64Array(n), new Float64Array(n)];
  const sigma = noiseOf(points.y);
  const [noise, secondNoise] = [new Float64Array(n), new Float64Array(n)];
  for (let i = 0; i < n; i++) {
    let [from, to] = [i, i];
    while (
      from > 0 &&
      i - from < MOST_SIDE &&
      (i - from < LEAST_SIDE || points.x[i]! - points.x[from - 1]! <= halfWidth)
    )
      from--;
    while (to < n - 1 && to - i < MOST_SIDE && (to - i < LEAST_SIDE || points.x[to + 1]! - points.x[i]! <= halfWidth))
      to++;
    const local = parabola(points, i, from, to);
    fitted[i] = local.value;
    second[i] = local.second;
    noise[i] = sigma * local.spread;
    secondNoise[i] = sigma * local.secondSpread;
  }
  let [low, high] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY];
  for (const value of fitted) {
    low = Math.min(low, value);
    high = Math.max(high, value);
  }
  return { x: points.x, y: fitted, second, noise, secondNoise, range: high - low };
}

/** Points without gaps and with rising x, in groups where there are very many. */
function thinned(x: ArrayLike<number>, y: ArrayLike<number>): { x: Float64Array; y: Float64Array } {
  const kept: number[] = [];
  for (let i = 0; i < x.length; i++) {
    const isNew = kept.length === 0 || x[i]! > x[kept.at(-1)!]!;
    if (isNew && Number.isFinite(y[i]!) && Number.isFinite(x[i]!)) kept.push(i);
  }
  const size = Math.ceil(kept.length / MOST_POINTS) || 1;
  const groups = Math.ceil(kept.length / size);
  const mean = (values: ArrayLike<number>, group: number): number => {
    const members = kept.slice(group * size, (group + 1) * size);
    return members.reduce((sum, i) => sum + values[i]!, 0) / members.length;
  };
  return {
    x: Float64Array.from({ length: groups }, (_, g) => mean(x, g)),
    y: Float64Array.from({ length: groups }, (_, g) => mean(y, g)),
  };
}

/** Noise of one point, from the median size of third differences, which a smooth curve hardly has. */
function noiseOf(y: Float64Array): number {
  const sizes: number[] = [];
  for (let i = 3; i < y.length; i++) sizes.push(Math.abs(y[i]! - 3 * y[i - 1]! + 3 * y[i - 2]! - y[i - 3]!));
  if (sizes.length === 0) return 0;
  sizes.sort((a, b) => a - b);
  return (1.4826 * sizes[Math.floor(sizes.length / 2)]!) / Math.sqrt(20);
}

/** Least-squares parabola through points from..to, at point i; `spread` and `secondSpread` are u of value and
 * second derivative per u(y). */
function parabola(points: { x: Float64Array; y: Float64Array }, i: number, from: number, to: number) {
  const scale = Math.max(points.x[i]! - points.x[from]!, points.x[to]! - points.x[i]!) || 1;
  const s = [0, 0, 0, 0, 0];
  const b = [0, 0, 0];
  for (let j = from; j <= to; j++) {
    const t = (points.x[j]! - points.x[i]!) / scale;
    const y = points.y[j]!;
    for (let k = 0, power = 1; k < 5; k++, power *= t) {
      s[k]! += power;
      if (k < 3) b[k]! += power * y;
    }
  }
  const [s0, s1, s2, s3, s4] = s as [number, number, number, number, number];
  const [b0, b1, b2] = b as [number, number, number];
  const determinant = s0 * (s2 * s4 - s3 * s3) - s1 * (s1 * s4 - s2 * s3) + s2 * (s1 * s3 - s2 * s2);
  if (!(Math.abs(determinant) > 1e-12)) return { value: points.y[i]!, second: 0, spread: 1, secondSpread: 0 };
  const value = (b0 * (s2 * s4 - s3 * s3) - b1 * (s1 * s4 - s2 * s3) + b2 * (s1 * s3 - s2 * s2)) / determinant;
  const square = (b0 * (s1 * s3 - s2 * s2) - b1 * (s0 * s3 - s1 * s2) + b2 * (s0 * s2 - s1 * s1)) / determinant;
  const spread = Math.sqrt(Math.max(0, (s2 * s4 - s3 * s3) / determinant));
  const squareSpread = Math.sqrt(Math.max(0, (s0 * s2 - s1 * s1) / determinant));
  return { value, second: (2 * square) / scale ** 2, spread, secondSpread: (2 * squareSpread) / scale ** 2 };
}
