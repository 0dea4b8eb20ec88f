import { and, count, eq, sql } from 'drizzle-orm';
import type { DraftCounts, PersonDetail } from '#src/contracts/people.ts';
import type { Db, Tx } from '#src/db/client.ts';
import { complexes, labs, preparations, spectra } from '#src/db/schema/index.ts';
import { nowIso } from '../ids.ts';
import { type Actor, record } from '../trail.ts';

type Table = typeof complexes | typeof preparations | typeof spectra;

const drafts = (t: Table, makerId: string, labId: string) =>
  and(eq(t.state, 'draft'), eq(t.makerId, makerId), eq(t.labId, labId));

/** How many records a person began in a lab and did not register. */
export async function countDrafts(db: Db | Tx, makerId: string, labId: string): Promise<DraftCounts> {
  const of = async (t: Table) => {
    const [row] = await db
      .select({ n: count() })
      .from(t)
      .where(drafts(t, makerId, labId));
    return row?.n ?? 0;
  };
  return { complexes: await of(complexes), preparations: await of(preparations), spectra: await of(spectra) };
}

/**
 * Make another member the maker of a person's drafts in a lab. Each gets a row in the trail and a new version, so that
 * a change under way by the former maker does not land on it.
 */
export async function handOverDrafts(
  tx: Tx,
  actor: Actor,
  { labId, from, to }: { labId: string; from: string; to: string },
): Promise<void> {
  const kinds = [
    [complexes, 'complex'],
    [preparations, 'preparation'],
    [spectra, 'spectrum'],
  ] as const;
  for (const [t, subjectType] of kinds) {
    const handed = await tx
      .update(t)
      .set({ makerId: to, version: sql`${t.version} + 1`, updatedAt: nowIso() })
      .where(drafts(t, from, labId))
      .returning({ id: t.id });
    for (const { id } of handed)
      await record(tx, actor, { action: 'hand-over', subjectType, subjectId: id, detail: { from, to } });
  }
}

const MOST = 500;

/** What a person began in any lab and did not register: complexes, then preparations, then spectra. */
export async function listDrafts(db: Db, makerId: string): Promise<PersonDetail['drafts']> {
  const lab = { id: labs.id, name: labs.name };
  const mine = (t: Table) => and(eq(t.state, 'draft'), eq(t.makerId, makerId));
  const { accession } = complexes;
  const [ofComplexes, ofPreparations, ofSpectra] = await Promise.all([
    db
      .select({ id: complexes.id, name: complexes.formula, accession, lab })
      .from(complexes)
      .innerJoin(labs, eq(labs.id, complexes.labId))
      .where(mine(complexes))
      .orderBy(complexes.id)
      .limit(MOST),
    db
      .select({ id: preparations.id, name: preparations.label, accession, lab })
      .from(preparations)
      .innerJoin(complexes, eq(complexes.id, preparations.complexId))
      .innerJoin(labs, eq(labs.id, preparations.labId))
      .where(mine(preparations))
      .orderBy(preparations.id)
      .limit(MOST),
    db
      .select({ id: spectra.id, name: spectra.title, accession, lab })
      .from(spectra)
      .innerJoin(complexes, eq(complexes.id, spectra.complexId))
      .innerJoin(labs, eq(labs.id, spectra.labId))
      .where(mine(spectra))
      .orderBy(spectra.id)
      .limit(MOST),
  ]);
  return [
    ...ofComplexes.map((row) => ({ kind: 'complex' as const, ...row })),
    ...ofPreparations.map((row) => ({ kind: 'preparation' as const, ...row })),
    ...ofSpectra.map((row) => ({ kind: 'spectrum' as const, ...row })),
  ].slice(0, MOST);
}
