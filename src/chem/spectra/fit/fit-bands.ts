import { DomainError } from '../../errors.ts';
import { oscillatorStrength } from '../oscillator-strength.ts';
import { areaFactor, type BandShape, lorentzianShare, PARAMETERS_OF } from './band-shapes.ts';
import { type CurveFit, chooseFit, fitFrom, type Seed } from './choose-count.ts';
import { localMaxima, prepareCurve } from './curve.ts';
import { curveModel, edgeIndex } from './curve-model.ts';

export type { BandShape } from './band-shapes.ts';
export type { Seed } from './choose-count.ts';

export interface FitOptions {
  /** Exactly so many bands; found by AICc where it is left out. */
  count?: number | undefined;
  /** A charge-transfer edge that rises towards the upper end; by AICc where it is left out. */
  edge?: boolean | undefined;
  /** A constant under it all (default: none). */
  constant?: boolean | undefined;
  /** Default: gaussian. */
  shape?: BandShape | undefined;
  /** Components to begin with, in place of those found; parts of them may be locked. With these, their number is kept. */
  start?: readonly Seed[] | undefined;
  /** Whether components may be negative, as in circular dichroism (default: no). */
  signed?: boolean | undefined;
}

/** Standard errors (k = 1) as the scatter of the points about the curve gives them; null where the data do not. */
export interface FittedErrors {
  wavenumber: number | null;
  height: number | null;
  fwhm: number | null;
  area: number | null;
  oscillatorStrength: number | null;
}

export interface FittedBand {
  /** Its place in the components that the fit began with, from 0. */
  component: number;
  /** cm⁻¹ */
  wavenumber: number;
  height: number;
  /** Full width at half height, cm⁻¹. */
  fwhm: number;
  /** ∫ over all wavenumbers: for ε, dm³ mol⁻¹ cm⁻². */
  area: number;
  /** Holds where y is ε in dm³ mol⁻¹ cm⁻¹ (refractive index 1). */
  oscillatorStrength: number;
  /** Whether the whole curve has no maximum of its own there. */
  shoulder: boolean;
  /** Lorentzian share of a `voigt`; null for the other shapes. */
  lorentzian: number | null;
  errors: FittedErrors;
}

export interface BandFit {
  /** In ascending wavenumber. */
  bands: FittedBand[];
  /** Height at the upper end and the stretch in cm⁻¹ over which it falls by e; null where there is none. */
  edge: { height: number; decay: number; at: number } | null;
  constant: number | null;
  /** y minus the fitted curve in the order of the points given; NaN at gaps. */
  residual: Float64Array;
  /** Root mean square of the residual, in units of y. */
  rms: number;
  /** Numbers of bands that were compared, with their AICc; one entry where the number was given. */
  compared: { count: number; edge: boolean; aicc: number }[];
  converged: boolean;
}

/**
 * Fit a spectrum as a sum of bands on the wavenumber axis.
 *
 * Points weigh alike. Where no number of bands is given, that of the lowest corrected Akaike criterion is taken among
 * fits in which every band is significant and lies within the range. Errors are those of the fit alone: wavelength
 * check and bandwidth of the instrument come on top (see `combinedPositionError`).
 *
 * @param x - n wavenumbers in cm⁻¹, any order
 * @param y - n ordinates; NaN is a gap
 * @throws {DomainError} `too-large` or `out-of-range` with the input it is about
 * @see AICc: N. Sugiura, Commun. Stat. A7 (1978) 13; C. M. Hurvich, C.-L. Tsai, Biometrika 76 (1989) 297
 */
export function fitBands(x: ArrayLike<number>, y: ArrayLike<number>, options: FitOptions = {}): BandFit {
  const curve = prepareCurve(x, y);
  const { shape = 'gaussian', constant = false, signed = false, count, edge, start } = options;
  if (count !== undefined && !(Number.isInteger(count) && count >= 0 && count <= 20))
    throw new DomainError('out-of-range', 'count is a whole number from 0 to 20', 'count');
  if (curve.x.length < 8) throw new DomainError('out-of-range', 'A fit needs at least 8 points that are no gaps', 'x');
  const settings = { shape, constant, signed };
  const { fit, compared } = start
    ? fitFrom(curve, { ...settings, start, edge: edge ?? false })
    : chooseFit(curve, { ...settings, count, edge });
  return describe(x, y, fit, compared, curve.x[curve.x.length - 1]!);
}

