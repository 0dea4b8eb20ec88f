import { useState } from 'react';
import type { FolioRecord } from '../../contracts/sharing.ts';
import { Button } from '../ui/Button.tsx';
import { Dialog } from '../ui/Dialog.tsx';
import { Problem } from '../ui/Problem.tsx';
import type { useFolio } from './useFolio.ts';

interface Props {
  folio: FolioRecord;
  remove: ReturnType<typeof useFolio>['remove'];
  /** How many guests read it today. */
  readers: number;
}

/** Deleting a folio, once no guest reads it. */
export function DeleteFolio({ folio, remove, readers }: Props) {
  const [isAsked, setIsAsked] = useState(false);
  const isRead = readers > 0;
  return (
    <>
      <Button kind="danger" onClick={() => setIsAsked(true)}>
        Delete
      </Button>
      <Dialog
        open={isAsked}
        onOpenChange={setIsAsked}
        title="Delete the folio"
        description={
          isRead
            ? `${readers === 1 ? 'A guest reads' : `${readers} guests read`} this folio. End that access first.`
            : `“${folio.name}” goes, with its invitations, past grants, requests and bundles. The complexes and spectra in it stay as they are.`
        }
        actions={
          <>
            <Button onClick={() => setIsAsked(false)}>{isRead ? 'Close' : 'Keep it'}</Button>
            {!isRead && (
              <Button kind="danger" disabled={remove.isPending} onClick={() => remove.mutate()}>
                Delete the folio
              </Button>
            )}
          </>
        }
      >
        {remove.error && <Problem problem={remove.error} />}
      </Dialog>
    </>
  );
}
