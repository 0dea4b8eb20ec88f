import { type FormEvent, useMemo, useState } from 'react';
import type { GrantRecord } from '../../contracts/grants.ts';
import type { GuestInvitation } from '../../contracts/invitations.ts';
import type { FolioRecord } from '../../contracts/sharing.ts';
import { InvitationTable } from '../labs/InvitationTable.tsx';
import { Sent } from '../labs/LabInvitations.tsx';
import { useInvitations } from '../labs/useInvitations.ts';
import { Button } from '../ui/Button.tsx';
import { Select, TextInput } from '../ui/controls.tsx';
import { DataTable } from '../ui/DataTable.tsx';
import { Dialog } from '../ui/Dialog.tsx';
import { dayLater, shortDay } from '../ui/dates.ts';
import { Panel } from '../ui/Panel.tsx';
import { Problem } from '../ui/Problem.tsx';
import { ProblemError } from '../ui/problem-error.ts';
import { StatusLine } from '../ui/StatusLine.tsx';
import type { DataColumn } from '../ui/table-csv.ts';
import { useDraft } from '../ui/useDraft.ts';
import { openGrants } from './folio-facts.ts';
import type { useFolio } from './useFolio.ts';

const LEVELS = [
  { value: 'view', label: 'Read on screen' },
  { value: 'download', label: 'Read and download files' },
];

const COLUMNS: DataColumn<GrantRecord>[] = [
  { id: 'name', header: 'Name', value: (grant) => grant.name },
  { id: 'email', header: 'Address', value: (grant) => grant.email },
  { id: 'level', header: 'May', value: (grant) => (grant.level === 'download' ? 'read and download' : 'read') },
  {
    id: 'until',
    header: 'Until',
    value: (grant) => grant.expires.slice(0, 10),
    cell: (grant) => shortDay(grant.expires),
  },
  {
    id: 'terms',
    header: 'Terms accepted',
    value: (grant) => grant.termsAcceptedAt?.slice(0, 10) ?? null,
    cell: (grant) => (grant.termsAcceptedAt ? shortDay(grant.termsAcceptedAt) : '–'),
  },
];

interface Props {
  folio: FolioRecord;
  revokeGrant: ReturnType<typeof useFolio>['revokeGrant'];
  now: string;
  isDemo: boolean;
}

/** Who may read a folio besides the members of its lab, and who was asked to. */
export function FolioReaders({ folio, revokeGrant, now, isDemo }: Props) {
  const [asked, setAsked] = useState<GrantRecord | null>(null);
  const readers = openGrants(folio, now);
  return (
    <>
      <Panel title="Who may read it" aside={`besides the members of ${folio.lab.name}`}>
        <Problem problem={revokeGrant.error} />
        {readers.length === 0 ? (
          <p className="text-ink-soft">No guest. Invite one below.</p>
        ) : (
          <DataTable
            name="Readers"
            columns={COLUMNS}
            rows={readers}
            rowId={(grant) => grant.id}
            tools={readers.length > 8}
            compact
            actions={(grant) => (
              <Button size="small" kind="danger" onClick={() => setAsked(grant)} aria-label={`Revoke ${grant.email}`}>
                Revoke
              </Button>
            )}
          />
        )}
      </Panel>
      <GuestInvitations folio={folio} now={now} isDemo={isDemo} />
      <Dialog
        open={asked !== null}
        onOpenChange={(open) => !open && setAsked(null)}
        title="End this access"
        description={`${asked?.name} (${asked?.email}) sees nothing of this folio from the next request on. What was downloaded stays with them.`}
        actions={
          <>
            <Button onClick={() => setAsked(null)}>Keep it</Button>
            <Button
              kind="danger"
              disabled={revokeGrant.isPending}
              onClick={() => {
                if (asked) revokeGrant.mutate(asked.id);
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

function GuestInvitations({ folio, now, isDemo }: Pick<Props, 'folio' | 'now' | 'isDemo'>) {
  const { sent, invite, revoke } = useInvitations<GuestInvitation>(`/api/folios/${folio.id}`);
  const nobody = useMemo(
    () => ({ email: '', level: 'view' as 'view' | 'download', expires: dayLater(now, 365) }),
    [now],
  );
  const { draft, change, clear } = useDraft(`invite-guest:${folio.id}`, nobody);
  const submit = (event: FormEvent) => {
    event.preventDefault();
    invite.mutate({ ...draft, email: draft.email.trim() }, { onSuccess: clear });
  };
  const refused = invite.error instanceof ProblemError ? invite.error : null;
  const isTold = refused?.about('email') ?? refused?.about('expires');
  return (
    <Panel title="Invite a guest" aside="Read-only, this folio and nothing else">
      <form onSubmit={submit} className="flex flex-wrap items-start gap-3" aria-label="Invite a guest">
        <TextInput
          label="E-mail address"
          type="email"
          required
          autoComplete="off"
          className="min-w-56 flex-1"
          error={refused?.about('email')}
          value={draft.email}
          onChange={(event) => change({ email: event.target.value })}
        />
        <Select
          label="May"
          className="min-w-44"
          options={LEVELS}
          value={draft.level}
          onChange={(event) => change({ level: event.target.value as 'view' | 'download' })}
        />
        <TextInput
          label="Until"
          type="date"
          required
          min={dayLater(now, 0)}
          error={refused?.about('expires')}
          value={draft.expires}
          onChange={(event) => change({ expires: event.target.value })}
        />
        <Button type="submit" kind="primary" className="mt-[22px]" disabled={invite.isPending}>
          Invite
        </Button>
      </form>
      {!isTold && <Problem problem={invite.error} />}
      <StatusLine>{invite.data && <Sent email={invite.data.email} isDemo={isDemo} />}</StatusLine>
      <Problem problem={sent.error} onRetry={() => void sent.refetch()} />
      {sent.data && sent.data.length > 0 && <InvitationTable invitations={sent.data} revoke={revoke} />}
    </Panel>
  );
}
