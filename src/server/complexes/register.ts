import { and, eq, isNull, ne, not, or } from 'drizzle-orm';
import type { ComplexInput } from '../../contracts/complexes.ts';
import { isUniqueViolation, type Tx } from '../../db/client.ts';
import { centres, complexes, complexLigands, ligandSites, mergeTasks } from '../../db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import { requireLab } from '../access/records.ts';
import { complexSight } from '../access/sight.ts';
import { nextAccession } from '../accession.ts';
import { database } from '../database.ts';
import { HttpError } from '../http.ts';
import { newId, nowIso } from '../ids.ts';
import { notifyMentions } from '../mentions/notify.ts';
import { record } from '../trail.ts';
import { deriveIdentity, groundTermOf, type Identity } from './derive-identity.ts';

/** The columns of a complex that follow from its identity. */
export function identityColumns(identity: Identity) {
  const { entity, isomer } = identity;
  return {
    identityKey: identity.key,
    formula: entity.entity,
    charge: identity.charge,
    hill: entity.hill,
    composition: entity.composition,
    molarMass: entity.molarMass,
    descriptor: identity.descriptor,
    chirality: identity.chirality,
    sites: isomer?.sites ?? null,
    chelates: isomer?.chelates ?? null,
    pointGroup: isomer?.pointGroup ?? null,
    donorSetGroup: isomer?.donorSetGroup ?? null,
  };
}

const searchText = (accession: string, { entity, reading, descriptor }: Identity) =>
  [
    accession,
    entity.entity,
    descriptor,
    entity.hill,
    reading.formula,
    ...entity.ligands.flatMap((l) => [l.abbreviation, l.name]),
    ...entity.centres.map((c) => c.element),
  ]
    .filter(Boolean)
    .join(' ')
    .toLowerCase();

/** Write the rows that hang on an identity: centres, ligands and who sits where. */
export async function insertParts(tx: Tx, complexId: string, identity: Identity): Promise<void> {
  const { entity, geometries, spinStates, isomer } = identity;
  await tx.insert(centres).values(
    entity.centres.map((centre, ordinal) => {
      const geometry = geometries[ordinal] ?? null;
      const spinState = (spinStates[ordinal] ?? null) as (typeof centres.$inferInsert)['spinState'];
      const term = groundTermOf(centre.dCount, geometry, spinState ?? null);
      return {
        complexId,
        ordinal,
        element: centre.element,
        group: centre.group,
        oxidationState: centre.oxidationState,
        nominal: centre.nominal,
        alternatives: centre.alternatives,
        dCount: centre.dCount,
        coordinationNumber: entity.centres.length === 1 ? entity.coordinationNumber : null,
        geometry,
        geometryBasis: geometry === null ? ('unknown' as const) : ('assumed' as const),
        spinState,
        groundTerm: term?.label ?? null,
        groundTermGroup: term?.group ?? null,
      };
    }),
  );
  if (entity.ligands.length === 0) return;
  const sorted = [...entity.ligands].sort((a, b) => (a.abbreviation < b.abbreviation ? -1 : 1));
  await tx.insert(complexLigands).values(
    sorted.map((ligand, ordinal) => ({
      complexId,
      ordinal,
      abbreviation: ligand.abbreviation,
      count: ligand.count,
      charge: ligand.charge,
      denticity: ligand.denticity,
      hapticity: ligand.hapticity,
      donors: ligand.donors,
      bridging: ligand.bridging,
    })),
  );
  if (isomer) await tx.insert(ligandSites).values(siteRows(complexId, sorted, isomer));
}

/** Which donor of which ligand stands at each vertex. Ligands are numbered through the request, kind by kind. */
function siteRows(complexId: string, sorted: Identity['entity']['ligands'], isomer: NonNullable<Identity['isomer']>) {
  const instances = sorted.flatMap((ligand, ligandOrdinal) =>
    Array.from({ length: ligand.count }, (_, instance) => ({ ligandOrdinal, instance })),
  );
  const placed = new Map<number, number>();
  return isomer.ligandOfSite.map((number, vertex) => {
    const donor = placed.get(number) ?? 0;
    placed.set(number, donor + 1);
    const { ligandOrdinal, instance } = instances[number] ?? { ligandOrdinal: 0, instance: number };
    return { complexId, centreOrdinal: 0, vertex, ligandOrdinal, instance, donor };
  });
}

/** The record of the same identity, if there is one in the asker's sight. */
export async function duplicateInSight(tx: Tx, asker: Asker, key: string, except?: string) {
  const [found] = await tx
    .select({ accession: complexes.accession })
    .from(complexes)
    .where(and(eq(complexes.identityKey, key), complexSight(asker), except ? ne(complexes.id, except) : undefined))
    .limit(1);
  return found?.accession ?? null;
}

export const duplicate = (accession: string) =>
  new HttpError(409, `This complex is registered as ${accession}`, { members: { accession } });

/** Records of the same identity that the asker may not know of become a task for the steward; nothing is told. */
export async function noteHiddenDuplicates(tx: Tx, asker: Asker, complexId: string, key: string): Promise<void> {
  const hidden = await tx
    .select({ id: complexes.id })
    .from(complexes)
    .where(
      and(
        eq(complexes.identityKey, key),
        ne(complexes.id, complexId),
        eq(complexes.state, 'registered'),
        isNull(complexes.mergedInto),
        not(complexSight(asker)),
      ),
    );
  for (const { id } of hidden) {
    const [known] = await tx
      .select({ id: mergeTasks.id })
      .from(mergeTasks)
      .where(
        or(
          and(eq(mergeTasks.firstId, id), eq(mergeTasks.secondId, complexId)),
          and(eq(mergeTasks.firstId, complexId), eq(mergeTasks.secondId, id)),
        ),
      )
      .limit(1);
    if (!known)
      await tx.insert(mergeTasks).values({ id: newId(), firstId: id, secondId: complexId, createdAt: nowIso() });
  }
}

/**
 * Register a complex, or keep it as a draft.
 *
 * @returns its accession
 * @throws {HttpError} 403 for a lab that is not the asker's, 409 for an identity in the asker's sight, 422
 */
export async function registerComplex(asker: Asker, input: ComplexInput): Promise<string> {
  requireLab(asker, input.lab);
  const identity = deriveIdentity(input);
  const { write } = await database();
  const id = newId();
  try {
    return await write(async (tx) => {
      const existing = await duplicateInSight(tx, asker, identity.key);
      if (existing) throw duplicate(existing);
      const { number, accession } = await nextAccession(tx);
      const now = nowIso();
      const state = input.state ?? 'registered';
      await tx.insert(complexes).values({
        id,
        number,
        accession,
        ...identityColumns(identity),
        labId: input.lab,
        makerId: asker.accountId,
        state,
        visibility: input.visibility ?? 'programme',
        notes: input.notes ?? null,
        answers: input.answers ?? {},
        search: searchText(accession, identity),
        createdAt: now,
        updatedAt: now,
      });
      await insertParts(tx, id, identity);
      await noteHiddenDuplicates(tx, asker, id, identity.key);
      await record(tx, asker, {
        action: state === 'draft' ? 'draft' : 'register',
        subjectType: 'complex',
        subjectId: id,
        detail: { accession, typed: input.formula },
      });
      await notifyMentions(tx, asker, { text: input.notes, subject: { type: 'complex', id } });
      return accession;
    });
  } catch (error) {
    // Two registrations of one identity at the same moment: the index let one through.
    if (isUniqueViolation(error))
      throw new HttpError(409, 'This complex was registered just now: look for it in the table');
    throw error;
  }
}
