/** What the address of the access log tells. */
export interface AccessView {
  kind: '' | 'look' | 'download';
  subjectType: string[];
  account: string;
  complex: string;
  spectrum: string;
  folio: string;
  from: string;
  to: string;
  q: string;
  /** Cursors of the pages before this one, the first page's left out. */
  cursors: string[];
}

export const ACCESS_PAGE = 50;
const TEXTS = ['account', 'complex', 'spectrum', 'folio', 'from', 'to', 'q'] as const;

/** The view in an address. */
export function accessFrom(search: string): AccessView {
  const params = new URLSearchParams(search);
  const text = (name: string) => params.get(name) ?? '';
  const kind = text('kind');
  return {
    kind: kind === 'look' || kind === 'download' ? kind : '',
    subjectType: text('subjectType').split(',').filter(Boolean),
    account: text('account'),
    complex: text('complex'),
    spectrum: text('spectrum'),
    folio: text('folio'),
    from: text('from'),
    to: text('to'),
    q: text('q'),
    cursors: [],
  };
}

function params(view: AccessView): URLSearchParams {
  const made = new URLSearchParams();
  if (view.kind) made.set('kind', view.kind);
  if (view.subjectType.length > 0) made.set('subjectType', view.subjectType.join(','));
  for (const name of TEXTS) if (view[name].trim()) made.set(name, view[name].trim());
  return made;
}

/** The address of a view; `view=looked` keeps the tab. */
export const accessAddress = (view: AccessView): string => {
  const made = params(view);
  made.set('view', 'looked');
  return `?${made}`;
};

/** The request for the page shown. */
export function accessRequest(view: AccessView): string {
  const made = params(view);
  made.set('limit', String(ACCESS_PAGE));
  const cursor = view.cursors.at(-1);
  if (cursor) made.set('cursor', cursor);
  return `/api/access-log?${made}`;
}

export const narrowedAccess = (view: AccessView, part: Partial<Omit<AccessView, 'cursors'>>): AccessView => ({
  ...view,
  ...part,
  cursors: [],
});

export const hasAccessFilter = (view: AccessView): boolean => params(view).size > 0;
