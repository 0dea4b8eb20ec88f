import {
  type CellConditions,
  combinedPositionError,
  gaussianArea,
  molarAbsorptionCoefficient,
  oscillatorStrength,
  toAbsorbance,
  wavenumberInterval,
  type YUnit,
} from '#src/chem/spectra/index.ts';
import type { FitHistory } from '#src/contracts/spectra.ts';
import type { bands, spectra } from '#src/db/schema/index.ts';
import { componentOf, fitOf } from './fit-history.ts';

type Spectrum = typeof spectra.$inferSelect;
type Band = typeof bands.$inferSelect;
type Technique = Spectrum['technique'];

const ABSORBING = new Set<Technique>(['solution', 'transmission']);
const ABSORBANCE_LIKE = new Set<YUnit>(['absorbance', 'transmittance', 'percent-transmittance']);

/** What the stored ascending copy holds: absorbance where an absorption technique gives it, else the file's quantity. */
export const storedQuantity = (technique: Technique, yUnit: YUnit): YUnit =>
  ABSORBING.has(technique) && ABSORBANCE_LIKE.has(yUnit) ? 'absorbance' : yUnit;

/** Ordinates of a file as they are stored; see `storedQuantity`. */
export const storedValues = (y: ArrayLike<number>, technique: Technique, yUnit: YUnit): Float64Array =>
  storedQuantity(technique, yUnit) === 'absorbance' ? toAbsorbance(y, yUnit) : Float64Array.from(y);

/** What a band's ε hangs on, beside the band itself. */
export interface BandContext {
  /** Null where there is no ε: a condition is missing, the technique gives none, or several species absorb. */
  cell: CellConditions | null;
  mixture: boolean;
  /** nm */
  bandwidth: number | null;
  /** How the fitted bands were found. */
  fit: FitHistory | null;
}

/** @param speciesCount - how many species absorb; with more than one no ε belongs to the complex */
export function bandContext(
  {
    technique,
    concentration,
    pathLength,
    bandwidth,
    history,
  }: Pick<Spectrum, 'technique' | 'concentration' | 'pathLength' | 'bandwidth' | 'history'>,
  speciesCount: number,
): BandContext {
  const mixture = speciesCount > 1;
  const known = !mixture && ABSORBING.has(technique) && concentration && pathLength;
  return { cell: known ? { concentration, pathLength } : null, mixture, bandwidth, fit: fitOf(history) };
}

/** Stored ordinates as ε, or null where the conditions do not give it. */
export function epsilonOf(value: Float64Array, quantity: YUnit, cell: CellConditions | null): Float64Array | null {
  if (quantity === 'epsilon') return value;
  if (quantity === 'log-epsilon') return value.map((log) => 10 ** log);
  return quantity === 'absorbance' && cell ? molarAbsorptionCoefficient(value, cell) : null;
}

/**
 * What follows from a band and the conditions of its spectrum.
 *
 * ε is per mole of the entity. The oscillator strength is that of a Gaussian of this height and width, or of the shape
 * that was fitted. The uncertainty of a picked position is what the spectral bandwidth alone leaves, taken as a rectangle
 * of that width (JCGM 100:2008, 4.3.7); that of a fitted one combines fit, wavelength check and bandwidth; a typed
 * position has none that is known here.
 */
export function deriveBand(
  band: Pick<Band, 'wavenumber' | 'height' | 'quantity' | 'fwhm' | 'found'>,
  { cell, mixture, bandwidth, fit }: BandContext,
): Pick<Band, 'epsilon' | 'oscillatorStrength' | 'uncertainty'> {
  const epsilon = mixture ? null : epsilonOfBand(band, cell);
  const component = band.found === 'fitted' ? componentOf(fit, band.wavenumber) : undefined;
  return {
    epsilon,
    oscillatorStrength: strengthOf(epsilon, band, component),
    uncertainty: component ? fittedUncertainty(component, fit, bandwidth) : positionUncertainty(band, bandwidth),
  };
}

type Component = FitHistory['components'][number];

function strengthOf(epsilon: number | null, { fwhm }: Pick<Band, 'fwhm'>, component: Component | undefined) {
  if (epsilon === null || !(epsilon > 0) || !fwhm) return null;
  const isOwnWidth = component && component.height !== 0 && component.fwhm === fwhm;
  return oscillatorStrength(isOwnWidth ? (epsilon * component.area) / component.height : gaussianArea(epsilon, fwhm));
}

/** Null where nothing but a locked position is known. */
function fittedUncertainty({ wavenumber, error }: Component, fit: FitHistory | null, bandwidth: number | null) {
  const instrument = { wavelengthCheck: fit?.wavelengthCheck ?? undefined, bandwidth: bandwidth ?? undefined };
  return combinedPositionError(wavenumber, error, instrument) || null;
}

function positionUncertainty({ found, wavenumber }: Pick<Band, 'found' | 'wavenumber'>, bandwidth: number | null) {
  return found === 'typed' || !bandwidth ? null : bandwidthUncertainty(wavenumber, bandwidth);
}

function epsilonOfBand({ height, quantity }: Pick<Band, 'height' | 'quantity'>, cell: CellConditions | null) {
  if (quantity === 'epsilon') return height;
  return quantity === 'absorbance' && cell ? height / (cell.concentration * cell.pathLength) : null;
}

function bandwidthUncertainty(wavenumber: number, bandwidth: number): number {
  const centre = 1e7 / wavenumber;
  const half = Math.min(bandwidth / 2, centre / 2);
  return wavenumberInterval(centre - half, centre + half) / Math.sqrt(12);
}

/**
 * A band's height after its spectrum's conditions were mended. What was measured is the absorbance: a height told as ε
 * moves with concentration and path, and is an absorbance again where there is no ε any more.
 */
export function rebaseHeight(
  { height, quantity }: Pick<Band, 'height' | 'quantity'>,
  stored: YUnit,
  before: CellConditions | null,
  after: CellConditions | null,
): Pick<Band, 'height' | 'quantity'> {
  if (quantity !== 'epsilon' || stored !== 'absorbance' || !before) return { height, quantity };
  if (after && after.concentration === before.concentration && after.pathLength === before.pathLength)
    return { height, quantity };
  const absorbance = height * before.concentration * before.pathLength;
  if (!after) return { height: absorbance, quantity: 'absorbance' };
  return { height: absorbance / (after.concentration * after.pathLength), quantity };
}
