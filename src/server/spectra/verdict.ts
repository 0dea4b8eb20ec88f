import { findSolvent } from '#src/chem/spectra/index.ts';
import type { bands, centres } from '#src/db/schema/index.ts';
import type { SolventShare } from './conditions.ts';

type Centre = Pick<typeof centres.$inferSelect, 'ordinal' | 'dCount' | 'spinState'>;
type Band = Pick<typeof bands.$inferSelect, 'class' | 'centreOrdinal' | 'wavenumber' | 'from' | 'to'>;

/**
 * What plainly contradicts an assignment, in a sentence, or null. Silent where the facts do not bear a judgement: a
 * d-count that is not known, several centres of which none is named, a crossover complex.
 */
export function verdictOf(
  band: Band,
  { centres, solvents }: { centres: readonly Centre[]; solvents: readonly SolventShare[] },
): string | null {
  const named = centres.length === 1 ? centres[0] : centres.find(({ ordinal }) => ordinal === band.centreOrdinal);
  const doubts = [
    named ? electronDoubt(band, named) : null,
    named && band.class === 'd-d' ? termDoubt(band, named) : null,
    cutoffDoubt(band, solvents),
  ];
  return doubts.filter((doubt) => doubt !== null).join(' ') || null;
}

function electronDoubt({ class: kind }: Band, { dCount }: Centre): string | null {
  if (kind === 'd-d' && (dCount === 0 || dCount === 10)) return `A d${dCount} ion has no d–d band.`;
  if (kind === 'MLCT' && dCount === 0) return 'A d0 ion has no d electron to give: no MLCT band.';
  if (kind === 'LMCT' && dCount === 10) return 'The d shell of a d10 ion is full: no LMCT band into it.';
  return null;
}

/** A multiplicity 2S + 1 that n d electrons cannot have. */
function termDoubt({ from, to }: Band, { dCount, spinState }: Centre): string | null {
  if (dCount === null || !Number.isInteger(dCount) || dCount < 1 || dCount > 9 || spinState === 'crossover')
    return null;
  const highest = Math.min(dCount, 10 - dCount) + 1;
  for (const term of [from, to]) {
    const multiplicity = Number(/^\s*(\d)\s*[A-Z]/.exec(term ?? '')?.[1] ?? Number.NaN);
    if (Number.isNaN(multiplicity)) continue;
    if (multiplicity < 1 || multiplicity > highest || (highest - multiplicity) % 2 !== 0)
      return `A d${dCount} ion has no term of multiplicity ${multiplicity}.`;
  }
  return null;
}

function cutoffDoubt({ wavenumber }: Band, solvents: readonly SolventShare[]): string | null {
  const wavelength = 1e7 / wavenumber;
  const worst = solvents
    .flatMap(({ name }) => findSolvent(name) ?? [])
    .sort((a, b) => b.cutoffNm - a.cutoffNm)
    .at(0);
  if (!worst || wavelength >= worst.cutoffNm) return null;
  return `The band lies below the cut-off of ${worst.name}, ${worst.cutoffNm} nm.`;
}
