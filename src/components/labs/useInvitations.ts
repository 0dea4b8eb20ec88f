import { useMutation, useQuery } from '@tanstack/react-query';
import type { InvitationRecord } from '../../contracts/invitations.ts';
import { getJson, sendJson } from '../ui/http.ts';
import { queryClient } from '../ui/query-client.ts';

/**
 * Invitations into a lab or to a folio: those sent, sending one, taking one back.
 *
 * @param owner - `/api/labs/{id}` or `/api/folios/{id}`
 */
export function useInvitations<Input>(owner: string) {
  const url = `${owner}/invitations`;
  const again = () => queryClient.invalidateQueries({ queryKey: [url] });
  const sent = useQuery(
    { queryKey: [url], queryFn: ({ signal }) => getJson<InvitationRecord[]>(url, signal) },
    queryClient,
  );
  const invite = useMutation(
    { mutationFn: (input: Input) => sendJson<InvitationRecord>('POST', url, input), onSuccess: again },
    queryClient,
  );
  const revoke = useMutation(
    { mutationFn: (id: string) => sendJson('DELETE', `/api/invitations/${id}`), onSuccess: again },
    queryClient,
  );
  return { sent, invite, revoke };
}
