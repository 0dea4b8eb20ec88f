import { and, eq, inArray, isNotNull, lt } from 'drizzle-orm';
import type { Tx } from '#src/db/client.ts';
import { bundles } from '#src/db/schema/index.ts';
import { database } from '../database.ts';
import { store } from '../store.ts';
import { bundleFolder } from './paths.ts';

/** How long the file of a bundle is kept, in milliseconds: it can be made anew at any time. */
const KEPT_MS = 7 * 24 * 3600 * 1000;

type Row = typeof bundles.$inferSelect;

/** Until when the file of a ready bundle is kept, ISO 8601; null where there is none, or none any more. */
export const fileUntil = ({ state, storeKey, finishedAt }: Pick<Row, 'state' | 'storeKey' | 'finishedAt'>) =>
  state === 'ready' && storeKey && finishedAt ? new Date(Date.parse(finishedAt) + KEPT_MS).toISOString() : null;

/** Remove whatever lies in the store for a bundle. */
export async function removeFiles(id: string): Promise<void> {
  for await (const { key } of store().list(bundleFolder(id))) await store().delete(key);
}

/** Remove the files of bundles past their time. The file goes first: a crash between the two repeats it. How many. */
export async function forgetOldFiles(): Promise<number> {
  const { db, write } = await database();
  const before = new Date(Date.now() - KEPT_MS).toISOString();
  const old = await db
    .select({ id: bundles.id })
    .from(bundles)
    .where(and(eq(bundles.state, 'ready'), isNotNull(bundles.storeKey), lt(bundles.finishedAt, before)));
  for (const { id } of old) {
    await removeFiles(id);
    await write((tx) => tx.update(bundles).set({ storeKey: null }).where(eq(bundles.id, id)));
  }
  return old.length;
}

/**
 * Close bundles that were begun before `before` and never came to an end: their jobs, which knew that they failed, are
 * about to be forgotten.
 */
export async function closeStale(tx: Tx, before: string): Promise<void> {
  await tx
    .update(bundles)
    .set({ state: 'failed', error: 'The bundle could not be built: order it again', finishedAt: before })
    .where(and(inArray(bundles.state, ['queued', 'running']), lt(bundles.createdAt, before)));
}