function describe(
  x: ArrayLike<number>,
  y: ArrayLike<number>,
  fit: CurveFit,
  compared: BandFit['compared'],
  end: number,
): BandFit {
  const { composition, parameters } = fit;
  const xs = Float64Array.from(x);
  const model = curveModel(Float64Array.from([...xs, end]), composition); // the edge is measured from the curve's end
  const residual = Float64Array.from(y, (value, i) => value - model(i, parameters));
  const finite = residual.filter((value) => !Number.isNaN(value));
  const at = edgeIndex(composition);
  const maxima = localMaxima(fit.x, fit.values);
  return {
    bands: Array.from({ length: composition.bands }, (_, band) => bandOf(fit, band, maxima)).sort(
      (a, b) => a.wavenumber - b.wavenumber,
    ),
    edge: composition.edge ? { height: parameters[at]!, decay: Math.exp(parameters[at + 1]!), at: end } : null,
    constant: composition.constant ? parameters[parameters.length - 1]! : null,
    residual,
    rms: Math.sqrt(finite.reduce((sum, value) => sum + value * value, 0) / (finite.length || 1)),
    compared,
    converged: fit.converged,
  };
}

function bandOf(fit: CurveFit, band: number, maxima: readonly number[]): FittedBand {
  const { composition, parameters, covariance } = fit;
  const size = PARAMETERS_OF[composition.shape];
  const from = band * size;
  const [wavenumber, height, logWidth] = [parameters[from]!, parameters[from + 1]!, parameters[from + 2]!];
  const fwhm = Math.exp(logWidth);
  const isVoigt = composition.shape === 'voigt';
  const factor = areaFactor(composition.shape, isVoigt ? parameters[from + 3]! : 0);
  const area = height * fwhm * factor;
  const own = maxima.some((maximum) => Math.abs(maximum - wavenumber) < 0.3 * fwhm && nearest(fit, maximum) === band);
  const entry = (a: number, b: number) => covariance![(from + a) * parameters.length + from + b]!;
  const relativeArea = covariance && entry(1, 1) / height ** 2 + entry(2, 2) + (2 * entry(1, 2)) / height;
  const areaError = relativeArea === null ? null : Math.abs(area) * Math.sqrt(Math.max(0, relativeArea));
  return {
    component: band,
    wavenumber,
    height,
    fwhm,
    area,
    oscillatorStrength: oscillatorStrength(area),
    shoulder: !own,
    lorentzian: isVoigt ? lorentzianShare(parameters[from + 3]!) : null,
    errors: {
      wavenumber: covariance && Math.sqrt(entry(0, 0)),
      height: covariance && Math.sqrt(entry(1, 1)),
      fwhm: covariance && fwhm * Math.sqrt(entry(2, 2)),
      area: areaError,
      oscillatorStrength: areaError === null ? null : oscillatorStrength(areaError),
    },
  };
}

/** The band that is nearest to a maximum, in units of its own width. */
function nearest({ composition, parameters }: CurveFit, maximum: number): number {
  const size = PARAMETERS_OF[composition.shape];
  let best = -1;
  let least = Number.POSITIVE_INFINITY;
  for (let band = 0; band < composition.bands; band++) {
    const distance = Math.abs(maximum - parameters[band * size]!) / Math.exp(parameters[band * size + 2]!);
    if (distance < least) [best, least] = [band, distance];
  }
  return best;
}

/**
 * Standard uncertainty of a band's position: fit, wavelength check and spectral bandwidth combined. Wavelengths are
 * turned into wavenumbers at the band; of the bandwidth, a tenth counts as uncertainty of where a broad band's top lies
 * (common practice).
 *
 * @param fitted - standard error of the fit in cm⁻¹; null counts as 0
 * @param instrument - both in nm, standard uncertainty of the wavelength check and bandwidth
 */
export function combinedPositionError(
  wavenumber: number,
  fitted: number | null,
  instrument: { wavelengthCheck?: number | undefined; bandwidth?: number | undefined },
): number {
  const perNm = (wavenumber * wavenumber) / 1e7;
  return Math.hypot(fitted ?? 0, (instrument.wavelengthCheck ?? 0) * perNm, ((instrument.bandwidth ?? 0) / 10) * perNm);
}
