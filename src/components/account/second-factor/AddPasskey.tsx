import { useState } from 'react';
import { Button } from '../../ui/Button.tsx';
import { Dialog } from '../../ui/Dialog.tsx';
import { EndOthers } from './EndOthers.tsx';
import { NameAndPassword } from './NameAndPassword.tsx';
import type { SecondFactor } from './useSecondFactor.ts';

interface Props {
  factors: SecondFactor;
  first: boolean;
  onDone: (recoveryCodes: string[]) => void;
  onClose: () => void;
}

/** Setting up a passkey: who asks, then the browser takes over. */
export function AddPasskey({ factors: { addPasskey }, first, onDone, onClose }: Props) {
  const [endOthers, setEndOthers] = useState(true);
  const mutate = (input: { name: string; password: string }) =>
    addPasskey.mutate(
      { ...input, endOthers: first && endOthers },
      { onSuccess: ({ recoveryCodes }) => onDone(recoveryCodes) },
    );
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title="Add a passkey"
      description="A security key, or this device by its own lock. It works on this registry alone, so that a copied page cannot use it."
      actions={
        <>
          <Button onClick={onClose}>Cancel</Button>
          <Button type="submit" form="add-passkey" kind="primary" disabled={addPasskey.isPending}>
            {addPasskey.isPending ? 'Waiting for the browser' : 'Continue'}
          </Button>
        </>
      }
    >
      <NameAndPassword
        id="add-passkey"
        nameHint="How you will tell it from others, such as the key or the device."
        mutation={{ error: addPasskey.error, mutate }}
      >
        {first && <EndOthers checked={endOthers} onChange={setEndOthers} />}
      </NameAndPassword>
    </Dialog>
  );
}
