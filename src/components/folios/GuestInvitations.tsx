import { type FormEvent, useMemo } from 'react';
import type { GuestInvitation } from '../../contracts/invitations.ts';
import type { FolioRecord } from '../../contracts/sharing.ts';
import { AddressField } from '../labs/AddressField.tsx';
import { InvitationTable } from '../labs/InvitationTable.tsx';
import { SentNote } from '../labs/SentNote.tsx';
import { useInvitations } from '../labs/useInvitations.ts';
import { useInviteForm } from '../labs/useInviteForm.ts';
import { Button } from '../ui/Button.tsx';
import { Select, TextInput } from '../ui/controls.tsx';
import { dayLater } from '../ui/dates.ts';
import { Panel } from '../ui/Panel.tsx';
import { Problem } from '../ui/Problem.tsx';
import { ProblemError } from '../ui/problem-error.ts';
import { StatusLine } from '../ui/StatusLine.tsx';
import { useDraft } from '../ui/useDraft.ts';
import { LEVELS } from './licences.ts';

interface Props {
  folio: FolioRecord;
  now: string;
  isDemo: boolean;
}

/** Asking partners outside to read a folio, and what became of it. */
export function GuestInvitations({ folio, now, isDemo }: Props) {
  const { sent, invite, resend, revoke } = useInvitations<GuestInvitation>(`/api/folios/${folio.id}`);
  const nobody = useMemo(
    () => ({ email: '', level: 'view' as 'view' | 'download', expires: dayLater(now, 365) }),
    [now],
  );
  const { draft, change, clear } = useDraft(`invite-guest:${folio.id}`, nobody);
  const form = useInviteForm(draft.email, invite.error);
  const submit = (event: FormEvent) => {
    event.preventDefault();
    const to = form.take();
    if (to) invite.mutate({ ...to, level: draft.level, expires: draft.expires }, { onSuccess: clear });
  };
  const refused = invite.error instanceof ProblemError ? invite.error : null;
  const isTold = form.refused.size > 0 || refused?.about('expires') !== undefined;
  return (
    <Panel title="Invite a guest" aside="Read-only, this folio and nothing else">
      <form onSubmit={submit} noValidate className="flex flex-wrap items-start gap-3" aria-label="Invite a guest">
        <AddressField
          className="min-w-56 flex-1 basis-72"
          value={draft.email}
          onChange={(email) => change({ email })}
          refused={form.refused}
          wasTried={form.wasTried}
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
      <StatusLine>{invite.data && <SentNote sent={invite.data} isDemo={isDemo} />}</StatusLine>
      <Problem problem={sent.error} onRetry={() => void sent.refetch()} />
      {sent.data && sent.data.length > 0 && <InvitationTable invitations={sent.data} resend={resend} revoke={revoke} />}
    </Panel>
  );
}
