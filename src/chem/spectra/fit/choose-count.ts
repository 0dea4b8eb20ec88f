import { DomainError } from '../../errors.ts';
import { pickBands } from '../pick-bands.ts';
import { type BandShape, PARAMETERS_OF } from './band-shapes.ts';
import type { Curve } from './curve.ts';
import { type Composition, curveModel, edgeIndex, parameterCount } from './curve-model.ts';
import { leastSquares } from './least-squares.ts';

/** A component to begin with: cm⁻¹, units of y, cm⁻¹. */
export interface Seed {
  wavenumber: number;
  height: number;
  fwhm: number;
  locked?: { wavenumber?: boolean; height?: boolean; fwhm?: boolean } | undefined;
}

export interface CurveFit {
  composition: Composition;
  parameters: Float64Array;
  covariance: Float64Array | null;
  x: Float64Array;
  /** The fitted curve on x. */
  values: Float64Array;
  rss: number;
  aicc: number;
  converged: boolean;
}

interface Settings {
  shape: BandShape;
  constant: boolean;
  signed: boolean;
}
type Compared = { count: number; edge: boolean; aicc: number }[];

const MOST_BANDS = 10;
/** A curve that is met to this part of its height is not worth another band, whatever the criterion says. */
const GOOD_ENOUGH = 2e-4;
/** A band counts when its height is so many standard errors. */
const SIGNIFICANT = 4;
/**
 * A richer fit must be better by this. AICc counts a band's three parameters, not that its place was looked for among
 * some hundred places and widths, which costs about 2 ln 100; to that comes the usual margin of 6.
 */
const MARGIN = 15;

/** Fit components that a person laid, in their number; locked parts stay. */
export function fitFrom(
  curve: Curve,
  { start, edge, ...settings }: Settings & { start: readonly Seed[]; edge: boolean },
): { fit: CurveFit; compared: Compared } {
  start.forEach((seed, i) => {
    if (!(seed.fwhm > 0)) throw new DomainError('out-of-range', 'A width is above 0 cm⁻¹', `start/${i}/fwhm`);
  });
  const fit = run(curve, settings, start, edge);
  return { fit, compared: [{ count: start.length, edge, aicc: fit.aicc }] };
}

/** The best number of bands, with or without an edge, unless these are given. */
export function chooseFit(
  curve: Curve,
  { count, edge, ...settings }: Settings & { count: number | undefined; edge: boolean | undefined },
): { fit: CurveFit; compared: Compared } {
  const compared: Compared = [];
  const best = (edge === undefined ? [false, true] : [edge])
    .map((withEdge) => grow(curve, settings, withEdge, count, compared))
    .reduce((a, b) => (b.aicc < a.aicc - MARGIN ? b : a));
  return { fit: best, compared };
}

/** Add bands one by one where they help most. */
function grow(
  curve: Curve,
  settings: Settings,
  edge: boolean,
  count: number | undefined,
  compared: Compared,
): CurveFit {
  const most = count ?? MOST_BANDS;
  let fit = run(curve, settings, firstSeeds(curve, settings, edge, most), edge);
  let best = count === undefined && !isSound(fit, curve, settings) ? run(curve, settings, [], edge) : fit;
  const note = (f: CurveFit) => compared.push({ count: f.composition.bands, edge, aicc: f.aicc });
  note(best);
  let failures = 0;
  fit = best;
  while (fit.composition.bands < most && failures < 2) {
    if (count === undefined && Math.sqrt(fit.rss / curve.x.length) < GOOD_ENOUGH * curve.scale) break;
    fit = withOneMore(fit, curve, settings, edge);
    note(fit);
    if (count !== undefined || (isSound(fit, curve, settings) && fit.aicc < best.aicc - MARGIN)) {
      best = fit;
      failures = 0;
    } else failures++;
  }
  return best;
}

function firstSeeds(curve: Curve, { signed }: Settings, edge: boolean, most: number): Seed[] {
  const sides = signed ? [1, -1] : [1];
  const seeds = sides.flatMap((sign) => {
    const y = sign === 1 ? curve.y : curve.y.map((value) => -value);
    return pickBands(curve.x, y, { prominence: 0.02, count: most }).map(({ wavenumber, height, fwhm }) => ({
      wavenumber,
      height: sign * height,
      fwhm: fwhm ?? curve.width / 8,
    }));
  });
  // What rises at the very end belongs to the edge.
  const inside = edge ? seeds.filter((seed) => seed.wavenumber < curve.x[0]! + 0.95 * curve.width) : seeds;
  return inside.sort((a, b) => Math.abs(b.height) - Math.abs(a.height)).slice(0, most);
}

/** The fit with one band more, begun where a band on the residual would take most of it away. */
function withOneMore(fit: CurveFit, curve: Curve, settings: Settings, edge: boolean): CurveFit {
  const kept = seedsOf(fit);
  const candidates = residualSeeds(fit, curve, settings);
  return candidates
    .map((seed) => run(curve, settings, [...kept, seed], edge, fit))
    .reduce((a, b) => (b.rss < a.rss ? b : a));
}

