import type { Points, SpectrumSummary } from '#src/contracts/spectra.ts';
import type { YUnit } from '../plot/units.ts';
import { mediumText } from '../words.ts';

/** A curve as the plot takes it, in the quantity it came in. */
export interface FetchedCurve {
  quantity: YUnit;
  x: readonly number[];
  y: readonly (number | null)[];
}

/** Points of a spectrum as the plot takes them: log ε as ε, everything else in the quantity it came in. */
export function curveOf({ x, y, yUnit }: Points): FetchedCurve {
  if (yUnit !== 'log-epsilon') return { quantity: yUnit as YUnit, x, y };
  return { quantity: 'epsilon', x, y: y.map((log) => (log === null ? null : 10 ** log)) };
}

const ABSORBANCE_LIKE = new Set<YUnit>(['absorbance', 'transmittance', 'percent-transmittance']);

/** Transmittance as absorbance, A = −log₁₀ T; where nothing passes there is a gap. Other quantities stay as they are. */
export function asAbsorbance(curve: FetchedCurve): FetchedCurve {
  if (curve.quantity === 'absorbance' || !ABSORBANCE_LIKE.has(curve.quantity)) return curve;
  const full = curve.quantity === 'transmittance' ? 1 : 100;
  const y = curve.y.map((t) => (t === null || t <= 0 ? null : -Math.log10(t / full)));
  return { quantity: 'absorbance', x: curve.x, y };
}

/** Reflectance as the Kubelka–Munk function F(R) = (1 − R)²/2R, in which bands are maxima. */
export function asKubelkaMunk(curve: FetchedCurve): FetchedCurve {
  const full = { reflectance: 1, 'percent-reflectance': 100 }[curve.quantity as string];
  if (full === undefined) return curve;
  const y = curve.y.map((r) => (r === null || r <= 0 ? null : (1 - r / full) ** 2 / ((2 * r) / full)));
  return { quantity: 'kubelka-munk', x: curve.x, y };
}

/** The curve in the quantity in which its technique reads bands. */
export const asMeasured = (curve: FetchedCurve, technique: SpectrumSummary['technique']): FetchedCurve =>
  technique === 'reflectance' ? asKubelkaMunk(curve) : asAbsorbance(curve);

/** Quantities among which a set of curves can be shown, the most telling first. */
export function quantitiesOf(curves: readonly FetchedCurve[]): YUnit[] {
  const found = new Set(curves.map(({ quantity }) => quantity));
  const ordered: YUnit[] = [];
  if (found.has('epsilon')) ordered.push('epsilon', 'log-epsilon');
  for (const quantity of found) if (quantity !== 'epsilon') ordered.push(quantity);
  return ordered;
}

/** Lab, medium and state of a spectrum, as the key to its curve. */
export function curveLabel(spectrum: SpectrumSummary): string {
  const marks = [spectrum.synthetic ? 'SYNTHETIC' : null, spectrum.state === 'registered' ? null : spectrum.state];
  return [spectrum.lab.name, mediumText(spectrum), ...marks].filter(Boolean).join(' · ');
}
