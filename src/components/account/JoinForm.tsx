import type { InvitationPreview } from '../../contracts/invitations.ts';
import { LicenceTerms } from '../folios/LicenceTerms.tsx';
import { Button, ButtonLink } from '../ui/Button.tsx';
import { longDay } from '../ui/dates.ts';
import { EmptyState } from '../ui/EmptyState.tsx';
import { Facts } from '../ui/Panel.tsx';
import { Problem } from '../ui/Problem.tsx';
import { joinStep } from './join-step.ts';
import { NewAccountFields } from './NewAccountFields.tsx';
import { useJoin } from './useJoin.ts';

interface Props {
  /** Address of who is signed in in this browser, or null. */
  signedInAs: string | null;
  /** Today, ISO 8601, by the server's clock. */
  today: string;
}

/** What an invitation offers, and the way to accept it. */
export function JoinForm({ signedInAs, today }: Props) {
  const join = useJoin();
  if (join.token === null) {
    return (
      <EmptyState title="No invitation here" action={<ButtonLink href="/signin">Sign in</ButtonLink>}>
        Open the link in the mail once more, the whole of it: the part after # holds the invitation.
      </EmptyState>
    );
  }
  if (join.preview.error) {
    return <Problem problem={join.preview.error} onRetry={() => void join.preview.refetch()} />;
  }
  if (!join.preview.data) return <p role="status">Reading the invitation…</p>;
  const preview = join.preview.data;
  return (
    <div className="flex flex-col gap-5">
      <Offer preview={preview} />
      {!preview.folio && <Recorded />}
      <Step preview={preview} signedInAs={signedInAs} today={today} join={join} />
    </div>
  );
}

function Offer({ preview }: { preview: InvitationPreview }) {
  const { folio, lab, level, role } = preview;
  return (
    <Facts
      facts={[
        ['From', preview.invitedBy],
        folio ? ['Folio', folio.name] : null,
        ['Lab', lab.name],
        folio ? ['You may', level === 'download' ? 'read and download' : 'read'] : ['As', role],
        preview.accessUntil ? ['Until', longDay(preview.accessUntil)] : null,
        ['For', preview.email],
        ['Link works', `until ${longDay(preview.expiresAt)}`],
      ]}
    />
  );
}

/** What guests are told by their terms. */
function Recorded() {
  return (
    <p className="text-ink-soft">
      The registry records, with the day, which records you open and which files you download. Stewards can see it, and
      so can the leads of the lab whose records they are.
    </p>
  );
}

interface StepProps extends Props {
  preview: InvitationPreview;
  join: ReturnType<typeof useJoin>;
}

function Step({ preview, signedInAs, today, join }: StepProps) {
  const { email } = preview;
  const terms = preview.folio && <Terms today={today} licence={preview.folio.licence} until={preview.accessUntil} />;
  switch (joinStep(preview, signedInAs)) {
    case 'sign-in':
      return (
        <>
          <p>This address has an account. Its password stays as it is.</p>
          <ButtonLink kind="primary" href={`/signin?${new URLSearchParams({ next: '/join', email })}`}>
            Sign in as {email} to accept
          </ButtonLink>
        </>
      );
    case 'other-account':
      return (
        <>
          <p>
            You are signed in as <b className="font-semibold">{signedInAs}</b>. This invitation is for{' '}
            <b className="font-semibold">{email}</b> and can be accepted by that address only.
          </p>
          <Problem problem={join.leave.error} />
          <Button kind="primary" disabled={join.leave.isPending} onClick={() => join.leave.mutate()}>
            Sign out and go on
          </Button>
        </>
      );
    case 'accept':
      return (
        <>
          {terms}
          <Problem problem={join.accept.error} />
          <Button kind="primary" disabled={join.accept.isPending} onClick={() => join.accept.mutate(null)}>
            {preview.folio ? 'Accept the terms and open the folio' : 'Accept the invitation'}
          </Button>
        </>
      );
    case 'new-account':
      return <NewAccountFields email={email} terms={terms} join={join} />;
  }
}

function Terms({ today, licence, until }: { today: string; licence: string; until: string | null }) {
  return (
    <section aria-labelledby="terms" className="border border-hairline bg-zaffre-wash px-4 py-3">
      <h2 id="terms" className="mb-1.5 font-semibold">
        Terms
      </h2>
      <LicenceTerms licence={licence} until={until} />
      <p className="mt-2 text-xs text-ink-soft">
        Accepting on {longDay(today)}, you agree to these. The day and the licence are recorded.
      </p>
    </section>
  );
}