const TRIED_POSITIONS = 48;
const TRIED_WIDTHS = [0.04, 0.09, 0.2]; // of the whole range
const TRIED_FITS = 3;

function residualSeeds(fit: CurveFit, curve: Curve, { signed }: Settings): Seed[] {
  const residual = curve.y.map((value, i) => value - fit.values[i]!);
  const found: (Seed & { gain: number })[] = [];
  for (const part of TRIED_WIDTHS)
    for (let k = 0; k <= TRIED_POSITIONS; k++) {
      const fwhm = part * curve.width;
      const wavenumber = curve.x[0]! + (k / TRIED_POSITIONS) * curve.width;
      let [overlap, norm] = [0, 0];
      for (let i = 0; i < residual.length; i++) {
        const t = (curve.x[i]! - wavenumber) / fwhm;
        if (Math.abs(t) > 2) continue;
        const g = Math.exp(-4 * Math.LN2 * t * t);
        overlap += g * residual[i]!;
        norm += g * g;
      }
      const height = overlap / (norm || 1);
      if (height > 0 || signed) found.push({ wavenumber, fwhm, height, gain: height * overlap });
    }
  found.sort((a, b) => b.gain - a.gain);
  const apart: Seed[] = [];
  for (const seed of found) {
    if (apart.length === TRIED_FITS) break;
    if (apart.every((other) => Math.abs(other.wavenumber - seed.wavenumber) > 0.04 * curve.width)) apart.push(seed);
  }
  return apart.length > 0
    ? apart
    : [{ wavenumber: curve.x[0]! + curve.width / 2, fwhm: curve.width / 8, height: 1e-3 * curve.scale }];
}

function seedsOf({ composition, parameters }: CurveFit): Seed[] {
  const size = PARAMETERS_OF[composition.shape];
  return Array.from({ length: composition.bands }, (_, band) => ({
    wavenumber: parameters[band * size]!,
    height: parameters[band * size + 1]!,
    fwhm: Math.exp(parameters[band * size + 2]!),
  }));
}

function run(
  curve: Curve,
  { shape, constant }: Settings,
  seeds: readonly Seed[],
  edge: boolean,
  before?: CurveFit,
): CurveFit {
  const composition: Composition = { shape, bands: seeds.length, edge, constant };
  const size = PARAMETERS_OF[shape];
  const start = new Float64Array(parameterCount(composition));
  const locked: boolean[] = Array(start.length).fill(false);
  seeds.forEach((seed, band) => {
    start.set([seed.wavenumber, seed.height, Math.log(seed.fwhm)], band * size);
    locked[band * size] = seed.locked?.wavenumber ?? false;
    locked[band * size + 1] = seed.locked?.height ?? false;
    locked[band * size + 2] = seed.locked?.fwhm ?? false;
  });
  const tail = edgeIndex(composition);
  if (before?.composition.edge === edge && before.composition.constant === constant)
    start.set(before.parameters.subarray(edgeIndex(before.composition)), tail);
  else if (edge) start.set([Math.max(curve.y[curve.y.length - 1]!, 1e-6), Math.log(curve.width / 10)], tail);

  const model = curveModel(curve.x, composition);
  const solved = leastSquares(model, curve.y, start, { locked });
  const values = Float64Array.from(curve.x, (_, i) => model(i, solved.parameters));
  const n = curve.y.length;
  const k = start.length - locked.filter(Boolean).length + 1; // the variance counts, too
  // Below the last bits of the data no fit is better than another.
  const floor = n * (1e-9 * curve.scale) ** 2;
  const aicc =
    n * Math.log(Math.max(solved.residualSumOfSquares, floor) / n) +
    2 * k +
    (n > k + 1 ? (2 * k * (k + 1)) / (n - k - 1) : Number.POSITIVE_INFINITY);
  return {
    composition,
    parameters: solved.parameters,
    covariance: solved.covariance,
    x: curve.x,
    values,
    rss: solved.residualSumOfSquares,
    aicc,
    converged: solved.stoppedBy === 'converged',
  };
}

/** Every band significant, of the right sign, within the range and of a width that the points can show. */
function isSound(fit: CurveFit, curve: Curve, { signed }: Settings): boolean {
  const { composition, parameters, covariance } = fit;
  const size = PARAMETERS_OF[composition.shape];
  const step = curve.width / curve.x.length;
  const tail = edgeIndex(composition);
  if (composition.edge && !(parameters[tail]! > 0 && Math.exp(parameters[tail + 1]!) < curve.width)) return false;
  for (let band = 0; band < composition.bands; band++) {
    const [position, height] = [parameters[band * size]!, parameters[band * size + 1]!];
    const fwhm = Math.exp(parameters[band * size + 2]!);
    const inside = position >= curve.x[0]! - fwhm / 4 && position <= curve.x[0]! + curve.width + fwhm / 4;
    if (!inside || fwhm < 2 * step || fwhm > 1.5 * curve.width) return false;
    if (!signed && !(height > 0)) return false;
    const variance = covariance?.[(band * size + 1) * parameters.length + band * size + 1];
    if (variance !== undefined && Math.abs(height) < SIGNIFICANT * Math.sqrt(variance)) return false;
  }
  return true;
}
