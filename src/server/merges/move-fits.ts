import { and, eq, isNull } from 'drizzle-orm';
import type { Tx } from '#src/db/client.ts';
import { type complexes, levelFits } from '#src/db/schema/index.ts';
import { nowIso } from '../ids.ts';
import { type Actor, record } from '../trail.ts';
import { centrePlaces } from './centre-places.ts';
import { seenByAllWhoSee } from './sight-kept.ts';

type Complex = typeof complexes.$inferSelect;

/** What a saved input says of where its wavenumbers come from. */
interface Given {
  bands?: { spectrum?: string }[];
}

/**
 * Saved fits go with the record they belong to, each to the centre that is its own there. Those that rest on spectra are
 * seen where their spectra are. One of typed wavenumbers has nothing that would keep it from people who did not see it
 * before: within a lab it becomes the lab's own, otherwise it is withdrawn.
 *
 * @param spectra - ids of the spectra that moved with the record
 * @returns ids of the fits that moved, for the trail
 */
export async function moveFits(
  tx: Tx,
  actor: Actor,
  { from, into, spectra }: { from: Complex; into: Complex; spectra: readonly string[] },
): Promise<string[]> {
  const placeOf = await centrePlaces(tx, from.id, into.id);
  const live = and(eq(levelFits.complexId, from.id), isNull(levelFits.withdrawnAt));
  const moved: string[] = [];
  for (const { id, input, centreOrdinal } of await tx.select().from(levelFits).where(live)) {
    const rests = ((input as Given).bands ?? []).every(({ spectrum }) => spectrum && spectra.includes(spectrum));
    const asItIs = rests || seenByAllWhoSee(from, into);
    const change =
      asItIs || from.labId === into.labId
        ? {
            complexId: into.id,
            centreOrdinal: placeOf(centreOrdinal) ?? centreOrdinal,
            ...(asItIs ? {} : { visibility: 'lab' as const }),
          }
        : { withdrawnAt: nowIso() };
    await tx.update(levelFits).set(change).where(eq(levelFits.id, id));
    if ('complexId' in change) moved.push(id);
    else
      await record(tx, actor, {
        action: 'withdraw-fit',
        subjectType: 'complex',
        subjectId: from.id,
        detail: { fit: id, mergedInto: into.accession },
      });
  }
  return moved;
}
