import { createHash } from 'node:crypto';
import { desc } from 'drizzle-orm';
import type { Tx } from '../db/client.ts';
import { trail } from '../db/schema/index.ts';
import { nowIso } from './ids.ts';

/** Who acts: an account, perhaps by an access token, or the program itself (null). */
export interface Actor {
  accountId: string | null;
  tokenId?: string | null;
}

export interface TrailEntry {
  action: string;
  subjectType:
    | 'complex'
    | 'preparation'
    | 'spectrum'
    | 'band'
    | 'folio'
    | 'bundle'
    | 'account'
    | 'lab'
    | 'invitation'
    | 'token'
    | 'registry';
  subjectId: string;
  /** What changed, without secrets. */
  detail?: Record<string, unknown>;
}

/** Hash of a row: over its predecessor's hash and its own content, in a fixed order. */
export function trailHash(
  previousHash: string,
  row: Omit<typeof trail.$inferSelect, 'seq' | 'previousHash' | 'hash'>,
): string {
  const content = [
    previousHash,
    row.at,
    row.actorId,
    row.tokenId,
    row.action,
    row.subjectType,
    row.subjectId,
    JSON.stringify(row.detail),
  ];
  return createHash('sha256').update(JSON.stringify(content)).digest('hex');
}

/** Add a row to the trail, in the transaction of what it tells of: both stand or neither does. */
export async function record(tx: Tx, actor: Actor, entry: TrailEntry): Promise<void> {
  const [last] = await tx.select({ hash: trail.hash }).from(trail).orderBy(desc(trail.seq)).limit(1);
  const previousHash = last?.hash ?? '';
  const row = {
    at: nowIso(),
    actorId: actor.accountId,
    tokenId: actor.tokenId ?? null,
    action: entry.action,
    subjectType: entry.subjectType,
    subjectId: entry.subjectId,
    detail: entry.detail ?? {},
  };
  await tx.insert(trail).values({ ...row, previousHash, hash: trailHash(previousHash, row) });
}
