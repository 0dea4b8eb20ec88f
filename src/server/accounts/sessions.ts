import { and, desc, eq } from 'drizzle-orm';
import type { SessionRecord } from '#src/contracts/account.ts';
import { sessions } from '#src/db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import { database } from '../database.ts';
import { notInSight } from '../http.ts';
import { endSession, endSessions, liveSession } from '../sessions.ts';
import { record } from '../trail.ts';
import { browserName } from './browser-name.ts';

/** Where the asker is signed in now, the session that asks first, then the last used one. */
export async function listSessions(asker: Asker): Promise<SessionRecord[]> {
  const { db } = await database();
  const rows = await db
    .select()
    .from(sessions)
    .where(and(eq(sessions.accountId, asker.accountId), liveSession()))
    .orderBy(desc(sessions.lastSeenAt), desc(sessions.id));
  const listed = rows.map(({ id, userAgent, address, secondFactor, createdAt, lastSeenAt, expiresAt }) => ({
    id,
    current: id === asker.sessionId,
    browser: browserName(userAgent),
    address,
    secondFactor,
    createdAt,
    lastSeenAt,
    expiresAt,
  }));
  return [...listed.filter(({ current }) => current), ...listed.filter(({ current }) => !current)];
}

/** End one of the asker's own sessions, also the one that asks. @throws {HttpError} 404 where it is not theirs or ended */
export async function endOwnSession(asker: Asker, id: string): Promise<void> {
  const { write } = await database();
  await write(async (tx) => {
    if (!(await endSession(tx, asker.accountId, id))) throw notInSight();
    const detail = { session: id };
    await record(tx, asker, {
      action: 'end-session',
      subjectType: 'account',
      subjectId: asker.accountId,
      detail,
    });
  });
}

/** End all sessions of the asker, or all but the one that asks. */
export async function endOwnSessions(asker: Asker, { others }: { others: boolean }): Promise<void> {
  const { write } = await database();
  await write(async (tx) => {
    const ended = await endSessions(tx, asker.accountId, others ? asker.sessionId : null);
    if (ended === 0) return;
    await record(tx, asker, {
      action: 'end-sessions',
      subjectType: 'account',
      subjectId: asker.accountId,
      detail: { ended, others },
    });
  });
}
