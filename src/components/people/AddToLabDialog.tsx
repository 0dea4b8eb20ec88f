import { type FormEvent, useState } from 'react';
import type { PersonRecord } from '../../contracts/people.ts';
import { Button } from '../ui/Button.tsx';
import { Select } from '../ui/controls.tsx';
import { Dialog } from '../ui/Dialog.tsx';
import { Problem } from '../ui/Problem.tsx';
import { useAddToLab } from './usePeople.ts';

interface Props {
  person: PersonRecord;
  labs: readonly { id: string; name: string }[];
  onClose: () => void;
  onDone: (said: string) => void;
}

const ROLES = [
  { value: 'contributor', label: 'Contributor: makes, measures, proposes' },
  { value: 'lead', label: 'Lead: runs the lab, attests, invites' },
];

/** Putting somebody into a lab at once, with no invitation to accept. */
export function AddToLabDialog({ person, labs, onClose, onDone }: Props) {
  const open = labs.filter(({ id }) => !person.labs.some((lab) => lab.id === id));
  const [lab, setLab] = useState(open[0]?.id ?? '');
  const [role, setRole] = useState('contributor');
  const add = useAddToLab(person.id, () => {
    onDone(`${person.name} is a ${role} of ${open.find(({ id }) => id === lab)?.name} now.`);
  });
  const submit = (event: FormEvent) => {
    event.preventDefault();
    add.mutate({ lab, role });
  };
  return (
    <Dialog
      open
      onOpenChange={(next) => !next && onClose()}
      title={`Add ${person.name} to a lab`}
      description="The person is told by mail. To move somebody, add them here and remove them on the page of the lab they leave, where their drafts are handed over."
      actions={
        <>
          <Button onClick={onClose}>Do not add</Button>
          <Button type="submit" form="add-to-lab" kind="primary" disabled={!lab || add.isPending}>
            Add to the lab
          </Button>
        </>
      }
    >
      {open.length === 0 ? (
        <p>
          {labs.length === 0 ? 'There is no lab yet: add one on the page of labs.' : 'A member of every lab already.'}
        </p>
      ) : (
        <form id="add-to-lab" className="flex flex-col gap-4" onSubmit={submit}>
          <Select
            label="Lab"
            value={lab}
            onChange={(event) => setLab(event.target.value)}
            options={open.map(({ id, name }) => ({ value: id, label: name }))}
          />
          <Select label="Role" value={role} onChange={(event) => setRole(event.target.value)} options={ROLES} />
          <Problem problem={add.error} />
        </form>
      )}
    </Dialog>
  );
}
