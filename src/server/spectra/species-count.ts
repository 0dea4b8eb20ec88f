import { count, eq } from 'drizzle-orm';
import type { Db, Tx } from '#src/db/client.ts';
import { spectrumSpecies } from '#src/db/schema/index.ts';
import { database } from '#src/server/database.ts';

/** How many species absorb in a spectrum, those out of the asker's sight included: with several there is no ε. */
export async function speciesCount(spectrumId: string, within?: Db | Tx): Promise<number> {
  const db = within ?? (await database()).db;
  const [row] = await db.select({ n: count() }).from(spectrumSpecies).where(eq(spectrumSpecies.spectrumId, spectrumId));
  return row?.n ?? 0;
}
