import { SERIES_COLOURS, SERIES_DASHES } from '#src/components/spectra/plot/theme.ts';
import type { PlotBand, PlotSeries } from '#src/components/spectra/plot/types.ts';
import type { YUnit } from '#src/components/spectra/plot/units.ts';
import type { BandRecord, SpectrumSummary } from '#src/contracts/spectra.ts';
import type { Curve } from './useComplexPage.ts';

/** Curves that are drawn before a person chooses: more would hide each other. */
const AT_FIRST = 12;

/** Spectra that are drawn before a person chooses: none that is withdrawn. */
export function shownAtFirst(spectra: readonly SpectrumSummary[]): ReadonlySet<string> {
  const fit = spectra.filter(({ state }) => state !== 'withdrawn');
  return new Set(fit.slice(0, AT_FIRST).map(({ id }) => id));
}

/** Colour and dash of a spectrum by its place in the list, so that hiding one leaves the others as they are. */
export const looksAt = (place: number) => ({
  colour: SERIES_COLOURS[place % SERIES_COLOURS.length]!,
  dash: [...SERIES_DASHES[place % SERIES_DASHES.length]!],
});

const sameQuantity = (quantity: YUnit, shown: YUnit) =>
  quantity === shown || (quantity === 'epsilon' && shown === 'log-epsilon');

/** The curves that are to be seen and have the quantity of the axis. */
export function overlaySeries(curves: readonly Curve[], shown: ReadonlySet<string>, yUnit: YUnit): PlotSeries[] {
  return curves.flatMap(({ spectrum, curve }, place) => {
    if (!curve || !shown.has(spectrum.id) || !sameQuantity(curve.quantity, yUnit)) return [];
    return [{ id: spectrum.id, label: spectrum.title, x: curve.x, y: curve.y, ...looksAt(place) }];
  });
}

/** A spectrum that is chosen, but not of the quantity of the axis. */
export const isOffAxis = ({ curve }: Curve, yUnit: YUnit): boolean =>
  curve !== null && !sameQuantity(curve.quantity, yUnit);

/** Bands of one transition in several spectra stand for each other within this, cm⁻¹. */
const SAME_BAND = 400;

/** Bands to mark over the curves, those of one transition once. They need the quantity of the axis. */
export function overlayBands(
  lists: readonly { spectrum: SpectrumSummary; bands: readonly BandRecord[] }[],
  series: readonly PlotSeries[],
  yUnit: YUnit,
): PlotBand[] {
  const drawn = new Set(series.map(({ id }) => id));
  const marked: PlotBand[] = [];
  for (const { spectrum, bands } of lists) {
    if (!drawn.has(spectrum.id)) continue;
    for (const band of bands) {
      const height = yUnit === 'epsilon' || yUnit === 'log-epsilon' ? band.epsilon : heightIn(band, yUnit);
      if (height === null) continue;
      const { class: kind, from, to } = band.assignment;
      const twin = marked.find((one) => one.class === kind && Math.abs(one.wavenumber - band.wavenumber) < SAME_BAND);
      if (twin) twin.height = Math.max(twin.height, height);
      else marked.push({ wavenumber: band.wavenumber, height, class: kind, label: bandLabel(from, to) });
    }
  }
  return marked;
}

const heightIn = (band: BandRecord, yUnit: YUnit): number | null => (band.quantity === yUnit ? band.height : null);

/** A transition in plain text, lower state first. */
export const bandLabel = (from: string | undefined, to: string | undefined): string | undefined =>
  [from, to].filter(Boolean).join(' → ') || undefined;
