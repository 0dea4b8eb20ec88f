import { useMutation, useQuery } from '@tanstack/react-query';
import type { TokenInput, TokenRecord } from '../../contracts/sharing.ts';
import { getJson, sendJson } from '../ui/http.ts';
import { queryClient } from '../ui/query-client.ts';

const KEY = ['tokens'];
const again = () => queryClient.invalidateQueries({ queryKey: KEY });

/** Own access tokens. A new one's secret lives in the answer of `make` alone, until that is reset. */
export function useTokens(first: TokenRecord[]) {
  const { data: tokens } = useQuery(
    { queryKey: KEY, queryFn: ({ signal }) => getJson<TokenRecord[]>('/api/tokens', signal), initialData: first },
    queryClient,
  );
  const make = useMutation(
    {
      mutationFn: (input: TokenInput) => sendJson<TokenRecord>('POST', '/api/tokens', input),
      onSuccess: again,
      gcTime: 0, // nothing keeps the secret once it was put away
    },
    queryClient,
  );
  const revoke = useMutation(
    { mutationFn: (id: string) => sendJson('DELETE', `/api/tokens/${id}`), onSuccess: again },
    queryClient,
  );
  const revokeAll = useMutation(
    {
      // Those shown: one that was made elsewhere since is not ended unseen.
      mutationFn: (until: string) => sendJson('DELETE', `/api/tokens?until=${encodeURIComponent(until)}`),
      onSuccess: again,
    },
    queryClient,
  );
  return { tokens, make, revoke, revokeAll };
}
