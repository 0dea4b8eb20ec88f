import { useMutation, useQuery } from '@tanstack/react-query';
import type { Page } from '../../contracts/common.ts';
import type { MergeTask } from '../../contracts/merges.ts';
import { getJson, getVersioned, sendJson } from '../ui/http.ts';
import { queryClient } from '../ui/query-client.ts';

/** What the steward says of a pair. */
export type Decision =
  | { kind: 'different'; task: MergeTask; reason: string }
  | { kind: 'merge'; task: MergeTask; from: string; into: string; reason: string };

const KEY = ['merge-tasks'];

async function send(decision: Decision): Promise<string> {
  const { task, reason } = decision;
  if (decision.kind === 'different') {
    await sendJson('POST', `/api/merge-tasks/${task.id}/settle`, { outcome: 'different', reason });
    return `${task.first.complex.accession} and ${task.second.complex.accession} stay two records.`;
  }
  const { from, into } = decision;
  const { etag } = await getVersioned(`/api/complexes/${from}`);
  await sendJson('POST', `/api/complexes/${from}/merge`, { into, reason }, { ifMatch: etag });
  return `${from} lives on as ${into}.`;
}

/** Pairs that wait, and deciding on one. The first pairs came with the page. */
export function useMergeQueue(first: Page<MergeTask>) {
  const queue = useQuery(
    {
      queryKey: KEY,
      queryFn: ({ signal }) => getJson<Page<MergeTask>>('/api/merge-tasks', signal),
      initialData: first,
      staleTime: 30_000, // ms
    },
    queryClient,
  );
  const decide = useMutation(
    { mutationFn: send, onSuccess: () => queryClient.invalidateQueries({ queryKey: KEY }) },
    queryClient,
  );
  return { queue, decide };
}
