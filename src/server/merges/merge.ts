import { and, eq, inArray, isNull, or, sql } from 'drizzle-orm';
import type { MergeInput } from '#src/contracts/merges.ts';
import type { Tx } from '#src/db/client.ts';
import {
  bands,
  complexes,
  mergeTasks,
  preparationComponents,
  preparations,
  spectra,
  spectrumSpecies,
} from '#src/db/schema/index.ts';
import type { MergeAccess } from '../access/merges.ts';
import { seeComplex } from '../access/records.ts';
import { database } from '../database.ts';
import { HttpError } from '../http.ts';
import { nowIso } from '../ids.ts';
import { refuse } from '../spectra/refuse.ts';
import { type Actor, record } from '../trail.ts';
import { centrePlaces } from './centre-places.ts';
import { mergeItems } from './folio-items.ts';
import { moveFits } from './move-fits.ts';
import { obstaclesTo } from './obstacles.ts';
import { seenByAllWhoSee, visibilityUnder } from './sight-kept.ts';

type Complex = typeof complexes.$inferSelect;

/**
 * Merge one record into another of the same complex. Spectra, preparations and folio items move; attestations stand,
 * with a note; editions stay as they were; the accession leads to the record that lives on, for good. Nothing comes
 * into the sight of anybody who could not see it before.
 *
 * @returns the accession of the record that lives on
 * @throws {HttpError} 409 where the two cannot be merged as they stand, 412 when one changed meanwhile, 422
 */
export async function mergeComplex(access: MergeAccess, { into: accession, reason }: MergeInput): Promise<string> {
  const { asker, complex, alias } = access;
  if (alias) throw new HttpError(409, `${alias} was merged into ${complex.accession} before`);
  const into = await target(access, accession);
  const { write } = await database();
  await write(async (tx) => {
    const from = await takeVersion(tx, complex);
    const lives = await takeVersion(tx, into);
    const [obstacle, ...more] = await obstaclesTo(tx, from, lives);
    if (obstacle)
      throw new HttpError(409, obstacle, {
        errors: [obstacle, ...more].map((detail) => ({ pointer: '#/into', detail })),
      });
    const moved = await moveParts(tx, asker, { from, into: lives, reason });
    await becomeAlias(tx, from, lives);
    await settleTasks(tx, asker, from.id, lives.id, reason);
    await record(tx, asker, {
      action: 'merge',
      subjectType: 'complex',
      subjectId: from.id,
      detail: { accession: from.accession, into: lives.accession, reason, ...moved },
    });
    // Who could not see the one must not learn of it from the history of the other.
    if (seenByAllWhoSee(from, lives))
      await record(tx, asker, {
        action: 'take-in',
        subjectType: 'complex',
        subjectId: lives.id,
        detail: { from: from.accession, reason },
      });
  });
  return into.accession;
}

async function target({ asker, complex }: MergeAccess, accession: string): Promise<Complex> {
  const seen = await seeComplex(asker, accession).catch((error: unknown) => {
    if (error instanceof HttpError && error.status === 404)
      throw refuse('#/into', 'There is no such complex in your sight');
    throw error;
  });
  if (seen.complex.id === complex.id) throw refuse('#/into', 'A record is not merged into itself');
  return seen.complex;
}

/** Both records as they stand now, held against a change in between. */
async function takeVersion(tx: Tx, { id, version }: Complex): Promise<Complex> {
  const [row] = await tx
    .update(complexes)
    .set({ version: version + 1 })
    .where(and(eq(complexes.id, id), eq(complexes.version, version), isNull(complexes.mergedInto)))
    .returning();
  if (!row) throw new HttpError(412, 'Somebody changed one of the records meanwhile: read them again and repeat');
  return row;
}

interface Merge {
  from: Complex;
  into: Complex;
  reason: string;
}

