import { and, eq, inArray, isNull, sql } from 'drizzle-orm';
import type { Tx } from '#src/db/client.ts';
import {
  accessRequests,
  bundles,
  editions,
  folioItems,
  folios,
  grants,
  invitations,
  jobs,
} from '#src/db/schema/index.ts';
import { type FolioDelete, liveGrant } from '../access/grants.ts';
import { removeFiles } from '../bundles/forget.ts';
import { database } from '../database.ts';
import { HttpError } from '../http.ts';
import { nowIso } from '../ids.ts';
import { cancelJob } from '../jobs.ts';
import { log } from '../log.ts';
import { record } from '../trail.ts';
import { changedMeanwhile } from './change.ts';

/**
 * Delete a folio with its invitations, its past grants and requests, and its bundles. The complexes and spectra in it
 * are untouched, and the trail keeps what happened.
 *
 * @throws {HttpError} 409 while a guest may read it and where it has editions, 412 when it changed meanwhile
 */
export async function deleteFolio({ asker, folio }: FolioDelete): Promise<void> {
  const { write } = await database();
  const made = await write(async (tx) => {
    const [live] = await tx
      .select({ id: grants.id })
      .from(grants)
      .where(and(eq(grants.folioId, folio.id), liveGrant()))
      .limit(1);
    if (live) throw new HttpError(409, 'A guest may still read this folio: end that access first');
    const [edition] = await tx
      .select({ id: editions.id })
      .from(editions)
      .where(eq(editions.folioId, folio.id))
      .limit(1);
    if (edition) throw new HttpError(409, 'This folio has editions, which others may cite: it stays');
    const open = and(eq(invitations.folioId, folio.id), isNull(invitations.acceptedAt), isNull(invitations.revokedAt));
    await tx.update(invitations).set({ revokedAt: nowIso() }).where(open);
    const ended = await dropBundles(tx, folio.id);
    await tx.delete(accessRequests).where(eq(accessRequests.folioId, folio.id));
    await tx.delete(grants).where(eq(grants.folioId, folio.id));
    await tx.delete(folioItems).where(eq(folioItems.folioId, folio.id));
    const [gone] = await tx
      .delete(folios)
      .where(and(eq(folios.id, folio.id), eq(folios.version, folio.version)))
      .returning();
    if (!gone) throw changedMeanwhile();
    const detail = { name: folio.name, lab: folio.labId };
    await record(tx, asker, { action: 'delete', subjectType: 'folio', subjectId: folio.id, detail });
    return ended;
  });
  // Files without a row harm nobody, so that the store may be away just now.
  for (const id of made)
    await removeFiles(id).catch((error: unknown) => log.warn({ bundle: id, error: String(error) }, 'bundle file left'));
}

/** Take out the bundles of a folio, those in the making too. Their ids. */
async function dropBundles(tx: Tx, folioId: string): Promise<string[]> {
  const rows = await tx.delete(bundles).where(eq(bundles.folioId, folioId)).returning({ id: bundles.id });
  const ids = rows.map((row) => row.id);
  const ofThese = inArray(sql`json_extract(${jobs.payload}, '$.bundle')`, ids);
  const working = ids.length === 0 ? [] : await tx.select({ id: jobs.id }).from(jobs).where(ofThese);
  for (const { id } of working) await cancelJob(tx, id);
  return ids;
}
