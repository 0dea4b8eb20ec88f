import { Notice } from '#src/components/ui/StatusLine.tsx';
import type { ComplexRecord } from '#src/contracts/complexes.ts';

/** What a reader must know of the record before anything else. */
export function Banners({ complex }: { complex: ComplexRecord }) {
  const { mergedInto, state, withdrawnReason } = complex;
  return (
    <>
      {mergedInto && (
        <Notice title="Merged:" tone="plain">
          this record lives on as{' '}
          <a href={`/complexes/${mergedInto}`} className="link num">
            {mergedInto}
          </a>
          , where its spectra and preparations are.
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
