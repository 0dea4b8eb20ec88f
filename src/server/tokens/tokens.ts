import { and, count, desc, eq, gt, isNull, lte } from 'drizzle-orm';
import type { RevokeAllQuery } from '#src/contracts/oversight.ts';
import type { TokenInput, TokenRecord } from '#src/contracts/sharing.ts';
import { accessTokens } from '#src/db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import type { TokenRevoke } from '../access/sharing.ts';
import { database } from '../database.ts';
import { HttpError } from '../http.ts';
import { newId, newSecret, nowIso, sha256 } from '../ids.ts';
import { MOST_TOKENS } from '../limits/policy.ts';
import { record } from '../trail.ts';

/** So that a token found in a log or a repository can be told from other secrets. */
const PREFIX = 'zft_';
const LONGEST = 366 * 24 * 3600 * 1000; // ms: a year, leap or not

const toRecord = (row: typeof accessTokens.$inferSelect): TokenRecord => ({
  id: row.id,
  name: row.name,
  scopes: row.scopes,
  lab: row.labId,
  createdAt: row.createdAt,
  expires: row.expiresAt,
  lastUsedAt: row.lastUsedAt,
});

/** Tokens of an account that still open something. */
const liveOf = (accountId: string) =>
  and(eq(accessTokens.accountId, accountId), isNull(accessTokens.revokedAt), gt(accessTokens.expiresAt, nowIso()));

/** The asker's own tokens that still open something, newest first; never the tokens themselves. */
export async function listTokens(asker: Asker): Promise<TokenRecord[]> {
  const { db } = await database();
  const rows = await db.select().from(accessTokens).where(liveOf(asker.accountId)).orderBy(desc(accessTokens.id));
  return rows.map(toRecord);
}

const refuse = (pointer: string, detail: string) =>
  new HttpError(422, 'The token cannot be made as asked', { errors: [{ pointer, detail }] });

/**
 * Make a token. It is in this answer and nowhere else: only its hash is kept.
 *
 * @throws {HttpError} 422 for an end that is past or more than a year away, and for a lab that is not the asker's; 409
 *   where the account has as many as it may
 */
export async function createToken(asker: Asker, { name, scopes, lab, expires }: TokenInput): Promise<TokenRecord> {
  const end = Date.parse(expires);
  if (end <= Date.now()) throw refuse('#/expires', 'Choose a moment that is still to come');
  if (end > Date.now() + LONGEST) throw refuse('#/expires', 'A token lives for a year at most');
  if (lab !== undefined && !asker.labs.has(lab)) throw refuse('#/lab', 'Choose one of your own labs');
  const token = PREFIX + newSecret();
  const row = {
    id: newId(),
    accountId: asker.accountId,
    name,
    hash: sha256(token),
    scopes,
    labId: lab ?? null,
    createdAt: nowIso(),
    expiresAt: new Date(end).toISOString(),
    lastUsedAt: null,
    revokedAt: null,
  };
  const { write } = await database();
  await write(async (tx) => {
    const [live] = await tx.select({ n: count() }).from(accessTokens).where(liveOf(asker.accountId));
    if ((live?.n ?? 0) >= MOST_TOKENS)
      throw new HttpError(409, `You have ${MOST_TOKENS} tokens, as many as an account may: revoke one first`);
    await tx.insert(accessTokens).values(row);
    const detail = { name, scopes, lab: row.labId, expires: row.expiresAt };
    await record(tx, asker, { action: 'create', subjectType: 'token', subjectId: row.id, detail });
  });
  return { ...toRecord(row), token };
}

/** End a token; it opens nothing from the next request on. */
export async function revokeToken({ asker, token }: TokenRevoke): Promise<void> {
  const { write } = await database();
  await write(async (tx) => {
    const [revoked] = await tx
      .update(accessTokens)
      .set({ revokedAt: nowIso() })
      .where(and(eq(accessTokens.id, token.id), isNull(accessTokens.revokedAt)))
      .returning({ id: accessTokens.id });
    if (revoked) await record(tx, asker, { action: 'revoke', subjectType: 'token', subjectId: token.id });
  });
}

/** End all live tokens of the asker, or those made until a moment. How many there were. */
export async function revokeAllTokens(asker: Asker, { until }: RevokeAllQuery): Promise<{ revoked: number }> {
  const { write } = await database();
  return write(async (tx) => {
    const ended = await tx
      .update(accessTokens)
      .set({ revokedAt: nowIso() })
      .where(
        and(liveOf(asker.accountId), until ? lte(accessTokens.createdAt, new Date(until).toISOString()) : undefined),
      )
      .returning({ id: accessTokens.id });
    for (const { id } of ended) await record(tx, asker, { action: 'revoke', subjectType: 'token', subjectId: id });
    return { revoked: ended.length };
  });
}
