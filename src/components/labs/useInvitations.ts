import { useMutation, useQuery } from '@tanstack/react-query';
import type { InvitationRecord, InvitationsSent } from '../../contracts/invitations.ts';
import { getJson, sendJson } from '../ui/http.ts';
import { queryClient } from '../ui/query-client.ts';

/**
 * Invitations into a lab or to a folio: those sent, sending some, sending one again, taking one back.
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
    {
      mutationFn: async (input: Input) => {
        const answer = await sendJson<InvitationsSent>('POST', url, input);
        return 'items' in answer ? answer.items : [answer];
      },
      onSuccess: again,
    },
    queryClient,
  );
  const resend = useMutation(
    {
      mutationFn: (id: string) => sendJson<InvitationRecord>('POST', `/api/invitations/${id}/resend`),
      // Also after a refusal: it was accepted or revoked meanwhile, which the table should show.
      onSettled: again,
    },
    queryClient,
  );
  const revoke = useMutation(
    { mutationFn: (id: string) => sendJson('DELETE', `/api/invitations/${id}`), onSettled: again },
    queryClient,
  );
  return { sent, invite, resend, revoke };
}
