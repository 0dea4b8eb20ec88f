import { Button } from '../ui/Button.tsx';
import { TextArea } from '../ui/controls.tsx';
import { Dialog } from '../ui/Dialog.tsx';
import { Problem } from '../ui/Problem.tsx';
import { useDraft } from '../ui/useDraft.ts';
import type { Decision } from './useMergeQueue.ts';

const NOTHING = { reason: '' };

interface MergeDialogProps {
  decision: Decision;
  problem: unknown;
  isSending: boolean;
  onDecide: (decision: Decision, settled: () => void) => void;
  onClose: () => void;
}

/** Asks for the reason, and says what will happen. */
export function MergeDialog({ decision, problem, isSending, onDecide, onClose }: MergeDialogProps) {
  const { draft, change, clear } = useDraft(`merge-task:${decision.task.id}`, NOTHING);
  const merges = decision.kind === 'merge';
  const title = merges ? `Merge ${decision.from} into ${decision.into}` : 'Keep both records';
  const description = merges
    ? `Spectra, preparations and folio items of ${decision.from} move. Attestations stand, with a note. Its accession leads to ${decision.into} for good; editions stay as they were. Nobody sees anything that was out of their sight before.`
    : 'The pair leaves this list. Neither lab is told of the other’s record.';
  const reason = draft.reason.trim();
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={title}
      description={description}
      actions={
        <>
          <Button onClick={onClose}>Cancel</Button>
          <Button
            kind="primary"
            disabled={reason.length < 3 || isSending}
            onClick={() => onDecide({ ...decision, reason }, clear)}
          >
            {merges ? 'Merge' : 'They are different'}
          </Button>
        </>
      }
    >
      <div className="flex flex-col gap-3">
        <TextArea
          label="Reason"
          hint="Kept in the trail"
          maxLength={2000}
          value={draft.reason}
          onChange={(event) => change({ reason: event.currentTarget.value })}
        />
        <Problem problem={problem} />
      </div>
    </Dialog>
  );
}
