import { and, inArray, lt, ne } from 'drizzle-orm';
import type { Database } from '#src/db/client.ts';
import { challenges, idempotency, jobs, limits, mails, passwordResets } from '#src/db/schema/index.ts';
import { closeStale } from '../bundles/forget.ts';
import { forgetOldSessions } from '../sessions.ts';

const DAY = 24 * 3600 * 1000; // ms
/** How long finished work and the text of mails is kept, in milliseconds. */
const KEPT_MS = 90 * DAY;

/**
 * Take out what nobody needs any more: kept answers after a day, counts whose window is over, challenges and links to
 * choose a password past their time, sessions and finished jobs after 90 days. Of a mail that old the text goes; its
 * key stays, since it keeps the same mail from going out again.
 */
export async function cleanUp({ write }: Database, now = Date.now()): Promise<void> {
  const before = (ms: number) => new Date(now - ms).toISOString();
  await write(async (tx) => {
    await tx.delete(idempotency).where(lt(idempotency.createdAt, before(DAY)));
    await tx.delete(limits).where(lt(limits.until, now));
    await tx.delete(challenges).where(lt(challenges.expiresAt, before(0)));
    await tx.delete(passwordResets).where(lt(passwordResets.expiresAt, before(DAY)));
    await forgetOldSessions(tx);
  });
  await write(async (tx) => {
    const old = before(KEPT_MS);
    await closeStale(tx, old);
    await tx.delete(jobs).where(and(inArray(jobs.state, ['done', 'failed', 'cancelled']), lt(jobs.finishedAt, old)));
    await tx
      .update(mails)
      .set({ text: '', html: '' })
      .where(and(inArray(mails.state, ['sent', 'failed']), lt(mails.createdAt, old), ne(mails.text, '')));
  });
}
