import { useMutation, useQuery } from '@tanstack/react-query';
import { useEffect } from 'react';
import type { GrantPatch, GrantRecord } from '../../contracts/grants.ts';
import type { FolioPatch, FolioRecord } from '../../contracts/sharing.ts';
import { getJson, getVersioned, ProblemError, sendJson } from '../ui/http.ts';
import { queryClient } from '../ui/query-client.ts';
import { withItem, withoutItem } from './folio-facts.ts';

/** How often a guest's page looks whether its access still holds, in milliseconds. */
const LOOK_AGAIN_MS = 30_000;

/** A folio, and the changes to it. `isGone` once it is no longer in sight. */
export function useFolio(first: FolioRecord) {
  const url = `/api/folios/${first.id}`;
  const key = ['folio', first.id];
  const isGuest = first.level !== null;
  const {
    data: folio,
    error,
    refetch,
  } = useQuery(
    {
      queryKey: key,
      queryFn: ({ signal }) => getJson<FolioRecord>(url, signal),
      initialData: first,
      refetchInterval: ({ state }) => (isGuest && !isMissing(state.error) ? LOOK_AGAIN_MS : false),
    },
    queryClient,
  );
  useEffect(() => {
    if (!isGuest) return;
    // Who comes back to a page that lay open must not read on in what was ended meanwhile.
    const look = () => document.visibilityState === 'visible' && void refetch();
    document.addEventListener('visibilitychange', look);
    return () => document.removeEventListener('visibilitychange', look);
  }, [isGuest, refetch]);
  const keep = (changed: FolioRecord) => queryClient.setQueryData(key, changed);
  const again = () => queryClient.invalidateQueries({ queryKey: key, exact: true });

  // The list is sent whole, so it is read once more right before: what others put in meanwhile stays in.
  const editItems = useMutation(
    {
      mutationFn: async (edit: { add: string } | { remove: string }) => {
        const { items } = await getJson<FolioRecord>(url);
        const next = 'add' in edit ? withItem(items, edit.add) : withoutItem(items, edit.remove);
        return sendJson<FolioRecord>('PUT', `${url}/items`, next);
      },
      onSuccess: async (changed) => {
        keep(changed);
        await queryClient.invalidateQueries({ queryKey: [...key, 'complexes'] });
      },
    },
    queryClient,
  );
  const change = useMutation(
    {
      mutationFn: async (patch: FolioPatch) => {
        const { etag } = await getVersioned<FolioRecord>(url);
        return sendJson<FolioRecord>('PATCH', url, patch, { ifMatch: etag });
      },
      onSuccess: keep,
    },
    queryClient,
  );
  const remove = useMutation(
    {
      mutationFn: async () => {
        const { etag } = await getVersioned<FolioRecord>(url);
        await sendJson('DELETE', url, undefined, { ifMatch: etag });
        location.assign('/folios');
      },
    },
    queryClient,
  );
  const changeGrant = useMutation(
    {
      mutationFn: async ({ id, patch }: { id: string; patch: GrantPatch }) => {
        const grant = `${url}/grants/${id}`;
        const { etag } = await getVersioned<GrantRecord>(grant);
        return sendJson<GrantRecord>('PATCH', grant, patch, { ifMatch: etag });
      },
      onSuccess: again,
    },
    queryClient,
  );
  const revokeGrant = useMutation(
    { mutationFn: (grant: string) => sendJson('DELETE', `${url}/grants/${grant}`), onSuccess: again },
    queryClient,
  );
  const acceptTerms = useMutation(
    {
      mutationFn: (licence: string) => sendJson<FolioRecord>('POST', `${url}/terms`, { licence }),
      onSuccess: keep,
      // The licence may have changed once more: what is asked for must be the present one.
      onError: again,
    },
    queryClient,
  );
  return { folio, isGone: isMissing(error), editItems, change, remove, changeGrant, revokeGrant, acceptTerms };
}

const isMissing = (error: unknown): boolean => error instanceof ProblemError && error.status === 404;
