import { and, asc, count, eq, inArray, ne } from 'drizzle-orm';
import type { MeasuredRecord } from '#src/contracts/people.ts';
import type { Db } from '#src/db/client.ts';
import { complexes, labs, preparations, spectra } from '#src/db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import type { LabAccess } from '../access/sharing.ts';
import { preparationSight, spectrumSight } from '../access/sight.ts';
import { database } from '../database.ts';

/** Spectra in sight, of preparations in sight, that another lab made than measured. */
function measuredAcross(db: Db, asker: Asker) {
  // The preparation has a sight of its own; within the brackets `complex` is the one it is filed under.
  const prepared = db
    .select({ id: preparations.id })
    .from(preparations)
    .innerJoin(complexes, eq(complexes.id, preparations.complexId))
    .where(preparationSight(asker));
  return and(
    spectrumSight(asker),
    ne(spectra.state, 'withdrawn'),
    inArray(spectra.preparationId, prepared),
    ne(preparations.labId, spectra.labId),
  );
}

/** What a lab measured for others, and what others measured for it, over what the asker sees. */
export async function measured({ asker, lab }: LabAccess): Promise<MeasuredRecord> {
  const { db } = await database();
  const countBy = (mine: typeof spectra.labId, other: typeof spectra.labId) =>
    db
      .select({ lab: { id: labs.id, name: labs.name }, spectra: count() })
      .from(spectra)
      .innerJoin(complexes, eq(complexes.id, spectra.complexId))
      .innerJoin(preparations, eq(preparations.id, spectra.preparationId))
      .innerJoin(labs, eq(labs.id, other))
      .where(and(eq(mine, lab.id), measuredAcross(db, asker)))
      .groupBy(labs.id, labs.name)
      .orderBy(asc(labs.name), asc(labs.id));
  const maker = preparations.labId as unknown as typeof spectra.labId;
  const [forOthers, elsewhere] = await Promise.all([countBy(spectra.labId, maker), countBy(maker, spectra.labId)]);
  return { forOthers, elsewhere };
}
