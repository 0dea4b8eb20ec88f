import { and, eq } from 'drizzle-orm';
import { normaliseAccession } from '#src/contracts/accession.ts';
import type { SpectrumMetadata } from '#src/contracts/spectra.ts';
import { type complexes, labs, preparationComponents, type preparations } from '#src/db/schema/index.ts';
import type { Asker } from '#src/server/access/asker.ts';
import { requireLab, requireMemberSight, seeComplex, seePreparation } from '#src/server/access/records.ts';
import { database } from '#src/server/database.ts';
import { HttpError } from '#src/server/http.ts';
import { requireInstrument, type SpeciesRow, speciesRows } from './conditions.ts';
import { refuse } from './refuse.ts';

/** Where an upload goes: everything it names, found in the asker's sight. */
export interface UploadTarget {
  asker: Asker;
  complex: typeof complexes.$inferSelect;
  preparationId: string | null;
  labId: string;
  species: SpeciesRow[];
}

/**
 * Find what the metadata names.
 *
 * @throws {HttpError} 422 for what is not in the asker's sight or does not fit together, 403 for a lab not the asker's
 */
export async function resolveTarget(asker: Asker, metadata: SpectrumMetadata): Promise<UploadTarget> {
  const labId = await measuringLab(asker, metadata.lab);
  const preparation = metadata.preparation
    ? (await orRefuse(seePreparation(asker, metadata.preparation), '#/preparation', 'preparation')).preparation
    : null;
  const complex = await targetComplex(asker, metadata, preparation);
  requireMemberSight(asker, complex);
  if (complex.state === 'withdrawn') throw refuse('#/complex', 'This complex is withdrawn: nothing is added to it');
  await requireInstrument(metadata.instrument);
  const species = await speciesRows(asker, metadata.species ?? null, complex.id);
  return { asker, complex, preparationId: preparation?.id ?? null, labId, species: species! };
}

type Preparation = typeof preparations.$inferSelect;

async function targetComplex(
  asker: Asker,
  { complex, ...metadata }: SpectrumMetadata,
  preparation: Preparation | null,
) {
  if (complex === undefined) return (await seePreparation(asker, metadata.preparation!)).complex;
  const accession = normaliseAccession(complex) ?? complex;
  const found = (await orRefuse(seeComplex(asker, accession), '#/complex', 'complex')).complex;
  if (preparation && preparation.complexId !== found.id && !(await isComponent(preparation.id, found.id)))
    throw refuse('#/preparation', 'This preparation is not one of that complex');
  return found;
}

async function isComponent(preparationId: string, complexId: string): Promise<boolean> {
  const { db } = await database();
  const [row] = await db
    .select({ id: preparationComponents.complexId })
    .from(preparationComponents)
    .where(and(eq(preparationComponents.preparationId, preparationId), eq(preparationComponents.complexId, complexId)));
  return row !== undefined;
}

async function measuringLab(asker: Asker, told: string | undefined): Promise<string> {
  if (told === undefined) {
    const [own, another] = asker.labs.keys();
    if (own === undefined || another !== undefined) throw refuse('#/lab', 'Tell which lab measured');
    return own;
  }
  requireLab(asker, told);
  const { db } = await database();
  const [lab] = await db.select({ id: labs.id }).from(labs).where(eq(labs.id, told));
  if (!lab) throw refuse('#/lab', 'There is no such lab');
  return told;
}

/** What hangs on the body is asked for after the body was read: out of sight is a fault of the body then. */
async function orRefuse<T>(seen: Promise<T>, pointer: string, what: string): Promise<T> {
  try {
    return await seen;
  } catch (error) {
    if (error instanceof HttpError && error.status === 404)
      throw refuse(pointer, `There is no such ${what} in your sight`);
    throw error;
  }
}
