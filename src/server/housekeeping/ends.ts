import { and, eq, gt, isNull, lte, type SQL, sql } from 'drizzle-orm';
import type { Database, Tx } from '#src/db/client.ts';
import { accounts, folios, grants, labs, mails } from '#src/db/schema/index.ts';
import { contactOf, leadsOf } from '../grants/contact.ts';
import { mailEnded, NEWS_MS, readsOn } from '../grants/ended-mail.ts';
import { accessEndsSoon, guestsEndSoon } from '../mail/sharing-mails.ts';
import { queueMail } from '../mail.ts';
import { settings } from '../settings.ts';

const DAY = 24 * 3600 * 1000; // ms
/** How long before its end a guest is told, in milliseconds. */
const NOTICE_MS = 7 * DAY;
/** An access that was given for so short a time, in milliseconds, needs no reminder of its end. */
const SHORT_MS = 8 * DAY;

const iso = (ms: number) => new Date(ms).toISOString();
const notMailed = (key: SQL) => sql`not exists (select 1 from ${mails} where ${mails.key} = ${key})`;
const keyOf = (prefix: string) => sql`${prefix} || ${grants.id} || ':' || ${grants.expiresAt}`;

/** Tell guests whose access ended lately by its time. How many grants were looked at. */
export async function tellEnded(database: Database, now = Date.now()): Promise<number> {
  const due = and(
    isNull(grants.revokedAt),
    lte(grants.expiresAt, iso(now)),
    gt(grants.expiresAt, iso(now - NEWS_MS)),
    notMailed(keyOf('ended:')),
  );
  return eachGrant(database, due, ({ tx, grant, folio }) => mailEnded(tx, grant, folio));
}

/** Tell guests whose access ends within a week, and those who lead the lab that granted it. */
export async function tellEndsSoon(database: Database, now = Date.now()): Promise<number> {
  const due = and(
    isNull(grants.revokedAt),
    gt(grants.expiresAt, iso(now)),
    lte(grants.expiresAt, iso(now + NOTICE_MS)),
    sql`julianday(${grants.expiresAt}) - julianday(${grants.createdAt}) > ${SHORT_MS / DAY}`,
    notMailed(keyOf('expiry:')),
  );
  return eachGrant(database, due, async (ending) => {
    if (await mailGuest(ending)) await mailLead(ending);
  });
}

interface Ending {
  tx: Tx;
  grant: typeof grants.$inferSelect;
  folio: typeof folios.$inferSelect;
}

/** Each in a write of its own, so that nobody waits long behind this. */
async function eachGrant(
  { db, write }: Database,
  due: SQL | undefined,
  tell: (ending: Ending) => Promise<void>,
): Promise<number> {
  const rows = await db
    .select({ grant: grants, folio: folios })
    .from(grants)
    .innerJoin(folios, eq(folios.id, grants.folioId))
    .innerJoin(accounts, eq(accounts.id, grants.accountId))
    .where(and(due, eq(accounts.state, 'active')))
    .limit(500);
  for (const row of rows) await write((tx) => tell({ tx, ...row }));
  return rows.length;
}

const linkTo = (folio: Ending['folio']) => `${settings().publicOrigin}/folios/${folio.id}`;

/** Whether there was somebody to tell. */
async function mailGuest({ tx, grant, folio }: Ending): Promise<boolean> {
  const [guest] = await tx.select().from(accounts).where(eq(accounts.id, grant.accountId));
  if (!guest || (await readsOn(tx, grant, folio))) return false;
  const [lab] = await tx.select().from(labs).where(eq(labs.id, folio.labId));
  const content = accessEndsSoon({
    folio: folio.name,
    lab: lab!.name,
    expiresAt: grant.expiresAt,
    contact: await contactOf(tx, folio.labId, grant.grantedBy),
    link: linkTo(folio),
  });
  const key = `expiry:${grant.id}:${grant.expiresAt}`;
  await queueMail(tx, { key, kind: 'access-ends-soon', to: guest.email, ...content });
  return true;
}

/**
 * One mail to the lead for all whose access to a folio ends at one moment, as it does for those who were invited
 * together. Whoever granted it and leads no more is spared; then the first lead of the lab is told.
 */
async function mailLead({ tx, grant, folio }: Ending): Promise<void> {
  const leads = await leadsOf(tx, [folio.labId]);
  const lead = leads.find(({ accountId }) => accountId === grant.grantedBy) ?? leads[0];
  if (!lead) return;
  const together = await tx
    .select({ name: accounts.name })
    .from(grants)
    .innerJoin(accounts, eq(accounts.id, grants.accountId))
    .where(and(eq(grants.folioId, folio.id), eq(grants.expiresAt, grant.expiresAt), isNull(grants.revokedAt)))
    .orderBy(accounts.name);
  const content = guestsEndSoon({
    folio: folio.name,
    guests: together.map(({ name }) => name),
    expiresAt: grant.expiresAt,
    link: linkTo(folio),
  });
  const key = `expiry-lead:${folio.id}:${lead.accountId}:${grant.expiresAt}`;
  await queueMail(tx, { key, kind: 'access-ends-soon', to: lead.email, ...content });
}
