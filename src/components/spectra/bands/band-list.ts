import { pickBands } from '#src/chem/spectra/pick-bands.ts';
import type { BandList, BandRecord } from '#src/contracts/spectra.ts';
import type { FetchedCurve } from '../page/curves.ts';

type Input = BandList[number];
export type BandClass = NonNullable<Input['assignment']>['class'];

/** A band in the making. `id` is there for one that stands on record. */
export interface BandDraft {
  /** Tells rows apart while they have no id. */
  key: string;
  id?: string;
  wavenumber: number;
  height: number;
  quantity: Input['quantity'];
  fwhm: number | null;
  shoulder: boolean;
  found: Input['found'];
  class: BandClass;
  centre?: number;
  from: string;
  to: string;
  ligand: string;
  reason: string;
}

export const draftOf = (band: BandRecord): BandDraft => ({
  key: band.id,
  id: band.id,
  wavenumber: band.wavenumber,
  height: band.height,
  quantity: band.quantity,
  fwhm: band.fwhm,
  shoulder: band.shoulder,
  found: band.found,
  class: band.assignment.class,
  ...(band.assignment.centre === undefined ? {} : { centre: band.assignment.centre }),
  from: band.assignment.from ?? '',
  to: band.assignment.to ?? '',
  ligand: band.assignment.ligand ?? '',
  reason: band.assignment.reason ?? '',
});

/** A list as it is sent: texts that are empty are not told. */
export function bandInputs(list: readonly BandDraft[]): BandList {
  return list.map(({ key: _, id, class: kind, centre, from, to, ligand, reason, ...measured }) => {
    const texts = Object.fromEntries(
      Object.entries({ from, to, ligand, reason })
        .map(([name, text]) => [name, text.trim()])
        .filter(([, text]) => text !== ''),
    );
    return {
      ...(id ? { id } : {}),
      ...measured,
      assignment: { class: kind, ...(centre === undefined ? {} : { centre }), ...texts },
    };
  });
}

/** Whether a list says the same as another, whatever its rows are called. */
export const sameBands = (a: readonly BandDraft[], b: readonly BandDraft[]): boolean =>
  JSON.stringify(bandInputs(a)) === JSON.stringify(bandInputs(b));

/** Steps that can be taken back. */
const UNDO_STEPS = 50;

/** The list as it is, and as it was before each step. */
export interface BandWork {
  list: BandDraft[];
  past: BandDraft[][];
}

export const step = ({ list, past }: BandWork, next: BandDraft[]): BandWork => ({
  list: [...next].sort((a, b) => a.wavenumber - b.wavenumber),
  past: [...past, list].slice(-UNDO_STEPS),
});
export const undo = ({ list, past }: BandWork): BandWork => ({ list: past.at(-1) ?? list, past: past.slice(0, -1) });

/** Quantity in which heights are told on a curve; null where the contract has none for it. */
export function heightQuantity(quantity: FetchedCurve['quantity']): Input['quantity'] | null {
  const known = ['epsilon', 'absorbance', 'kubelka-munk', 'delta-epsilon', 'emission'] as const;
  return known.find((one) => one === quantity) ?? null;
}

/** A fresh band of a curve. */
export const newBand = (
  key: string,
  quantity: Input['quantity'],
  measured: Pick<BandDraft, 'wavenumber' | 'height' | 'fwhm' | 'shoulder' | 'found'>,
): BandDraft => ({ key, quantity, ...measured, class: 'unassigned', from: '', to: '', ligand: '', reason: '' });

type Measured = Pick<BandDraft, 'wavenumber' | 'height' | 'fwhm' | 'shoulder' | 'found'>;

/** A place on a curve to what picking bears: whole cm⁻¹, five figures of the height. */
const rounded = <T extends Pick<Measured, 'wavenumber' | 'height' | 'fwhm'>>(band: T): T => ({
  ...band,
  wavenumber: Math.round(band.wavenumber),
  height: Number(band.height.toPrecision(5)),
  fwhm: band.fwhm === null ? null : Math.round(band.fwhm),
});

/** What the picker finds on a curve: positions in cm⁻¹, heights in the curve's quantity. */
export function pickable({ x, y }: FetchedCurve): Measured[] {
  const values = y.map((value) => value ?? Number.NaN);
  return pickBands(x, values).map((band) => rounded({ ...band, found: 'picked' as const }));
}

/** Share of the range of a curve within which a click means the maximum beside it. */
const SNAP_SHARE = 0.04;
/** Two bands closer than this are one, cm⁻¹. */
const SAME_BAND = 150;

/**
 * The band that a click on a curve means: the nearest maximum, if there is one near; else the curve at that place, as a
 * shoulder, since nothing rises there.
 *
 * @returns null outside the curve or over a gap
 */
export function bandAt(curve: FetchedCurve, candidates: readonly Measured[], wavenumber: number): Measured | null {
  const { x } = curve;
  const first = x[0];
  const last = x.at(-1);
  if (first === undefined || last === undefined || wavenumber < first || wavenumber > last) return null;
  const reach = SNAP_SHARE * (last - first);
  const near = candidates
    .filter((one) => Math.abs(one.wavenumber - wavenumber) <= reach)
    .sort((a, b) => Math.abs(a.wavenumber - wavenumber) - Math.abs(b.wavenumber - wavenumber));
  const found = near.find(({ shoulder }) => !shoulder) ?? near[0];
  if (found) {
    const { wavenumber: at, height, fwhm, shoulder } = found;
    return { wavenumber: at, height, fwhm, shoulder, found: 'picked' };
  }
  const height = heightAt(curve, wavenumber);
  return height === null
    ? null
    : rounded<Measured>({ wavenumber, height, fwhm: null, shoulder: true, found: 'picked' });
}

/** Height of the curve at a place, between its points linearly; null outside it or beside a gap. */
export function heightAt({ x, y }: FetchedCurve, wavenumber: number): number | null {
  const after = x.findIndex((value) => value >= wavenumber);
  if (after < 0) return null;
  const [x1, y1] = [x[after]!, y[after] ?? null];
  if (x1 === wavenumber) return y1;
  if (after === 0) return null;
  const [x0, y0] = [x[after - 1]!, y[after - 1] ?? null];
  return y0 === null || y1 === null ? null : y0 + ((y1 - y0) * (wavenumber - x0)) / (x1 - x0);
}

/** Whether a list holds a band at that place already. */
export const holds = (list: readonly Pick<BandDraft, 'wavenumber'>[], wavenumber: number): boolean =>
  list.some((band) => Math.abs(band.wavenumber - wavenumber) < SAME_BAND);
