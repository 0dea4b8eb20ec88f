import { and, eq, inArray, sql } from 'drizzle-orm';
import type { Tx } from '#src/db/client.ts';
import { folioItems, folios } from '#src/db/schema/index.ts';
import { nowIso } from '../ids.ts';
import { type Actor, record } from '../trail.ts';

type Item = typeof folioItems.$inferSelect;
/** A complex with the spectra that hang on it before anything moves. */
export interface Holding {
  id: string;
  spectra: readonly string[];
}

// An item that shares "all" spectra of a complex means those of that complex. Where others come to it by a merge or a
// move, nobody decided to share them: the item becomes the list of those that it held.

const listed = (item: Item, { spectra }: Holding): string[] => item.spectra ?? [...spectra];

async function itemsByFolio(tx: Tx, from: Holding, into: Holding) {
  const rows = await tx
    .select()
    .from(folioItems)
    .where(inArray(folioItems.complexId, [from.id, into.id]));
  return [...new Set(rows.map((row) => row.folioId))].map((folioId) => ({
    folioId,
    ofFrom: rows.find((row) => row.folioId === folioId && row.complexId === from.id),
    ofInto: rows.find((row) => row.folioId === folioId && row.complexId === into.id),
  }));
}

const place = (item: Pick<Item, 'folioId' | 'complexId'>) =>
  and(eq(folioItems.folioId, item.folioId), eq(folioItems.complexId, item.complexId));

async function touch(tx: Tx, actor: Actor, folioId: string, detail: Record<string, unknown>): Promise<void> {
  await tx
    .update(folios)
    .set({ version: sql`${folios.version} + 1`, updatedAt: nowIso() })
    .where(eq(folios.id, folioId));
  await record(tx, actor, { action: 'change', subjectType: 'folio', subjectId: folioId, detail });
}

/** Items of a complex that is merged away become items of the one that lives on; a folio keeps one. */
export async function mergeItems(
  tx: Tx,
  actor: Actor,
  { from, into, detail }: { from: Holding; into: Holding; detail: Record<string, unknown> },
): Promise<void> {
  for (const { folioId, ofFrom, ofInto } of await itemsByFolio(tx, from, into)) {
    if (!ofFrom) {
      if (!ofInto || ofInto.spectra !== null || from.spectra.length === 0) continue;
      await tx
        .update(folioItems)
        .set({ spectra: [...into.spectra] })
        .where(place(ofInto));
    } else if (!ofInto) {
      await tx
        .update(folioItems)
        .set({ complexId: into.id, spectra: listed(ofFrom, from) })
        .where(place(ofFrom));
    } else {
      const all = ofFrom.spectra === null && ofInto.spectra === null;
      const both = [...new Set([...listed(ofInto, into), ...listed(ofFrom, from)])];
      await tx.delete(folioItems).where(place(ofFrom));
      await tx
        .update(folioItems)
        .set({ spectra: all ? null : both, ordinal: Math.min(ofFrom.ordinal, ofInto.ordinal) })
        .where(place(ofInto));
    }
    await touch(tx, actor, folioId, detail);
  }
}

/**
 * A spectrum that moves leaves the items that listed it, and comes into those of its new complex only in folios that
 * shared it before.
 *
 * @param wasShared - whether guests could see it before: its complex was open to them
 */
export async function moveBetweenItems(
  tx: Tx,
  actor: Actor,
  {
    spectrum,
    from,
    into,
    wasShared,
    detail,
  }: { spectrum: string; from: Holding; into: Holding; wasShared: boolean; detail: Record<string, unknown> },
): Promise<void> {
  for (const { folioId, ofFrom, ofInto } of await itemsByFolio(tx, from, into)) {
    const had = wasShared && ofFrom !== undefined && (ofFrom.spectra === null || ofFrom.spectra.includes(spectrum));
    const without = ofFrom?.spectra?.filter((id) => id !== spectrum);
    if (ofFrom && without) await tx.update(folioItems).set({ spectra: without }).where(place(ofFrom));
    const listNow = ofInto?.spectra ?? (had ? null : [...into.spectra]);
    const listThen = had && listNow ? [...new Set([...listNow, spectrum])] : listNow;
    if (ofInto) await tx.update(folioItems).set({ spectra: listThen }).where(place(ofInto));
    await touch(tx, actor, folioId, detail);
  }
}
