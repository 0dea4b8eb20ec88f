import { useState } from 'react';
import { Quantity, Term } from '#src/components/notation/index.tsx';
import { formatNumber } from '#src/components/notation/quantity.ts';
import { Button } from '#src/components/ui/Button.tsx';
import { Dialog } from '#src/components/ui/Dialog.tsx';
import { shortDay } from '#src/components/ui/dates.ts';
import { Problem } from '#src/components/ui/Problem.tsx';
import type { LevelFitRecord } from '#src/contracts/level-fits.ts';

interface SavedFitsProps {
  fits: readonly LevelFitRecord[];
  onShow: (fit: LevelFitRecord) => void;
  onWithdraw: (id: string) => Promise<unknown>;
}

/** Fits that were saved, with what they were made of and by which release. */
export function SavedFits({ fits, onShow, onWithdraw }: SavedFitsProps) {
  const [leaving, setLeaving] = useState<LevelFitRecord | null>(null);
  if (fits.length === 0) return null;
  return (
    <section aria-label="Saved fits" className="mt-4">
      <h3 className="mb-1 text-sm">Saved fits</h3>
      <ul className="border-t border-faint">
        {fits.map((fit) => (
          <li key={fit.id} className="flex flex-wrap items-baseline gap-x-4 gap-y-1 border-b border-faint py-2">
            <span className="whitespace-nowrap">
              <i>Δ</i>{' '}
              <Quantity
                value={fit.result.delta}
                uncertainty={fit.result.errors.delta ?? undefined}
                unit="cm-1"
                figures={5}
              />
            </span>
            <span className="whitespace-nowrap">
              <i>B</i>{' '}
              <Quantity value={fit.result.B} uncertainty={fit.result.errors.B ?? undefined} unit="cm-1" figures={3} />
            </span>
            <span className="flex flex-wrap gap-x-2.5 text-xs text-ink-soft">
              {fit.result.assignments.map(({ wavenumber, to }) => (
                <span key={`${wavenumber} ${to}`} className="whitespace-nowrap">
                  <span className="num">{formatNumber(Math.round(wavenumber), 7)}</span> <Term term={to} />
                </span>
              ))}
            </span>
            {fit.note && <span className="basis-full text-sm">{fit.note}</span>}
            <span className="ml-auto flex items-baseline gap-2 text-xs text-ink-soft">
              <span>{[fit.madeBy, shortDay(fit.createdAt), `release ${fit.release}`].filter(Boolean).join(' · ')}</span>
              <Button kind="quiet" size="small" onClick={() => onShow(fit)}>
                Show
              </Button>
              {fit.may.withdraw && (
                <Button kind="quiet" size="small" onClick={() => setLeaving(fit)}>
                  Withdraw
                </Button>
              )}
            </span>
          </li>
        ))}
      </ul>
      {leaving && <Withdraw fit={leaving} onWithdraw={onWithdraw} onClose={() => setLeaving(null)} />}
    </section>
  );
}

function Withdraw({
  fit,
  onWithdraw,
  onClose,
}: {
  fit: LevelFitRecord;
  onWithdraw: SavedFitsProps['onWithdraw'];
  onClose: () => void;
}) {
  const [problem, setProblem] = useState<unknown>(null);
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title="Withdraw this fit?"
      actions={
        <>
          <Button onClick={onClose}>Keep it</Button>
          <Button kind="danger" onClick={() => void onWithdraw(fit.id).then(onClose, setProblem)}>
            Withdraw
          </Button>
        </>
      }
    >
      <p>
        The fit with <i>Δ</i> <Quantity value={fit.result.delta} unit="cm-1" figures={5} /> leaves the page of the
        complex. The trail keeps that it was there.
      </p>
      <Problem problem={problem} />
    </Dialog>
  );
}
