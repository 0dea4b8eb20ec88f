import { useState } from 'react';
import type { Page } from '../../contracts/common.ts';
import type { MergeTask } from '../../contracts/merges.ts';
import { Button } from '../ui/Button.tsx';
import { longDay } from '../ui/dates.ts';
import { EmptyState } from '../ui/EmptyState.tsx';
import { Problem } from '../ui/Problem.tsx';
import { StatusLine } from '../ui/StatusLine.tsx';
import { MergeDialog } from './MergeDialog.tsx';
import { MergeSpecimen } from './MergeSpecimen.tsx';
import { differenceSentence } from './sides.ts';
import { type Decision, useMergeQueue } from './useMergeQueue.ts';

/** Pairs of records that look like one complex, for the steward to judge. */
export function MergeQueue({ first }: { first: Page<MergeTask> }) {
  const { queue, decide } = useMergeQueue(first);
  const [asked, setAsked] = useState<Decision | null>(null);
  const { items, total } = queue.data;
  const ask = (decision: Decision) => {
    decide.reset();
    setAsked(decision);
  };
  return (
    <>
      <StatusLine>{decide.data}</StatusLine>
      <Problem problem={queue.error} onRetry={() => void queue.refetch()} />
      {items.length === 0 && (
        <EmptyState title="No pair waits">
          A pair comes here when a lab registers a complex that another lab keeps to itself; neither is told.
        </EmptyState>
      )}
      <ol className="flex flex-col gap-8">
        {items.map((task) => (
          <li key={task.id}>
            <Pair task={task} onAsk={ask} />
          </li>
        ))}
      </ol>
      {total > items.length && (
        <p className="mt-4 text-ink-soft">{total - items.length} more pairs come up as these are settled.</p>
      )}
      {asked && (
        <MergeDialog
          decision={asked}
          problem={decide.error}
          isSending={decide.isPending}
          onClose={() => setAsked(null)}
          onDecide={(decision, settled) =>
            decide.mutate(decision, {
              onSuccess: () => {
                settled();
                setAsked(null);
              },
            })
          }
        />
      )}
    </>
  );
}

function Pair({ task, onAsk }: { task: MergeTask; onAsk: (decision: Decision) => void }) {
  const { first, second, differs } = task;
  const sides = [
    { side: first, other: second },
    { side: second, other: first },
  ];
  return (
    <section aria-label={`${first.complex.accession} and ${second.complex.accession}`}>
      <div className="mb-2.5 flex flex-wrap items-center gap-x-4 gap-y-1.5">
        <p>
          {differenceSentence(differs)}{' '}
          <span className="text-xs text-ink-soft">Waiting since {longDay(task.createdAt)}.</span>
        </p>
        <Button className="ml-auto" onClick={() => onAsk({ kind: 'different', task, reason: '' })}>
          They are different
        </Button>
      </div>
      <div className="grid gap-4 md:grid-cols-2">
        {sides.map(({ side, other }) => (
          <MergeSpecimen key={side.complex.accession} side={side} differs={differs}>
            <Button
              disabled={side.obstacles.length > 0}
              onClick={() =>
                onAsk({
                  kind: 'merge',
                  task,
                  from: other.complex.accession,
                  into: side.complex.accession,
                  reason: '',
                })
              }
            >
              Let this record live on
            </Button>
          </MergeSpecimen>
        ))}
      </div>
    </section>
  );
}
