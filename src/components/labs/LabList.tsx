import { useMutation } from '@tanstack/react-query';
import { useState } from 'react';
import type { LabRecord } from '../../contracts/sharing.ts';
import { Button } from '../ui/Button.tsx';
import { TextInput } from '../ui/controls.tsx';
import { DataTable } from '../ui/DataTable.tsx';
import { Dialog } from '../ui/Dialog.tsx';
import { EmptyState } from '../ui/EmptyState.tsx';
import { sendJson } from '../ui/http.ts';
import { Problem } from '../ui/Problem.tsx';
import { ProblemError } from '../ui/problem-error.ts';
import { queryClient } from '../ui/query-client.ts';
import type { DataColumn } from '../ui/table-csv.ts';
import { useDraft } from '../ui/useDraft.ts';

const COLUMNS: DataColumn<LabRecord>[] = [
  {
    id: 'name',
    header: 'Lab',
    value: (lab) => lab.name,
    cell: (lab) => (
      <a href={`/labs/${lab.id}`} className="link">
        {lab.name}
      </a>
    ),
  },
  { id: 'place', header: 'Place', value: (lab) => lab.place },
  { id: 'kind', header: 'Kind', value: (lab) => (lab.facility ? 'facility' : null) },
  { id: 'role', header: 'Your role', value: (lab) => lab.role },
  { id: 'members', header: 'Members', value: (lab) => lab.members, figures: true },
  { id: 'complexes', header: 'Complexes', value: (lab) => lab.complexes, figures: true },
  { id: 'spectra', header: 'Spectra', value: (lab) => lab.spectra, figures: true },
];

/** The labs of the programme; a steward adds one. */
export function LabList({ labs, mayAdd }: { labs: LabRecord[]; mayAdd: boolean }) {
  const [adding, setAdding] = useState(false);
  return (
    <>
      <header className="mb-5 flex flex-wrap items-center gap-4">
        <h1 className="text-xl font-semibold">Labs</h1>
        {mayAdd && (
          <Button kind="primary" className="ml-auto" onClick={() => setAdding(true)}>
            Add a lab
          </Button>
        )}
      </header>
      {labs.length > 0 ? (
        <DataTable name="Labs" columns={COLUMNS} rows={labs} rowId={(lab) => lab.id} sort="name" />
      ) : (
        <EmptyState title="No lab yet">
          {mayAdd ? 'Add the first, then invite its lead.' : 'A steward adds labs and invites their leads.'}
        </EmptyState>
      )}
      <AddLab open={adding} onClose={() => setAdding(false)} />
    </>
  );
}

const NO_LAB = { name: '', place: '' };

function AddLab({ open, onClose }: { open: boolean; onClose: () => void }) {
  const { draft, change, clear } = useDraft('new-lab', NO_LAB);
  const add = useMutation(
    {
      mutationFn: async () => {
        const lab = await sendJson<LabRecord>('POST', '/api/labs', {
          name: draft.name,
          ...(draft.place ? { place: draft.place } : {}),
        });
        clear();
        location.assign(`/labs/${lab.id}`);
      },
    },
    queryClient,
  );
  const nameFault = add.error instanceof ProblemError ? add.error.about('name') : undefined;
  return (
    <Dialog
      open={open}
      onOpenChange={(next) => !next && onClose()}
      title="Add a lab"
      actions={
        <>
          <Button onClick={onClose}>Leave</Button>
          <Button type="submit" form="add-lab" kind="primary" disabled={add.isPending}>
            Add the lab
          </Button>
        </>
      }
    >
      <form
        id="add-lab"
        className="flex flex-col gap-4"
        onSubmit={(event) => {
          event.preventDefault();
          add.mutate();
        }}
      >
        <TextInput
          label="Name"
          required
          maxLength={200}
          error={nameFault}
          value={draft.name}
          onChange={(event) => change({ name: event.target.value })}
        />
        <TextInput
          label="Place"
          maxLength={200}
          value={draft.place}
          onChange={(event) => change({ place: event.target.value })}
        />
        {!nameFault && <Problem problem={add.error} />}
      </form>
    </Dialog>
  );
}
