import { asc, eq, sql } from 'drizzle-orm';
import type { Page } from '#src/contracts/common.ts';
import type { LabRecord, MemberRecord } from '#src/contracts/sharing.ts';
import { accounts, labs, memberships } from '#src/db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import { leads } from '../access/records.ts';
import type { LabAccess } from '../access/sharing.ts';
import { database } from '../database.ts';
import { behind, cursorScope, cutPage, readCursor } from '../paging.ts';
import { labRecords } from './record.ts';

/** Labs of the programme in the order of their names. */
export async function listLabs(
  asker: Asker,
  query: { limit: number; cursor?: string | undefined },
): Promise<Page<LabRecord>> {
  const { db } = await database();
  const scope = cursorScope(asker.accountId, 'labs', query);
  const [name, id] = [sql`${labs.name}`, sql`${labs.id}`];
  const [found, [counted]] = await Promise.all([
    db
      .select()
      .from(labs)
      .where(behind(readCursor(query.cursor, scope), name, id, false))
      .orderBy(asc(labs.name), asc(labs.id))
      .limit(query.limit + 1),
    db.select({ total: sql<number>`count(*)` }).from(labs),
  ]);
  const { rows, next } = cutPage(found, query.limit, scope, (lab) => ({ value: lab.name, id: lab.id }));
  return { items: await labRecords(asker, rows), total: counted?.total ?? 0, next };
}

/** People of a lab by name, leads first. Their addresses are for leads of the lab and stewards. */
export async function listMembers({ asker, lab }: LabAccess): Promise<MemberRecord[]> {
  const { db } = await database();
  const rows = await db
    .select({
      id: accounts.id,
      name: accounts.name,
      email: accounts.email,
      role: memberships.role,
      since: memberships.createdAt,
      state: accounts.state,
    })
    .from(memberships)
    .innerJoin(accounts, eq(accounts.id, memberships.accountId))
    .where(eq(memberships.labId, lab.id))
    .orderBy(sql`${memberships.role} = 'lead' desc`, asc(accounts.name), asc(accounts.id));
  const withAddress = leads(asker, lab.id);
  return rows.map((row) => ({ ...row, email: withAddress ? row.email : null }));
}
