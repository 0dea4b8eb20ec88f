import { and, isNotNull, type SQL, sql } from 'drizzle-orm';
import type { Db, Tx } from '../../db/client.ts';
import { complexes } from '../../db/schema/index.ts';

// An accession is for good: that of a record merged into another one leads to where it lives on. Chains are flattened
// when records are merged, so that one step always arrives.

/** The accession under which a record lives: its own, or that of the record it was merged into. */
export const livingAccession = (accession: string): SQL =>
  sql`coalesce((select known.merged_into from ${complexes} known where known.accession = ${accession}), ${accession})`;

/** The same for many: what each accession of a list leads to. */
export async function livingAccessions(db: Db | Tx, accessions: readonly string[]): Promise<(given: string) => string> {
  const merged = await db
    .select({ accession: complexes.accession, into: complexes.mergedInto })
    .from(complexes)
    .where(
      and(
        sql`${complexes.accession} in (select value from json_each(${JSON.stringify(accessions)}))`,
        isNotNull(complexes.mergedInto),
      ),
    );
  const into = new Map(merged.map((row) => [row.accession, row.into!]));
  return (given) => into.get(given) ?? given;
}
