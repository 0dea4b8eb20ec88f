import { useState } from 'react';
import type { InvitationRecord } from '../../contracts/invitations.ts';
import { Button } from '../ui/Button.tsx';
import { DataTable } from '../ui/DataTable.tsx';
import { Dialog } from '../ui/Dialog.tsx';
import { shortDay } from '../ui/dates.ts';
import { Problem } from '../ui/Problem.tsx';
import type { DataColumn } from '../ui/table-csv.ts';

interface Props {
  invitations: InvitationRecord[];
  revoke: { mutate: (id: string) => void; error: unknown; isPending: boolean };
}

const COLUMNS: DataColumn<InvitationRecord>[] = [
  { id: 'email', header: 'Address', value: (row) => row.email },
  { id: 'as', header: 'As', value: (row) => row.role ?? row.level },
  {
    id: 'state',
    header: 'State',
    value: (row) => row.state,
    cell: ({ state }) => <span className={state === 'accepted' ? 'text-attest' : ''}>{state}</span>,
  },
  { id: 'by', header: 'By', value: (row) => row.invitedBy },
  { id: 'sent', header: 'Sent', value: (row) => row.createdAt.slice(0, 10), cell: (row) => shortDay(row.createdAt) },
  {
    id: 'ends',
    header: 'Link until',
    value: (row) => row.expiresAt.slice(0, 10),
    cell: (row) => shortDay(row.expiresAt),
  },
];

/** Invitations with what became of them; those still out can be taken back. */
export function InvitationTable({ invitations, revoke }: Props) {
  const [asked, setAsked] = useState<InvitationRecord | null>(null);
  return (
    <>
      <Problem problem={revoke.error} />
      <DataTable
        name="Invitations"
        columns={COLUMNS}
        rows={invitations}
        rowId={(row) => row.id}
        tools={invitations.length > 8}
        compact
        actions={(row) =>
          row.state === 'sent' && (
            <Button size="small" kind="danger" onClick={() => setAsked(row)} aria-label={`Revoke ${row.email}`}>
              Revoke
            </Button>
          )
        }
      />
      <Dialog
        open={asked !== null}
        onOpenChange={(open) => !open && setAsked(null)}
        title="Revoke the invitation"
        description={`The link sent to ${asked?.email} stops working. It cannot be made to work again; a new one can be sent.`}
        actions={
          <>
            <Button onClick={() => setAsked(null)}>Keep it</Button>
            <Button
              kind="danger"
              disabled={revoke.isPending}
              onClick={() => {
                if (asked) revoke.mutate(asked.id);
                setAsked(null);
              }}
            >
              Revoke
            </Button>
          </>
        }
      />
    </>
  );
}
