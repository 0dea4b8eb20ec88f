import type { InvitationRecord } from '../../contracts/invitations.ts';

/** What happened to invitations: they are on their way, and in demo mode they lie in the outbox. */
export function SentNote({ sent, isDemo }: { sent: readonly InvitationRecord[]; isDemo: boolean }) {
  const [only] = sent;
  return (
    <span>
      {sent.length === 1
        ? `Invitation to ${only!.email} is on its way. `
        : `${sent.length} invitations are on their way. `}
      {isDemo && (
        <>
          In demo mode {sent.length === 1 ? 'it lies' : 'they lie'} in the{' '}
          <a href="/outbox" className="link">
            outbox
          </a>
          .
        </>
      )}
    </span>
  );
}
