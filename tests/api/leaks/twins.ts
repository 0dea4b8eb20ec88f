import type { World } from './world.ts';

/** Two records of the programme of one complex, as older data may hold them. */
export async function copyPair(world: World): Promise<{ from: string; into: string }> {
  const { database } = await import('#src/server/database.ts');
  const { complexes } = await import('#src/db/schema/index.ts');
  const { formatAccession } = await import('#src/contracts/accession.ts');
  const { newId } = await import('#src/server/ids.ts');
  const { write } = await database();
  const [from, into] = [880_001, 880_002].map((number) => formatAccession('ZF', number)) as [string, string];
  const createdAt = new Date().toISOString();
  await write(async (tx) => {
    for (const [i, accession] of [from, into].entries())
      await tx.insert(complexes).values({
        id: newId(),
        number: -1 - i,
        accession,
        identityKey: `twin ${i}`,
        formula: '[Zn(OH2)6]2+',
        charge: 2,
        hill: 'H12O6Zn',
        composition: { H: 12, O: 6, Zn: 1 },
        molarMass: 173.5,
        labId: world.labs.north,
        makerId: world.people.northLead.id,
        state: 'registered',
        search: accession.toLowerCase(),
        createdAt,
        updatedAt: createdAt,
      });
  });
  return { from, into };
}
