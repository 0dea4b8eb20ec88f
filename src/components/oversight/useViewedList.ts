import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { useEffect, useState } from 'react';
import type { Page } from '../../contracts/common.ts';
import { getJson } from '../ui/http.ts';
import { queryClient } from '../ui/query-client.ts';

/** Time that typing must rest before the list is asked, ms. */
const REST_MS = 250;

interface How<View> {
  from: (search: string) => View;
  requestOf: (view: View) => string;
  addressOf: (view: View) => string;
}

/** A list on the server whose view stands in the address. Its first page came with the document. */
export function useViewedList<View extends { q: string; cursors: string[] }, Row>(
  key: string,
  first: { search: string; page: Page<Row> },
  { from, requestOf, addressOf }: How<View>,
) {
  const [view, setView] = useState<View>(() => from(first.search));
  const [text, setText] = useState(view.q);
  const [start] = useState(() => requestOf(view));
  const request = requestOf(view);
  const { data, error, isPlaceholderData, refetch } = useQuery(
    {
      queryKey: [key, request],
      queryFn: ({ signal }) => getJson<Page<Row>>(request, signal),
      initialData: () => (request === start ? first.page : undefined),
      placeholderData: keepPreviousData,
    },
    queryClient,
  );
  useEffect(() => {
    const waiting = setTimeout(
      () => setView((now) => (now.q === text ? now : { ...now, q: text, cursors: [] })),
      REST_MS,
    );
    return () => clearTimeout(waiting);
  }, [text]);
  const address = addressOf(view);
  useEffect(() => history.replaceState(history.state, '', `${location.pathname}${address}`), [address]);
  return {
    view,
    setView,
    text,
    setText,
    page: data ?? first.page,
    isLate: isPlaceholderData,
    error,
    refetch: () => void refetch(),
  };
}
