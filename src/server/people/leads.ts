import { and, asc, eq, ne } from 'drizzle-orm';
import type { Db, Tx } from '#src/db/client.ts';
import { accounts, memberships } from '#src/db/schema/index.ts';

/** Active accounts that lead a lab apart from one person, the longest-serving first. */
export const otherLeads = (db: Db | Tx, labId: string, accountId: string): Promise<{ id: string; name: string }[]> =>
  db
    .select({ id: accounts.id, name: accounts.name })
    .from(memberships)
    .innerJoin(accounts, eq(accounts.id, memberships.accountId))
    .where(
      and(
        eq(memberships.labId, labId),
        eq(memberships.role, 'lead'),
        eq(accounts.state, 'active'),
        ne(accounts.id, accountId),
      ),
    )
    .orderBy(asc(memberships.createdAt), asc(accounts.id));
