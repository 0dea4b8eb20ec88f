import { and, asc, eq, not, sql } from 'drizzle-orm';
import type { FolioItem } from '#src/contracts/sharing.ts';
import type { Tx } from '#src/db/client.ts';
import { complexes, folioItems, spectra } from '#src/db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import { complexSight, spectrumSight } from '../access/sight.ts';
import { livingAccessions } from '../complexes/alias.ts';
import { HttpError } from '../http.ts';

/** What one was merely granted by others is not one's own to pass on. */
const withoutGrants = (asker: Asker): Asker => ({ ...asker, grants: [] });

type Item = Pick<typeof folioItems.$inferInsert, 'complexId' | 'spectra'>;

/**
 * Items as rows, each judged by what the asker sees as a member of the programme.
 *
 * @throws {HttpError} 422 for an accession or a spectrum that is not in sight, and for one that comes twice
 */
export async function resolveItems(tx: Tx, asker: Asker, items: FolioItem[], pointer: string): Promise<Item[]> {
  const member = withoutGrants(asker);
  const livesAs = await livingAccessions(
    tx,
    items.map((item) => item.accession),
  );
  const found = await tx
    .select({ id: complexes.id, accession: complexes.accession })
    .from(complexes)
    .where(
      and(
        inJson(
          complexes.accession,
          items.map((item) => livesAs(item.accession)),
        ),
        complexSight(member),
      ),
    );
  const named = items.flatMap((item) => (item.spectra === 'all' ? [] : item.spectra));
  const seen = await tx
    .select({ id: spectra.id, complexId: spectra.complexId })
    .from(spectra)
    .innerJoin(complexes, eq(complexes.id, spectra.complexId))
    .where(and(inJson(spectra.id, named), spectrumSight(member)));
  const idOf = new Map(found.map((row) => [row.accession, row.id]));
  const complexOf = new Map(seen.map((row) => [row.id, row.complexId]));

  const errors: { pointer: string; detail: string }[] = [];
  const taken = new Set<string>();
  const rows = items.flatMap(({ accession, spectra: chosen }, i): Item[] => {
    const complexId = idOf.get(livesAs(accession));
    if (!complexId) errors.push({ pointer: `${pointer}/${i}/accession`, detail: `${accession} is not in your sight` });
    else if (taken.has(complexId)) errors.push({ pointer: `${pointer}/${i}`, detail: `${accession} stands twice` });
    if (!complexId) return [];
    taken.add(complexId);
    if (chosen === 'all') return [{ complexId, spectra: null }];
    chosen.forEach((id, j) => {
      if (complexOf.get(id) !== complexId)
        errors.push({
          pointer: `${pointer}/${i}/spectra/${j}`,
          detail: `No such spectrum of ${accession} in your sight`,
        });
    });
    return [{ complexId, spectra: [...new Set(chosen)] }];
  });
  if (errors.length > 0) throw new HttpError(422, 'Some items cannot be put into the folio', { errors });
  return rows;
}

const inJson = (column: typeof complexes.accession | typeof spectra.id, values: string[]) =>
  sql`${column} in (select value from json_each(${JSON.stringify(values)}))`;

/** Make these the items of a folio. Items put in by others that the asker may not pass on stay where they are. */
export async function replaceItems(tx: Tx, asker: Asker, folioId: string, items: Item[]): Promise<void> {
  const inFolio = eq(folioItems.folioId, folioId);
  const visible = sql`${folioItems.complexId} in (select ${complexes.id} from ${complexes} where ${complexSight(withoutGrants(asker))})`;
  const hidden = await tx
    .select()
    .from(folioItems)
    .where(and(inFolio, not(visible)))
    .orderBy(asc(folioItems.ordinal));
  const kept = hidden.filter((item) => !items.some((other) => other.complexId === item.complexId));
  await tx.delete(folioItems).where(inFolio);
  const rows = [...items, ...kept].map(({ complexId, spectra }, ordinal) => ({ folioId, complexId, spectra, ordinal }));
  for (let i = 0; i < rows.length; i += 500) await tx.insert(folioItems).values(rows.slice(i, i + 500));
}
