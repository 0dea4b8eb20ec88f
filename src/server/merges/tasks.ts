import { and, count, eq, inArray, isNull, sql } from 'drizzle-orm';
import type { Page } from '#src/contracts/common.ts';
import type { MergeSettlement, MergeSide, MergeTask } from '#src/contracts/merges.ts';
import { accounts, complexes, folioItems, mergeTasks, preparations } from '#src/db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import type { MergeTaskAccess } from '../access/merges.ts';
import { summaries } from '../complexes/summary.ts';
import { database } from '../database.ts';
import { HttpError } from '../http.ts';
import { nowIso } from '../ids.ts';
import { behind, cursorScope, cutPage, readCursor } from '../paging.ts';
import { record } from '../trail.ts';
import { obstaclesTo } from './obstacles.ts';

const open = isNull(mergeTasks.settledAt);

/** How many pairs wait for the steward; null for everybody else. */
export async function countMergeTasks(asker: Asker): Promise<number | null> {
  if (!asker.steward) return null;
  const { db } = await database();
  const [row] = await db.select({ n: count() }).from(mergeTasks).where(open);
  return row?.n ?? 0;
}

/** Open merge tasks with both records, the longest waiting first. The asker is a steward, who sees every record. */
export async function listMergeTasks(
  asker: Asker,
  query: { limit: number; cursor?: string | undefined },
): Promise<Page<MergeTask>> {
  const { db } = await database();
  const scope = cursorScope(asker.accountId, 'merge tasks', query);
  const by = sql`${mergeTasks.createdAt}`;
  const found = await db
    .select()
    .from(mergeTasks)
    .where(and(open, behind(readCursor(query.cursor, scope), by, sql`${mergeTasks.id}`, false)))
    .orderBy(by, mergeTasks.id)
    .limit(query.limit + 1);
  const { rows, next } = cutPage(found, query.limit, scope, ({ createdAt, id }) => ({ value: createdAt, id }));
  const sideOf = await sides(
    asker,
    rows.flatMap((task) => [task.firstId, task.secondId]),
  );
  const items: MergeTask[] = [];
  for (const { id, createdAt, firstId, secondId } of rows) {
    const [first, second] = [sideOf(firstId), sideOf(secondId)];
    items.push({
      id,
      createdAt,
      first: { ...first.facts, obstacles: await obstaclesTo(db, second.row, first.row) },
      second: { ...second.facts, obstacles: await obstaclesTo(db, first.row, second.row) },
      differs: differences(first.facts, second.facts),
    });
  }
  return { items, total: (await countMergeTasks(asker)) ?? 0, next };
}

type Facts = Omit<MergeSide, 'obstacles'>;

async function sides(asker: Asker, ids: string[]) {
  const { db } = await database();
  const rows = await db
    .select({
      complex: complexes,
      maker: accounts.name,
      preparations: sql<number>`(select count(*) from ${preparations} where ${preparations.complexId} = ${complexes.id})`,
      folios: sql<number>`(select count(*) from ${folioItems} where ${folioItems.complexId} = ${complexes.id})`,
    })
    .from(complexes)
    .innerJoin(accounts, eq(accounts.id, complexes.makerId))
    .where(inArray(complexes.id, ids));
  const summaryRows = await summaries(
    asker,
    rows.map(({ complex }) => complex),
  );
  const byId = new Map(
    rows.map(({ complex, ...counts }, i) => {
      const facts: Facts = {
        complex: summaryRows[i]!,
        notes: complex.notes,
        createdAt: complex.createdAt,
        ...counts,
      };
      return [complex.id, { row: complex, facts }] as const;
    }),
  );
  return (id: string) => byId.get(id)!; // a foreign key holds every record of a task
}

/** Members of the two complexes that are compared: what says who it is, and what says who sees it. */
const COMPARED = [
  'formula',
  'centres',
  'ligands',
  'isomer',
  'pointGroup',
  'lab',
  'visibility',
  'embargoUntil',
  'state',
] as const;

const differences = (first: Facts, second: Facts): string[] =>
  COMPARED.filter((name) => JSON.stringify(first.complex[name]) !== JSON.stringify(second.complex[name]));

/** The two are different complexes, says a person, and why. @throws {HttpError} 409 when it is settled */
export async function settleMergeTask(
  { asker, task }: MergeTaskAccess,
  { outcome, reason }: MergeSettlement,
): Promise<void> {
  const { write } = await database();
  await write(async (tx) => {
    const [settled] = await tx
      .update(mergeTasks)
      .set({ settledAt: nowIso(), settledBy: asker.accountId, outcome, reason })
      .where(and(eq(mergeTasks.id, task.id), open))
      .returning();
    if (!settled) throw new HttpError(409, 'This pair is settled');
    await record(tx, asker, {
      action: 'settle-merge-task',
      subjectType: 'registry',
      subjectId: task.id,
      detail: { first: task.firstId, second: task.secondId, outcome, reason },
    });
  });
}
