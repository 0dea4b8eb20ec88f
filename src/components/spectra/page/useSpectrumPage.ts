import { useQuery } from '@tanstack/react-query';
import { getJson, getVersioned } from '#src/components/ui/http.ts';
import { queryClient } from '#src/components/ui/query-client.ts';
import type { Points, SpectrumRecord } from '#src/contracts/spectra.ts';
import { asMeasured, curveOf } from './curves.ts';

/** Points that the curve of one spectrum is drawn from, and bands are picked on. */
const SHOWN_POINTS = 8000;

/** The spectrum with its version. It came with the page; after a change it is read again. */
export function useSpectrumRecord(first: { spectrum: SpectrumRecord; etag: string }) {
  const { id } = first.spectrum;
  const { data } = useQuery(
    {
      queryKey: ['spectrum', id],
      queryFn: ({ signal }) => getVersioned<SpectrumRecord>(`/api/spectra/${id}`, signal),
      initialData: { data: first.spectrum, etag: first.etag },
    },
    queryClient,
  );
  return {
    spectrum: data.data,
    etag: data.etag ?? '',
    reload: async () => {
      await queryClient.invalidateQueries({ queryKey: ['spectrum', id] });
      // Conditions decide what the curve is shown as.
      await queryClient.invalidateQueries({ queryKey: ['points', id] });
    },
  };
}

/** The curve: ε where the conditions give it, else in the quantity its technique reads bands in. */
export function useCurve({ id, technique }: Pick<SpectrumRecord, 'id' | 'technique'>) {
  return useQuery(
    {
      queryKey: ['points', id, SHOWN_POINTS, technique],
      queryFn: async ({ signal }) => {
        const points = await getJson<Points>(`/api/spectra/${id}/points?xUnit=cm-1&max=${SHOWN_POINTS}`, signal);
        return asMeasured(curveOf(points), technique);
      },
      staleTime: 300_000, // ms
    },
    queryClient,
  );
}

/** The curve as absorbance, for spectra that are shown as ε; asked for once somebody wants it. */
export function useAbsorbance(id: string, isWanted: boolean) {
  return useQuery(
    {
      queryKey: ['points', id, SHOWN_POINTS, 'as absorbance'],
      queryFn: async ({ signal }) =>
        curveOf(
          await getJson<Points>(`/api/spectra/${id}/points?xUnit=cm-1&yUnit=absorbance&max=${SHOWN_POINTS}`, signal),
        ),
      enabled: isWanted,
      staleTime: 300_000, // ms
    },
    queryClient,
  );
}
