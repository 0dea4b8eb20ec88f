import { bandClasses } from '#src/chem/assignment/band-classes.ts';

/**
 * What the table of complexes shows: filters, order, page. It stands in the address under the names of the API, so that
 * an address can be sent to a colleague; there `page` takes the place of the cursor, which is good for one asker only.
 */
export interface ComplexView {
  lists: Record<ListFilter, string[]>;
  /** Numbers as typed; empty where none. Window in nm, ε in dm³ mol⁻¹ cm⁻¹. */
  bandFrom: string;
  bandTo: string;
  minEpsilon: string;
  q: string;
  /** SMILES of a fragment of a ligand. */
  substructure: string;
  folio: string;
  sort: string;
  /** Counted from 1. */
  page: number;
}

export const LIST_FILTERS = [
  'metal',
  'geometry',
  'dCount',
  'pointGroup',
  'oxidationState',
  'spinState',
  'ligand',
  'lab',
  'bandClass',
  'state',
] as const;
export type ListFilter = (typeof LIST_FILTERS)[number];

export const NUMBER_FILTERS = ['bandFrom', 'bandTo', 'minEpsilon'] as const;
export const DEFAULT_SORT = '-updated';
/** Rows of a page. */
export const PAGE_SIZE = 50;

const SORTS = /^-?(accession|formula|metal|dCount|geometry|pointGroup|labs|spectra|updated)$/;
const NUMERIC: readonly ListFilter[] = ['dCount', 'oxidationState'];
const AMONG: Partial<Record<ListFilter, readonly string[]>> = {
  spinState: ['low', 'intermediate', 'high', 'crossover'],
  state: ['draft', 'registered', 'withdrawn'],
  bandClass: bandClasses,
};

const fitsList = (name: ListFilter, value: string): boolean => {
  if (NUMERIC.includes(name)) return Number.isFinite(Number(value));
  return AMONG[name]?.includes(value) ?? value.length <= 100;
};

/** A number the API takes: above zero, or zero for the least ε. */
export const isFilterNumber = (name: (typeof NUMBER_FILTERS)[number], text: string): boolean => {
  const value = Number(text);
  return text.trim() !== '' && Number.isFinite(value) && (name === 'minEpsilon' ? value >= 0 : value > 0);
};

/** The view that an address means. What does not fit is left out, so that an old or mistyped address still opens. */
export function readView(search: URLSearchParams): ComplexView {
  const list = (name: ListFilter) => {
    const values = search.getAll(name).flatMap((text) => text.split(','));
    return [...new Set(values.filter((value) => value !== '' && fitsList(name, value)))].slice(0, 50);
  };
  const number = (name: (typeof NUMBER_FILTERS)[number]) => {
    const text = search.get(name) ?? '';
    return isFilterNumber(name, text) ? text : '';
  };
  const sort = search.get('sort') ?? '';
  const page = Number(search.get('page'));
  return {
    lists: Object.fromEntries(LIST_FILTERS.map((name) => [name, list(name)])) as ComplexView['lists'],
    bandFrom: number('bandFrom'),
    bandTo: number('bandTo'),
    minEpsilon: number('minEpsilon'),
    q: (search.get('q') ?? '').slice(0, 200),
    substructure: (search.get('substructure') ?? '').slice(0, 500),
    folio: search.get('folio') ?? '',
    sort: SORTS.test(sort) ? sort : DEFAULT_SORT,
    page: Number.isInteger(page) && page >= 1 && page <= 10_000 ? page : 1,
  };
}

/** The filters of a view as the API takes them; equal views give equal text. */
export function filterSearch(view: ComplexView): URLSearchParams {
  const search = new URLSearchParams();
  for (const name of LIST_FILTERS) if (view.lists[name].length > 0) search.set(name, view.lists[name].join(','));
  for (const name of NUMBER_FILTERS) if (isFilterNumber(name, view[name])) search.set(name, view[name]);
  if (view.q.trim()) search.set('q', view.q.trim());
  if (view.substructure.trim()) search.set('substructure', view.substructure.trim());
  if (view.folio) search.set('folio', view.folio);
  return search;
}

/** What follows the path in the address of a view; empty for the plain table. */
export function toSearch(view: ComplexView): string {
  const search = filterSearch(view);
  if (view.sort !== DEFAULT_SORT) search.set('sort', view.sort);
  if (view.page > 1) search.set('page', String(view.page));
  // Commas are as good plain, and a person reads them better.
  const text = search.toString().replaceAll('%2C', ',');
  return text ? `?${text}` : '';
}

/** Another selection starts from its first page. */
export const changeView = (view: ComplexView, part: Partial<ComplexView>): ComplexView => ({
  ...view,
  page: 1,
  ...part,
});

/** Chooses a value of a filter, or takes it back. */
export function toggleValue(view: ComplexView, name: ListFilter, value: string): ComplexView {
  const chosen = view.lists[name];
  const next = chosen.includes(value) ? chosen.filter((one) => one !== value) : [...chosen, value];
  return changeView(view, { lists: { ...view.lists, [name]: next } });
}

/** Sorting by the column already sorted turns it round. */
export const sortBy = (view: ComplexView, column: string): ComplexView =>
  changeView(view, { sort: view.sort === column ? `-${column}` : column });

/** The same order, but nothing chosen. */
export const withoutFilters = (view: ComplexView): ComplexView => ({
  ...readView(new URLSearchParams()),
  sort: view.sort,
});

export const hasFilters = (view: ComplexView): boolean => filterSearch(view).size > 0;

/** One thing that is chosen, with the view without it. */
export interface Chosen {
  key: string;
  filter: ListFilter | 'band' | 'q' | 'substructure' | 'folio';
  value: string;
  without: ComplexView;
}

/** Everything that is chosen, in the order of the console. */
export function chosenOf(view: ComplexView): Chosen[] {
  const lists = LIST_FILTERS.flatMap((filter) =>
    view.lists[filter].map((value) => ({
      key: `${filter} ${value}`,
      filter,
      value,
      without: toggleValue(view, filter, value),
    })),
  );
  const one = (filter: 'band' | 'q' | 'substructure' | 'folio', value: string, part: Partial<ComplexView>) =>
    value ? [{ key: filter, filter, value, without: changeView(view, part) }] : [];
  return [
    ...lists,
    ...one('band', bandText(view), { bandFrom: '', bandTo: '', minEpsilon: '' }),
    ...one('q', view.q.trim(), { q: '' }),
    ...one('substructure', view.substructure.trim(), { substructure: '' }),
    ...one('folio', view.folio, { folio: '' }),
  ];
}

/** `420–560 nm, ε ≥ 20`; empty where no band is asked for. */
export function bandText(view: Pick<ComplexView, (typeof NUMBER_FILTERS)[number]>): string {
  const { bandFrom: from, bandTo: to, minEpsilon: least } = view;
  const range = from && to ? `${from}–${to} nm` : from ? `from ${from} nm` : to ? `up to ${to} nm` : '';
  return [range, least ? `ε ≥ ${least}` : ''].filter(Boolean).join(', ');
}

/** Bands by bins of 25 nm from 200 to 1100 nm, as the histogram draws them. */
export function bandBins(facet: readonly { value: string | number; count: number }[]): number[] {
  const byStart = new Map(facet.map(({ value, count }) => [Number(value), count]));
  return Array.from({ length: 36 }, (_, i) => byStart.get(200 + 25 * i) ?? 0);
}
