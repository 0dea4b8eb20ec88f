import { useState } from 'react';
import { Button } from '#src/components/ui/Button.tsx';
import { TextInput } from '#src/components/ui/controls.tsx';
import { Problem } from '#src/components/ui/Problem.tsx';
import { StatusLine } from '#src/components/ui/StatusLine.tsx';
import { CandidateList } from './CandidateList.tsx';
import type { Fitting } from './useFit.ts';
import type { useSavedFits } from './useSavedFits.ts';

interface FitPartProps {
  fitting: Fitting;
  saved: ReturnType<typeof useSavedFits>;
  centre: number;
  maySave: boolean;
  labOnly: boolean;
}

/** What the bands give, the candidates, and the way to keep one. */
export function FitPart({ fitting, saved, centre, maySave, labOnly }: FitPartProps) {
  const { candidates, candidate, index, choose, refusal, input } = fitting;
  const [note, setNote] = useState('');
  const [said, setSaid] = useState<string | null>(null);
  if (input.bands.length === 0) return null;
  if (refusal) return <p className="text-xs text-alert">{refusal}</p>;
  if (!candidate) return <p className="text-xs text-ink-soft">The bands are being fitted.</p>;
  const save = () =>
    saved.save.mutate(
      {
        centre,
        input: { ...input, bands: input.bands.map((band) => ({ ...band })) },
        candidate: index,
        ...(note.trim() ? { note: note.trim() } : {}),
        ...(labOnly ? { visibility: 'lab' as const } : {}),
      },
      {
        onSuccess: () => {
          setNote('');
          setSaid('The fit is saved');
        },
      },
    );
  return (
    <>
      <CandidateList candidates={candidates} chosen={index} onChoose={choose} />
      {maySave && (
        <div className="no-print flex flex-col gap-2">
          <div className="flex items-end gap-2">
            <TextInput
              label="Note to the fit"
              value={note}
              maxLength={2000}
              onChange={(event) => setNote(event.currentTarget.value)}
              className="min-w-0 flex-1"
            />
            <Button kind="primary" onClick={save} disabled={saved.save.isPending}>
              Save the fit
            </Button>
          </div>
          <Problem problem={saved.save.error} />
          <StatusLine>{said}</StatusLine>
        </div>
      )}
    </>
  );
}
