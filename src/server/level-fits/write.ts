import { and, eq, inArray, isNull } from 'drizzle-orm';
import type { LevelFitInput } from '../../contracts/level-fits.ts';
import { bands, centres, complexes, levelFits, spectra } from '../../db/schema/index.ts';
import type { LevelFitChange } from '../access/level-fits.ts';
import { type ComplexAccess, requireMemberSight } from '../access/records.ts';
import { bandSight } from '../access/sight.ts';
import { database } from '../database.ts';
import { HttpError } from '../http.ts';
import { newId, nowIso } from '../ids.ts';
import { record } from '../trail.ts';
import { VERSION } from '../version.ts';
import { runInWorker } from '../worker-pool.ts';

/** cm⁻¹ by which a wavenumber may miss the band it names: it may have been rounded for the screen. */
const ROUNDING = 0.5;

const refuse = (pointer: string, detail: string): never => {
  throw new HttpError(422, detail, { errors: [{ pointer, detail }] });
};

/**
 * Save a fit of one centre: computed again from its input, so that what is stored is what this release answers.
 *
 * @returns its id
 * @throws {HttpError} 403 for who sees the complex as a guest, 409 for a withdrawn one, 422
 */
export async function saveLevelFit(
  { asker, complex }: ComplexAccess,
  { centre, input, candidate, note, visibility }: LevelFitInput,
  signal: AbortSignal,
): Promise<string> {
  requireMemberSight(asker, complex);
  if (complex.state === 'withdrawn') throw new HttpError(409, 'The complex is withdrawn');
  await requireCentre(complex.id, centre, input);
  const placed = await placeBands({ asker, complex }, input.bands);
  const plain = { ...input, bands: input.bands.map(({ band: _, ...rest }) => rest) };
  const { candidates } = await runInWorker('fit', plain, { field: 'bands', signal });
  const result = candidates[candidate];
  if (!result)
    return refuse('#/candidate', `These bands give ${candidates.length} candidates; there is no number ${candidate}`);
  const { write } = await database();
  const id = newId();
  await write(async (tx) => {
    await tx.insert(levelFits).values({
      id,
      complexId: complex.id,
      centreOrdinal: centre,
      makerId: asker.accountId,
      input: { ...input, bands: placed },
      result: { ...result },
      release: VERSION,
      note: note || null,
      visibility: visibility ?? (complex.visibility === 'lab' ? 'lab' : 'programme'),
      createdAt: nowIso(),
    });
    await record(tx, asker, {
      action: 'save-fit',
      subjectType: 'complex',
      subjectId: complex.id,
      detail: { fit: id, centre, bands: placed.length },
    });
  });
  return id;
}

/** A fit of another ion than the record's would be a fit of another complex. */
async function requireCentre(complexId: string, ordinal: number, { n, metal, oxidationState }: LevelFitInput['input']) {
  const { db } = await database();
  const [centre] = await db
    .select()
    .from(centres)
    .where(and(eq(centres.complexId, complexId), eq(centres.ordinal, ordinal)));
  if (!centre) return refuse('#/centre', `The complex has no centre number ${ordinal}; they count from 0`);
  if (centre.dCount !== null && centre.dCount !== n)
    refuse('#/input/n', `The centre has ${centre.dCount} d electrons, not ${n}`);
  if (metal !== undefined && metal !== centre.element)
    refuse('#/input/metal', `The centre is ${centre.element}, not ${metal}`);
  if (oxidationState !== undefined && centre.oxidationState !== null && centre.oxidationState !== oxidationState)
    refuse('#/input/oxidationState', `The centre has the oxidation state ${centre.oxidationState}`);
}

/** Bands with the spectrum of those that are stored ones: by it, it is judged who sees the fit. */
async function placeBands(
  { asker, complex }: Pick<ComplexAccess, 'asker' | 'complex'>,
  given: LevelFitInput['input']['bands'],
): Promise<(LevelFitInput['input']['bands'][number] & { spectrum?: string })[]> {
  const ids = given.flatMap(({ band }) => (band === undefined ? [] : [band]));
  const { db } = await database();
  const rows = ids.length
    ? await db
        .select({ id: bands.id, spectrum: bands.spectrumId, wavenumber: bands.wavenumber })
        .from(bands)
        .innerJoin(spectra, eq(spectra.id, bands.spectrumId))
        .innerJoin(complexes, eq(complexes.id, spectra.complexId))
        .where(and(inArray(bands.id, ids), eq(spectra.complexId, complex.id), bandSight(asker)))
    : [];
  const known = new Map(rows.map((row) => [row.id, row]));
  return given.map((each, i) => {
    if (each.band === undefined) return each;
    const found = known.get(each.band);
    if (!found) return refuse(`#/input/bands/${i}/band`, 'There is no such band of this complex in your sight');
    if (Math.abs(found.wavenumber - each.wavenumber) > ROUNDING)
      return refuse(`#/input/bands/${i}/wavenumber`, `The band named stands at ${found.wavenumber} cm⁻¹`);
    return { ...each, spectrum: found.spectrum };
  });
}

/** Take a fit out of sight; it stays stored. */
export async function withdrawLevelFit({ asker, complex, fit }: LevelFitChange): Promise<void> {
  const { write } = await database();
  await write(async (tx) => {
    const done = await tx
      .update(levelFits)
      .set({ withdrawnAt: nowIso() })
      .where(and(eq(levelFits.id, fit.id), isNull(levelFits.withdrawnAt)))
      .returning({ id: levelFits.id });
    if (done.length === 0) return; // somebody else was quicker, and it is as asked
    await record(tx, asker, {
      action: 'withdraw-fit',
      subjectType: 'complex',
      subjectId: complex.id,
      detail: { fit: fit.id },
    });
  });
}
