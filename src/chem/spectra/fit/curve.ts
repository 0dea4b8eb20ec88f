/** A curve ready to be fitted: ascending, without gaps, of at most some hundred points. */
export interface Curve {
  x: Float64Array;
  y: Float64Array;
  /** Largest |y| and the whole stretch of x. */
  scale: number;
  width: number;
}

/** More points than these are averaged in groups: bands are far broader than their distance. */
const MOST_POINTS = 1200;

/** Sort, drop gaps and average neighbours where there are very many points. */
export function prepareCurve(x: ArrayLike<number>, y: ArrayLike<number>): Curve {
  const kept = Array.from({ length: Math.min(x.length, y.length) }, (_, i) => i).filter(
    (i) => Number.isFinite(x[i]!) && Number.isFinite(y[i]!),
  );
  kept.sort((a, b) => x[a]! - x[b]!);
  const size = Math.ceil(kept.length / MOST_POINTS) || 1;
  const groups = Math.ceil(kept.length / size);
  const mean = (values: ArrayLike<number>, group: number): number => {
    const members = kept.slice(group * size, (group + 1) * size);
    return members.reduce((sum, i) => sum + values[i]!, 0) / members.length;
  };
  const xs = Float64Array.from({ length: groups }, (_, g) => mean(x, g));
  const ys = Float64Array.from({ length: groups }, (_, g) => mean(y, g));
  return {
    x: xs,
    y: ys,
    scale: ys.reduce((most, value) => Math.max(most, Math.abs(value)), 0) || 1,
    width: (xs[groups - 1] ?? 0) - (xs[0] ?? 0) || 1,
  };
}

/** Wavenumbers of the local extrema in size: maxima of |y|. */
export function localMaxima(x: ArrayLike<number>, y: ArrayLike<number>): number[] {
  const found: number[] = [];
  for (let i = 1; i < x.length - 1; i++) {
    const [before, here, after] = [Math.abs(y[i - 1]!), Math.abs(y[i]!), Math.abs(y[i + 1]!)];
    if (here > before && here >= after) found.push(x[i]!);
  }
  return found;
}
