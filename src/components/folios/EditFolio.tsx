import { useState } from 'react';
import type { FolioRecord } from '../../contracts/sharing.ts';
import { Button } from '../ui/Button.tsx';
import { Dialog } from '../ui/Dialog.tsx';
import { Problem } from '../ui/Problem.tsx';
import { ProblemError } from '../ui/problem-error.ts';
import { type FolioDraft, FolioFields } from './FolioFields.tsx';
import { embargoInstant } from './folio-facts.ts';
import type { Licence } from './licences.ts';
import type { useFolio } from './useFolio.ts';

interface Props {
  folio: FolioRecord;
  change: ReturnType<typeof useFolio>['change'];
  onClose: () => void;
}

/** The dialog in which name, licence, embargo and what guests see are changed. */
export function EditFolio({ folio, change, onClose }: Props) {
  const [draft, setDraft] = useState<FolioDraft>({
    name: folio.name,
    description: folio.description ?? '',
    lab: folio.lab.id,
    licence: folio.licence as Licence,
    shows: folio.shows,
    embargo: folio.embargoUntil?.slice(0, 10) ?? '',
  });
  const refused = change.error instanceof ProblemError ? change.error : null;
  const { name, description, licence, shows, embargo } = draft;
  return (
    <Dialog
      open
      onOpenChange={(open) => !open && onClose()}
      title="Change the folio"
      actions={
        <>
          <Button onClick={onClose}>Leave</Button>
          <Button type="submit" form="edit-folio" kind="primary" disabled={change.isPending}>
            Save
          </Button>
        </>
      }
    >
      <form
        id="edit-folio"
        onSubmit={(event) => {
          event.preventDefault();
          change.mutate(
            { name, description: description || null, licence, shows, embargoUntil: embargoInstant(embargo) },
            { onSuccess: onClose },
          );
        }}
      >
        <FolioFields
          draft={draft}
          change={(part) => setDraft((now) => ({ ...now, ...part }))}
          fault={(field) => refused?.about(field)}
        >
          <Problem problem={change.error} />
        </FolioFields>
      </form>
    </Dialog>
  );
}
