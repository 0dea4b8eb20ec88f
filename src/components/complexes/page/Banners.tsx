import { Notice } from '#src/components/ui/StatusLine.tsx';
import type { ComplexRecord } from '#src/contracts/complexes.ts';

/** What a reader must know of the record before anything else. */
export function Banners({ complex, alias }: { complex: ComplexRecord; alias: string | null }) {
  const { accession, state, withdrawnReason } = complex;
  return (
    <>
      {alias && (
        <Notice title="Merged:" tone="plain">
          <span className="num">{alias}</span> was merged into this record and lives on as{' '}
          <a href={`/complexes/${accession}`} className="link num">
            {accession}
          </a>
          .
        </Notice>
      )}
      {state === 'withdrawn' && <Notice title="Withdrawn:">{withdrawnReason ?? 'no reason is on record'}</Notice>}
      {state === 'draft' && (
        <Notice title="Draft:" tone="plain">
          seen by whoever made it, by leads of {complex.lab.name} and by the steward only.
        </Notice>
      )}
    </>
  );
}
