import { and, eq, inArray, isNull } from 'drizzle-orm';
import type { GuestInvitation, InvitationsSent, MemberInvitation } from '#src/contracts/invitations.ts';
import type { Tx } from '#src/db/client.ts';
import { invitations } from '#src/db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import type { FolioInvite, LabInvite } from '../access/sharing.ts';
import { database } from '../database.ts';
import { newId, nowIso } from '../ids.ts';
import { countAttempt } from '../rate-limit.ts';
import { record } from '../trail.ts';
import { endWithin, GRANT_DAYS, LONGEST_GRANT_DAYS } from './grant-end.ts';
import { fromNow, LINK_DAYS, linkEnd, mailLink, newLink } from './link.ts';
import { invitationRecord, invitationRows } from './record.ts';

/** So that nobody's account becomes a way to send mail to the world. */
const PER_HOUR = 100;

/** Count mails that an account has sent. @throws {HttpError} 429 above a hundred an hour */
export const countMails = (asker: Asker, by: number) =>
  countAttempt(`invite:${asker.accountId}`, { most: PER_HOUR, windowMs: 3600 * 1000, by });

type Offer = Pick<
  typeof invitations.$inferInsert,
  'labId' | 'role' | 'folioId' | 'level' | 'grantExpiresAt' | 'expiresAt'
>;
type Addresses = Pick<MemberInvitation, 'email' | 'emails'>;

/** Ask people to join a lab. Older invitations of these addresses into this lab are revoked. */
export function inviteMember({ asker, lab }: LabInvite, input: MemberInvitation): Promise<InvitationsSent> {
  const expiresAt = input.expires ? endWithin(input.expires, LINK_DAYS) : fromNow(LINK_DAYS);
  return send(asker, input, { labId: lab.id, role: input.role, expiresAt });
}

/** Ask partners outside to read a folio. Older invitations of these addresses to this folio are revoked. */
export function inviteGuest({ asker, folio }: FolioInvite, input: GuestInvitation): Promise<InvitationsSent> {
  const grantExpiresAt = input.expires ? endWithin(input.expires, LONGEST_GRANT_DAYS) : fromNow(GRANT_DAYS);
  const expiresAt = linkEnd(grantExpiresAt);
  return send(asker, input, { folioId: folio.id, level: input.level, grantExpiresAt, expiresAt });
}

/** All of them go out, or none. */
async function send(asker: Asker, { email, emails }: Addresses, offer: Offer): Promise<InvitationsSent> {
  const to = emails ?? [email!];
  await countMails(asker, to.length);
  const { write } = await database();
  const items = await write(async (tx) => {
    const made: string[] = [];
    for (const address of to) made.push(await sendOne(tx, asker, address, offer));
    const rows = await invitationRows(tx, inArray(invitations.id, made));
    return made.map((id) => invitationRecord(rows.find(({ invitation }) => invitation.id === id)!));
  });
  return emails ? { items } : items[0]!;
}

async function sendOne(tx: Tx, asker: Asker, email: string, offer: Offer): Promise<string> {
  await revokeOlder(tx, email, offer);
  const { token, tokenHash } = newLink();
  const now = nowIso();
  const facts = { id: newId(), email, tokenHash, invitedBy: asker.accountId, createdAt: now, sentAt: now };
  const [row] = await tx
    .insert(invitations)
    .values({ ...facts, ...offer })
    .returning();
  await mailLink(tx, asker, row!, token);
  const detail = { email, ...offer };
  await record(tx, asker, { action: 'invite', subjectType: 'invitation', subjectId: facts.id, detail });
  return facts.id;
}

/** The last word counts: of several invitations to one thing, an address holds one that works. */
async function revokeOlder(tx: Tx, email: string, { labId, folioId }: Offer): Promise<void> {
  const same = labId ? eq(invitations.labId, labId) : eq(invitations.folioId, folioId!);
  await tx
    .update(invitations)
    .set({ revokedAt: nowIso() })
    .where(and(eq(invitations.email, email), same, isNull(invitations.acceptedAt), isNull(invitations.revokedAt)));
}
