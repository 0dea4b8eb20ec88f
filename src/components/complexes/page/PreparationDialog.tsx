import { useDeferredValue, useEffect, useMemo, useState } from 'react';
import { Formula, Quantity } from '#src/components/notation/index.tsx';
import { Button } from '#src/components/ui/Button.tsx';
import { Select, TextArea, TextInput } from '#src/components/ui/controls.tsx';
import { Dialog } from '#src/components/ui/Dialog.tsx';
import { ProblemError, sendJson } from '#src/components/ui/http.ts';
import { Problem } from '#src/components/ui/Problem.tsx';
import { useDraft } from '#src/components/ui/useDraft.ts';
import { Questions } from '../register/Questions.tsx';
import { type Answered, answersOf, attemptReading } from '../register/reading.ts';
import { emptyPreparation, preparationInput } from './preparation-form.ts';

type Chemistry = typeof import('../register/chemistry.ts');

interface PreparationDialogProps {
  accession: string;
  labs: readonly { id: string; name: string }[];
  onAdded: () => void;
  onClose: () => void;
}

/** A material that one lab made: its label and whole formula, read as it is typed. */
export function PreparationDialog({ accession, labs, onAdded, onClose }: PreparationDialogProps) {
  const initial = useMemo(() => ({ ...emptyPreparation(labs[0]?.id ?? ''), answered: [] as Answered[] }), [labs]);
  const { draft, change, clear } = useDraft(`preparation:${accession}`, initial);
  const [chemistry, setChemistry] = useState<Chemistry | null>(null);
  const [problem, setProblem] = useState<unknown>(null);
  const [isSending, setIsSending] = useState(false);
  useEffect(() => {
    import('../register/chemistry.ts').then(setChemistry, setProblem);
  }, []);
  const typed = useDeferredValue(draft.formula);
  const attempt = useMemo(
    () => (chemistry ? attemptReading(chemistry.readFormula, typed, draft.answered) : null),
    [chemistry, typed, draft.answered],
  );
  const reading = attempt?.kind === 'read' ? attempt.reading : null;
  const refusal = attempt?.kind === 'refused' ? attempt.message : undefined;
  const about = (field: string) => (problem instanceof ProblemError ? problem.about(field) : undefined);

  const send = async () => {
    setIsSending(true);
    setProblem(null);
    try {
      const { answered, ...told } = draft;
      const input = preparationInput(told, answersOf(answered));
      await sendJson('POST', `/api/complexes/${accession}/preparations`, input);
      clear();
      onAdded();
      onClose();
    } catch (error) {
      setProblem(error);
    } finally {
      setIsSending(false);
    }
  };
  const text = (name: 'label' | 'storage' | 'atmosphere' | 'preparedOn') => ({
    value: draft[name],
    error: about(name),
    onChange: (event: React.ChangeEvent<HTMLInputElement>) => change({ [name]: event.currentTarget.value }),
  });
  const mayAdd = draft.label.trim() !== '' && !refusal && (reading?.questions.length ?? 0) === 0;

  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      width="wide"
      title="Add a preparation"
      description="The material as one lab made it, with counter-ions and solvates. Spectra are measured on it."
      actions={
        <>
          <Button onClick={onClose}>Close</Button>
          <Button kind="primary" disabled={!mayAdd || isSending} onClick={() => void send()}>
            Add preparation
          </Button>
        </>
      }
    >
      <div className="grid gap-3 sm:grid-cols-2">
        <TextInput label="Label" hint="As on the vial, such as QN-114" maxLength={100} {...text('label')} />
        <Select
          label="Lab that made it"
          value={draft.lab}
          error={about('lab')}
          options={labs.map(({ id, name }) => ({ value: id, label: name }))}
          onChange={(event) => change({ lab: event.currentTarget.value })}
        />
        <div className="flex flex-col gap-2 sm:col-span-2">
          <TextInput
            label="Whole formula"
            hint="With counter-ions and solvates, such as K3[Cr(ox)3]·3H2O; may stay empty"
            figures
            autoComplete="off"
            spellCheck={false}
            maxLength={500}
            value={draft.formula}
            error={refusal ?? about('formula')}
            onChange={(event) => change({ formula: event.currentTarget.value, answered: [] })}
          />
          <Questions
            open={reading?.questions ?? []}
            answered={draft.answered}
            onAnswer={(answer) =>
              change({
                answered: [...draft.answered.filter(({ question }) => question.code !== answer.question.code), answer],
              })
            }
          />
          {reading && (
            <p role="status" className="bg-zaffre-wash px-3 py-1.5">
              Read as <Formula formula={reading.formula} />,{' '}
              <Quantity value={reading.molarMass} unit="g mol-1" figures={5} /> per formula unit
            </p>
          )}
        </div>
        <Select
          label="Form"
          value={draft.form}
          options={[
            { value: '', label: 'not stated' },
            { value: 'crystal', label: 'crystal' },
            { value: 'powder', label: 'powder' },
            { value: 'film', label: 'film' },
            { value: 'solution', label: 'solution as received' },
          ]}
          onChange={(event) => change({ form: event.currentTarget.value as typeof draft.form })}
        />
        <TextInput label="Made on" type="date" {...text('preparedOn')} />
        <TextInput label="Storage" maxLength={500} {...text('storage')} />
        <TextInput label="Atmosphere" maxLength={200} {...text('atmosphere')} />
        <Select
          label="Seen by"
          value={draft.visibility}
          options={[
            { value: 'programme', label: 'every lab of the programme' },
            { value: 'lab', label: 'this lab only' },
          ]}
          onChange={(event) => change({ visibility: event.currentTarget.value as typeof draft.visibility })}
        />
        <TextArea
          label="Notes"
          className="sm:col-span-2"
          maxLength={10_000}
          value={draft.notes}
          onChange={(event) => change({ notes: event.currentTarget.value })}
        />
        <div className="sm:col-span-2">
          <Problem problem={problem} />
        </div>
      </div>
    </Dialog>
  );
}
