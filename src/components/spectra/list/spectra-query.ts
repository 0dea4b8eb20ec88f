import type { SpectrumSummary } from '#src/contracts/spectra.ts';

/** What the address of the list tells; texts as they stand in it. */
export interface SpectraQuery {
  lab: string[];
  technique: string[];
  flag: string[];
  state: string[];
  q: string;
  sort: string;
  /** Cursors of the pages before this one, the first page's left out: the last is the page shown. */
  cursors: string[];
}

export const SORT_AT_FIRST = '-created';
/** Rows of a page. */
export const PAGE_SIZE = 50;
const LISTS = ['lab', 'technique', 'flag', 'state'] as const;
export type ListFilter = (typeof LISTS)[number];

/** The query in an address. The page of a list is a place in a session, not in an address that is sent to others. */
export function queryFrom(search: string): SpectraQuery {
  const params = new URLSearchParams(search);
  const list = (name: string) => params.getAll(name).flatMap((text) => text.split(',').filter(Boolean));
  return {
    lab: list('lab'),
    technique: list('technique'),
    flag: list('flag'),
    state: list('state'),
    q: params.get('q') ?? '',
    sort: params.get('sort') ?? SORT_AT_FIRST,
    cursors: [],
  };
}

/** The address of a query, without what is so anyhow. */
export function addressOf(query: SpectraQuery): string {
  const params = new URLSearchParams();
  for (const name of LISTS) if (query[name].length > 0) params.set(name, query[name].join(','));
  if (query.q.trim()) params.set('q', query.q.trim());
  if (query.sort !== SORT_AT_FIRST) params.set('sort', query.sort);
  const text = params.toString();
  return text === '' ? '' : `?${text}`;
}

/** The request for the page shown. */
export function requestOf(query: SpectraQuery): string {
  const params = new URLSearchParams(addressOf(query));
  params.set('limit', String(PAGE_SIZE));
  params.set('facets', '1');
  const cursor = query.cursors.at(-1);
  if (cursor) params.set('cursor', cursor);
  return `/api/spectra?${params}`;
}

/** Another filter or order starts from the first page. */
export const narrowed = (query: SpectraQuery, part: Partial<Omit<SpectraQuery, 'cursors'>>): SpectraQuery => ({
  ...query,
  ...part,
  cursors: [],
});

/** One choice put in or taken out. */
export const toggled = (query: SpectraQuery, name: ListFilter, value: string): SpectraQuery =>
  narrowed(query, {
    [name]: query[name].includes(value) ? query[name].filter((one) => one !== value) : [...query[name], value],
  });

/** Order by a column; by the one already chosen, the other way round. The latest comes first at first. */
export function sortedBy(query: SpectraQuery, column: string): SpectraQuery {
  const first = column === 'created' ? '-created' : column;
  const other = column === 'created' ? 'created' : `-${column}`;
  return narrowed(query, { sort: query.sort === first ? other : first });
}

/** How a column is ordered by just now. */
export const orderOf = ({ sort }: SpectraQuery, column: string): 'rising' | 'falling' | null =>
  sort === column ? 'rising' : sort === `-${column}` ? 'falling' : null;

export const hasFilter = (query: SpectraQuery): boolean =>
  query.q.trim() !== '' || LISTS.some((name) => query[name].length > 0);

/** Points of a spectrum in nm, the shorter wavelength first. */
export const rangeNm = ({ xMin, xMax }: Pick<SpectrumSummary, 'xMin' | 'xMax'>): [number, number] => [
  Math.round(1e7 / xMax),
  Math.round(1e7 / xMin),
];
