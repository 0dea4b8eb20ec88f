import { and, asc, eq, type SQL, sql } from 'drizzle-orm';
import {
  bands,
  type bundles,
  centres,
  complexes,
  complexLigands,
  folioItems,
  folios,
  instruments,
  labs,
  preparations,
  spectra,
  spectrumSolvents,
} from '#src/db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import { seesAsMember } from '../access/records.ts';
import { guestLevel } from '../access/sharing.ts';
import { bandSight, complexDownload, spectrumDownload } from '../access/sight.ts';
import { livingAccessions } from '../complexes/alias.ts';
import { database } from '../database.ts';

type Rows<T extends { $inferSelect: unknown }> = T['$inferSelect'][];
export type Order = Pick<typeof bundles.$inferSelect, 'folioId' | 'complexes'>;

/** What goes into a bundle, in its one order: by accession, then by id. Points and files are not in it. */
export interface Content {
  folio: typeof folios.$inferSelect | null;
  complexes: Rows<typeof complexes>;
  centres: Rows<typeof centres>;
  ligands: Rows<typeof complexLigands>;
  spectra: Rows<typeof spectra>;
  solvents: Rows<typeof spectrumSolvents>;
  bands: Rows<typeof bands>;
  preparations: Rows<typeof preparations>;
  labs: Map<string, string>;
  instruments: Map<string, string>;
  /** SPDX identifiers under which this may be passed on; none for a selection of a member's own making. */
  licences: string[];
}

const among = (column: SQL, ids: readonly string[]) =>
  sql`${column} in (select value from json_each(${JSON.stringify(ids)}))`;

/**
 * As whom a bundle is judged: grants to read alone bring nothing into a file, and a guest's bundle of one folio is
 * judged by the grant of that folio, whatever else was granted.
 */
export function narrowed(asker: Asker, folio: typeof folios.$inferSelect | null): Asker {
  const grants = asker.grants.filter((grant) => grant.level === 'download');
  if (!folio || guestLevel(asker, folio) === null) return { ...asker, grants };
  return { ...asker, grants: grants.filter((grant) => grant.folioId === folio.id) };
}

/** All that this asker may take away of what was ordered, and nothing else. */
export async function gatherContent(asker: Asker, order: Order): Promise<Content> {
  const { db } = await database();
  const [folio = null] = order.folioId ? await db.select().from(folios).where(eq(folios.id, order.folioId)) : [];
  const judged = narrowed(asker, folio);
  const chosen = await complexesOf(judged, order);
  const ids = chosen.map(({ complex }) => complex.id);
  const measured = await db
    .select({ spectrum: spectra })
    .from(spectra)
    .innerJoin(complexes, eq(complexes.id, spectra.complexId))
    .where(and(among(sql`${spectra.complexId}`, ids), spectrumDownload(judged)))
    .orderBy(asc(complexes.accession), asc(spectra.id));
  const listed = new Map(chosen.map(({ complex, listed }) => [complex.id, listed]));
  const taken = measured
    .map(({ spectrum }) => spectrum)
    .filter((spectrum) => listed.get(spectrum.complexId)?.includes(spectrum.id) ?? true)
    .filter((spectrum) => !folio || belongs(folio, spectrum));
  const spectrumIds = taken.map((spectrum) => spectrum.id);

  const [centreRows, ligandRows, solventRows, bandRows, preparationRows, labRows, instrumentRows] = await Promise.all([
    db
      .select()
      .from(centres)
      .where(among(sql`${centres.complexId}`, ids))
      .orderBy(asc(centres.ordinal)),
    db
      .select()
      .from(complexLigands)
      .where(among(sql`${complexLigands.complexId}`, ids))
      .orderBy(asc(complexLigands.ordinal)),
    db
      .select()
      .from(spectrumSolvents)
      .where(among(sql`${spectrumSolvents.spectrumId}`, spectrumIds))
      .orderBy(asc(spectrumSolvents.ordinal)),
    db
      .select({ band: bands })
      .from(bands)
      .innerJoin(spectra, eq(spectra.id, bands.spectrumId))
      .innerJoin(complexes, eq(complexes.id, spectra.complexId))
      .where(and(among(sql`${bands.spectrumId}`, spectrumIds), bandSight(judged)))
      .orderBy(asc(complexes.accession), asc(spectra.id), asc(bands.ordinal), asc(bands.id)),
    db
      .select()
      .from(preparations)
      .where(
        among(
          sql`${preparations.id}`,
          taken.flatMap((spectrum) => spectrum.preparationId ?? []),
        ),
      ),
    db.select({ id: labs.id, name: labs.name }).from(labs),
    db.select({ id: instruments.id, name: instruments.name }).from(instruments),
  ]);
  return {
    folio,
    complexes: chosen.map(({ complex }) => complex),
    centres: centreRows,
    ligands: ligandRows,
    spectra: taken,
    solvents: solventRows,
    bands: bandRows.map(({ band }) => band),
    preparations: preparationRows,
    labs: new Map(labRows.map(({ id, name }) => [id, name])),
    instruments: new Map(instrumentRows.map(({ id, name }) => [id, name])),
    licences: folio
      ? [folio.licence]
      : await licencesOf(
          judged,
          chosen.map(({ complex }) => complex),
        ),
  };
}

