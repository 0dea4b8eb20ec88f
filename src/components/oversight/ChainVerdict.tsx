import { useQuery } from '@tanstack/react-query';
import { ShieldCheck, TriangleAlert } from 'lucide-react';
import type { TrailVerdict } from '../../contracts/oversight.ts';
import { formatNumber } from '../notation/quantity.ts';
import { Button } from '../ui/Button.tsx';
import { CopyText } from '../ui/CopyText.tsx';
import { getJson } from '../ui/http.ts';
import { Problem } from '../ui/Problem.tsx';
import { queryClient } from '../ui/query-client.ts';

const whole = (count: number) => formatNumber(count, 12);

/** Whether the chain of hashes holds, with the hash of its last row to be kept elsewhere. */
export function ChainVerdict() {
  const { data, error, isFetching, refetch } = useQuery(
    {
      queryKey: ['trail-verdict'],
      queryFn: ({ signal }) => getJson<TrailVerdict>('/api/trail/verify', signal),
      staleTime: Number.POSITIVE_INFINITY, // every row is read again: only when asked for
    },
    queryClient,
  );
  return (
    <section className="specimen mb-5 px-5 py-4" aria-labelledby="chain">
      <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
        <h2 id="chain" className="text-base font-semibold">
          Chain
        </h2>
        <p role="status" className="flex items-center gap-1.5">
          {isFetching && !data && <span className="text-ink-soft">Following it from the first row…</span>}
          {data && <Verdict verdict={data} />}
        </p>
        <Button size="small" className="ml-auto" disabled={isFetching} onClick={() => void refetch()}>
          {isFetching ? 'Checking…' : 'Check again'}
        </Button>
      </div>
      <Problem problem={error} onRetry={() => void refetch()} />
      {data && data.head !== '' && (
        <div className="mt-3 max-w-3xl">
          <CopyText label="Hash of the last row" text={data.head} />
          <p className="mt-1 text-xs text-ink-soft">
            Each row carries the hash of the one before. Keep this one outside the registry, with the date: searched for
            here later, it shows that no row up to it was changed.
          </p>
        </div>
      )}
    </section>
  );
}

function Verdict({ verdict: { rows, verified, firstBroken } }: { verdict: TrailVerdict }) {
  if (verified)
    return (
      <span className="flex items-center gap-1.5 text-attest">
        <ShieldCheck aria-hidden="true" size={16} />
        <span>{rows === 1 ? 'The one row fits' : `All ${whole(rows)} rows fit`} the hash of the one before.</span>
      </span>
    );
  return (
    <span className="flex items-center gap-1.5 font-medium text-alert">
      <TriangleAlert aria-hidden="true" size={16} />
      <span>
        Broken at row {whole(firstBroken ?? 0)}: it, or what stood before it, was changed or taken away behind the
        program’s back. Compare with a backup.
      </span>
    </span>
  );
}
