import type { TransitionTable } from '#src/chem/symmetry/index.ts';
import { type DataColumn, tableCsv } from '#src/components/ui/table-csv.ts';
import { bandsByRow, type PlacedBand, type View } from './band-matching.ts';

type Transition = View['rows'][number]['transitions'][number];

/** One line of the table of transitions: a term of the polyhedron, and one part of it in a group. */
export interface TransitionRow {
  key: string;
  kind: View['kind'];
  group: string;
  /** In the group of the ideal polyhedron. */
  excited: string;
  count: number;
  freeIon: string[];
  transition: Transition;
  bands: PlacedBand[];
  /** First of the parts of its term. */
  leads: boolean;
  /** Parts of its term. */
  parts: number;
}

export const KIND_WORDS: Record<View['kind'], string> = {
  framework: 'framework',
  donorSet: 'donor set',
  effective: 'effective',
  polyhedron: 'ideal polyhedron',
};

export const MECHANISM_WORDS: Record<Transition['mechanism'], string> = {
  allowed: 'allowed',
  vibronic: 'vibronic',
  'spin-forbidden': 'spin-forbidden',
  'spin-forbidden-vibronic': 'spin-forbidden, vibronic',
  forbidden: 'forbidden',
};

/** Views that judge alike in one group, once each, with every word for them. */
export function distinctViews({ views }: TransitionTable): { view: View; words: string }[] {
  const first = views.filter(
    (view, i) => !views.slice(0, i).some((other) => other.group === view.group && other.axes === view.axes),
  );
  return first.map((view) => ({
    view,
    words: views
      .filter((other) => other.group === view.group && other.axes === view.axes)
      .map(({ kind }) => KIND_WORDS[kind])
      .join(', '),
  }));
}

/** The lines of one view. */
export function transitionRows(table: TransitionTable, view: View, bands: readonly PlacedBand[]): TransitionRow[] {
  const bandsOf = bandsByRow(table, bands);
  return view.rows.flatMap(({ label, count, freeIon, transitions }) =>
    transitions.map((transition, i) => ({
      key: `${label} ${transition.from} ${transition.to} ${i}`,
      kind: view.kind,
      group: view.group,
      excited: label,
      count,
      freeIon,
      transition,
      bands: bandsOf(label, view.group, transition.to),
      leads: i === 0,
      parts: transitions.length,
    })),
  );
}

/** How a polarisation stands: open, by which vibrations, or closed. */
export function polarisation({ dipole, vibronic }: Transition, direction: 'x' | 'y' | 'z'): string {
  if (dipole[direction]) return 'allowed';
  return vibronic[direction].length > 0 ? `by ${vibronic[direction].join(', ')}` : 'closed';
}

const columns = (parent: string): DataColumn<TransitionRow>[] => {
  const way = (d: 'x' | 'y' | 'z'): DataColumn<TransitionRow> => ({
    id: d,
    header: `along ${d}`,
    value: ({ transition }) => polarisation(transition, d),
  });
  const truth = (value: boolean | null): string => (value === null ? 'no meaning' : value ? 'allowed' : 'forbidden');
  return [
    { id: 'excited', header: `excited term in ${parent}`, value: ({ excited }) => excited },
    { id: 'count', header: 'levels', value: ({ count }) => count },
    { id: 'ion', header: 'free-ion terms', value: ({ freeIon }) => freeIon.join(' ') },
    { id: 'kind', header: 'judged by', value: ({ kind }) => KIND_WORDS[kind] },
    { id: 'group', header: 'group', value: ({ group }) => group },
    { id: 'from', header: 'from', value: ({ transition }) => transition.from },
    { id: 'to', header: 'to', value: ({ transition }) => transition.to },
    { id: 'spin', header: 'spin', value: ({ transition }) => truth(transition.spinAllowed) },
    { id: 'laporte', header: 'Laporte', value: ({ transition }) => truth(transition.laporteAllowed) },
    way('x'),
    way('y'),
    way('z'),
    { id: 'mechanism', header: 'mechanism', value: ({ transition }) => MECHANISM_WORDS[transition.mechanism] },
    {
      id: 'least',
      header: 'expected epsilon from / dm3 mol-1 cm-1',
      value: ({ transition }) => transition.expectedEpsilon.from,
    },
    { id: 'most', header: 'to / dm3 mol-1 cm-1', value: ({ transition }) => transition.expectedEpsilon.to },
    {
      id: 'bands',
      header: 'bands / cm-1',
      value: ({ bands }) => bands.map(({ band }) => Math.round(band.wavenumber)).join(' '),
    },
  ];
};

/** Every view of a table as one CSV. */
export function transitionsCsv(table: TransitionTable, bands: readonly PlacedBand[]): string {
  const rows = table.views.flatMap((view) => transitionRows(table, view, bands));
  return tableCsv(columns(table.parent ?? 'the polyhedron'), rows);
}

/** The lines of one view with tabs between, for a table elsewhere. */
export function transitionsText(table: TransitionTable, view: View, bands: readonly PlacedBand[]): string {
  const own = columns(table.parent ?? 'the polyhedron');
  const lines = transitionRows(table, view, bands).map((row) => own.map(({ value }) => value(row) ?? '').join('\t'));
  return [own.map(({ header }) => header).join('\t'), ...lines].join('\n');
}
