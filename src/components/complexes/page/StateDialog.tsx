import { useState } from 'react';
import { Button } from '#src/components/ui/Button.tsx';
import { TextArea } from '#src/components/ui/controls.tsx';
import { Dialog } from '#src/components/ui/Dialog.tsx';
import { Problem } from '#src/components/ui/Problem.tsx';
import { Notice } from '#src/components/ui/StatusLine.tsx';
import { useConditionalSave } from '#src/components/ui/useConditionalSave.ts';

export type StateChange = 'withdraw' | 'delete' | 'register' | 'restore';

interface StateDialogProps {
  change: StateChange;
  /** "complex" or "spectrum". */
  what: string;
  name: string;
  url: string;
  etag: string;
  onSaved: () => void;
  onDeleted: () => void;
  onClose: () => void;
}

const TEXTS: Record<StateChange, { title: string; button: string; description: (what: string) => string }> = {
  withdraw: {
    title: 'Withdraw',
    button: 'Withdraw',
    description: (what) =>
      `A withdrawn ${what} stays on record, marked and with the reason. Guests no longer see it, and nothing is added to it.`,
  },
  delete: {
    title: 'Delete the draft',
    button: 'Delete',
    description: (what) => `The draft of this ${what} is removed for good.`,
  },
  register: {
    title: 'Register',
    button: 'Register',
    description: (what) => `The ${what} becomes part of the registry. It does not become a draft again.`,
  },
  restore: {
    title: 'Take the withdrawal back',
    button: 'Take back',
    description: (what) => `The ${what} counts again as registered.`,
  },
};

/** Withdraw, delete a draft, register it, or take a withdrawal back. */
export function StateDialog({ change, what, name, url, etag, onSaved, onDeleted, onClose }: StateDialogProps) {
  const [reason, setReason] = useState('');
  const saving = useConditionalSave<unknown>(url, etag, () => {
    onSaved();
    onClose();
  });
  const { title, button, description } = TEXTS[change];
  const isMissing = change === 'withdraw' && reason.trim().length < 3;
  const readPresent = () => {
    onSaved();
    onClose();
  };
  const act = () => {
    if (change === 'delete') return saving.remove(onDeleted);
    if (change === 'withdraw') return saving.save({ state: 'withdrawn', withdrawnReason: reason.trim() });
    return saving.save({ state: 'registered' });
  };
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={`${title}: ${name}`}
      description={description(what)}
      actions={
        <>
          <Button onClick={onClose}>Cancel</Button>
          <Button
            kind={change === 'withdraw' || change === 'delete' ? 'danger' : 'primary'}
            disabled={isMissing || saving.isSending || (saving.isStale && saving.present === null)}
            onClick={() => void act()}
          >
            {button}
          </Button>
        </>
      }
    >
      <div className="flex flex-col gap-3">
        {change === 'withdraw' && (
          <TextArea
            label="Reason"
            hint="Read by everybody who sees the record"
            maxLength={2000}
            value={reason}
            onChange={(event) => setReason(event.currentTarget.value)}
          />
        )}
        <Problem problem={saving.problem} />
        {saving.isStale && (
          <div role="alert">
            <Notice title="Somebody changed this meanwhile.">
              {saving.present === null ? (
                <div className="mt-2">
                  <Button onClick={() => void saving.loadPresent()}>Look at the present state</Button>
                </div>
              ) : (
                <>
                  The present state is loaded: close to read it first, or go on.{' '}
                  <button type="button" className="link" onClick={readPresent}>
                    Close and read it
                  </button>
                </>
              )}
            </Notice>
          </div>
        )}
      </div>
    </Dialog>
  );
}
