import { Button } from '#src/components/ui/Button.tsx';
import { Conflict } from '#src/components/ui/Conflict.tsx';
import { TextInput } from '#src/components/ui/controls.tsx';
import { Dialog } from '#src/components/ui/Dialog.tsx';
import { Problem } from '#src/components/ui/Problem.tsx';
import { useConditionalSave } from '#src/components/ui/useConditionalSave.ts';
import { useRecordDraft } from '#src/components/ui/useRecordDraft.ts';
import type { SpectrumRecord } from '#src/contracts/spectra.ts';
import { ConditionFields } from '../upload/ConditionFields.tsx';
import { type ConditionsDraft, conditionErrors, conditionsOf } from '../upload/conditions-draft.ts';
import { conditionDifferences, conditionsPatch } from '../upload/conditions-patch.ts';

interface EditConditionsProps {
  spectrum: SpectrumRecord;
  etag: string;
  onSaved: () => void;
  onClose: () => void;
}

/** Mend the conditions; what follows from them (ε, flags, colour) follows again. */
export function EditConditions({ spectrum, etag, onSaved, onClose }: EditConditionsProps) {
  const { touched, base, change, clear } = useRecordDraft<ConditionsDraft>(`spectrum-conditions:${spectrum.id}`, etag);
  const saving = useConditionalSave<SpectrumRecord>(`/api/spectra/${spectrum.id}`, base, () => {
    clear();
    onSaved();
    onClose();
  });
  const record = saving.present ?? spectrum;
  const draft: ConditionsDraft = { ...conditionsOf(record), ...touched };
  const giveUp = () => {
    clear();
    onClose();
  };
  const errors = conditionErrors(draft);
  const isFaulty = Object.keys(errors).length > 0;
  const patch = isFaulty ? {} : conditionsPatch(record, draft);
  const isSame = Object.keys(patch).length === 0;
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      width="wide"
      title="Edit conditions"
      description="ε, flags and colour follow again. A band whose ε changes has to be judged anew."
      actions={
        <>
          <Button onClick={giveUp}>Discard</Button>
          <Button
            kind="primary"
            disabled={isSame || isFaulty || saving.isSending || saving.isStale}
            onClick={() => void saving.save(patch)}
          >
            Save
          </Button>
        </>
      }
    >
      <div className="flex flex-col gap-4">
        <TextInput
          label="Title"
          maxLength={200}
          value={draft.title}
          onChange={(event) => change({ title: event.currentTarget.value })}
        />
        <ConditionFields
          draft={draft}
          change={change}
          errors={errors}
          yUnit={spectrum.yUnit}
          labName={spectrum.lab.name}
        />
        <Problem problem={saving.problem} />
        <Conflict
          saving={saving}
          differences={(present) => conditionDifferences(present, draft)}
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
