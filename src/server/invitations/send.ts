import { and, eq, isNull } from 'drizzle-orm';
import type { GuestInvitation, InvitationRecord, MemberInvitation } from '#src/contracts/sharing.ts';
import type { Tx } from '#src/db/client.ts';
import { invitations } from '#src/db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import type { FolioInvite, InvitationRevoke, LabInvite } from '../access/sharing.ts';
import { database } from '../database.ts';
import { HttpError } from '../http.ts';
import { newId, newSecret, nowIso, sha256 } from '../ids.ts';
import { guestInvitation, type MailContent, memberInvitation } from '../mail/templates.ts';
import { queueMail } from '../mail.ts';
import { countAttempt } from '../rate-limit.ts';
import { settings } from '../settings.ts';
import { record } from '../trail.ts';
import { invitationRecord, invitationRows } from './record.ts';

const DAY = 24 * 3600 * 1000; // ms
/** How long a link works. */
const LINK_DAYS = 14;
/** How long a guest reads, where the inviter says nothing. */
const GRANT_DAYS = 365;
const LONGEST_GRANT_DAYS = 5 * 366;
/** So that nobody's account becomes a way to send mail to the world. */
const PER_HOUR = 100;

const fromNow = (days: number) => new Date(Date.now() + days * DAY).toISOString();

/** @throws {HttpError} 422 for an end that is past, or later than `days` from now */
function endWithin(expires: string, days: number): string {
  const end = new Date(expires).toISOString();
  if (end <= nowIso()) throw badEnd('Choose a moment that is still to come');
  if (end > fromNow(days)) throw badEnd(`Choose a moment at most ${days} days from now`);
  return end;
}
const badEnd = (detail: string) =>
  new HttpError(422, 'The invitation cannot end then', { errors: [{ pointer: '#/expires', detail }] });

type Offer = Pick<typeof invitations.$inferInsert, 'labId' | 'role' | 'folioId' | 'level' | 'grantExpiresAt'>;

/** Ask a person to join a lab. An older invitation of that address into this lab is revoked. */
export function inviteMember({ asker, lab }: LabInvite, input: MemberInvitation): Promise<InvitationRecord> {
  const { email, role, expires } = input;
  const expiresAt = expires ? endWithin(expires, LINK_DAYS) : fromNow(LINK_DAYS);
  const mail = (link: string) => memberInvitation({ inviter: asker.name, lab: lab.name, role, link, expiresAt });
  return send(asker, { email, expiresAt, offer: { labId: lab.id, role }, mail });
}

/** Ask a partner outside to read a folio. An older invitation of that address to this folio is revoked. */
export function inviteGuest({ asker, folio }: FolioInvite, input: GuestInvitation): Promise<InvitationRecord> {
  const { email, level, expires } = input;
  const grantExpiresAt = expires ? endWithin(expires, LONGEST_GRANT_DAYS) : fromNow(GRANT_DAYS);
  // A link that outlives what it gives would be a promise that cannot be kept.
  const expiresAt = [fromNow(LINK_DAYS), grantExpiresAt].sort()[0]!;
  const mail = (link: string) => guestInvitation({ inviter: asker.name, folio: folio.name, level, link, expiresAt });
  return send(asker, { email, expiresAt, offer: { folioId: folio.id, level, grantExpiresAt }, mail });
}

interface Sending {
  email: string;
  expiresAt: string;
  offer: Offer;
  mail: (link: string) => MailContent;
}

async function send(asker: Asker, { email, expiresAt, offer, mail }: Sending): Promise<InvitationRecord> {
  await countAttempt(`invite:${asker.accountId}`, { most: PER_HOUR, windowMs: 3600 * 1000 });
  const id = newId();
  const token = newSecret();
  // In the fragment, so that the token reaches no server log and no Referer header.
  const link = `${settings().publicOrigin}/join#${token}`;
  const row = {
    id,
    email,
    tokenHash: sha256(token),
    invitedBy: asker.accountId,
    createdAt: nowIso(),
    expiresAt,
    ...offer,
  };
  const { write } = await database();
  return write(async (tx) => {
    await revokeOlder(tx, email, offer);
    await tx.insert(invitations).values(row);
    await queueMail(tx, { key: `invitation:${id}`, kind: 'invitation', to: email, ...mail(link) });
    await record(tx, asker, {
      action: 'invite',
      subjectType: 'invitation',
      subjectId: id,
      detail: { email, ...offer },
    });
    const [made] = await invitationRows(tx, eq(invitations.id, id));
    return invitationRecord(made!);
  });
}

/** The last word counts: of several invitations to one thing, an address holds one that works. */
async function revokeOlder(tx: Tx, email: string, { labId, folioId }: Offer): Promise<void> {
  const same = labId ? eq(invitations.labId, labId) : eq(invitations.folioId, folioId!);
  await tx
    .update(invitations)
    .set({ revokedAt: nowIso() })
    .where(and(eq(invitations.email, email), same, isNull(invitations.acceptedAt), isNull(invitations.revokedAt)));
}

/** Take an invitation back. @throws {HttpError} 409 when it was accepted */
export async function revokeInvitation({ asker, invitation }: InvitationRevoke): Promise<void> {
  const { write } = await database();
  await write(async (tx) => {
    const open = and(eq(invitations.id, invitation.id), isNull(invitations.acceptedAt));
    const [row] = await tx.update(invitations).set({ revokedAt: nowIso() }).where(open).returning();
    if (!row) throw new HttpError(409, 'It was accepted: end the access of that person instead');
    await record(tx, asker, { action: 'revoke', subjectType: 'invitation', subjectId: invitation.id });
  });
}
