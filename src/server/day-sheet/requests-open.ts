import { and, count, desc, eq, inArray, isNull } from 'drizzle-orm';
import type { DaySheet } from '#src/contracts/day-sheet.ts';
import { accessRequests, accounts, folios } from '#src/db/schema/index.ts';
import { type Asker, labsWith } from '../access/asker.ts';
import { database } from '../database.ts';

const SHOWN = 6;

/** What guests of the labs that the asker leads asked for and nobody answered yet, the longest waiting first. */
export async function requestsOpen(asker: Asker): Promise<DaySheet['requests']> {
  const led = labsWith(asker, 'lead');
  if (led.length === 0) return { items: [], total: 0 };
  const { db } = await database();
  const waiting = and(inArray(folios.labId, led), isNull(accessRequests.settledAt));
  const [items, [counted]] = await Promise.all([
    db
      .select({
        id: accessRequests.id,
        name: accounts.name,
        wants: accessRequests.wants,
        folio: folios.name,
        folioId: folios.id,
        createdAt: accessRequests.createdAt,
      })
      .from(accessRequests)
      .innerJoin(folios, eq(folios.id, accessRequests.folioId))
      .innerJoin(accounts, eq(accounts.id, accessRequests.accountId))
      .where(waiting)
      .orderBy(accessRequests.createdAt, desc(accessRequests.id))
      .limit(SHOWN),
    db
      .select({ total: count() })
      .from(accessRequests)
      .innerJoin(folios, eq(folios.id, accessRequests.folioId))
      .where(waiting),
  ]);
  return { items, total: counted?.total ?? 0 };
}
