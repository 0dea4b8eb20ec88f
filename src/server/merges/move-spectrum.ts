import { and, eq, inArray, ne } from 'drizzle-orm';
import type { SpectrumMove } from '#src/contracts/merges.ts';
import type { Tx } from '#src/db/client.ts';
import { bands, complexes, preparationComponents, spectra, spectrumSpecies } from '#src/db/schema/index.ts';
import type { SpectrumMoveAccess } from '../access/merges.ts';
import { seeComplex, seePreparation } from '../access/records.ts';
import { spectrumSight } from '../access/sight.ts';
import { database } from '../database.ts';
import { HttpError } from '../http.ts';
import { nowIso } from '../ids.ts';
import { takeVersion } from '../spectra/change.ts';
import { refuse } from '../spectra/refuse.ts';
import { record } from '../trail.ts';
import { centrePlaces } from './centre-places.ts';
import { moveBetweenItems } from './folio-items.ts';
import { embargoInForce, visibilityUnder } from './sight-kept.ts';

type Complex = typeof complexes.$inferSelect;
const REOPENED = 'Reopened: the spectrum was moved to another complex';

/**
 * Move a spectrum to the complex or isomer that was measured. What was judged of its bands was judged of another
 * identity, and is proposed again. Nothing comes into the sight of anybody who could not see it before.
 *
 * @throws {HttpError} 409 where it cannot go there as things stand, 412 when it changed meanwhile, 422
 */
export async function moveSpectrum(access: SpectrumMoveAccess, move: SpectrumMove): Promise<void> {
  const { asker, complex: from, spectrum } = access;
  const into = await target(access, move.complex);
  const visibility = keepSight(access, into);
  const preparationId = await preparationUnder(access, into, move.preparation);
  const { write } = await database();
  await write(async (tx) => {
    await refuseDuplicate(tx, access, into);
    const idsOf = async (complexId: string) =>
      (await tx.select({ id: spectra.id }).from(spectra).where(eq(spectra.complexId, complexId))).map(({ id }) => id);
    const detail = { from: from.accession, into: into.accession, reason: move.reason };
    await moveBetweenItems(tx, asker, {
      spectrum: spectrum.id,
      from: { id: from.id, spectra: await idsOf(from.id) },
      into: { id: into.id, spectra: await idsOf(into.id) },
      wasShared: from.state === 'registered',
      detail: { ...detail, spectrum: spectrum.id },
    });
    await takeVersion(tx, spectrum, { complexId: into.id, preparationId, visibility });
    await moveSpecies(tx, spectrum.id, from.id, into.id);
    const reopened = await reopenBands(tx, spectrum.id, await centrePlaces(tx, from.id, into.id));
    await record(tx, asker, {
      action: 'move',
      subjectType: 'spectrum',
      subjectId: spectrum.id,
      detail: {
        ...detail,
        ...(visibility === spectrum.visibility ? {} : { visibility }),
        ...(preparationId === spectrum.preparationId ? {} : { preparationBefore: spectrum.preparationId }),
        ...(reopened.length > 0 ? { reopened } : {}),
      },
    });
    for (const id of reopened)
      await record(tx, asker, {
        action: 'reopen',
        subjectType: 'band',
        subjectId: id,
        detail: { reason: REOPENED, spectrum: spectrum.id },
      });
  });
}

async function orRefuse<T>(seen: Promise<T>, pointer: string, what: string): Promise<T> {
  return seen.catch((error: unknown) => {
    if (error instanceof HttpError && error.status === 404)
      throw refuse(pointer, `There is no such ${what} in your sight`);
    throw error;
  });
}

async function target({ asker, complex, spectrum }: SpectrumMoveAccess, accession: string): Promise<Complex> {
  if (spectrum.state === 'withdrawn') throw new HttpError(409, 'This spectrum is withdrawn: it stays where it is');
  const { complex: into } = await orRefuse(seeComplex(asker, accession), '#/complex', 'complex');
  if (into.id === complex.id) throw refuse('#/complex', 'It is on this complex already');
  if (into.state !== 'registered')
    throw new HttpError(409, `${into.accession} is ${into.state}: nothing is moved to it`);
  return into;
}

