/** What the address of the trail tells; texts as they stand in it. */
export interface TrailView {
  action: string[];
  subjectType: string[];
  subject: string;
  actor: string;
  from: string;
  to: string;
  q: string;
  sort: 'seq' | '-seq';
  /** Cursors of the pages before this one, the first page's left out: the last is the page shown. */
  cursors: string[];
}

/** Rows of a page. */
export const PAGE_SIZE = 50;
const LISTS = ['action', 'subjectType'] as const;
const TEXTS = ['subject', 'actor', 'from', 'to', 'q'] as const;

/** The view in an address. Which page it is belongs to the session, not to an address that is sent to others. */
export function viewFrom(search: string): TrailView {
  const params = new URLSearchParams(search);
  const list = (name: string) => params.getAll(name).flatMap((text) => text.split(',').filter(Boolean));
  const text = (name: string) => params.get(name) ?? '';
  return {
    action: list('action'),
    subjectType: list('subjectType'),
    subject: text('subject'),
    actor: text('actor'),
    from: text('from'),
    to: text('to'),
    q: text('q'),
    sort: text('sort') === 'seq' ? 'seq' : '-seq',
    cursors: [],
  };
}

function filterParams(view: TrailView): URLSearchParams {
  const params = new URLSearchParams();
  for (const name of LISTS) if (view[name].length > 0) params.set(name, view[name].join(','));
  for (const name of TEXTS) if (view[name].trim()) params.set(name, view[name].trim());
  return params;
}
const searchOf = (params: URLSearchParams) => (params.size === 0 ? '' : `?${params}`);

/** The address of a view, without what is so anyhow. */
export function addressOf(view: TrailView): string {
  const params = filterParams(view);
  if (view.sort === 'seq') params.set('sort', 'seq');
  return searchOf(params);
}

/** The request for the page shown. */
export function requestOf(view: TrailView): string {
  const params = filterParams(view);
  params.set('sort', view.sort);
  params.set('facets', '1');
  params.set('limit', String(PAGE_SIZE));
  const cursor = view.cursors.at(-1);
  if (cursor) params.set('cursor', cursor);
  return `/api/trail?${params}`;
}

/** The file of all rows that fit the filter. */
export const exportOf = (view: TrailView, ending: 'csv' | 'jsonl'): string =>
  `/api/trail/export.${ending}${searchOf(filterParams(view))}`;

/** Another filter or order starts from the first page. */
export const narrowed = (view: TrailView, part: Partial<Omit<TrailView, 'cursors'>>): TrailView => ({
  ...view,
  ...part,
  cursors: [],
});

/** One choice put in or taken out. */
export const toggled = (view: TrailView, name: (typeof LISTS)[number], value: string): TrailView =>
  narrowed(view, {
    [name]: view[name].includes(value) ? view[name].filter((one) => one !== value) : [...view[name], value],
  });

export const hasFilter = (view: TrailView): boolean => filterParams(view).size > 0;
