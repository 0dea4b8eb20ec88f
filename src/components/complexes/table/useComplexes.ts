import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { useCallback, useEffect, useState } from 'react';
import { getJson } from '#src/components/ui/http.ts';
import { queryClient } from '#src/components/ui/query-client.ts';
import type { Page } from '#src/contracts/common.ts';
import type { ComplexSummary } from '#src/contracts/complexes.ts';
import { pageAt } from './pages.ts';
import { type ComplexView, filterSearch, PAGE_SIZE, readView, toSearch } from './view.ts';

type ComplexPage = Page<ComplexSummary>;

/** One page of complexes by the API. */
export const fetchComplexes =
  (search: URLSearchParams, signal?: AbortSignal) =>
  (paging: { limit: number; cursor?: string }): Promise<ComplexPage> => {
    const query = new URLSearchParams(search);
    for (const [name, value] of Object.entries(paging)) query.set(name, String(value));
    return getJson<ComplexPage>(`/api/complexes?${query}`, signal);
  };

const EMPTY: ComplexPage = { items: [], total: 0, next: null };

/** The view, kept in the address. Turning a page is a step one can go back; a changed filter is not. */
function useView(search: string) {
  const [view, setView] = useState(() => readView(new URLSearchParams(search)));
  useEffect(() => {
    const back = () => setView(readView(new URLSearchParams(location.search)));
    addEventListener('popstate', back);
    return () => removeEventListener('popstate', back);
  }, []);
  useEffect(() => {
    const address = location.pathname + toSearch(view);
    if (address === location.pathname + location.search) return;
    const shown = readView(new URLSearchParams(location.search));
    if (toSearch({ ...shown, page: 1 }) === toSearch({ ...view, page: 1 })) history.pushState(null, '', address);
    else history.replaceState(null, '', address);
  }, [view]);
  return [view, useCallback((next: ComplexView) => setView(next), [])] as const;
}

/**
 * The complexes that match a view, and what each filter would leave. Both came with the document for the view it was
 * asked for; rows stay while newer ones are fetched, and a newer question calls off an older one.
 */
export function useComplexes(first: { search: string; page: ComplexPage }) {
  const [view, setView] = useView(first.search);
  const [firstView] = useState(view);
  const filters = filterSearch(view);
  const isFirst = view === firstView;

  const rows = useQuery(
    {
      queryKey: ['complexes', 'page', filters.toString(), view.sort, view.page],
      queryFn: async ({ signal }) => {
        const search = new URLSearchParams(filters);
        search.set('sort', view.sort);
        return (await pageAt((view.page - 1) * PAGE_SIZE, PAGE_SIZE, fetchComplexes(search, signal))) ?? EMPTY;
      },
      initialData: () => (isFirst ? first.page : undefined),
      placeholderData: keepPreviousData,
    },
    queryClient,
  );
  const facets = useQuery(
    {
      queryKey: ['complexes', 'facets', filters.toString()],
      queryFn: async ({ signal }) => {
        const search = new URLSearchParams(filters);
        search.set('facets', '1');
        return (await fetchComplexes(search, signal)({ limit: 1 })).facets ?? {};
      },
      initialData: () => (isFirst ? first.page.facets : undefined),
      placeholderData: keepPreviousData,
    },
    queryClient,
  );
  return {
    view,
    setView,
    page: rows.data ?? EMPTY,
    facets: facets.data ?? {},
    isLate: rows.isPlaceholderData || rows.isPending,
    problem: rows.error ?? facets.error,
    retry: () => {
      rows.refetch();
      facets.refetch();
    },
  };
}
