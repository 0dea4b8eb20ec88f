import { createHash } from 'node:crypto';
import { sql } from 'drizzle-orm';
import type { Database, Tx } from '#src/db/client.ts';
import { limits } from '#src/db/schema/index.ts';
import type { RatePolicy } from './policy.ts';

/** Where a request stands against its limit. */
export interface Standing {
  policy: RatePolicy;
  allowed: boolean;
  /** Requests left in this window, as far as this process knows. */
  remaining: number;
  /** Milliseconds until the next window. */
  resetMs: number;
}

interface Bucket {
  /** End of the window, milliseconds since 1970. */
  until: number;
  /** What was let through without the database. */
  unseen: number;
  /** What is left of the last share drawn. */
  left: number;
  /** The count in the database after the last share; null before the first. */
  counted: number | null;
  drawing: Promise<void> | null;
}

/** Buckets kept at most; beyond, those of past windows are cleared away. */
const KEPT = 10_000;

/**
 * Counts requests within fixed windows, for several processes on one database, at far less than a write a request.
 *
 * A process lets the first `unseen` requests of a window through by itself. From then on it draws shares of `share`
 * requests from one row of the database, telling at the first draw what it let through before; a share is handed out
 * only while fewer than `most` were, in one statement that no other process can come between.
 *
 * What holds, with P processes and within one window:
 * - at most `most + P · unseen` requests are let through, and exactly `most` where `unseen` is 0;
 * - nobody is refused before `most − (P − 1) · (share + unseen)` of theirs, since another process may hold a share that
 *   it does not use.
 *
 * Windows are fixed: around the border of two, twice as many may come within a short time. They begin at another
 * moment for each key, the same in every process, so that not all draw at once.
 */
export class RequestCounter {
  private readonly buckets = new Map<string, Bucket>();

  constructor(
    private readonly open: () => Promise<Pick<Database, 'write'>>,
    private readonly now: () => number = Date.now,
  ) {}

  /** Count one request of `who`, an account, token or address. */
  async take(policy: RatePolicy, who: string): Promise<Standing> {
    const key = `${policy.name}:${who}`;
    const bucket = this.bucketOf(key, policy);
    for (;;) {
      if (bucket.counted === null && bucket.unseen < policy.unseen) {
        bucket.unseen += 1;
        return this.standing(policy, bucket, true);
      }
      if (bucket.left > 0) {
        bucket.left -= 1;
        return this.standing(policy, bucket, true);
      }
      // Once it is used up, refusing costs nothing until the window ends.
      if (bucket.counted !== null && bucket.counted >= policy.most) return this.standing(policy, bucket, false);
      bucket.drawing ??= this.draw(key, policy, bucket).finally(() => {
        bucket.drawing = null;
      });
      await bucket.drawing;
    }
  }

  private standing(policy: RatePolicy, { until, unseen, left, counted }: Bucket, allowed: boolean): Standing {
    const known = counted ?? unseen;
    const remaining = left + Math.max(0, policy.most - known);
    return { policy, allowed, remaining: allowed ? remaining : 0, resetMs: Math.max(0, until - this.now()) };
  }

  private bucketOf(key: string, { windowMs }: RatePolicy): Bucket {
    const now = this.now();
    const held = this.buckets.get(key);
    if (held && held.until > now) return held;
    if (this.buckets.size >= KEPT)
      for (const [name, { until }] of this.buckets) if (until <= now) this.buckets.delete(name);
    const phase = createHash('sha256').update(key).digest().readUInt32BE() % windowMs;
    const until = (Math.floor((now - phase) / windowMs) + 1) * windowMs + phase;
    const bucket: Bucket = { until, unseen: 0, left: 0, counted: null, drawing: null };
    this.buckets.set(key, bucket);
    return bucket;
  }

  private async draw(key: string, { most, share }: RatePolicy, bucket: Bucket): Promise<void> {
    const told = bucket.counted === null ? bucket.unseen : 0;
    const { write } = await this.open();
    const count = await write((tx) => addCount(tx, key, bucket.until, told + share));
    bucket.left += Math.max(0, Math.min(share, most - (count - share)));
    bucket.counted = count;
  }
}

/** Add to the count of a window, which begins anew where the row is of a past one. Returns the count after. */
async function addCount(tx: Tx, key: string, until: number, more: number): Promise<number> {
  const [row] = await tx
    .insert(limits)
    .values({ key, count: more, until })
    .onConflictDoUpdate({
      target: limits.key,
      set: {
        count: sql`case when ${limits.until} < ${until} then ${more} else ${limits.count} + ${more} end`,
        until: sql`max(${limits.until}, ${until})`,
      },
    })
    .returning({ count: limits.count });
  return row!.count;
}
