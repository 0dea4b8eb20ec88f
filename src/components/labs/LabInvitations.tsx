import type { FormEvent } from 'react';
import type { MemberInvitation } from '../../contracts/invitations.ts';
import type { LabRecord } from '../../contracts/sharing.ts';
import { Button } from '../ui/Button.tsx';
import { Select, TextInput } from '../ui/controls.tsx';
import { Panel } from '../ui/Panel.tsx';
import { Problem } from '../ui/Problem.tsx';
import { ProblemError } from '../ui/problem-error.ts';
import { StatusLine } from '../ui/StatusLine.tsx';
import { useDraft } from '../ui/useDraft.ts';
import { InvitationTable } from './InvitationTable.tsx';
import { useInvitations } from './useInvitations.ts';

const ROLES = [
  { value: 'contributor', label: 'Contributor: makes, measures, proposes' },
  { value: 'lead', label: 'Lead: runs the lab, attests, invites' },
];
const NOBODY: { email: string; role: 'contributor' | 'lead' } = { email: '', role: 'contributor' };

/** Who was asked to join a lab, and asking somebody. */
export function LabInvitations({ lab, isDemo }: { lab: LabRecord; isDemo: boolean }) {
  const { sent, invite, revoke } = useInvitations<MemberInvitation>(`/api/labs/${lab.id}`);
  const { draft, change, clear } = useDraft(`invite-to-lab:${lab.id}`, NOBODY);
  const submit = (event: FormEvent) => {
    event.preventDefault();
    invite.mutate({ email: draft.email.trim(), role: draft.role }, { onSuccess: clear });
  };
  const emailFault = invite.error instanceof ProblemError ? invite.error.about('email') : undefined;
  return (
    <Panel title="Invitations" aside="A link works once, for 14 days, for its address only">
      <form onSubmit={submit} className="mb-4 flex flex-wrap items-start gap-3" aria-label="Invite a person">
        <TextInput
          label="E-mail address"
          type="email"
          required
          autoComplete="off"
          className="min-w-56 flex-1"
          error={emailFault}
          value={draft.email}
          onChange={(event) => change({ email: event.target.value })}
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
      {!emailFault && <Problem problem={invite.error} />}
      <StatusLine>{invite.data && <Sent email={invite.data.email} isDemo={isDemo} />}</StatusLine>
      <Problem problem={sent.error} onRetry={() => void sent.refetch()} />
      {sent.data && sent.data.length > 0 && <InvitationTable invitations={sent.data} revoke={revoke} />}
      {sent.data?.length === 0 && <p className="text-ink-soft">Nobody was invited yet.</p>}
    </Panel>
  );
}

/** What happened to an invitation: it was queued, and in demo mode it lies in the outbox. */
export function Sent({ email, isDemo }: { email: string; isDemo: boolean }) {
  return (
    <span>
      Invitation to {email} is on its way.{' '}
      {isDemo && (
        <>
          In demo mode it lies in the{' '}
          <a href="/outbox" className="link">
            outbox
          </a>
          .
        </>
      )}
    </span>
  );
}
