import type { TransitionTable } from '#src/chem/symmetry/index.ts';
import type { BandRecord, SpectrumSummary } from '#src/contracts/spectra.ts';

export type View = TransitionTable['views'][number];
export type Row = View['rows'][number];

/** A band with the spectrum it stands in. */
export interface PlacedBand {
  band: BandRecord;
  spectrum: Pick<SpectrumSummary, 'id' | 'title'>;
}

/** Where an assignment's upper term stands among the transitions. */
export interface Match {
  /** Row, by its label in the group of the polyhedron. */
  row: string;
  /** Group that the label was read in. */
  group: string;
  /** The single transition in the view whose group that is; null where the label is that of the polyhedron. */
  to: string | null;
}

/** A term without the free-ion term in brackets: `4T1g(F)` is `4T1g`. */
export const bare = (term: string): string => term.trim().replace(/\([^()]*\)$/, '');

/**
 * Transitions that an assignment may mean. Its labels are read in the group of the ideal polyhedron first, where the
 * terms of a table are; then in the framework, the donor set and the effective group, in which one label can stand for
 * parts of several terms.
 *
 * @returns several where the label is not of one row alone; none where there is no label or no such term
 */
export function matchesOf(table: TransitionTable, { from, to }: BandRecord['assignment']): Match[] {
  if (!to || !table.ground || table.parent === null) return [];
  const [upper, lower] = [bare(to), from ? bare(from) : null];
  const parent = table.parent;
  const rows = table.views[0]?.rows ?? [];
  if (lower === null || lower === table.ground.label) {
    const own = rows.filter(({ label }) => label === upper);
    if (own.length > 0) return own.map(({ label }) => ({ row: label, group: parent, to: null }));
  }
  for (const view of table.views) {
    const found = view.rows.filter(({ transitions }) =>
      transitions.some((each) => each.to === upper && (lower === null || each.from === lower)),
    );
    if (found.length > 0) return found.map(({ label }) => ({ row: label, group: view.group, to: upper }));
  }
  return [];
}

/** The d–d bands of each row and transition, for the table. */
export function bandsByRow(table: TransitionTable, bands: readonly PlacedBand[]) {
  const placed = bands
    .filter(({ band }) => band.assignment.class === 'd-d')
    .map((each) => ({ ...each, matches: matchesOf(table, each.band.assignment) }));
  return (row: string, view: string, to: string): PlacedBand[] =>
    placed.filter(({ matches }) =>
      matches.some((match) => match.row === row && (match.to === null || match.group !== view || match.to === to)),
    );
}

/** The band to begin with: the strongest d–d one, then the strongest that the metal takes part in, then any. */
export function firstBand(bands: readonly PlacedBand[]): PlacedBand | null {
  const strength = ({ band }: PlacedBand): number => band.epsilon ?? -1;
  const strongest = (some: readonly PlacedBand[]) =>
    some.reduce<PlacedBand | null>((best, each) => (best && strength(best) >= strength(each) ? best : each), null);
  const of = (...classes: string[]) => bands.filter(({ band }) => classes.includes(band.assignment.class));
  return strongest(of('d-d')) ?? strongest(of('LMCT', 'MLCT', 'intervalence', 'metal-metal')) ?? strongest(bands);
}
