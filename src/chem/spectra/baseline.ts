import { DomainError } from '../errors.ts';

/** A base line through the curve at two wavenumbers (cm⁻¹) where nothing absorbs. */
export interface Baseline {
  /** Straight, or a constant and light scattered by small particles, which grows as ν̄⁴ (Rayleigh). */
  kind: 'line' | 'scattering';
  from: number;
  to: number;
}

/** Share of the whole range over which the curve is averaged at an anchor. */
const ANCHOR_SHARE = 0.01;

/**
 * A curve with its base line taken off.
 *
 * @param x - n wavenumbers in cm⁻¹, ascending
 * @param y - n ordinates; NaN is a gap and stays one
 * @throws {DomainError} `out-of-range` where the two places are one, or the curve has no point at one of them
 */
export function subtractBaseline(x: ArrayLike<number>, y: ArrayLike<number>, baseline: Baseline): Float64Array {
  const power = baseline.kind === 'line' ? 1 : 4;
  const scale = Math.max(Math.abs(baseline.from), Math.abs(baseline.to)) || 1;
  const rise = (wavenumber: number) => (wavenumber / scale) ** power;
  const [u0, u1] = [rise(baseline.from), rise(baseline.to)];
  if (u0 === u1)
    throw new DomainError('out-of-range', 'A base line needs two places apart from each other', 'baseline');
  const [y0, y1] = [meanAt(x, y, baseline.from), meanAt(x, y, baseline.to)];
  const slope = (y1 - y0) / (u1 - u0);
  return Float64Array.from(y, (value, i) => value - (y0 + slope * (rise(x[i]!) - u0)));
}

/**
 * Two places where a base line may go through: the lowest points of the lower and of the upper half of a curve.
 *
 * @param x - wavenumbers in cm⁻¹, ascending
 * @returns null where one half has no point
 */
export function quietPlaces(x: ArrayLike<number>, y: ArrayLike<number>): { from: number; to: number } | null {
  const middle = ((x[0] ?? 0) + (x[x.length - 1] ?? 0)) / 2;
  let [from, to] = [-1, -1];
  for (let i = 0; i < x.length; i++) {
    if (!Number.isFinite(y[i]!)) continue;
    if (x[i]! < middle && (from < 0 || y[i]! < y[from]!)) from = i;
    if (x[i]! > middle && (to < 0 || y[i]! < y[to]!)) to = i;
  }
  return from < 0 || to < 0 ? null : { from: x[from]!, to: x[to]! };
}

function meanAt(x: ArrayLike<number>, y: ArrayLike<number>, wavenumber: number): number {
  const reach = ANCHOR_SHARE * ((x[x.length - 1] ?? 0) - (x[0] ?? 0));
  let [sum, count] = [0, 0];
  for (let i = 0; i < x.length; i++)
    if (Math.abs(x[i]! - wavenumber) <= reach && Number.isFinite(y[i]!)) {
      sum += y[i]!;
      count++;
    }
  if (count === 0)
    throw new DomainError('out-of-range', `The curve has no point at ${Math.round(wavenumber)} cm⁻¹`, 'baseline');
  return sum / count;
}
