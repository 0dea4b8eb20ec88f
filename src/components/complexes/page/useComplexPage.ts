import { type UseQueryResult, useQueries, useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import { asMeasured, curveOf, type FetchedCurve } from '#src/components/spectra/page/curves.ts';
import { getJson, getVersioned } from '#src/components/ui/http.ts';
import { queryClient } from '#src/components/ui/query-client.ts';
import type { ComplexRecord } from '#src/contracts/complexes.ts';
import type { BandRecord, Points, SpectrumSummary } from '#src/contracts/spectra.ts';

/** What the page was drawn with. */
export interface FirstComplex {
  complex: ComplexRecord;
  etag: string;
  /** The accession that was asked for, where that record was merged into this one. */
  alias?: string | null;
  spectra: SpectrumSummary[];
  /** How many spectra there are in sight; more than `spectra` where there are very many. */
  totalSpectra: number;
  bands: Record<string, BandRecord[]>;
}

/** The complex with its version. It came with the page; after a change it is read again. */
export function useComplexRecord({ complex, etag }: Pick<FirstComplex, 'complex' | 'etag'>) {
  const url = `/api/complexes/${complex.accession}`;
  const key = ['complex', complex.accession];
  const { data } = useQuery(
    {
      queryKey: key,
      queryFn: ({ signal }) => getVersioned<ComplexRecord>(url, signal),
      initialData: { data: complex, etag },
    },
    queryClient,
  );
  return {
    complex: data.data,
    etag: data.etag ?? '',
    reload: () => queryClient.invalidateQueries({ queryKey: key }),
  };
}

/** Bands of each spectrum that has some. */
export function useBandLists(spectra: readonly SpectrumSummary[], first: FirstComplex['bands']) {
  const withBands = useMemo(() => spectra.filter(({ bandCount }) => bandCount > 0), [spectra]);
  const lists = useQueries(
    {
      queries: withBands.map(({ id }) => ({
        queryKey: ['bands', id],
        queryFn: ({ signal }: { signal: AbortSignal }) => getJson<BandRecord[]>(`/api/spectra/${id}/bands`, signal),
        initialData: first[id],
      })),
    },
    queryClient,
  );
  return withBands.map((spectrum, i) => ({ spectrum, bands: lists[i]?.data ?? [] }));
}

export interface Curve {
  spectrum: SpectrumSummary;
  curve: FetchedCurve | null;
  failure: unknown;
}

/** One function for good, so that equal answers stay the same object from drawing to drawing. */
const keepAnswers = (results: readonly UseQueryResult<FetchedCurve>[]) =>
  results.map(({ data, error }) => ({ data: data ?? null, error }));

/** Points enough for an overlay; each spectrum is asked for once it is to be shown. */
export function useCurves(spectra: readonly SpectrumSummary[], wanted: ReadonlySet<string>): Curve[] {
  const answers = useQueries(
    {
      queries: spectra.map(({ id, technique }) => ({
        queryKey: ['points', id, 2000],
        queryFn: async ({ signal }: { signal: AbortSignal }) => {
          const points = await getJson<Points>(`/api/spectra/${id}/points?xUnit=cm-1&max=2000`, signal);
          return asMeasured(curveOf(points), technique);
        },
        enabled: wanted.has(id),
        staleTime: 300_000, // ms; points of a stored file do not change, only conditions do
      })),
      combine: keepAnswers,
    },
    queryClient,
  );
  return useMemo(
    () => spectra.map((spectrum, i) => ({ spectrum, curve: answers[i]?.data ?? null, failure: answers[i]?.error })),
    [spectra, answers],
  );
}
