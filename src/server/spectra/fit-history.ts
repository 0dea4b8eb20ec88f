import type { BandList, FitHistory } from '#src/contracts/spectra.ts';
import type { spectra } from '#src/db/schema/index.ts';
import { refuse } from './refuse.ts';

type Steps = (typeof spectra.$inferSelect)['history'];

const OPERATION = 'fit-bands';

/** A fit as the one entry that stands in a spectrum's history. */
export const asSteps = (fit: FitHistory | null): Steps => (fit ? [{ operation: OPERATION, parameters: fit }] : []);

/** The fit of a spectrum's history; null where its bands were not fitted. */
export function fitOf(history: Steps): FitHistory | null {
  const entry = history.find(({ operation }) => operation === OPERATION);
  return (entry?.parameters as FitHistory | undefined) ?? null;
}

/** What a fit says of a fitted band: the component that it was taken from. */
export const componentOf = (fit: FitHistory | null, wavenumber: number): FitHistory['components'][number] | undefined =>
  fit?.components.find((one) => Math.abs(one.wavenumber - wavenumber) < 1e-6);

/**
 * The history that goes with a list: the one sent, else the one on record for as long as a fitted band is left.
 *
 * @throws {HttpError} 422 for a fit without a fitted band
 */
export function historyFor(list: BandList, sent: FitHistory | undefined, standing: Steps): Steps {
  const isFitted = list.some(({ found }) => found === 'fitted');
  if (sent && !isFitted) throw refuse('#/fit', 'None of the bands is a fitted one: leave the history out');
  if (sent) return asSteps(sent);
  return isFitted ? standing : [];
}
