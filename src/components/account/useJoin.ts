import { useMutation, useQuery } from '@tanstack/react-query';
import { useEffect, useState } from 'react';
import type { InvitationPreview } from '../../contracts/invitations.ts';
import { sendJson } from '../ui/http.ts';
import { ProblemError } from '../ui/problem-error.ts';
import { queryClient } from '../ui/query-client.ts';
import { forgetInvitation, takeInvitationToken } from './invitation-token.ts';
import { landing } from './join-step.ts';
import { signInPath } from './own-path.ts';
import { signIn, signOut } from './sign-in.ts';

interface Accepted {
  email: string;
  folio: string | null;
  lab: string | null;
}

/** An invitation from its link to its acceptance. */
export function useJoin() {
  // undefined until the address was read, which only the browser can
  const [token, setToken] = useState<string | null | undefined>(undefined);
  const [name, setName] = useState('');
  const [password, setPassword] = useState('');
  useEffect(() => setToken(takeInvitationToken()), []);

  const preview = useQuery(
    {
      queryKey: ['invitation', token],
      queryFn: ({ signal }) => sendJson<InvitationPreview>('POST', '/api/invitations/preview', { token }, { signal }),
      enabled: typeof token === 'string',
    },
    queryClient,
  );
  const isRefused = preview.error instanceof ProblemError && preview.error.status === 404;
  useEffect(() => {
    if (isRefused) forgetInvitation();
  }, [isRefused]);

  const accept = useMutation(
    {
      mutationFn: async (account: { name: string; password: string } | null) => {
        const shown = preview.data?.folio ? { terms: true, licence: preview.data.folio.licence } : {};
        const accepted = await sendJson<Accepted>('POST', '/api/invitations/accept', { token, ...account, ...shown });
        forgetInvitation();
        const isIn = account === null || (await signIn(accepted.email, account.password).catch(() => '')) === null;
        location.assign(isIn ? landing(accepted) : signInPath(landing(accepted)));
      },
      // The licence changed since it was shown: the page must show the present one before it is accepted.
      onError: (error) => error instanceof ProblemError && error.status === 409 && void preview.refetch(),
    },
    queryClient,
  );
  const leave = useMutation(
    {
      mutationFn: async () => {
        await signOut();
        location.reload();
      },
    },
    queryClient,
  );
  return { token, preview, name, setName, password, setPassword, accept, leave };
}
