import { useMemo, useState } from 'react';
import { bandLabel } from '#src/components/complexes/page/overlay.ts';
import { type StateChange, StateDialog } from '#src/components/complexes/page/StateDialog.tsx';
import { CautionsPanel } from '#src/components/complexes/register/CautionsPanel.tsx';
import { Button } from '#src/components/ui/Button.tsx';
import { Panel } from '#src/components/ui/Panel.tsx';
import { Problem } from '#src/components/ui/Problem.tsx';
import { StatusLine } from '#src/components/ui/StatusLine.tsx';
import type { SpectrumRecord } from '#src/contracts/spectra.ts';
import { BandEditor } from '../bands/BandEditor.tsx';
import type { AssignmentChoices } from '../bands/BandRowFields.tsx';
import { BandTable } from '../bands/BandTable.tsx';
import { heightAt } from '../bands/band-list.ts';
import { bandSentence } from '../bands/band-sentence.ts';
import { CopyButton } from '../bands/CopyButton.tsx';
import { useBandEditor } from '../bands/useBandEditor.ts';
import { FitPanel } from '../fit/FitPanel.tsx';
import { Banner } from './Banner.tsx';
import { ConditionsPanel } from './ConditionsPanel.tsx';
import { CurvePanel } from './CurvePanel.tsx';
import { EditConditions } from './EditConditions.tsx';
import { FilePanel } from './FilePanel.tsx';
import { SpectrumHead } from './SpectrumHead.tsx';
import { useCurve, useSpectrumRecord } from './useSpectrumPage.ts';

export interface SpectrumPageProps {
  first: { spectrum: SpectrumRecord; etag: string };
  choices: AssignmentChoices;
  /** Label of the preparation, where it is in sight. */
  preparation: string | null;
  sentences: { NO_CAUTION_COMPUTED: string; NO_RULE_MATCHED: string; STANDING_SENTENCE: string };
}

/** One spectrum: its curve and bands, how it was measured, and the file it came in. */
export function SpectrumPage({ first, choices, preparation, sentences }: SpectrumPageProps) {
  const { spectrum, etag, reload } = useSpectrumRecord(first);
  const curve = useCurve(spectrum);
  const [open, setOpen] = useState<'conditions' | StateChange | null>(null);
  const [isEditing, setIsEditing] = useState(false);
  const [isFitting, setIsFitting] = useState(false);
  const [said, setSaid] = useState<string | null>(null);
  const editing = useBandEditor(spectrum, curve.data ?? null, () => void reload());
  const { may, state, bands } = spectrum;
  const shownBands = useMemo(
    () =>
      isEditing
        ? editing.list.map(({ wavenumber, height, quantity, class: kind, from, to }) => ({
            wavenumber,
            height,
            quantity,
            class: kind,
            label: bandLabel(from, to),
          }))
        : bands.map(({ wavenumber, height, quantity, epsilon, assignment: { class: kind, from, to } }) => ({
            wavenumber,
            height: epsilon ?? height,
            quantity: epsilon === null ? quantity : ('epsilon' as const),
            class: kind,
            label: bandLabel(from, to),
          })),
    [isEditing, editing.list, bands],
  );
  const saved = () => {
    setSaid('Saved');
    void reload();
  };
  const sentence = bandSentence(bands, spectrum);
  return (
    <div className="flex flex-col gap-5">
      <Banner spectrum={spectrum} />
      <SpectrumHead spectrum={spectrum}>
        {may.change && (
          <>
            {state === 'draft' && <Button onClick={() => setOpen('register')}>Register</Button>}
            {state !== 'withdrawn' && <Button onClick={() => setOpen('conditions')}>Edit conditions</Button>}
            {state === 'registered' && <Button onClick={() => setOpen('withdraw')}>Withdraw</Button>}
            {state === 'draft' && (
              <Button kind="danger" onClick={() => setOpen('delete')}>
                Delete draft
              </Button>
            )}
            {state === 'withdrawn' && <Button onClick={() => setOpen('restore')}>Take the withdrawal back</Button>}
            <StatusLine>{said}</StatusLine>
          </>
        )}
      </SpectrumHead>
      <div className="grid items-start gap-6 lg:grid-cols-[minmax(0,1fr)_360px]">
        <div className="grid min-w-0 grid-cols-[minmax(0,1fr)] gap-5">
          <Problem problem={curve.error} onRetry={() => void curve.refetch()} />
          {isFitting && curve.data ? (
            <FitPanel
              spectrum={spectrum}
              curve={curve.data}
              editing={editing}
              bands={shownBands.filter(({ quantity }) => quantity === curve.data?.quantity)}
              onTaken={() => {
                setIsFitting(false);
                setIsEditing(true);
              }}
              onClose={() => setIsFitting(false)}
            />
          ) : (
            <CurvePanel
              spectrum={spectrum}
              curve={curve.data ?? null}
              bands={shownBands}
              onPick={isEditing ? editing.pick : undefined}
            />
          )}
          <Panel
            title="Bands"
            aside={
              <span className="flex flex-wrap items-center gap-3">
                {sentence && !isEditing && (
                  <CopyButton text={sentence} what="the band list" label="Copy as a sentence" />
                )}
                {may.propose && !isFitting && editing.quantity && (
                  <Button size="small" onClick={() => setIsFitting(true)}>
                    Fit bands
                  </Button>
                )}
                {may.propose && !isEditing && (
                  <Button size="small" onClick={() => setIsEditing(true)}>
                    {bands.length === 0 ? 'Pick bands' : 'Edit bands'}
                  </Button>
                )}
              </span>
            }
          >
            {isEditing ? (
              <BandEditor
                editing={editing}
                choices={choices}
                standing={bands}
                onClose={() => setIsEditing(false)}
                heightAt={(wavenumber) => (curve.data ? heightAt(curve.data, wavenumber) : null)}
              />
            ) : bands.length === 0 ? (
              <p className="text-ink-soft">No band is proposed yet.</p>
            ) : (
              <BandTable bands={bands} label="Bands" onJudged={() => void reload()} />
            )}
            {!isEditing && editing.isChanged && may.propose && (
              <p className="mt-3 text-alert">
                Changes of the bands are not saved yet.{' '}
                <button type="button" className="link" onClick={() => setIsEditing(true)}>
                  Go on with them
                </button>
              </p>
            )}
          </Panel>
        </div>
        <aside aria-label="How it was measured" className="flex min-w-0 flex-col gap-5">
          <ConditionsPanel spectrum={spectrum} preparation={preparation} />
          <FilePanel spectrum={spectrum} />
          <CautionsPanel cautions={spectrum.cautions} sentences={sentences} />
        </aside>
      </div>
      {open === 'conditions' && (
        <EditConditions spectrum={spectrum} etag={etag} onSaved={saved} onClose={() => setOpen(null)} />
      )}
      {open !== null && open !== 'conditions' && (
        <StateDialog
          change={open}
          what="spectrum"
          name={spectrum.title}
          url={`/api/spectra/${spectrum.id}`}
          etag={etag}
          onSaved={saved}
          onDeleted={() => location.assign(`/complexes/${spectrum.complex}`)}
          onClose={() => setOpen(null)}
        />
      )}
    </div>
  );
}
