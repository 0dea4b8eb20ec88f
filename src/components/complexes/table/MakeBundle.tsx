import { useCallback, useState } from 'react';
import { formatNumber } from '#src/components/notation/quantity.ts';
import { Button, ButtonLink } from '#src/components/ui/Button.tsx';
import { Dialog } from '#src/components/ui/Dialog.tsx';
import { Problem } from '#src/components/ui/Problem.tsx';
import { Progress } from '#src/components/ui/Progress.tsx';
import { StatusLine } from '#src/components/ui/StatusLine.tsx';
import { MAX_IN_BUNDLE, makeBundle } from './make-bundle.ts';
import { useTask } from './useTask.ts';
import type { ComplexView } from './view.ts';

/** The filtered complexes with their spectra as one file. */
export function MakeBundle({ view, total }: { view: ComplexView; total: number }) {
  const [isOpen, setIsOpen] = useState(false);
  const work = useCallback(
    (signal: AbortSignal, onProgress: (share: number | null) => void) => makeBundle(view, signal, onProgress),
    [view],
  );
  const { state, progress, result, problem, start, cancel } = useTask(work);
  const tooMany = total > MAX_IN_BUNDLE;
  const close = () => {
    if (state === 'running') cancel();
    setIsOpen(false);
  };
  return (
    <>
      <Button
        disabled={total === 0}
        onClick={() => {
          setIsOpen(true);
          if (!tooMany) start();
        }}
      >
        Make bundle
      </Button>
      <Dialog
        open={isOpen}
        onOpenChange={(open) => !open && close()}
        title="Make bundle"
        description="A ZIP file with the complexes that match, their spectra as original, JCAMP-DX and CSV, and their tables."
        actions={
          state === 'done' && result ? (
            <ButtonLink kind="primary" href={`/api/bundles/${result.id}/file`} download>
              Download
            </ButtonLink>
          ) : undefined
        }
      >
        {tooMany && (
          <p>
            {formatNumber(total)} complexes match; a bundle takes {formatNumber(MAX_IN_BUNDLE)}. Choose more filters, or
            make a folio.
          </p>
        )}
        {state === 'running' && (
          <Progress
            label={progress === null ? 'Waiting in line' : 'Making the bundle'}
            value={progress}
            onCancel={close}
          />
        )}
        {state === 'done' && result && (
          <StatusLine>Ready{result.size === null ? '' : `: ${formatNumber(result.size / 1e6, 3)} MB`}</StatusLine>
        )}
        <Problem problem={problem} onRetry={start} />
      </Dialog>
    </>
  );
}
