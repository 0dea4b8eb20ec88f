import { and, eq, ne, or, sql } from 'drizzle-orm';
import type { Db, Tx } from '#src/db/client.ts';
import { type complexes, preparationComponents, preparations, spectra, spectrumSpecies } from '#src/db/schema/index.ts';
import { nowIso } from '../ids.ts';
import { embargoInForce, seenByAllWhoSee } from './sight-kept.ts';

type Complex = typeof complexes.$inferSelect;

/**
 * Why `from` cannot be merged into `into` as they stand: each a sentence that says what to do. Empty where it can.
 */
export async function obstaclesTo(db: Db | Tx, from: Complex, into: Complex): Promise<string[]> {
  const found: string[] = [];
  if (from.hill !== into.hill || from.charge !== into.charge)
    found.push('They differ in composition or charge: these are two complexes.');
  for (const { state, accession } of [from, into])
    if (state !== 'registered') found.push(`${accession} is ${stateWords[state]}.`);
  if (!seenByAllWhoSee(into, from))
    found.push(
      `${into.accession} is seen by fewer people than ${from.accession}, who would lose it: merge the other way round, or let a lead of its lab open it to the programme.`,
    );
  const now = nowIso();
  if (embargoInForce(from, now) !== embargoInForce(into, now))
    found.push('They are under different embargoes: let the leads of their labs agree on one.');
  if (!seenByAllWhoSee(from, into) && (await hasForeignParts(db, from)))
    found.push(
      `Spectra or preparations of other labs hang on ${from.accession}, which one lab alone sees: they would come into sight of others.`,
    );
  if (await countedApart(db, from, into))
    found.push('A spectrum or a preparation names them as two species beside each other: mend that first.');
  return found;
}

const stateWords = {
  draft: 'a draft: whoever made it registers or deletes it',
  withdrawn: 'withdrawn: a lead of its lab takes that back, or it is left as it is',
  registered: 'registered',
};

/** Spectra or preparations of another lab, or of another complex that names this one. */
async function hasForeignParts(db: Db | Tx, { id, labId }: Complex): Promise<boolean> {
  const [row] = await db.all<{ n: number }>(sql`select
    (select count(*) from ${spectra} where ${and(eq(spectra.complexId, id), ne(spectra.labId, labId))})
    + (select count(*) from ${preparations} where ${and(eq(preparations.complexId, id), ne(preparations.labId, labId))})
    + (select count(*) from ${spectrumSpecies} join ${spectra} on ${spectra.id} = ${spectrumSpecies.spectrumId}
        where ${and(eq(spectrumSpecies.complexId, id), ne(spectra.complexId, id))})
    + (select count(*) from ${preparationComponents} join ${preparations} on ${preparations.id} = ${preparationComponents.preparationId}
        where ${and(eq(preparationComponents.complexId, id), ne(preparations.complexId, id))}) as n`);
  return (row?.n ?? 0) > 0;
}

/** Whether something names both as different species, which says that they are two. */
async function countedApart(db: Db | Tx, from: Complex, into: Complex): Promise<boolean> {
  const species = await db
    .select({ of: spectrumSpecies.spectrumId })
    .from(spectrumSpecies)
    .where(or(eq(spectrumSpecies.complexId, from.id), eq(spectrumSpecies.complexId, into.id)))
    .groupBy(spectrumSpecies.spectrumId)
    .having(sql`count(*) > 1`)
    .limit(1);
  const components = await db
    .select({ of: preparationComponents.preparationId })
    .from(preparationComponents)
    .where(or(eq(preparationComponents.complexId, from.id), eq(preparationComponents.complexId, into.id)))
    .groupBy(preparationComponents.preparationId)
    .having(sql`count(*) > 1`)
    .limit(1);
  return species.length + components.length > 0;
}
