import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { useEffect, useState } from 'react';
import { getJson } from '#src/components/ui/http.ts';
import { queryClient } from '#src/components/ui/query-client.ts';
import type { Page } from '#src/contracts/common.ts';
import type { SpectrumSummary } from '#src/contracts/spectra.ts';
import { addressOf, narrowed, queryFrom, requestOf, type SpectraQuery } from './spectra-query.ts';

/** Time that typing must rest before the list is asked, ms. */
const REST_MS = 250;

/** The spectra that match a query which stands in the address. Their first page came with the document. */
export function useSpectra(first: { search: string; page: Page<SpectrumSummary> }) {
  const [query, setQuery] = useState<SpectraQuery>(() => queryFrom(first.search));
  const [text, setText] = useState(query.q);
  const [start] = useState(() => requestOf(query));
  const request = requestOf(query);
  const { data, error, isPlaceholderData, refetch } = useQuery(
    {
      queryKey: ['spectra', request],
      queryFn: ({ signal }) => getJson<Page<SpectrumSummary>>(request, signal),
      initialData: () => (request === start ? first.page : undefined),
      placeholderData: keepPreviousData,
    },
    queryClient,
  );

  useEffect(() => {
    const waiting = setTimeout(() => setQuery((now) => (now.q === text ? now : narrowed(now, { q: text }))), REST_MS);
    return () => clearTimeout(waiting);
  }, [text]);
  useEffect(() => history.replaceState(history.state, '', `${location.pathname}${addressOf(query)}`), [query]);

  return {
    query,
    setQuery,
    text,
    setText,
    page: data ?? first.page,
    isLate: isPlaceholderData,
    error,
    refetch: () => void refetch(),
  };
}
