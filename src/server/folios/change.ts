import { and, eq, isNotNull, isNull, sql } from 'drizzle-orm';
import type { FolioInput, FolioItem, FolioPatch, FolioRecord } from '#src/contracts/sharing.ts';
import type { Tx } from '#src/db/client.ts';
import { folios, grants } from '#src/db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import { requireLab } from '../access/records.ts';
import type { FolioChange } from '../access/sharing.ts';
import { database } from '../database.ts';
import { HttpError } from '../http.ts';
import { newId, nowIso } from '../ids.ts';
import { record } from '../trail.ts';
import { replaceItems, resolveItems } from './items.ts';
import { folioRecord } from './record.ts';

const instant = (text: string | null | undefined) => (text ? new Date(text).toISOString() : null);

/**
 * Make a folio of one of the asker's labs.
 *
 * @throws {HttpError} 403 for a lab that is not the asker's, 422 for items out of sight
 */
export async function createFolio(asker: Asker, input: FolioInput): Promise<FolioRecord> {
  requireLab(asker, input.lab);
  const { db, write } = await database();
  const lab = await db.query.labs.findFirst({ where: (labs, { eq: is }) => is(labs.id, input.lab) });
  if (!lab)
    throw new HttpError(422, 'There is no such lab', { errors: [{ pointer: '#/lab', detail: 'Choose a lab' }] });
  const now = nowIso();
  const row = {
    id: newId(),
    name: input.name,
    description: input.description || null,
    labId: lab.id,
    makerId: asker.accountId,
    licence: input.licence,
    embargoUntil: instant(input.embargoUntil),
    shows: input.shows,
    createdAt: now,
    updatedAt: now,
  };
  const folio = await write(async (tx) => {
    const items = await resolveItems(tx, asker, input.items, '#/items');
    const [made] = await tx.insert(folios).values(row).returning();
    await replaceItems(tx, asker, row.id, items);
    const detail = { name: row.name, lab: lab.id, licence: row.licence, items: items.length };
    await record(tx, asker, { action: 'create', subjectType: 'folio', subjectId: row.id, detail });
    return made!;
  });
  return folioRecord({ asker, folio });
}

export const changedMeanwhile = () =>
  new HttpError(412, 'Somebody changed this folio meanwhile: read it again and repeat');

/** Change what is told in `patch`. @throws {HttpError} 412 when it changed meanwhile */
export async function changeFolio({ asker, folio }: FolioChange, patch: FolioPatch): Promise<FolioRecord> {
  const { write } = await database();
  const embargo = patch.embargoUntil === undefined ? {} : { embargoUntil: instant(patch.embargoUntil) };
  const changed = await write(async (tx) => {
    const [row] = await tx
      .update(folios)
      .set({ ...patch, ...embargo, version: sql`${folios.version} + 1`, updatedAt: nowIso() })
      .where(and(eq(folios.id, folio.id), eq(folios.version, folio.version)))
      .returning();
    if (!row) throw changedMeanwhile();
    if (row.licence !== folio.licence) await noteAccepted(tx, folio);
    await record(tx, asker, { action: 'change', subjectType: 'folio', subjectId: folio.id, detail: { ...patch } });
    return row;
  });
  return folioRecord({ asker, folio: changed });
}

/** Terms accepted without their licence being noted, as it once was, were those of the licence that held until now. */
async function noteAccepted(tx: Tx, { id, licence }: FolioChange['folio']): Promise<void> {
  const unnoted = and(eq(grants.folioId, id), isNull(grants.termsLicence), isNotNull(grants.termsAcceptedAt));
  await tx.update(grants).set({ termsLicence: licence }).where(unnoted);
}

/** Replace the content of a folio. @throws {HttpError} 422 for items out of sight */
export async function replaceFolioItems({ asker, folio }: FolioChange, items: FolioItem[]): Promise<FolioRecord> {
  const { write } = await database();
  const changed = await write(async (tx) => {
    await replaceItems(tx, asker, folio.id, await resolveItems(tx, asker, items, '#'));
    const [row] = await tx
      .update(folios)
      .set({ version: sql`${folios.version} + 1`, updatedAt: nowIso() })
      .where(eq(folios.id, folio.id))
      .returning();
    const detail = { items };
    await record(tx, asker, { action: 'change', subjectType: 'folio', subjectId: folio.id, detail });
    return row!;
  });
  return folioRecord({ asker, folio: changed });
}
