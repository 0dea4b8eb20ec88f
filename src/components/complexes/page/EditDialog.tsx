import { useEffect, useMemo, useState } from 'react';
import { Button } from '#src/components/ui/Button.tsx';
import { Conflict } from '#src/components/ui/Conflict.tsx';
import { Select, TextArea, TextInput } from '#src/components/ui/controls.tsx';
import { Dialog } from '#src/components/ui/Dialog.tsx';
import { ProblemError } from '#src/components/ui/http.ts';
import { Problem } from '#src/components/ui/Problem.tsx';
import { Notice } from '#src/components/ui/StatusLine.tsx';
import { useConditionalSave } from '#src/components/ui/useConditionalSave.ts';
import { useRecordDraft } from '#src/components/ui/useRecordDraft.ts';
import type { ComplexRecord } from '#src/contracts/complexes.ts';
import { soleEntity } from '../register/reading.ts';
import { settle, subjectOf } from '../register/settle.ts';
import { type EditDraft, editDifferences, editDraft, editPatch, presentPick, touchesIdentity } from './edit-form.ts';
import { IdentityChoices } from './IdentityChoices.tsx';

type Chemistry = typeof import('../register/chemistry.ts');

interface EditDialogProps {
  complex: ComplexRecord;
  etag: string;
  /** Answers that were given when the formula was read at registration. */
  answers: Record<string, string>;
  onSaved: () => void;
  onClose: () => void;
}

/** Accession of the record that a change would make this one equal to. */
function twinOf(problem: unknown): string | null {
  const accession = problem instanceof ProblemError && problem.status === 409 ? problem.members.accession : null;
  return typeof accession === 'string' ? accession : null;
}

/** Change what a person decides about a complex: isomer, geometry, spin state, notes, who sees it and from when. */
export function EditDialog({ complex, etag, answers, onSaved, onClose }: EditDialogProps) {
  const { touched, base, change, clear } = useRecordDraft<EditDraft>(`complex-edit:${complex.accession}`, etag);
  const [chemistry, setChemistry] = useState<Chemistry | null>(null);
  const [fault, setFault] = useState<unknown>(null);
  const saving = useConditionalSave<ComplexRecord>(`/api/complexes/${complex.accession}`, base, () => {
    clear();
    onSaved();
    onClose();
  });
  const record = saving.present ?? complex;
  const draft: EditDraft = { ...editDraft(record), ...touched };

  useEffect(() => {
    import('../register/chemistry.ts').then(setChemistry, setFault);
  }, []);
  const entity = useMemo(
    () => (chemistry ? soleEntity(chemistry.readFormula(complex.formula, answers)) : null),
    [chemistry, complex.formula, answers],
  );
  const settled = useMemo(() => {
    if (!chemistry || !entity) return null;
    const of = subjectOf(entity);
    const geometry = record.centres[0]?.geometry ?? null;
    const list = chemistry.isomersOf(entity, geometry)?.list;
    const isomer = list ? presentPick(record, list) : null;
    const present = { of, geometry, isomer, spinState: record.centres[0]?.spinState ?? null };
    return settle(chemistry, entity, draft.choices ?? present);
  }, [chemistry, entity, record, draft.choices]);

  const patch = editPatch(record, draft, settled);
  const isSame = Object.keys(patch).length === 0;
  const twin = twinOf(saving.problem);
  const giveUp = () => {
    clear();
    onClose();
  };
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      width="wide"
      title={`Edit ${complex.accession}`}
      description="The formula is the identity and stays; another formula is another record."
      actions={
        <>
          <Button onClick={giveUp}>Discard</Button>
          <Button
            kind="primary"
            disabled={isSame || saving.isSending || saving.isStale}
            onClick={() => void saving.save(patch)}
          >
            Save
          </Button>
        </>
      }
    >
      <div className="flex flex-col gap-5">
        {chemistry && entity && settled && (
          <IdentityChoices {...{ chemistry, entity, settled }} onChoose={(choices) => change({ choices })} />
        )}
        {touchesIdentity(patch) && complex.state === 'registered' && (
          <Notice title="This changes what the record is:" tone="plain">
            attested assignments of its bands are proposed again, and have to be attested anew.
          </Notice>
        )}
        <TextArea
          label="Notes"
          maxLength={10_000}
          value={draft.notes}
          onChange={(event) => change({ notes: event.currentTarget.value })}
        />
        <div className="grid gap-3 sm:grid-cols-2">
          <Select
            label="Seen by"
            value={draft.visibility}
            options={[
              { value: 'programme', label: 'every lab of the programme' },
              { value: 'lab', label: `${complex.lab.name} only` },
            ]}
            onChange={(event) => change({ visibility: event.currentTarget.value as typeof draft.visibility })}
          />
          <TextInput
            label="Embargo until"
            hint="Guests do not see it before this day; empty for none"
            type="date"
            value={draft.embargo}
            onChange={(event) => change({ embargo: event.currentTarget.value })}
          />
        </div>
        <Problem problem={saving.problem ?? fault} />
        {twin && (
          <p>
            <a href={`/complexes/${twin}`} className="link">
              Open <span className="num">{twin}</span>
            </a>
          </p>
        )}
        <Conflict
          saving={saving}
          differences={(present) => editDifferences(present, draft, settled)}
          onTakePresent={() => {
            onSaved();
            giveUp();
          }}
          onSendMine={() => void saving.save(patch)}
        />
      </div>
    </Dialog>
  );
}
