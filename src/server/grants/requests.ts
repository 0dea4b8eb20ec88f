import { and, count, desc, eq, inArray, isNull, type SQL } from 'drizzle-orm';
import type { AccessRequestInput, AccessRequestRecord } from '#src/contracts/grants.ts';
import type { Db, Tx } from '#src/db/client.ts';
import { accessRequests, accounts, folios } from '#src/db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import type { AskForMore } from '../access/grants.ts';
import type { FolioInvite } from '../access/sharing.ts';
import { database } from '../database.ts';
import { HttpError } from '../http.ts';
import { newId, nowIso } from '../ids.ts';
import { moreAsked } from '../mail/sharing-mails.ts';
import { queueMail } from '../mail.ts';
import { settings } from '../settings.ts';
import { record } from '../trail.ts';
import { whoAnswers } from './contact.ts';

/** Requests of one guest about one folio that may wait at one time. */
const OPEN_AT_ONCE = 3;

/** Requests for more, the newest first. */
export async function requestRows(db: Db | Tx, where: SQL | undefined): Promise<AccessRequestRecord[]> {
  const rows = await db
    .select({ request: accessRequests, folio: folios, name: accounts.name, email: accounts.email })
    .from(accessRequests)
    .innerJoin(folios, eq(folios.id, accessRequests.folioId))
    .innerJoin(accounts, eq(accounts.id, accessRequests.accountId))
    .where(where)
    .orderBy(desc(accessRequests.id));
  return rows.map(({ request, folio, name, email }) => ({
    id: request.id,
    folio: { id: folio.id, name: folio.name },
    name,
    email,
    wants: request.wants,
    message: request.message,
    createdAt: request.createdAt,
    settledAt: request.settledAt,
    outcome: request.outcome,
    answer: request.answer,
  }));
}

/** What guests of a folio asked for, the newest first. */
export async function listRequests({ folio }: FolioInvite): Promise<AccessRequestRecord[]> {
  return requestRows((await database()).db, eq(accessRequests.folioId, folio.id));
}

/** The asker's own requests about folios that wait for an answer. */
export async function openRequests(asker: Asker, folioIds: string[]) {
  const { db } = await database();
  return db
    .select()
    .from(accessRequests)
    .where(
      and(
        eq(accessRequests.accountId, asker.accountId),
        inArray(accessRequests.folioId, folioIds),
        isNull(accessRequests.settledAt),
      ),
    );
}

/**
 * Ask the lab of a folio for more. Its leads are told by mail.
 *
 * @throws {HttpError} 409 when three requests of this guest wait already
 */
export async function askForMore(
  { asker, folio }: AskForMore,
  { wants, message }: AccessRequestInput,
): Promise<AccessRequestRecord> {
  const row = {
    id: newId(),
    accountId: asker.accountId,
    folioId: folio.id,
    wants,
    message: message || null,
    createdAt: nowIso(),
  };
  const { write } = await database();
  return write(async (tx) => {
    const mine = and(
      eq(accessRequests.accountId, asker.accountId),
      eq(accessRequests.folioId, folio.id),
      isNull(accessRequests.settledAt),
    );
    const [open] = await tx.select({ count: count() }).from(accessRequests).where(mine);
    if ((open?.count ?? 0) >= OPEN_AT_ONCE)
      throw new HttpError(409, `${OPEN_AT_ONCE} of your requests wait for an answer: give the lab some time`);
    await tx.insert(accessRequests).values(row);
    const content = moreAsked({
      guest: { name: asker.name, email: asker.email },
      folio: folio.name,
      wants,
      message: row.message,
      link: `${settings().publicOrigin}/folios/${folio.id}`,
    });
    for (const { accountId, email } of await whoAnswers(tx, folio.labId))
      await queueMail(tx, { key: `request:${row.id}:${accountId}`, kind: 'request', to: email, ...content });
    const detail = { request: row.id, wants };
    await record(tx, asker, { action: 'ask-for-more', subjectType: 'folio', subjectId: folio.id, detail });
    const [made] = await requestRows(tx, eq(accessRequests.id, row.id));
    return made!;
  });
}
