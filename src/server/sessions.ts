import { and, eq, gt, isNull, lt, ne } from 'drizzle-orm';
import type { Tx } from '../db/client.ts';
import { sessions } from '../db/schema/index.ts';
import { database } from './database.ts';
import { newId, nowIso } from './ids.ts';

/** How long a sign-in holds at most, and how long without a request, in milliseconds. */
export const SESSION_LIFE_MS = 12 * 3600 * 1000;
export const SESSION_IDLE_MS = 4 * 3600 * 1000;
/** How stale `lastSeenAt` may get, so that not every request writes. */
const SEEN_EVERY_MS = 5 * 60 * 1000;

const before = (ms: number) => new Date(Date.now() - ms).toISOString();

export interface NewSession {
  accountId: string;
  secondFactor: boolean;
  userAgent: string | null;
  address: string | null;
}

/** Begin a session, in the transaction of the sign-in that the trail tells of. Its id goes into the cookie. */
export async function beginSession(tx: Tx, { userAgent, ...facts }: NewSession): Promise<string> {
  const id = newId();
  const now = nowIso();
  await tx.insert(sessions).values({
    id,
    ...facts,
    userAgent: userAgent?.slice(0, 300) ?? null,
    createdAt: now,
    lastSeenAt: now,
    expiresAt: new Date(Date.now() + SESSION_LIFE_MS).toISOString(),
  });
  return id;
}

/** What makes a session hold now: not ended, not past its time, not idle for too long. */
export const liveSession = () =>
  and(isNull(sessions.endedAt), gt(sessions.expiresAt, nowIso()), gt(sessions.lastSeenAt, before(SESSION_IDLE_MS)));

/** Note that a session was used, at most every few minutes. */
export async function touchSession({ id, lastSeenAt }: Pick<typeof sessions.$inferSelect, 'id' | 'lastSeenAt'>) {
  if (lastSeenAt > before(SEEN_EVERY_MS)) return;
  const { write } = await database();
  await write((tx) => tx.update(sessions).set({ lastSeenAt: nowIso() }).where(eq(sessions.id, id)));
}

/** End one session of an account. Whether it was live. */
export async function endSession(tx: Tx, accountId: string, id: string): Promise<boolean> {
  const ended = await tx
    .update(sessions)
    .set({ endedAt: nowIso() })
    .where(and(eq(sessions.id, id), eq(sessions.accountId, accountId), liveSession()))
    .returning({ id: sessions.id });
  return ended.length > 0;
}

/** End every session of an account, or all but one. How many were live. */
export async function endSessions(tx: Tx, accountId: string, except?: string | null): Promise<number> {
  const ended = await tx
    .update(sessions)
    .set({ endedAt: nowIso() })
    .where(and(eq(sessions.accountId, accountId), except ? ne(sessions.id, except) : undefined, liveSession()))
    .returning({ id: sessions.id });
  return ended.length;
}

/** Forget sessions that ended or lapsed more than 90 days ago. */
export async function forgetOldSessions(tx: Tx): Promise<void> {
  await tx.delete(sessions).where(lt(sessions.expiresAt, before(90 * 24 * 3600 * 1000)));
}
