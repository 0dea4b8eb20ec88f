import { and, eq, isNull, sql } from 'drizzle-orm';
import type { InvitationRecord } from '#src/contracts/invitations.ts';
import { invitations } from '#src/db/schema/index.ts';
import type { InvitationAccess } from '../access/grants.ts';
import { database } from '../database.ts';
import { HttpError } from '../http.ts';
import { nowIso } from '../ids.ts';
import { countAttempt } from '../rate-limit.ts';
import { record } from '../trail.ts';
import { linkEnd, mailLink, newLink } from './link.ts';
import { invitationRecord, invitationRows } from './record.ts';
import { countMails } from './send.ts';

const RESENDS_A_DAY = 5;

/** One invitation as those see it who may take it back. */
export async function readInvitation({ invitation }: InvitationAccess): Promise<InvitationRecord> {
  const { db } = await database();
  const [row] = await invitationRows(db, eq(invitations.id, invitation.id));
  return invitationRecord(row!);
}

/** Take an invitation back. @throws {HttpError} 409 when it was accepted */
export async function revokeInvitation({ asker, invitation }: InvitationAccess): Promise<void> {
  const { write } = await database();
  await write(async (tx) => {
    const open = and(eq(invitations.id, invitation.id), isNull(invitations.acceptedAt));
    const [row] = await tx.update(invitations).set({ revokedAt: nowIso() }).where(open).returning();
    if (!row) throw new HttpError(409, 'It was accepted: end the access of that person instead');
    await record(tx, asker, { action: 'revoke', subjectType: 'invitation', subjectId: invitation.id });
  });
}

const accepted = () => new HttpError(409, 'It was accepted: there is nothing to send again');
const revoked = () => new HttpError(409, 'It was revoked: send a new invitation');

/**
 * Send an invitation again, also one that lapsed. It gets a new link for a new time, and the older link is dead at once.
 *
 * @throws {HttpError} 409 when it was accepted or revoked, or when the access that it offers has ended; 429
 */
export async function resendInvitation({ asker, invitation }: InvitationAccess): Promise<InvitationRecord> {
  const { id, acceptedAt, revokedAt, grantExpiresAt } = invitation;
  if (acceptedAt) throw accepted();
  if (revokedAt) throw revoked();
  if (grantExpiresAt && grantExpiresAt <= nowIso())
    throw new HttpError(409, 'The access that it offers has ended: send a new invitation');
  await countAttempt(`resend:${id}`, { most: RESENDS_A_DAY, windowMs: 24 * 3600 * 1000 });
  await countMails(asker, 1);
  const { token, tokenHash } = newLink();
  const { write } = await database();
  return write(async (tx) => {
    const open = and(eq(invitations.id, id), isNull(invitations.acceptedAt), isNull(invitations.revokedAt));
    const [row] = await tx
      .update(invitations)
      .set({ tokenHash, expiresAt: linkEnd(grantExpiresAt), sends: sql`${invitations.sends} + 1`, sentAt: nowIso() })
      .where(open)
      .returning();
    if (!row) throw new HttpError(409, 'It was accepted or revoked meanwhile: there is nothing to send again');
    await mailLink(tx, asker, row, token);
    const detail = { email: row.email, sends: row.sends };
    await record(tx, asker, { action: 'resend', subjectType: 'invitation', subjectId: id, detail });
    const [again] = await invitationRows(tx, eq(invitations.id, id));
    return invitationRecord(again!);
  });
}
