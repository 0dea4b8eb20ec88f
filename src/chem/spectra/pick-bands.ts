import { type LocalFit, smooth } from './smooth.ts';

/** A band as picked: position and full width in cm⁻¹, height in the units of y. */
export interface PickedBand {
  wavenumber: number;
  height: number;
  /** Null where the curve does not fall to half the height on both sides before it rises again. */
  fwhm: number | null;
  shoulder: boolean;
}

export interface PickOptions {
  /** At most so many bands, the highest by their own prominence (default: all). */
  count?: number;
  /** Half width in cm⁻¹ of the stretch over which a parabola is laid (default 250; at least 4 points a side are used). */
  window?: number;
  /** A maximum must rise by this part of the whole range of y above its surroundings (default 0.005). */
  prominence?: number;
}

/**
 * Bands must stand out by so many standard deviations of the smoothed curve: between the highest and the lowest of some
 * hundred values of mere noise lie six to seven.
 */
const NOISE_FACTOR = 8;
/** A shoulder's own height, as the curvature gives it, as a part of the curve's height there (common practice). */
const SHOULDER_SHARE = 0.02;

interface Candidate extends PickedBand {
  prominence: number;
}

/**
 * Maxima of a spectrum, and shoulders where the curve bulges without a maximum (a minimum of the second derivative).
 *
 * A thin picker, for a person to look over: it takes no baseline off and separates nothing. Overlapping bands shift
 * each other's maxima, and a shoulder's position and height are those of the curve there, not of the band beneath.
 *
 * @param x - n wavenumbers in cm⁻¹, ascending
 * @param y - n ordinates; NaN is a gap, over which the curve is taken to go on
 * @returns bands in ascending wavenumber; none for fewer than 9 points
 */
export function pickBands(x: ArrayLike<number>, y: ArrayLike<number>, options: PickOptions = {}): PickedBand[] {
  const { count = Number.POSITIVE_INFINITY, window = 250, prominence = 0.005 } = options;
  const fit = smooth(x, y, window);
  const isFlat = fit.range <= 1e-9 * Math.abs(fit.y[0] ?? 0); // the last bits of a constant are no structure
  if (fit.x.length < 9 || isFlat) return [];
  const threshold = prominence * fit.range;
  const maxima = findMaxima(fit, threshold);
  const shoulders = findShoulders(fit, threshold, maxima);
  return [...maxima, ...shoulders]
    .sort((a, b) => b.prominence - a.prominence)
    .slice(0, count)
    .sort((a, b) => a.wavenumber - b.wavenumber)
    .map(({ prominence: _, ...band }) => band);
}

function findMaxima(fit: LocalFit, threshold: number): Candidate[] {
  const { x, y } = fit;
  const found: Candidate[] = [];
  for (let i = 1; i < x.length - 1; i++) {
    if (!(y[i]! > y[i - 1]! && y[i]! >= y[i + 1]!)) continue;
    const rise = prominenceAt(y, i);
    if (rise < Math.max(threshold, NOISE_FACTOR * fit.noise[i]!) || y[i]! <= 0) continue;
    const [wavenumber, height] = vertex(fit, i);
    found.push({ wavenumber, height, fwhm: widthAt(fit, i, height), shoulder: false, prominence: rise });
  }
  return found;
}

/** How far the curve falls on the higher-lying side before it rises above the maximum again, or ends. */
function prominenceAt(y: Float64Array, at: number): number {
  const top = y[at]!;
  const side = (step: -1 | 1): number => {
    let lowest = top;
    for (let i = at + step; i >= 0 && i < y.length && y[i]! <= top; i += step) lowest = Math.min(lowest, y[i]!);
    return lowest;
  };
  return top - Math.max(side(-1), side(1));
}

/** Top of the parabola through a maximum and its neighbours, however far apart they lie. */
function vertex({ x, y }: LocalFit, i: number): [number, number] {
  const [a, b] = [x[i - 1]! - x[i]!, x[i + 1]! - x[i]!];
  const [p, q] = [y[i - 1]! - y[i]!, y[i + 1]! - y[i]!];
  const curvature = (p / a - q / b) / (a - b);
  const slope = p / a - curvature * a;
  if (!(curvature < 0)) return [x[i]!, y[i]!];
  const shift = Math.min(b, Math.max(a, -slope / (2 * curvature)));
  return [x[i]! + shift, y[i]! + slope * shift + curvature * shift * shift];
}

function widthAt({ x, y }: LocalFit, at: number, height: number): number | null {
  const half = height / 2;
  const crossing = (step: -1 | 1): number | null => {
    for (let i = at; i + step >= 0 && i + step < y.length; i += step) {
      const [here, next] = [y[i]!, y[i + step]!];
      if (next <= half) return x[i]! + ((half - here) / (next - here)) * (x[i + step]! - x[i]!);
      if (next > height) return null;
    }
    return null;
  };
  const [left, right] = [crossing(-1), crossing(1)];
  return left === null || right === null ? null : right - left;
}

/**
 * Minima of the second derivative that no maximum accounts for. Between its points of inflection a Gaussian of height
 * h is 2σ wide and has a curvature of −h/σ², so that curvature and width give the height of what bulges.
 */
function findShoulders(fit: LocalFit, threshold: number, maxima: readonly Candidate[]): Candidate[] {
  const { x, y, second } = fit;
  const found: Candidate[] = [];
  for (let i = 2; i < x.length - 2; i++) {
    const bend = second[i]!;
    if (!(bend < 0 && bend < second[i - 1]! && bend <= second[i + 1]!)) continue;
    const [left, right] = [valleyOf(second, i, -1), valleyOf(second, i, 1)];
    if (left === 0 || right === x.length - 1) continue; // the bulge is not whole
    const sigma = (x[right]! - x[left]!) / 2;
    const rim = Math.min(0, Math.max(second[left]!, second[right]!)); // zero, or the turn before another bulge
    const own = (rim - bend) * sigma * sigma;
    if (own < Math.max(threshold, SHOULDER_SHARE * y[i]!, NOISE_FACTOR * fit.secondNoise[i]! * sigma * sigma)) continue;
    const isMaximum = maxima.some(({ wavenumber }) => wavenumber >= x[left]! && wavenumber <= x[right]!);
    if (isMaximum || y[i]! <= 0) continue;
    found.push({ wavenumber: x[i]!, height: y[i]!, fwhm: null, shoulder: true, prominence: own });
  }
  return found;
}

/** Where, from a minimum of the second derivative, it crosses zero or turns down again. */
function valleyOf(second: Float64Array, at: number, step: -1 | 1): number {
  let i = at;
  while (i + step >= 0 && i + step < second.length && second[i]! < 0 && second[i + step]! >= second[i]!) i += step;
  return i;
}
