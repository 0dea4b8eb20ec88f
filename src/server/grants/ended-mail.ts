import { and, eq, gt, isNull, ne } from 'drizzle-orm';
import type { Tx } from '#src/db/client.ts';
import { accounts, type folios, grants, labs, memberships } from '#src/db/schema/index.ts';
import { endOf } from '../access/grants.ts';
import { nowIso } from '../ids.ts';
import { accessEnded } from '../mail/sharing-mails.ts';
import { queueMail } from '../mail.ts';
import { settings } from '../settings.ts';
import { contactOf } from './contact.ts';

type Grant = typeof grants.$inferSelect;
type Folio = typeof folios.$inferSelect;

/** An end further back than this is no news, in milliseconds. */
export const NEWS_MS = 7 * 24 * 3600 * 1000;

/**
 * Tell a guest that access ended, once for each end, whether by hand or by time. Who reads on by another grant or as a
 * member of the lab, and who cannot sign in any more, is told nothing.
 */
export async function mailEnded(tx: Tx, grant: Grant, folio: Folio): Promise<void> {
  if (endOf(grant) < new Date(Date.now() - NEWS_MS).toISOString()) return;
  const [guest] = await tx.select().from(accounts).where(eq(accounts.id, grant.accountId));
  if (guest?.state !== 'active' || (await readsOn(tx, grant, folio))) return;
  const [lab] = await tx.select().from(labs).where(eq(labs.id, folio.labId));
  const content = accessEnded({
    folio: folio.name,
    lab: lab!.name,
    endedAt: endOf(grant),
    contact: await contactOf(tx, folio.labId, grant.grantedBy),
    link: `${settings().publicOrigin}/folios/${folio.id}`,
  });
  const key = `ended:${grant.id}:${grant.expiresAt}`;
  await queueMail(tx, { key, kind: 'access-ended', to: guest.email, ...content });
}

/** Whether somebody reads a folio otherwise than by this grant. */
export async function readsOn(tx: Tx, grant: Pick<Grant, 'id' | 'accountId'>, folio: Folio): Promise<boolean> {
  const [member] = await tx
    .select()
    .from(memberships)
    .where(and(eq(memberships.accountId, grant.accountId), eq(memberships.labId, folio.labId)));
  if (member) return true;
  const [other] = await tx
    .select({ id: grants.id })
    .from(grants)
    .where(
      and(
        eq(grants.folioId, folio.id),
        eq(grants.accountId, grant.accountId),
        ne(grants.id, grant.id),
        isNull(grants.revokedAt),
        gt(grants.expiresAt, nowIso()),
      ),
    )
    .limit(1);
  return other !== undefined;
}
