import { useMutation, useQuery } from '@tanstack/react-query';
import type { Account, AddressChangeInput, PasswordChange, SessionRecord } from '../../contracts/account.ts';
import { getJson, getVersioned, sendJson } from '../ui/http.ts';
import { queryClient } from '../ui/query-client.ts';
import { leaveNothing } from '../ui/signed-out.ts';

const ACCOUNT = ['account'];
const SESSIONS = ['account', 'sessions'];
const again = (queryKey: string[]) => queryClient.invalidateQueries({ queryKey, exact: true });

/** One's own account as it stands. */
export function useAccount(first: Account): Account {
  const { data } = useQuery(
    { queryKey: ACCOUNT, queryFn: ({ signal }) => getJson<Account>('/api/account', signal), initialData: first },
    queryClient,
  );
  return data;
}

/** Change one's name. The newest version is read first: nobody else changes it, but other fields of it may have moved on. */
export function useRename() {
  return useMutation(
    {
      mutationFn: async (name: string) => {
        const { etag } = await getVersioned<Account>('/api/account');
        return sendJson<Account>('PATCH', '/api/account', { name }, { ifMatch: etag });
      },
      onSuccess: (account) => queryClient.setQueryData(ACCOUNT, account),
    },
    queryClient,
  );
}

/** Change one's password; what was typed leaves the memory with the answer. */
export function usePasswordChange() {
  return useMutation(
    {
      mutationFn: (input: PasswordChange) =>
        sendJson<{ sessionsEnded: number; tokensRevoked: number }>('POST', '/api/account/password', input),
      onSuccess: () => again(SESSIONS),
      gcTime: 0,
    },
    queryClient,
  );
}

/** Ask for another address, or take that back. */
export function useAddressChange() {
  const ask = useMutation(
    {
      mutationFn: (input: AddressChangeInput) => sendJson<{ detail: string }>('POST', '/api/account/address', input),
      onSuccess: () => again(ACCOUNT),
      gcTime: 0,
    },
    queryClient,
  );
  const cancel = useMutation(
    { mutationFn: () => sendJson('DELETE', '/api/account/address'), onSuccess: () => again(ACCOUNT) },
    queryClient,
  );
  return { ask, cancel };
}

/** Where one is signed in, and ending that. */
export function useSessions(first: SessionRecord[]) {
  const { data: sessions, error } = useQuery(
    {
      queryKey: SESSIONS,
      queryFn: ({ signal }) => getJson<SessionRecord[]>('/api/account/sessions', signal),
      initialData: first,
    },
    queryClient,
  );
  const end = useMutation(
    { mutationFn: (id: string) => sendJson('DELETE', `/api/account/sessions/${id}`), onSettled: () => again(SESSIONS) },
    queryClient,
  );
  const endOthers = useMutation(
    { mutationFn: () => sendJson('DELETE', '/api/account/sessions?others=1'), onSettled: () => again(SESSIONS) },
    queryClient,
  );
  const endAll = useMutation(
    {
      mutationFn: () => sendJson('DELETE', '/api/account/sessions'),
      onSuccess: () => {
        leaveNothing();
        location.assign('/signin');
      },
    },
    queryClient,
  );
  return { sessions, error, end, endOthers, endAll };
}
