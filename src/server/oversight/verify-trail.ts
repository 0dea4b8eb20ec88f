import { asc, gt, sql } from 'drizzle-orm';
import type { TrailVerdict } from '#src/contracts/oversight.ts';
import type { Db } from '#src/db/client.ts';
import { trail } from '#src/db/schema/index.ts';
import { trailHash } from '../trail.ts';

/** Rows read at once; each chunk is let go before the next, so that memory is flat however long the trail is. */
const CHUNK = 500;

/**
 * Follow the chain from its first row: each must carry the hash of the one before, and its own hash must be that of its
 * content. The first row that fails either is told; after a row that was taken out, that is the next one. Rows taken
 * off the end leave a chain that fits, but a counter of the database that is ahead of it: the first that is missing is
 * told. Who rewrites every row and the counter leaves no contradiction behind: against that, keep the head elsewhere.
 *
 * @param signal - ends it when whoever asked has gone
 */
export async function verifyTrail(db: Db, signal?: AbortSignal): Promise<TrailVerdict> {
  // Before the rows: one that is added meanwhile is then no row that is missing.
  const given = await lastNumber(db);
  let [rows, last, head] = [0, 0, ''];
  let firstBroken: number | null = null;
  for (;;) {
    signal?.throwIfAborted();
    const chunk = await db.select().from(trail).where(gt(trail.seq, last)).orderBy(asc(trail.seq)).limit(CHUNK);
    for (const row of chunk) {
      const fits = row.previousHash === head && row.hash === trailHash(head, row);
      if (!fits) firstBroken ??= row.seq;
      head = row.hash;
    }
    rows += chunk.length;
    if (chunk.length < CHUNK) {
      last = chunk.at(-1)?.seq ?? last;
      break;
    }
    last = chunk.at(-1)!.seq;
  }
  if (firstBroken === null && given > last) firstBroken = last + 1;
  return { rows, verified: firstBroken === null, firstBroken, head };
}

/** The highest number ever given to a row. */
async function lastNumber(db: Db): Promise<number> {
  const [row] = await db.all<{ seq: number }>(sql`select seq from sqlite_sequence where name = 'trail'`);
  return row?.seq ?? 0;
}
