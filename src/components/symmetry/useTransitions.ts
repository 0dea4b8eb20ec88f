import { useQuery } from '@tanstack/react-query';
import { getJson } from '#src/components/ui/http.ts';
import { queryClient } from '#src/components/ui/query-client.ts';
import type { CentreTransitions } from './panel-argument.ts';

export type SpinChoice = 'low' | 'intermediate' | 'high';

/** All d–d transitions of each centre of a complex; `stamp` changes when the record did. */
export function useTransitions(accession: string, spin: SpinChoice | null, stamp: string) {
  return useQuery(
    {
      queryKey: ['transitions', accession, spin, stamp],
      queryFn: ({ signal }) =>
        getJson<{ centres: CentreTransitions[] }>(
          `/api/complexes/${accession}/transitions${spin ? `?spin=${spin}` : ''}`,
          signal,
        ),
      staleTime: 300_000, // ms; they follow from the record alone
    },
    queryClient,
  );
}
