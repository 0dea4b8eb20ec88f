import { createHash } from 'node:crypto';
import { type Readable, Transform } from 'node:stream';
import { and, eq, inArray } from 'drizzle-orm';
import { bundles } from '#src/db/schema/index.ts';
import { askerAgain, isMember } from '../access/asker.ts';
import { seeBundle } from '../access/sharing.ts';
import { database } from '../database.ts';
import { HttpError } from '../http.ts';
import { newId, nowIso } from '../ids.ts';
import type { JobContext } from '../jobs.ts';
import { store } from '../store.ts';
import { gatherContent, type Held } from './content.ts';
import { archiveKey, bundleFolder, heldKey } from './paths.ts';
import { mailReady, tookLong } from './ready-mail.ts';
import { writeBundle } from './write.ts';

/** What a job of kind `bundle` is told. */
export interface BundleJob {
  bundle: string;
  accountId: string;
  tokenId: string | null;
  /** Whether a mail was asked for; orders of before this was asked have none. */
  notify?: boolean;
}

/**
 * Build one bundle: gather what the one who ordered it may take by now, write it as a stream into the store, and mark
 * it ready. Running it again comes to the same. Whatever goes wrong, no half bundle is left: the store keeps an object
 * only when its stream ended well.
 */
export async function buildBundle(payload: Record<string, unknown>, { progress, signal }: JobContext): Promise<void> {
  const { bundle: id, notify = false, ...orderedBy } = payload as unknown as BundleJob;
  const { db } = await database();
  const [order] = await db.select().from(bundles).where(eq(bundles.id, id));
  if (!order || order.state === 'cancelled' || order.state === 'ready') return;
  // What a process left that died on its way.
  for await (const { key } of store().list(bundleFolder(id))) await store().delete(key);
  const asker = await askerAgain(orderedBy);
  const seen = asker && (await seeBundle(asker, id).catch(orNull));
  const content = seen && (await gatherContent(asker, order));
  if (!content || (content.complexes.length === 0 && !isMember(asker))) return endWithout(id);

  const { name, bag } = writeBundle(asker, content, progress);
  const giveUp = () => bag.stream.destroy(new Error('the bundle was cancelled'));
  signal.addEventListener('abort', giveUp, { once: true });
  const storeKey = `${bundleFolder(id)}${newId()}`;
  try {
    if (signal.aborted) giveUp();
    const measured = measuring(bag.stream);
    await store().put(archiveKey(storeKey), measured.stream, { contentType: 'application/zip' });
    const held: Held = {
      name,
      complexes: content.complexes.map((row) => row.id),
      spectra: content.spectra.map((row) => row.id),
      bands: content.bands.map((row) => row.id),
    };
    await store().put(heldKey(storeKey), Buffer.from(JSON.stringify(held)), { contentType: 'application/json' });
    if (!(await markReady(order, { storeKey, ...measured.result() }, notify))) await remove(storeKey);
  } catch (error) {
    bag.stream.destroy();
    await remove(storeKey).catch(() => undefined);
    throw error;
  } finally {
    signal.removeEventListener('abort', giveUp);
  }
}

/** Whether it was still wanted: not if it was cancelled, or finished by another process, meanwhile. */
async function markReady(
  order: typeof bundles.$inferSelect,
  made: { storeKey: string; size: number; sha256: string },
  notify: boolean,
): Promise<boolean> {
  const { write } = await database();
  const ready = { ...made, state: 'ready' as const, progress: 1, finishedAt: nowIso(), error: null };
  const wanted = and(eq(bundles.id, order.id), inArray(bundles.state, ['queued', 'running']));
  return write(async (tx) => {
    const [bundle] = await tx.update(bundles).set(ready).where(wanted).returning();
    if (bundle && (notify || tookLong(bundle))) await mailReady(tx, bundle);
    return bundle !== undefined;
  });
}

/** There is nothing that the one who ordered it may take: trying again would not help. */
async function endWithout(id: string): Promise<void> {
  const { write } = await database();
  const ended = { state: 'failed' as const, error: 'Access ended before the bundle was built', finishedAt: nowIso() };
  await write((tx) => tx.update(bundles).set(ended).where(eq(bundles.id, id)));
}

async function remove(storeKey: string): Promise<void> {
  await store().delete(archiveKey(storeKey));
  await store().delete(heldKey(storeKey));
}

function orNull(error: unknown): null {
  if (error instanceof HttpError && error.status === 404) return null;
  throw error;
}

/** Size and SHA-256 of a stream that passes through. An error of the source ends the result, too. */
function measuring(source: Readable): { stream: Readable; result: () => { size: number; sha256: string } } {
  const hash = createHash('sha256');
  let size = 0;
  const tap = new Transform({
    transform(chunk: Buffer, _, pass) {
      hash.update(chunk);
      size += chunk.length;
      pass(null, chunk);
    },
  });
  source.on('error', (error) => tap.destroy(error));
  return { stream: source.pipe(tap), result: () => ({ size, sha256: hash.digest('hex') }) };
}
