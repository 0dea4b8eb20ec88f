import { and, eq, isNull, lt, or } from 'drizzle-orm';
import { accessTokens } from '#src/db/schema/index.ts';
import { database } from '../database.ts';
import { nowIso } from '../ids.ts';

/** How stale `lastUsedAt` may get, so that not every request writes, in milliseconds. */
const TOLD_EVERY_MS = 5 * 60 * 1000;
/** Tokens remembered at most. */
const KEPT = 10_000;

/** When this process last told of a token, milliseconds since 1970. */
const told = new Map<string, number>();

/** Note that a token was used, at most every five minutes. */
export async function touchToken(tokenId: string, now = Date.now()): Promise<void> {
  if (now - (told.get(tokenId) ?? 0) < TOLD_EVERY_MS) return;
  if (told.size >= KEPT) told.clear();
  told.set(tokenId, now);
  const stale = new Date(now - TOLD_EVERY_MS).toISOString();
  const { write } = await database();
  await write((tx) =>
    tx
      .update(accessTokens)
      .set({ lastUsedAt: nowIso() })
      .where(
        and(eq(accessTokens.id, tokenId), or(isNull(accessTokens.lastUsedAt), lt(accessTokens.lastUsedAt, stale))),
      ),
  );
}
