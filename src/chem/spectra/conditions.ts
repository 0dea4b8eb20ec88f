import { findSolvent } from './solvents.ts';
import type { YUnit } from './types.ts';
import { convertEnergy } from './units.ts';

/** A doubt about a measurement: a code for programs, a sentence for people. */
export interface Flag {
  code:
    | 'below-cutoff'
    | 'unknown-solvent'
    | 'no-solvent'
    | 'absorbance-high'
    | 'saturated'
    | 'negative-absorbance'
    | 'no-concentration'
    | 'no-path-length';
  detail: string;
}

/** One solvent, or the parts of a mixture. */
export type SolventGiven = string | readonly { name: string; volumeFraction?: number }[];

export interface MeasuredCurve {
  /** cm⁻¹, any order. */
  x: ArrayLike<number>;
  /** Absorbances, NaN for a gap; a transmittance of zero or less is one. */
  absorbance: ArrayLike<number>;
  solvent?: SolventGiven | null;
  /** mol dm⁻³. */
  concentration?: number | null;
  /** cm. */
  pathLength?: number | null;
  /** Highest absorbance that the instrument is good for. */
  absorbanceLimit?: number;
  /** Set when the ordinate is ε already, which needs neither concentration nor path. */
  yUnit?: YUnit;
}

/** Highest absorbance used when an instrument states none (ASTM E925 works from 0.2 to 2.0). */
export const ABSORBANCE_LIMIT = 2;
/** Absorbances below this are more than noise about a baseline (common practice). */
const NEGATIVE = -0.02;
/** Points of one same value at the top that noise does not give (common practice). */
const FLAT_POINTS = 5;

/**
 * What speaks against using a solution spectrum as it is: points below the solvent's cut-off, above the range of the
 * instrument, a flat top, a baseline below zero, and conditions without which there is no ε.
 *
 * @returns flags in a fixed order, none when all is well
 */
export function checkConditions(curve: MeasuredCurve): Flag[] {
  const isEpsilon = curve.yUnit === 'epsilon' || curve.yUnit === 'log-epsilon';
  return [
    ...checkSolvent(curve),
    ...(isEpsilon ? [] : checkRange(curve)),
    ...(isEpsilon || curve.concentration ? [] : [missing('no-concentration', 'concentration')]),
    ...(isEpsilon || curve.pathLength ? [] : [missing('no-path-length', 'path length')]),
  ];
}

function missing(code: Flag['code'], what: string): Flag {
  return { code, detail: `the ${what} is not stated, so absorbance cannot become a molar absorption coefficient` };
}

function checkSolvent({ x, absorbance, solvent }: MeasuredCurve): Flag[] {
  const names = typeof solvent === 'string' ? [solvent] : (solvent ?? []).map(({ name }) => name);
  const given = names.filter((name) => name.trim() !== '');
  if (given.length === 0)
    return [{ code: 'no-solvent', detail: 'the solvent is not stated, so its cut-off is not known' }];
  const found = given.map((name) => ({ name, solvent: findSolvent(name) }));
  const flags: Flag[] = found
    .filter((entry) => entry.solvent === null)
    .map(({ name }) => ({ code: 'unknown-solvent', detail: `no cut-off is listed for ${name}` }));
  const worst = found.flatMap((entry) => entry.solvent ?? []).sort((a, b) => b.cutoffNm - a.cutoffNm)[0];
  if (!worst) return flags;
  const limit = convertEnergy(worst.cutoffNm, 'nm', 'cm-1');
  const below = count(x, (value, i) => value > limit * (1 + 1e-9) && !Number.isNaN(absorbance[i]!));
  if (below === 0) return flags;
  const detail = `${below} points lie below the cut-off of ${worst.name}, ${worst.cutoffNm} nm (tables differ by some 5 nm)`;
  return [...flags, { code: 'below-cutoff', detail }];
}

function checkRange({ absorbance, absorbanceLimit = ABSORBANCE_LIMIT }: MeasuredCurve): Flag[] {
  const flags: Flag[] = [];
  const above = count(absorbance, (value) => value > absorbanceLimit);
  if (above > 0) {
    const detail = `${above} points have an absorbance above ${absorbanceLimit}, the limit of the range; leave them out of a fit`;
    flags.push({ code: 'absorbance-high', detail });
  }
  const flat = flatTop(absorbance);
  if (flat)
    flags.push({ code: 'saturated', detail: `${flat.points} points in a row stand at ${flat.value}: the top is cut` });
  const negative = count(absorbance, (value) => value < NEGATIVE);
  if (negative > 0) {
    const detail = `${negative} points have an absorbance below ${NEGATIVE}: look at the blank and the baseline`;
    flags.push({ code: 'negative-absorbance', detail });
  }
  return flags;
}

/** The run of equal values at the highest absorbance, where it is longer than noise gives and high enough to matter. */
function flatTop(absorbance: ArrayLike<number>): { points: number; value: number } | null {
  let highest = Number.NEGATIVE_INFINITY;
  let run = 0;
  let longest = 0;
  for (let i = 0; i < absorbance.length; i++) {
    const value = absorbance[i]!;
    if (value > highest) {
      highest = value;
      run = 1;
      longest = 1;
    } else if (value === highest) {
      run++;
      longest = Math.max(longest, run);
    } else run = 0;
  }
  return longest >= FLAT_POINTS && highest >= 1 ? { points: longest, value: highest } : null;
}

function count(values: ArrayLike<number>, holds: (value: number, i: number) => boolean): number {
  let n = 0;
  for (let i = 0; i < values.length; i++) if (holds(values[i]!, i)) n++;
  return n;
}
