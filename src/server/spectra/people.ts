import { inArray } from 'drizzle-orm';
import type { Db } from '#src/db/client.ts';
import { accounts } from '#src/db/schema/index.ts';

/** Names of accounts by id, for members; a guest learns no names of the people behind a record. */
export async function namesFor(
  db: Db,
  seenAsMember: boolean,
  ids: readonly (string | null)[],
): Promise<(id: string | null) => string | null> {
  const wanted = [...new Set(ids.filter((id) => id !== null))];
  const found =
    seenAsMember && wanted.length > 0
      ? await db.select({ id: accounts.id, name: accounts.name }).from(accounts).where(inArray(accounts.id, wanted))
      : [];
  const names = new Map(found.map(({ id, name }) => [id, name]));
  return (id) => (id === null ? null : (names.get(id) ?? null));
}
