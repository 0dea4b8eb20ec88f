import { DomainError } from '../errors.ts';
import { type ScreenColour, xyzToSrgb } from './srgb.ts';
import { chromaticity, type Triple, tristimulus } from './tristimulus.ts';
import { nameColour } from './words.ts';

/** Spectrum of a dissolved complex, and how it is looked at. */
export interface SolutionSpectrum {
  /** n wavenumbers in cm⁻¹, ascending. */
  x: ArrayLike<number>;
  /** n molar absorption coefficients in dm³ mol⁻¹ cm⁻¹; NaN is a gap. */
  epsilon: ArrayLike<number>;
  /** mol dm⁻³; left out: such that the highest visible absorbance is 1. */
  concentration?: number;
  /** cm; 1 when left out. */
  pathLength?: number;
}

/** The colour that an eye would see, computed, under D65. */
export interface SolutionColour {
  XYZ: Triple;
  xy: [number, number];
  sRGB: Triple;
  hex: string;
  inGamut: boolean;
  concentration: number;
  pathLength: number;
  /** In words, for those who do not see the colour. */
  name: string;
}

/** The part of the spectrum without which there is no colour, nm. */
const NEEDED = { from: 400, to: 700 } as const;
/** The ends may be missing, and points may lie apart, by so much; nm. */
const END_SLACK = 5;
const WIDEST_GAP = 50;

/**
 * Colour of a solution by its spectrum: T = 10^(−ε·c·l), CIE 1931 2° observer, D65, sRGB.
 *
 * Between points ε goes by straight lines in wavenumber; outside them, to 380 and 780 nm, the last value is held.
 * Holds where Beer and Lambert's law does. Where nothing absorbs in the visible, the concentration is taken as 1.
 *
 * @returns null when the points leave out part of 400–700 nm (5 nm at the ends, gaps of 50 nm are borne)
 * @throws {DomainError} `out-of-range` when concentration or path is not above zero, or x is not ascending
 * @see CIE 015:2018; IEC 61966-2-1:1999
 */
export function colourOfSolution(spectrum: SolutionSpectrum): SolutionColour | null {
  const { pathLength = 1 } = spectrum;
  requirePositive('pathLength', pathLength);
  if (spectrum.concentration !== undefined) requirePositive('concentration', spectrum.concentration);
  const curve = presentPoints(spectrum);
  if (!coversVisible(curve)) return null;
  const epsilonAt = interpolator(curve);
  const concentration = spectrum.concentration ?? dilutionToOne(curve, epsilonAt, pathLength);
  const XYZ = tristimulus((nm) => 10 ** (-epsilonAt(1e7 / nm) * concentration * pathLength));
  const { sRGB, hex, inGamut }: ScreenColour = xyzToSrgb(XYZ);
  return { XYZ, xy: chromaticity(XYZ), sRGB, hex, inGamut, concentration, pathLength, name: nameColour(XYZ) };
}

interface Points {
  x: number[];
  y: number[];
}

function presentPoints({ x, epsilon }: SolutionSpectrum): Points {
  const points: Points = { x: [], y: [] };
  for (let i = 0; i < x.length; i++) {
    if (i > 0 && x[i]! < x[i - 1]!) {
      throw new DomainError('out-of-range', 'wavenumbers must ascend', 'x', i + 1);
    }
    if (!Number.isFinite(epsilon[i]!) || !(x[i]! > 0)) continue;
    points.x.push(x[i]!);
    points.y.push(epsilon[i]!);
  }
  return points;
}

function coversVisible({ x }: Points): boolean {
  const inside = x.map((wavenumber) => 1e7 / wavenumber); // descending
  if (
    !(
      (inside[0] ?? 0) >= NEEDED.to - END_SLACK &&
      (inside.at(-1) ?? Number.POSITIVE_INFINITY) <= NEEDED.from + END_SLACK
    )
  ) {
    return false;
  }
  return inside.every((nm, i) => {
    const before = inside[i - 1];
    if (before === undefined || nm >= NEEDED.to || before <= NEEDED.from) return true;
    return before - nm <= WIDEST_GAP + 1e-6;
  });
}

function interpolator({ x, y }: Points): (wavenumber: number) => number {
  return (wavenumber) => {
    if (wavenumber <= x[0]!) return y[0]!;
    if (wavenumber >= x.at(-1)!) return y.at(-1)!;
    let [low, high] = [0, x.length - 1];
    while (high - low > 1) {
      const middle = (low + high) >> 1;
      if (x[middle]! <= wavenumber) low = middle;
      else high = middle;
    }
    const share = (wavenumber - x[low]!) / (x[high]! - x[low]! || 1);
    return y[low]! + share * (y[high]! - y[low]!);
  };
}

/** Concentration at which the highest absorbance within 400–700 nm is 1. */
function dilutionToOne({ x, y }: Points, epsilonAt: (wavenumber: number) => number, pathLength: number): number {
  const [from, to] = [1e7 / NEEDED.to, 1e7 / NEEDED.from];
  let highest = Math.max(epsilonAt(from), epsilonAt(to));
  x.forEach((wavenumber, i) => {
    if (wavenumber >= from && wavenumber <= to) highest = Math.max(highest, y[i]!);
  });
  return highest > 0 ? 1 / (highest * pathLength) : 1;
}

function requirePositive(field: string, value: number): void {
  if (Number.isFinite(value) && value > 0) return;
  throw new DomainError('out-of-range', `${field} must be a number above zero; ${value} is not`, field);
}
