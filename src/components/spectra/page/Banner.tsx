import { Notice } from '#src/components/ui/StatusLine.tsx';
import type { SpectrumRecord } from '#src/contracts/spectra.ts';

/** What a reader must know of the spectrum before anything else. */
export function Banner({ spectrum }: { spectrum: SpectrumRecord }) {
  const { state, withdrawnReason, synthetic, lab } = spectrum;
  return (
    <>
      {state === 'withdrawn' && <Notice title="Withdrawn:">{withdrawnReason ?? 'no reason is on record'}</Notice>}
      {state === 'draft' && (
        <Notice title="Draft:" tone="plain">
          seen by whoever made it, by leads of {lab.name} and by the steward only.
        </Notice>
      )}
      {synthetic && (
        <Notice title="SYNTHETIC:" tone="plain">
          computed from band parameters, not measured.
        </Notice>
      )}
    </>
  );
}
