import type { FitRequest, ToldLevel } from '#src/chem/ligand-field/index.ts';
import type { BandRecord, SpectrumSummary } from '#src/contracts/spectra.ts';

export interface BandSource {
  spectrum: SpectrumSummary;
  bands: BandRecord[];
}

/** Above it, in dm³ mol⁻¹ cm⁻¹, an unassigned band is hardly d–d (common practice). */
const STRONG = 1000;

/** Whether a band can be one of the d levels of a centre: assigned so, or not assigned and not too strong. */
export const isCandidate = ({ assignment, epsilon }: BandRecord, centre: number): boolean =>
  (assignment.centre ?? centre) === centre &&
  (assignment.class === 'd-d' || (assignment.class === 'unassigned' && (epsilon ?? 0) < STRONG));

/** Spectra with candidates, that with the most assigned d–d bands first. */
export function sourcesFor(lists: readonly BandSource[], centre: number): BandSource[] {
  const assigned = ({ bands }: BandSource) =>
    bands.filter(({ assignment }) => assignment.class === 'd-d' && assignment.to).length;
  return lists
    .map(({ spectrum, bands }) => ({
      spectrum,
      bands: bands.filter((band) => isCandidate(band, centre)).sort((a, b) => a.wavenumber - b.wavenumber),
    }))
    .filter(({ bands }) => bands.length > 0)
    .sort((a, b) => assigned(b) - assigned(a) || b.bands.length - a.bands.length);
}

/** Bands to begin with: the assigned ones; where none is, all. */
export function firstChosen(bands: readonly BandRecord[]): string[] {
  const assigned = bands.filter(({ assignment }) => assignment.class === 'd-d');
  return (assigned.length > 0 ? assigned : bands).map(({ id }) => id);
}

type FitBand = FitRequest['bands'][number] & { band: string };

/** Bands as a fit takes them, each with its id. */
export const fitBands = (bands: readonly BandRecord[]): FitBand[] =>
  bands.map(({ id, wavenumber, uncertainty, assignment: { class: kind, to } }) => ({
    band: id,
    wavenumber,
    ...(kind === 'd-d' && to ? { to } : {}),
    ...(uncertainty ? { uncertainty } : {}),
  }));

const bare = (term: string): string => term.replace(/\([^()]*\)$/, '');
const parentOf = (term: string): string | null => /\(([A-Z])\)$/.exec(term)?.[1] ?? null;

/**
 * Which level each band ends on: of its term and, where told, its free-ion parent; bands of one term without a parent
 * take the levels of that term in rising order.
 *
 * @param levels - ascending, the ground level first
 * @returns for each band the index of its level; null where there is none of its term
 */
export function matchBands(
  levels: readonly Pick<ToldLevel, 'label' | 'parent'>[],
  bands: readonly { wavenumber: number; to: string | null }[],
): (number | null)[] {
  const found: (number | null)[] = bands.map(() => null);
  const taken = new Set<number>();
  const order = bands.map((_, i) => i).sort((a, b) => bands[a]!.wavenumber - bands[b]!.wavenumber);
  const settle = (i: number, fits: (level: Pick<ToldLevel, 'label' | 'parent'>) => boolean) => {
    const index = levels.findIndex((level, k) => k > 0 && !taken.has(k) && fits(level));
    if (index < 0) return;
    found[i] = index;
    taken.add(index);
  };
  // Those that tell most choose first.
  for (const i of order) {
    const to = bands[i]!.to;
    const parent = to && parentOf(to);
    if (to && parent) settle(i, (level) => level.label === bare(to) && level.parent === parent);
  }
  for (const i of order) {
    const to = bands[i]!.to;
    if (to && found[i] === null) settle(i, (level) => level.label === bare(to));
  }
  return found;
}
