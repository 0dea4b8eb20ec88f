import { useMutation, useQuery } from '@tanstack/react-query';
import type { AccessRequestRecord, AccessRequestSettlement } from '../../contracts/grants.ts';
import { getJson, sendJson } from '../ui/http.ts';
import { queryClient } from '../ui/query-client.ts';

/** What guests of a folio asked for, and answering one. */
export function useAccessRequests(folio: string) {
  const url = `/api/folios/${folio}/requests`;
  const requests = useQuery(
    { queryKey: [url], queryFn: ({ signal }) => getJson<AccessRequestRecord[]>(url, signal) },
    queryClient,
  );
  const settle = useMutation(
    {
      mutationFn: ({ id, ...body }: AccessRequestSettlement & { id: string }) =>
        sendJson<AccessRequestRecord>('POST', `/api/requests/${id}/settle`, body),
      // Also after a refusal: somebody else answered meanwhile. What was granted stands in the list of readers.
      onSettled: () =>
        Promise.all([
          queryClient.invalidateQueries({ queryKey: [url] }),
          queryClient.invalidateQueries({ queryKey: ['folio', folio], exact: true }),
        ]),
    },
    queryClient,
  );
  return { requests, settle };
}
