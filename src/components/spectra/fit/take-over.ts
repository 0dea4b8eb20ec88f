import { componentArea } from '#src/chem/spectra/fit/components.ts';
import type { FitState } from '#src/chem/spectra/fit/fit-steps.ts';
import type { FitHistory } from '#src/contracts/spectra.ts';
import { type BandDraft, newBand } from '../bands/band-list.ts';

interface TakenOver {
  list: BandDraft[];
  components: FitHistory['components'];
}

/** Digits that go on record: a tenth of a wavenumber, six figures of the height. */
const tenth = (value: number) => Number(value.toFixed(1));
const sixFigures = (value: number) => Number(value.toPrecision(6));

/**
 * The band list with the fitted components in it. A band that stays within half the width of a component keeps its
 * assignment, and its id; bands within the range that no component accounts for are gone; those outside it stay.
 *
 * @param makeKey - a name for each new row
 */
export function takeOver(
  list: readonly BandDraft[],
  { components, range, settings }: FitState,
  quantity: BandDraft['quantity'],
  makeKey: () => string,
): TakenOver {
  const free = new Set(list);
  const measured = components.map((component) => {
    const [wavenumber, height, fwhm] = [
      tenth(component.wavenumber),
      sixFigures(component.height),
      tenth(component.fwhm),
    ];
    const area = componentArea(settings.shape, { ...component, height, fwhm });
    return { wavenumber, height, fwhm, area, error: component.errors?.wavenumber ?? null };
  });
  const fitted = measured.map(({ wavenumber, height, fwhm }, i) => {
    const now = { wavenumber, height, fwhm, shoulder: components[i]!.shoulder, found: 'fitted' as const };
    const before = nearest(free, wavenumber, fwhm / 2);
    if (!before) return newBand(makeKey(), quantity, now);
    free.delete(before);
    return { ...before, ...now, quantity };
  });
  const outside = [...free].filter(
    ({ wavenumber }) => wavenumber < (range.from ?? -Infinity) || wavenumber > (range.to ?? Infinity),
  );
  return { list: [...fitted, ...outside], components: measured };
}

function nearest(bands: ReadonlySet<BandDraft>, wavenumber: number, reach: number): BandDraft | undefined {
  const distance = (band: BandDraft) => Math.abs(band.wavenumber - wavenumber);
  return [...bands].filter((band) => distance(band) <= reach).sort((a, b) => distance(a) - distance(b))[0];
}
