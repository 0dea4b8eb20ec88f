import { useMutation, useQuery } from '@tanstack/react-query';
import type { FolioPatch, FolioRecord } from '../../contracts/sharing.ts';
import { getJson, getVersioned, sendJson } from '../ui/http.ts';
import { queryClient } from '../ui/query-client.ts';
import { withItem, withoutItem } from './folio-facts.ts';

/** A folio, and the changes to it. */
export function useFolio(first: FolioRecord) {
  const url = `/api/folios/${first.id}`;
  const key = ['folio', first.id];
  const { data: folio } = useQuery(
    { queryKey: key, queryFn: ({ signal }) => getJson<FolioRecord>(url, signal), initialData: first },
    queryClient,
  );
  const keep = (changed: FolioRecord) => queryClient.setQueryData(key, changed);

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
  const revokeGrant = useMutation(
    {
      mutationFn: (grant: string) => sendJson('DELETE', `${url}/grants/${grant}`),
      onSuccess: () => queryClient.invalidateQueries({ queryKey: key, exact: true }),
    },
    queryClient,
  );
  return { folio, editItems, change, revokeGrant };
}
