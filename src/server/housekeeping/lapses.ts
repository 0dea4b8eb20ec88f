import { and, eq, gt, inArray, isNull, lte } from 'drizzle-orm';
import type { Database, Tx } from '#src/db/client.ts';
import { accounts, folios, invitations, labs, mails, memberships } from '#src/db/schema/index.ts';
import { invitationsLapsed } from '../mail/sharing-mails.ts';
import { queueMail } from '../mail.ts';
import { settings } from '../settings.ts';

/** A lapse further back than this is no news, in milliseconds. */
const NEWS_MS = 7 * 24 * 3600 * 1000;

type Invitation = typeof invitations.$inferSelect;

/** Those of one inviter to one thing that lapsed at one moment are one mail, as they were one act. */
const keyOf = ({ invitedBy, labId, folioId, expiresAt }: Invitation) =>
  `lapsed:${invitedBy}:${labId ?? folioId}:${expiresAt}`;

/** Tell those who invited that nobody used their link in time. How many mails were queued. */
export async function tellLapsed({ db, write }: Database, now = Date.now()): Promise<number> {
  const lapsed = await db
    .select()
    .from(invitations)
    .where(
      and(
        isNull(invitations.acceptedAt),
        isNull(invitations.revokedAt),
        lte(invitations.expiresAt, new Date(now).toISOString()),
        gt(invitations.expiresAt, new Date(now - NEWS_MS).toISOString()),
      ),
    );
  const groups = new Map<string, Invitation[]>();
  for (const row of lapsed) groups.set(keyOf(row), [...(groups.get(keyOf(row)) ?? []), row]);
  const keys = [...groups.keys()];
  const told = await db.select({ key: mails.key }).from(mails).where(inArray(mails.key, keys));
  for (const { key } of told) groups.delete(key);
  for (const [key, group] of groups) await write((tx) => mailInviter(tx, key, group));
  return groups.size;
}

async function mailInviter(tx: Tx, key: string, group: Invitation[]): Promise<void> {
  const { invitedBy, labId, folioId } = group[0]!;
  const [inviter] = await tx.select().from(accounts).where(eq(accounts.id, invitedBy));
  const [folio] = await tx
    .select()
    .from(folios)
    .where(eq(folios.id, folioId ?? ''));
  const [lab] = await tx
    .select()
    .from(labs)
    .where(eq(labs.id, labId ?? folio?.labId ?? ''));
  if (!lab || inviter?.state !== 'active') return;
  const [role] = await tx
    .select()
    .from(memberships)
    .where(and(eq(memberships.accountId, invitedBy), eq(memberships.labId, lab.id), eq(memberships.role, 'lead')));
  // Who no longer leads the lab cannot send it again.
  if (!inviter.steward && !role) return;
  const content = invitationsLapsed({
    addresses: group.map(({ email }) => email).sort(),
    to: folio?.name ?? lab.name,
    link: `${settings().publicOrigin}${folio ? `/folios/${folio.id}` : `/labs/${lab.id}`}`,
  });
  await queueMail(tx, { key, kind: 'invitation-lapsed', to: inviter.email, ...content });
}
