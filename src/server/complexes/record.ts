import { and, asc, desc, eq, inArray, ne, or } from 'drizzle-orm';
import type { ComplexRecord } from '../../contracts/complexes.ts';
import { accounts, complexes, preparations, trail } from '../../db/schema/index.ts';
import { type ComplexAccess, canChangeComplex, seesAsMember } from '../access/records.ts';
import { complexDownload, complexSight, preparationSight } from '../access/sight.ts';
import { database } from '../database.ts';
import { preparationRecords } from '../preparations/record.ts';
import { connectivityOf } from './derive-identity.ts';
import { countDoubts } from './doubts.ts';
import { formulaCautions } from './formula-cautions.ts';
import { summaries } from './summary.ts';

/** A complex in full, as this asker gets it. */
export async function complexRecord(access: ComplexAccess): Promise<ComplexRecord> {
  const { asker, complex, alias } = access;
  const { db } = await database();
  const [[summary], prepared, siblings, history, [downloadable], doubts] = await Promise.all([
    summaries(asker, [complex]),
    db
      .select({ preparation: preparations })
      .from(preparations)
      .innerJoin(complexes, eq(complexes.id, preparations.complexId))
      .where(and(eq(preparations.complexId, complex.id), ne(preparations.state, 'withdrawn'), preparationSight(asker)))
      .orderBy(desc(preparations.id)),
    siblingsOf(access),
    historyOf(access),
    db
      .select({ id: complexes.id })
      .from(complexes)
      .where(and(eq(complexes.id, complex.id), complexDownload(asker))),
    countDoubts(access),
  ]);
  const member = seesAsMember(asker, complex);
  return {
    ...summary!,
    ...(alias ? { mergedInto: complex.accession } : {}),
    notes: member ? complex.notes : null,
    withdrawnReason: complex.withdrawnReason,
    cautions: formulaCautions(complex.formula, complex.answers),
    doubts,
    evidence: [],
    preparations: await preparationRecords(
      asker,
      prepared.map(({ preparation }) => preparation),
    ),
    history,
    siblings,
    may: {
      change: canChangeComplex(asker, complex),
      addSpectrum: member && asker.scopes.has('write') && complex.state !== 'withdrawn',
      download: downloadable !== undefined,
    },
  };
}

/** Other stereoisomers of the same connectivity, as far as the asker sees. */
async function siblingsOf({ asker, complex }: ComplexAccess): Promise<ComplexRecord['siblings']> {
  const { db } = await database();
  const rows = await db
    .select({
      accession: complexes.accession,
      descriptor: complexes.descriptor,
      chirality: complexes.chirality,
      identityKey: complexes.identityKey,
    })
    .from(complexes)
    .where(
      and(
        eq(complexes.hill, complex.hill),
        eq(complexes.charge, complex.charge),
        ne(complexes.id, complex.id),
        complexSight(asker),
      ),
    )
    .orderBy(asc(complexes.accession))
    .limit(20);
  return rows
    .filter((row) => connectivityOf(row.identityKey) === connectivityOf(complex.identityKey))
    .map(({ accession, descriptor, chirality }) => ({ accession, descriptor, chirality }));
}

/**
 * What happened to the record. Guests see no names and no inner remarks: only that it was registered or changed, and
 * when; that another record went into it is nothing of theirs. What happened to that other record the steward alone
 * sees, since it may have been one lab's own.
 */
async function historyOf({ asker, complex }: ComplexAccess): Promise<ComplexRecord['history']> {
  const { db } = await database();
  const member = seesAsMember(asker, complex);
  const own = eq(trail.subjectId, complex.id);
  const mergedHere = db.select({ id: complexes.id }).from(complexes).where(eq(complexes.mergedInto, complex.accession));
  const subject = asker.steward ? or(own, inArray(trail.subjectId, mergedHere)) : own;
  const rows = await db
    .select({ at: trail.at, action: trail.action, detail: trail.detail, who: accounts.name, of: complexes.accession })
    .from(trail)
    .leftJoin(accounts, eq(accounts.id, trail.actorId))
    .leftJoin(complexes, eq(complexes.id, trail.subjectId))
    .where(and(eq(trail.subjectType, 'complex'), subject, member ? undefined : ne(trail.action, 'take-in')))
    .orderBy(desc(trail.seq))
    .limit(100);
  return rows.map(({ of, at, action, detail, who }) => {
    if (!member) return { at, action, who: null, detail: {} };
    return { at, action, who, detail: of === complex.accession ? detail : { ...detail, of } };
  });
}
