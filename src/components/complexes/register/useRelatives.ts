import { useQuery } from '@tanstack/react-query';
import { getJson } from '#src/components/ui/http.ts';
import { queryClient } from '#src/components/ui/query-client.ts';
import type { Page } from '#src/contracts/common.ts';
import type { ComplexSummary } from '#src/contracts/complexes.ts';

/** Records in sight whose text holds a formula, the withdrawn among them; asked once the reading stands. */
export function useRelatives(formula: string | null) {
  const search = new URLSearchParams({ q: formula ?? '', limit: '20', state: 'draft,registered,withdrawn' });
  return useQuery(
    {
      queryKey: ['complexes', 'of-formula', formula],
      queryFn: async ({ signal }) => {
        // A formula still being typed passes through many others: wait for it to settle.
        await new Promise((resolve) => setTimeout(resolve, 350));
        signal.throwIfAborted();
        return getJson<Page<ComplexSummary>>(`/api/complexes?${search}`, signal);
      },
      enabled: formula !== null && formula.length <= 200,
    },
    queryClient,
  );
}
