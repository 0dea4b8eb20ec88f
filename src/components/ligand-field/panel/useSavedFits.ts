import { useMutation, useQuery } from '@tanstack/react-query';
import { getJson, sendJson } from '#src/components/ui/http.ts';
import { queryClient } from '#src/components/ui/query-client.ts';
import type { LevelFitInput, LevelFitRecord } from '#src/contracts/level-fits.ts';

/** Saved fits of a complex, with what saves and withdraws one. */
export function useSavedFits(accession: string) {
  const url = `/api/complexes/${accession}/fits`;
  const key = ['level-fits', accession];
  const reload = () => queryClient.invalidateQueries({ queryKey: key });
  const list = useQuery(
    { queryKey: key, queryFn: ({ signal }) => getJson<LevelFitRecord[]>(url, signal) },
    queryClient,
  );
  const save = useMutation(
    { mutationFn: (body: LevelFitInput) => sendJson<LevelFitRecord>('POST', url, body), onSuccess: reload },
    queryClient,
  );
  const withdraw = useMutation(
    { mutationFn: (id: string) => sendJson('DELETE', `/api/level-fits/${id}`), onSuccess: reload },
    queryClient,
  );
  return { list, save, withdraw };
}
