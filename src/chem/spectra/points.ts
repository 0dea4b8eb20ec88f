import { DomainError } from '../errors.ts';

/** A curve as two arrays of one length. */
export interface Curve {
  x: Float64Array;
  y: Float64Array;
}

/**
 * Copy with ascending abscissae. Points of equal abscissa keep their order; points without an abscissa (NaN) have no
 * place on the axis and are left out; gaps in y stay.
 */
export function ascending(x: Float64Array, y: Float64Array): Curve {
  const order = Array.from(x.keys())
    .filter((i) => !Number.isNaN(x[i]))
    .sort((a, b) => x[a]! - x[b]! || a - b);
  return { x: Float64Array.from(order, (i) => x[i]!), y: Float64Array.from(order, (i) => y[i]!) };
}

/**
 * At most `max` points of a curve, such that a drawing of them looks like a drawing of all: first and last are kept,
 * and of every stretch between them its lowest and highest point; a stretch with a gap keeps one NaN in its place.
 *
 * @param max - 4 or more
 * @returns points of the curve itself in their order (a copy of all when there are no more than `max`)
 * @throws {DomainError} `out-of-range` when `max` is below 4
 */
export function decimate(x: Float64Array, y: Float64Array, max: number): Curve {
  if (!(max >= 4)) throw new DomainError('out-of-range', `at least 4 points must be kept; ${max} was asked for`, 'max');
  const n = x.length;
  if (n <= max) return { x: x.slice(), y: y.slice() };
  // Up to three points a stretch where there are gaps (lowest, highest, gap), else two.
  const perStretch = y.some(Number.isNaN) ? 3 : 2;
  const stretches = Math.max(1, Math.floor((max - 2) / perStretch));
  const kept: number[] = [0];
  for (let s = 0; s < stretches; s++) {
    const from = 1 + Math.floor((s * (n - 2)) / stretches);
    const to = 1 + Math.floor(((s + 1) * (n - 2)) / stretches);
    kept.push(...extremes(y, from, to).slice(0, max - 2));
  }
  kept.push(n - 1);
  return { x: Float64Array.from(kept, (i) => x[i]!), y: Float64Array.from(kept, (i) => y[i]!) };
}

/** Places of the lowest and highest value and of the first gap within [from, to), in rising order. */
function extremes(y: Float64Array, from: number, to: number): number[] {
  let low = -1;
  let high = -1;
  let gap = -1;
  for (let i = from; i < to; i++) {
    const value = y[i]!;
    if (Number.isNaN(value)) {
      if (gap < 0) gap = i;
      continue;
    }
    if (low < 0 || value < y[low]!) low = i;
    if (high < 0 || value > y[high]!) high = i;
  }
  return [...new Set([low, high, gap])].filter((i) => i >= 0).sort((a, b) => a - b);
}
