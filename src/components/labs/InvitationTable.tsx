import { useState } from 'react';
import type { InvitationRecord } from '../../contracts/invitations.ts';
import { Button } from '../ui/Button.tsx';
import { DataTable } from '../ui/DataTable.tsx';
import { Dialog } from '../ui/Dialog.tsx';
import { shortDay } from '../ui/dates.ts';
import { Problem } from '../ui/Problem.tsx';
import { StatusLine } from '../ui/StatusLine.tsx';
import type { DataColumn } from '../ui/table-csv.ts';

interface Act {
  mutate: (id: string) => void;
  error: unknown;
  isPending: boolean;
}
interface Props {
  invitations: InvitationRecord[];
  resend: Act & { data: InvitationRecord | undefined };
  revoke: Act;
}

/** When it came into its state. */
function since(row: InvitationRecord): string {
  if (row.state === 'accepted') return row.acceptedAt ?? row.sentAt;
  if (row.state === 'revoked') return row.revokedAt ?? row.sentAt;
  return row.state === 'lapsed' ? row.expiresAt : row.sentAt;
}

const STATE_COLOUR = { accepted: 'text-attest', lapsed: 'text-alert', sent: '', revoked: 'text-ink-soft' } as const;

const COLUMNS: DataColumn<InvitationRecord>[] = [
  { id: 'email', header: 'Address', value: (row) => row.email },
  { id: 'as', header: 'As', value: (row) => row.role ?? row.level },
  {
    id: 'state',
    header: 'State',
    value: (row) => row.state,
    cell: (row) => <span className={STATE_COLOUR[row.state]}>{row.state}</span>,
  },
  { id: 'since', header: 'Since', value: (row) => since(row).slice(0, 10), cell: (row) => shortDay(since(row)) },
  {
    id: 'sends',
    header: 'Sent',
    value: (row) => row.sends,
    cell: ({ sends }) => (sends === 1 ? 'once' : `${sends} ×`),
  },
  { id: 'by', header: 'By', value: (row) => row.invitedBy },
  {
    id: 'ends',
    header: 'Link until',
    value: (row) => (row.state === 'sent' ? row.expiresAt.slice(0, 10) : null),
    cell: (row) => (row.state === 'sent' ? shortDay(row.expiresAt) : '–'),
  },
];

/** Invitations with what became of them; those still out can be taken back, and those unused be sent again. */
export function InvitationTable({ invitations, resend, revoke }: Props) {
  const [asked, setAsked] = useState<InvitationRecord | null>(null);
  return (
    <>
      <Problem problem={resend.error ?? revoke.error} />
      <DataTable
        name="Invitations"
        columns={COLUMNS}
        rows={invitations}
        rowId={(row) => row.id}
        tools={invitations.length > 8}
        compact
        actions={(row) =>
          (row.state === 'sent' || row.state === 'lapsed') && (
            <span className="inline-flex gap-1.5">
              <Button
                size="small"
                disabled={resend.isPending}
                onClick={() => resend.mutate(row.id)}
                aria-label={`Send again to ${row.email}`}
              >
                Send again
              </Button>
              {row.state === 'sent' && (
                <Button size="small" kind="danger" onClick={() => setAsked(row)} aria-label={`Revoke ${row.email}`}>
                  Revoke
                </Button>
              )}
            </span>
          )
        }
      />
      <StatusLine>
        {resend.data && `Sent to ${resend.data.email} again with a new link. The older link no longer works.`}
      </StatusLine>
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
