import { lte, sql } from 'drizzle-orm';
import type { Database } from '#src/db/client.ts';
import { registrySettings } from '#src/db/schema/index.ts';

const KEY = 'housekeeping';

/**
 * Take the next turn at the housekeeping for this process: of several that share a database, one gets it. It is not
 * needed for correctness, as doing a turn twice comes to the same; it spares the work.
 *
 * @param everyMs - for how long nobody else gets a turn, in milliseconds
 */
export async function takeTurn({ write }: Database, everyMs: number, now = Date.now()): Promise<boolean> {
  // Instants of one length sort as text.
  const value = new Date(now + everyMs).toISOString();
  const taken = await write((tx) =>
    tx
      .insert(registrySettings)
      .values({ key: KEY, value })
      .onConflictDoUpdate({
        target: registrySettings.key,
        set: { value },
        setWhere: lte(registrySettings.value, new Date(now).toISOString()),
      })
      .returning({ key: sql`${registrySettings.key}` }),
  );
  return taken.length > 0;
}