/** @returns ids of what moved, for the trail */
async function moveParts(tx: Tx, actor: Actor, { from, into, reason }: Merge) {
  const partsOf = (table: typeof spectra | typeof preparations, complexId: string) =>
    tx
      .select({ id: table.id, labId: table.labId, visibility: table.visibility })
      .from(table)
      .where(eq(table.complexId, complexId));
  const own = { spectra: await partsOf(spectra, from.id), preparations: await partsOf(preparations, from.id) };
  const there = await partsOf(spectra, into.id);
  const ids = (rows: readonly { id: string }[]) => rows.map(({ id }) => id);
  const detail = { from: from.accession, into: into.accession, reason };

  await mergeItems(tx, actor, {
    from: { id: from.id, spectra: ids(own.spectra) },
    into: { id: into.id, spectra: ids(there) },
    detail,
  });
  for (const [table, kind] of [
    [spectra, 'spectrum'],
    [preparations, 'preparation'],
  ] as const)
    for (const part of kind === 'spectrum' ? own.spectra : own.preparations) {
      const visibility = visibilityUnder(part, from, into)!; // the obstacles leave none without
      await tx
        .update(table)
        .set({ complexId: into.id, visibility, version: sql`${table.version} + 1`, updatedAt: nowIso() })
        .where(eq(table.id, part.id));
      const narrowed = visibility === part.visibility ? {} : { visibility };
      await record(tx, actor, {
        action: 'move',
        subjectType: kind,
        subjectId: part.id,
        detail: { ...detail, ...narrowed },
      });
    }
  for (const table of [spectrumSpecies, preparationComponents])
    await tx.update(table).set({ complexId: into.id }).where(eq(table.complexId, from.id));
  await noteOnBands(tx, ids(own.spectra), from, into);
  const fits = await moveFits(tx, actor, { from, into, spectra: ids(own.spectra) });
  return { spectra: ids(own.spectra), preparations: ids(own.preparations), ...(fits.length > 0 ? { fits } : {}) };
}

/** Attestations stand, and say under which record they were made. */
async function noteOnBands(tx: Tx, spectrumIds: string[], from: Complex, into: Complex): Promise<void> {
  const placeOf = await centrePlaces(tx, from.id, into.id);
  const rows = await tx
    .select()
    .from(bands)
    .where(sql`${bands.spectrumId} in (select value from json_each(${JSON.stringify(spectrumIds)}))`);
  for (const band of rows) {
    const note = `Judged under ${from.accession}, which was merged into this record.`;
    await tx
      .update(bands)
      .set({
        centreOrdinal: band.centreOrdinal === null ? null : placeOf(band.centreOrdinal),
        judgement: band.state === 'proposed' ? band.judgement : [band.judgement, note].filter(Boolean).join(' '),
        version: band.version + 1,
      })
      .where(eq(bands.id, band.id));
  }
}

/** The accession leads to the living record, as do those that led here; search by any of them finds it. */
async function becomeAlias(tx: Tx, from: Complex, into: Complex): Promise<void> {
  const earlier = await tx
    .update(complexes)
    .set({ mergedInto: into.accession })
    .where(or(eq(complexes.id, from.id), eq(complexes.mergedInto, from.accession)))
    .returning({ accession: complexes.accession });
  const search = [into.search, ...earlier.map(({ accession }) => accession.toLowerCase())].join(' ');
  // Notes of a record that one lab alone saw stay with it: the steward reads them there.
  const open = seenByAllWhoSee(from, into);
  const notes = open && from.notes ? [into.notes, `From ${from.accession}: ${from.notes}`] : [into.notes];
  await tx
    .update(complexes)
    .set({
      search,
      notes: notes.filter(Boolean).join('\n\n') || null,
      ...(open ? { updatedAt: nowIso() } : {}),
    })
    .where(eq(complexes.id, into.id));
}

/** The task of the two is settled; others that name the record merged away name the living one. */
async function settleTasks(tx: Tx, actor: Actor, fromId: string, intoId: string, reason: string): Promise<void> {
  const open = isNull(mergeTasks.settledAt);
  const rows = await tx
    .select()
    .from(mergeTasks)
    .where(
      and(open, or(inArray(mergeTasks.firstId, [fromId, intoId]), inArray(mergeTasks.secondId, [fromId, intoId]))),
    );
  const pairOf = ({ firstId, secondId }: { firstId: string; secondId: string }) =>
    [firstId, secondId]
      .map((id) => (id === fromId ? intoId : id))
      .sort()
      .join();
  const kept = new Set<string>();
  for (const task of rows) {
    const pair = pairOf(task);
    const [one, other] = pair.split(',');
    if (one === other) {
      const settled = { settledAt: nowIso(), settledBy: actor.accountId, outcome: 'merged' as const, reason };
      await tx.update(mergeTasks).set(settled).where(eq(mergeTasks.id, task.id));
    } else if (kept.has(pair)) await tx.delete(mergeTasks).where(eq(mergeTasks.id, task.id));
    else {
      const renamed = (id: string) => (id === fromId ? intoId : id);
      await tx
        .update(mergeTasks)
        .set({ firstId: renamed(task.firstId), secondId: renamed(task.secondId) })
        .where(eq(mergeTasks.id, task.id));
      kept.add(pair);
    }
  }
}
