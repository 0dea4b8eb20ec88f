/** How alike two curves are over the range that both cover. */
export interface SpectralSimilarity {
  /** 1 for curves of one shape, whatever their heights; 0 for such that share nothing. */
  cosine: number;
  /** The same in degrees, 0 … 180. */
  angle: number;
  /** The range compared, cm⁻¹. */
  from: number;
  to: number;
}

/** Points of the grid on which two curves are compared: bands are far broader than their distance. */
const GRID = 256;
/** Both must cover at least this part of the narrower curve's range. */
const LEAST_OVERLAP = 0.5;

/**
 * Angle between two spectra as vectors over the range that both cover, on an even grid of wavenumbers.
 *
 * @param a - wavenumbers in cm⁻¹, ascending, and values; NaN is a gap, and such places are left out for both
 * @returns null where they share less than half of the narrower one's range, or one is zero there
 * @see F. W. Kruse et al., Remote Sens. Environ. 44 (1993) 145 (spectral angle; from memory)
 */
export function spectralSimilarity(
  a: { x: ArrayLike<number>; y: ArrayLike<number> },
  b: { x: ArrayLike<number>; y: ArrayLike<number> },
): SpectralSimilarity | null {
  if (a.x.length < 2 || b.x.length < 2) return null;
  const from = Math.max(a.x[0]!, b.x[0]!);
  const to = Math.min(a.x[a.x.length - 1]!, b.x[b.x.length - 1]!);
  const narrower = Math.min(a.x[a.x.length - 1]! - a.x[0]!, b.x[b.x.length - 1]! - b.x[0]!);
  if (!(to - from >= LEAST_OVERLAP * narrower) || to <= from) return null;
  let [dot, aa, bb] = [0, 0, 0];
  for (let i = 0; i < GRID; i++) {
    const at = from + ((to - from) * i) / (GRID - 1);
    const [va, vb] = [sampleAt(a.x, a.y, at), sampleAt(b.x, b.y, at)];
    if (Number.isNaN(va) || Number.isNaN(vb)) continue;
    dot += va * vb;
    aa += va * va;
    bb += vb * vb;
  }
  if (aa === 0 || bb === 0) return null;
  const cosine = Math.max(-1, Math.min(1, dot / Math.sqrt(aa * bb)));
  return { cosine, angle: (Math.acos(cosine) * 180) / Math.PI, from, to };
}

/** Value between the two points about `at`, by a straight line; NaN beside a gap. */
function sampleAt(x: ArrayLike<number>, y: ArrayLike<number>, at: number): number {
  let [low, high] = [0, x.length - 1];
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (x[middle]! <= at) low = middle;
    else high = middle;
  }
  const step = x[high]! - x[low]!;
  const share = step > 0 ? (at - x[low]!) / step : 0;
  return y[low]! + share * (y[high]! - y[low]!);
}
