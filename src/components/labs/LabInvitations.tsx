import type { FormEvent } from 'react';
import type { MemberInvitation } from '../../contracts/invitations.ts';
import type { LabRecord } from '../../contracts/sharing.ts';
import { Button } from '../ui/Button.tsx';
import { Select } from '../ui/controls.tsx';
import { Panel } from '../ui/Panel.tsx';
import { Problem } from '../ui/Problem.tsx';
import { StatusLine } from '../ui/StatusLine.tsx';
import { useDraft } from '../ui/useDraft.ts';
import { AddressField } from './AddressField.tsx';
import { InvitationTable } from './InvitationTable.tsx';
import { SentNote } from './SentNote.tsx';
import { useInvitations } from './useInvitations.ts';
import { useInviteForm } from './useInviteForm.ts';

const ROLES = [
  { value: 'contributor', label: 'Contributor: makes, measures, proposes' },
  { value: 'lead', label: 'Lead: runs the lab, attests, invites' },
];
const NOBODY: { email: string; role: 'contributor' | 'lead' } = { email: '', role: 'contributor' };

/** Who was asked to join a lab, and asking somebody. */
export function LabInvitations({ lab, isDemo }: { lab: LabRecord; isDemo: boolean }) {
  const { sent, invite, resend, revoke } = useInvitations<MemberInvitation>(`/api/labs/${lab.id}`);
  const { draft, change, clear } = useDraft(`invite-to-lab:${lab.id}`, NOBODY);
  const form = useInviteForm(draft.email, invite.error);
  const submit = (event: FormEvent) => {
    event.preventDefault();
    const to = form.take();
    if (to) invite.mutate({ ...to, role: draft.role }, { onSuccess: clear });
  };
  return (
    <Panel title="Invitations" aside="A link works once, for 14 days, for its address only">
      <form onSubmit={submit} noValidate className="mb-4 flex flex-wrap items-start gap-3" aria-label="Invite a person">
        <AddressField
          className="min-w-56 flex-1 basis-72"
          value={draft.email}
          onChange={(email) => change({ email })}
          refused={form.refused}
          wasTried={form.wasTried}
        />
        <Select
          label="Role"
          className="min-w-48 flex-1"
          options={ROLES}
          value={draft.role}
          onChange={(event) => change({ role: event.target.value as 'contributor' | 'lead' })}
        />
        <Button type="submit" kind="primary" className="mt-[22px]" disabled={invite.isPending}>
          Invite
        </Button>
      </form>
      {form.refused.size === 0 && <Problem problem={invite.error} />}
      <StatusLine>{invite.data && <SentNote sent={invite.data} isDemo={isDemo} />}</StatusLine>
      <Problem problem={sent.error} onRetry={() => void sent.refetch()} />
      {sent.data && sent.data.length > 0 && <InvitationTable invitations={sent.data} resend={resend} revoke={revoke} />}
      {sent.data?.length === 0 && <p className="text-ink-soft">Nobody was invited yet.</p>}
    </Panel>
  );
}
