import { and, desc, eq, ne, sql } from 'drizzle-orm';
import type { Page } from '../../contracts/common.ts';
import type { PreparationRecord } from '../../contracts/complexes.ts';
import { complexes, preparations } from '../../db/schema/index.ts';
import type { ComplexAccess } from '../access/records.ts';
import { preparationSight } from '../access/sight.ts';
import { database } from '../database.ts';
import { behind, cursorScope, cutPage, readCursor } from '../paging.ts';
import { preparationRecords } from './record.ts';

/** Preparations of a complex in the asker's sight, latest first. */
export async function listPreparations(
  { asker, complex }: ComplexAccess,
  query: { limit: number; cursor?: string | undefined },
): Promise<Page<PreparationRecord>> {
  const { db } = await database();
  const scope = cursorScope(asker.accountId, `preparations of ${complex.id}`, query);
  const by = sql`${preparations.createdAt}`;
  const where = and(
    eq(preparations.complexId, complex.id),
    ne(preparations.state, 'withdrawn'),
    preparationSight(asker),
  );
  const from = () =>
    db
      .select({ preparation: preparations })
      .from(preparations)
      .innerJoin(complexes, eq(complexes.id, preparations.complexId));
  const [found, counted] = await Promise.all([
    from()
      .where(and(where, behind(readCursor(query.cursor, scope), by, sql`${preparations.id}`, true)))
      .orderBy(desc(preparations.createdAt), desc(preparations.id))
      .limit(query.limit + 1),
    db
      .select({ total: sql<number>`count(*)` })
      .from(preparations)
      .innerJoin(complexes, eq(complexes.id, preparations.complexId))
      .where(where),
  ]);
  const { rows, next } = cutPage(found, query.limit, scope, ({ preparation }) => ({
    value: preparation.createdAt,
    id: preparation.id,
  }));
  return {
    items: await preparationRecords(
      asker,
      rows.map(({ preparation }) => preparation),
    ),
    total: counted[0]?.total ?? 0,
    next,
  };
}