/** @returns the visibility under which nobody new sees it @throws {HttpError} 409 where there is none */
function keepSight({ complex: from, spectrum }: SpectrumMoveAccess, into: Complex) {
  const now = nowIso();
  if (embargoInForce(from, now) > embargoInForce(into, now))
    throw new HttpError(409, `${from.accession} is under an embargo that ${into.accession} is not under`);
  const visibility = visibilityUnder(spectrum, from, into);
  if (visibility === null || (from.state === 'draft' && from.labId !== spectrum.labId))
    throw new HttpError(409, `People who cannot see it on ${from.accession} would see it on ${into.accession}`);
  return visibility;
}

/** The preparation told, or the present one where it holds the new complex, too. */
async function preparationUnder({ asker, spectrum }: SpectrumMoveAccess, into: Complex, told?: string | null) {
  if (told === null) return null;
  const id = told ?? spectrum.preparationId;
  if (id === null) return null;
  const { db } = await database();
  const [part] = await db
    .select({ id: preparationComponents.preparationId })
    .from(preparationComponents)
    .where(and(eq(preparationComponents.preparationId, id), eq(preparationComponents.complexId, into.id)));
  if (told === undefined) return part ? id : null;
  const { preparation } = await orRefuse(seePreparation(asker, told), '#/preparation', 'preparation');
  if (!part && preparation.complexId !== into.id)
    throw refuse('#/preparation', 'This preparation is not one of that complex');
  return preparation.id;
}

async function refuseDuplicate(tx: Tx, { asker, spectrum }: SpectrumMoveAccess, into: Complex): Promise<void> {
  const [twin] = await tx
    .select({ id: spectra.id })
    .from(spectra)
    .innerJoin(complexes, eq(complexes.id, spectra.complexId))
    .where(
      and(
        eq(spectra.complexId, into.id),
        eq(spectra.fileSha256, spectrum.fileSha256),
        eq(spectra.block, spectrum.block),
        eq(spectra.column, spectrum.column),
        spectrumSight(asker),
      ),
    )
    .limit(1);
  if (twin)
    throw new HttpError(409, 'This spectrum of this file is on that complex already', { members: { id: twin.id } });
}

/** The species that was the old complex is the new one; a mixture that names both stays as it is. */
async function moveSpecies(tx: Tx, spectrumId: string, fromId: string, intoId: string): Promise<void> {
  const rows = await tx
    .select({ id: spectrumSpecies.complexId })
    .from(spectrumSpecies)
    .where(and(eq(spectrumSpecies.spectrumId, spectrumId), inArray(spectrumSpecies.complexId, [fromId, intoId])));
  if (rows.some(({ id }) => id === intoId)) return;
  await tx
    .update(spectrumSpecies)
    .set({ complexId: intoId })
    .where(and(eq(spectrumSpecies.spectrumId, spectrumId), eq(spectrumSpecies.complexId, fromId)));
}

/** @returns ids of the bands that had been judged */
async function reopenBands(tx: Tx, spectrumId: string, placeOf: (ordinal: number) => number | null): Promise<string[]> {
  const rows = await tx.select().from(bands).where(eq(bands.spectrumId, spectrumId));
  for (const { id, centreOrdinal, version } of rows)
    await tx
      .update(bands)
      .set({ centreOrdinal: centreOrdinal === null ? null : placeOf(centreOrdinal), version: version + 1 })
      .where(eq(bands.id, id));
  const reopened = await tx
    .update(bands)
    .set({ state: 'proposed', judgedBy: null, judgedAt: null, judgement: REOPENED })
    .where(and(eq(bands.spectrumId, spectrumId), ne(bands.state, 'proposed')))
    .returning({ id: bands.id });
  return reopened.map(({ id }) => id);
}