/** A folio holds what a member of its lab may share: not another lab's own spectra, whoever asks. */
const belongs = (folio: typeof folios.$inferSelect, spectrum: typeof spectra.$inferSelect) =>
  spectrum.state === 'registered' && (spectrum.visibility === 'programme' || spectrum.labId === folio.labId);

async function complexesOf(asker: Asker, order: Order) {
  const { db } = await database();
  if (order.folioId)
    return db
      .select({ complex: complexes, listed: folioItems.spectra })
      .from(folioItems)
      .innerJoin(complexes, eq(complexes.id, folioItems.complexId))
      .where(and(eq(folioItems.folioId, order.folioId), eq(complexes.state, 'registered'), complexDownload(asker)))
      .orderBy(asc(complexes.accession));
  const named = order.complexes ?? [];
  const accessions = named.map(await livingAccessions(db, named));
  const rows = await db
    .select({ complex: complexes })
    .from(complexes)
    .where(and(among(sql`${complexes.accession}`, accessions), complexDownload(asker)))
    .orderBy(asc(complexes.accession));
  return rows.map(({ complex }) => ({ complex, listed: null }));
}

/** What is taken as a guest comes under the licences of the folios that it was granted from. */
async function licencesOf(asker: Asker, chosen: Rows<typeof complexes>): Promise<string[]> {
  const asGuest = chosen.filter((complex) => !seesAsMember(asker, complex)).map(({ id }) => id);
  if (asGuest.length === 0) return [];
  const { db } = await database();
  const granted = asker.grants.map((grant) => grant.folioId);
  const rows = await db
    .selectDistinct({ licence: folios.licence })
    .from(folios)
    .innerJoin(folioItems, eq(folioItems.folioId, folios.id))
    .where(and(among(sql`${folios.id}`, granted), among(sql`${folioItems.complexId}`, asGuest)))
    .orderBy(asc(folios.licence));
  return rows.map(({ licence }) => licence);
}

/** What a finished bundle holds, by id: kept beside it, so that access can be judged again when it is fetched. */
export interface Held {
  /** Name of the archive and of the one folder in it, without ending. */
  name: string;
  complexes: string[];
  spectra: string[];
  bands: string[];
}

/** Records by id, those merged since as what they live on as. */
const livesIn = (ids: readonly string[]) =>
  sql`${complexes.mergedInto} is null and (${among(sql`${complexes.id}`, ids)} or ${complexes.accession} in (select merged.merged_into from ${complexes} merged where ${among(sql`merged.id`, ids)}))`;

/** Whether the asker may still take all of what a bundle holds. What was deleted since is no matter of access. */
export async function stillOpen(asker: Asker, order: Order, held: Held): Promise<boolean> {
  const { db } = await database();
  const [folio = null] = order.folioId ? await db.select().from(folios).where(eq(folios.id, order.folioId)) : [];
  const judged = narrowed(asker, folio);
  const count = sql<number>`count(*)`;
  // As "is not true", since a condition on a missing value is neither true nor false.
  const shut = (sight: SQL) => sql`(${sight}) is not true`;
  const [c, s, b] = await Promise.all([
    db
      .select({ count })
      .from(complexes)
      .where(and(livesIn(held.complexes), shut(complexDownload(judged)))),
    db
      .select({ count })
      .from(spectra)
      .innerJoin(complexes, eq(complexes.id, spectra.complexId))
      .where(and(among(sql`${spectra.id}`, held.spectra), shut(spectrumDownload(judged)))),
    db
      .select({ count })
      .from(bands)
      .innerJoin(spectra, eq(spectra.id, bands.spectrumId))
      .innerJoin(complexes, eq(complexes.id, spectra.complexId))
      .where(and(among(sql`${bands.id}`, held.bands), shut(bandSight(judged)))),
  ]);
  return [c, s, b].every(([row]) => (row?.count ?? 0) === 0);
}
