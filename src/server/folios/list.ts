import { and, desc, sql } from 'drizzle-orm';
import type { Page } from '#src/contracts/common.ts';
import type { FolioRecord } from '#src/contracts/sharing.ts';
import { folios } from '#src/db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import { folioSight } from '../access/sharing.ts';
import { database } from '../database.ts';
import { behind, cursorScope, cutPage, readCursor } from '../paging.ts';
import { folioRecords } from './record.ts';

/** Folios in sight, the last changed first. */
export async function listFolios(
  asker: Asker,
  query: { limit: number; cursor?: string | undefined },
): Promise<Page<FolioRecord>> {
  const { db } = await database();
  const scope = cursorScope(asker.accountId, 'folios', query);
  const cursor = readCursor(query.cursor, scope);
  const sight = folioSight(asker);
  const [found, [counted]] = await Promise.all([
    db
      .select()
      .from(folios)
      .where(and(sight, behind(cursor, sql`${folios.updatedAt}`, sql`${folios.id}`, true)))
      .orderBy(desc(folios.updatedAt), desc(folios.id))
      .limit(query.limit + 1),
    db.select({ total: sql<number>`count(*)` }).from(folios).where(sight),
  ]);
  const { rows, next } = cutPage(found, query.limit, scope, (folio) => ({ value: folio.updatedAt, id: folio.id }));
  return { items: await folioRecords(asker, rows), total: counted?.total ?? 0, next };
}
