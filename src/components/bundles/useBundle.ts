import { useMutation, useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import type { BundleInput, BundleRecord } from '../../contracts/sharing.ts';
import { getJson, sendJson } from '../ui/http.ts';
import { queryClient } from '../ui/query-client.ts';
import { fileNameOf, isUnderWay } from './bundle-state.ts';

const ASK_AGAIN_MS = 1000;

/** A bundle from its order to the file; asked after once a second while it is made. */
export function useBundle(target: BundleInput) {
  const [id, setId] = useState<string | null>(null);
  const url = `/api/bundles/${id}`;
  const order = useMutation(
    {
      mutationFn: (notify: boolean) => sendJson<BundleRecord>('POST', '/api/bundles', { ...target, notify }),
      onSuccess: (bundle) => {
        queryClient.setQueryData(['bundle', bundle.id], bundle);
        setId(bundle.id);
      },
    },
    queryClient,
  );
  const bundle = useQuery(
    {
      queryKey: ['bundle', id],
      queryFn: ({ signal }) => getJson<BundleRecord>(url, signal),
      enabled: id !== null,
      refetchInterval: ({ state }) => (state.data && !isUnderWay(state.data) ? false : ASK_AGAIN_MS),
    },
    queryClient,
  );
  // The name stands in the head of the file; its first byte is enough to learn it.
  const fileName = useQuery(
    {
      queryKey: ['bundle', id, 'name'],
      queryFn: async ({ signal }) => {
        const { headers } = await fetch(`${url}/file`, { headers: { range: 'bytes=0-0' }, signal });
        return fileNameOf(headers.get('content-disposition')) ?? 'bundle.zip';
      },
      enabled: bundle.data?.state === 'ready',
    },
    queryClient,
  );
  const cancel = useMutation(
    {
      mutationFn: () => sendJson('DELETE', url),
      onSettled: () => queryClient.invalidateQueries({ queryKey: ['bundle', id] }),
    },
    queryClient,
  );
  return { order, bundle, fileName: fileName.data, cancel };
}
