import { and, asc, desc, eq, inArray, type SQL, sql } from 'drizzle-orm';
import type { Page } from '../../contracts/common.ts';
import type { ComplexQuery, ComplexSummary } from '../../contracts/complexes.ts';
import type { Db } from '../../db/client.ts';
import { centres, complexes, spectra } from '../../db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import { spectrumSight } from '../access/sight.ts';
import { database } from '../database.ts';
import { behind, cursorScope, cutPage, readCursor } from '../paging.ts';
import { facets } from './facets.ts';
import { filterConditions, whereOf } from './filters.ts';
import { summaries } from './summary.ts';

/** What a sort orders by. Null sorts first, as an empty text or −1, so that the order is total. */
function sortValue(asker: Asker, name: string): SQL<string | number> {
  const counted = (what: SQL) =>
    sql<number>`(select count(${what}) from ${spectra} where ${and(eq(spectra.complexId, complexes.id), eq(spectra.state, 'registered'), spectrumSight(asker))})`;
  switch (name) {
    case 'formula':
      return sql`${complexes.formula}`;
    case 'metal':
      return sql`coalesce(${centres.element}, '')`;
    case 'dCount':
      return sql`coalesce(${centres.dCount}, -1)`;
    case 'geometry':
      return sql`coalesce(${centres.geometry}, '')`;
    case 'pointGroup':
      return sql`coalesce(${complexes.pointGroup}, '')`;
    case 'labs':
      return counted(sql`distinct ${spectra.labId}`);
    case 'spectra':
      return counted(sql`*`);
    case 'updated':
      return sql`${complexes.updatedAt}`;
    default:
      return sql`${complexes.accession}`;
  }
}

/** Whole rows of the ids of a page: the sort itself runs over narrow ones. */
async function complexesInOrder(db: Db, ids: string[]) {
  const rows = ids.length ? await db.select().from(complexes).where(inArray(complexes.id, ids)) : [];
  const byId = new Map(rows.map((row) => [row.id, row]));
  return ids.map((id) => byId.get(id)!);
}

/** Complexes in the asker's sight: one page, the total, and on request what each filter would leave. */
export async function listComplexes(asker: Asker, query: ComplexQuery): Promise<Page<ComplexSummary>> {
  const { db } = await database();
  const scope = cursorScope(asker.accountId, 'complexes', query);
  const cursor = readCursor(query.cursor, scope);
  const falling = query.sort.startsWith('-');
  const by = sortValue(asker, query.sort.replace(/^-/, ''));
  const id = sql`${complexes.id}`;
  const where = whereOf(asker, await filterConditions(asker, query));

  const [found, [counted], facetCounts] = await Promise.all([
    db
      .select({ id: complexes.id, value: by })
      .from(complexes)
      // The first centre stands for the complex where a column shows one value.
      .leftJoin(centres, and(eq(centres.complexId, complexes.id), eq(centres.ordinal, 0)))
      .where(and(where, behind(cursor, by, id, falling)))
      .orderBy(falling ? desc(by) : asc(by), falling ? desc(id) : asc(id))
      .limit(query.limit + 1),
    db.select({ total: sql<number>`count(*)` }).from(complexes).where(where),
    query.facets === '1' ? facets(db, asker, query) : undefined,
  ]);
  const { rows, next } = cutPage(found, query.limit, scope, (row) => row);
  return {
    items: await summaries(
      asker,
      await complexesInOrder(
        db,
        rows.map((row) => row.id),
      ),
    ),
    total: counted?.total ?? 0,
    next,
    ...(facetCounts ? { facets: facetCounts } : {}),
  };
}
