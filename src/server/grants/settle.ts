import { and, desc, eq, isNull, sql } from 'drizzle-orm';
import type { AccessRequestRecord, AccessRequestSettlement } from '#src/contracts/grants.ts';
import type { Tx } from '#src/db/client.ts';
import { accessRequests, accounts, grants } from '#src/db/schema/index.ts';
import type { RequestSettle } from '../access/grants.ts';
import { database } from '../database.ts';
import { HttpError } from '../http.ts';
import { newId, nowIso } from '../ids.ts';
import { GRANT_DAYS, LONGEST_GRANT_DAYS } from '../invitations/grant-end.ts';
import { fromNow } from '../invitations/link.ts';
import { requestSettled } from '../mail/sharing-mails.ts';
import { queueMail } from '../mail.ts';
import { settings } from '../settings.ts';
import { record } from '../trail.ts';
import { requestRows } from './requests.ts';

type Grant = typeof grants.$inferSelect;

/**
 * Answer a guest's request. What is granted takes effect with the answer: downloads, or a year more; an access that has
 * ended begins again for a year. "Something else" is answered in words alone.
 *
 * @throws {HttpError} 409 when it was settled already
 */
export async function settleRequest(
  { asker, folio, request }: RequestSettle,
  { outcome, answer }: AccessRequestSettlement,
): Promise<AccessRequestRecord> {
  const { write } = await database();
  return write(async (tx) => {
    const settled = { settledAt: nowIso(), settledBy: asker.accountId, outcome, answer: answer || null };
    const open = and(eq(accessRequests.id, request.id), isNull(accessRequests.settledAt));
    const [row] = await tx.update(accessRequests).set(settled).where(open).returning();
    if (!row) throw new HttpError(409, 'This request was settled already');
    const given = outcome === 'granted' && row.wants !== 'other' ? await give(tx, row, asker.accountId) : null;
    const [guest] = await tx.select().from(accounts).where(eq(accounts.id, row.accountId));
    if (guest?.state === 'active') {
      const content = requestSettled({
        folio: folio.name,
        wants: row.wants,
        outcome,
        answer: row.answer,
        by: asker.name,
        now: given,
        link: `${settings().publicOrigin}/folios/${folio.id}`,
      });
      await queueMail(tx, { key: `request-settled:${row.id}`, kind: 'request-settled', to: guest.email, ...content });
    }
    const detail = { request: row.id, wants: row.wants, outcome, grant: given?.id ?? null };
    await record(tx, asker, { action: 'settle-request', subjectType: 'folio', subjectId: folio.id, detail });
    const [answered] = await requestRows(tx, eq(accessRequests.id, row.id));
    return answered!;
  });
}

/** What was asked for, in the guest's grant; one that was revoked stays so, and a new one follows it. */
async function give(tx: Tx, request: typeof accessRequests.$inferSelect, by: string): Promise<Grant> {
  const held = await tx
    .select()
    .from(grants)
    .where(and(eq(grants.folioId, request.folioId), eq(grants.accountId, request.accountId)))
    .orderBy(desc(grants.expiresAt), desc(grants.id));
  const last = held.find((grant) => !grant.revokedAt) ?? held[0]!;
  const change = {
    level: request.wants === 'download' ? ('download' as const) : last.level,
    expiresAt: newEnd(last, request.wants === 'longer'),
    grantedBy: by,
  };
  if (last.revokedAt) {
    const { termsAcceptedAt, termsLicence, folioId, accountId } = last;
    const row = { id: newId(), folioId, accountId, termsAcceptedAt, termsLicence, createdAt: nowIso(), ...change };
    const [made] = await tx.insert(grants).values(row).returning();
    return made!;
  }
  const [changed] = await tx
    .update(grants)
    .set({ ...change, version: sql`${grants.version} + 1` })
    .where(eq(grants.id, last.id))
    .returning();
  return changed!;
}

const DAY = 24 * 3600 * 1000; // ms

/** A year from now for what has ended, a year more for what runs, never past the longest time there is. */
function newEnd({ expiresAt, revokedAt }: Grant, longer: boolean): string {
  if (revokedAt || expiresAt <= nowIso()) return fromNow(GRANT_DAYS);
  if (!longer) return expiresAt;
  const wanted = new Date(Date.parse(expiresAt) + GRANT_DAYS * DAY).toISOString();
  const longest = fromNow(LONGEST_GRANT_DAYS);
  return [wanted, longest > expiresAt ? longest : expiresAt].sort()[0]!;
}
