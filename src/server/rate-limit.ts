import { sql } from 'drizzle-orm';
import { limits } from '../db/schema/index.ts';
import { database } from './database.ts';
import { HttpError } from './http.ts';

/**
 * Count one attempt under a key, or `by` of them; refuse when there were more than `most` within the window.
 *
 * The count stands in the database, so that it holds across processes and restarts.
 *
 * @throws {HttpError} 429 with Retry-After
 */
export async function countAttempt(
  key: string,
  { most, windowMs, by = 1 }: { most: number; windowMs: number; by?: number },
): Promise<void> {
  const { write } = await database();
  const now = Date.now();
  const [row] = await write((tx) =>
    tx
      .insert(limits)
      .values({ key, count: by, until: now + windowMs })
      .onConflictDoUpdate({
        target: limits.key,
        set: {
          count: sql`case when ${limits.until} < ${now} then ${by} else ${limits.count} + ${by} end`,
          until: sql`case when ${limits.until} < ${now} then ${now + windowMs} else ${limits.until} end`,
        },
      })
      .returning(),
  );
  if (row && row.count > most) {
    const seconds = Math.max(1, Math.ceil((row.until - now) / 1000));
    throw new HttpError(429, `Too many attempts: try again in ${seconds} s`, {
      headers: { 'retry-after': String(seconds) },
    });
  }
}
