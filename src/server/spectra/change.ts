import { and, asc, eq } from 'drizzle-orm';
import type { XUnit, YUnit } from '#src/chem/spectra/index.ts';
import type { SpectrumPatch } from '#src/contracts/spectra.ts';
import type { Tx } from '#src/db/client.ts';
import { bands, spectra, spectrumPoints, spectrumSolvents, spectrumSpecies } from '#src/db/schema/index.ts';
import { leads, type SpectrumChange } from '#src/server/access/records.ts';
import { database } from '#src/server/database.ts';
import { HttpError } from '#src/server/http.ts';
import { nowIso } from '#src/server/ids.ts';
import { record } from '#src/server/trail.ts';
import { colourOf, flagsOf } from './checks.ts';
import {
  absorbanceLimitOf,
  conditionColumns,
  replaceParts,
  requireInstrument,
  solventShares,
  speciesRows,
} from './conditions.ts';
import { bandContext, deriveBand, rebaseHeight, storedQuantity, storedValues } from './quantities.ts';
import { refuse } from './refuse.ts';
import { speciesCount } from './species-count.ts';
import { ascendingOrder, loadCurve, loadFilePoints, pack } from './stored-points.ts';

type Spectrum = typeof spectra.$inferSelect;

/**
 * Mend conditions, register a draft, withdraw or take a withdrawal back. What follows from the conditions follows
 * again: flags, colour, ε of the bands. A band whose ε changed has to be judged again.
 *
 * @throws {HttpError} 412 when somebody changed it meanwhile, 403, 422
 */
export async function changeSpectrum(access: SpectrumChange, patch: SpectrumPatch): Promise<void> {
  const { asker, spectrum } = access;
  const state = stateColumns(access, patch);
  const columns = conditionColumns(patch);
  const solvents = solventShares(patch.solvent);
  const species = await speciesRows(asker, patch.species, spectrum.complexId);
  await requireInstrument(patch.instrument);
  const next: Spectrum = { ...spectrum, ...columns };
  const absorbanceLimit = await absorbanceLimitOf(next.instrumentId);

  const { write } = await database();
  await write(async (tx) => {
    const before = bandContext(spectrum, await speciesCount(spectrum.id, tx));
    await takeVersion(tx, spectrum, { ...columns, ...state });
    await replaceParts(tx, spectrum.id, { solvents, species });
    const curve = await curveUnder(tx, spectrum, next.technique);
    const checked = {
      ...next,
      yUnit: next.yUnit as YUnit,
      solvents: await solventRows(tx, spectrum.id),
      absorbanceLimit,
    };
    await tx
      .update(spectra)
      .set({ flags: flagsOf(curve, checked), colour: colourOf(curve, checked) })
      .where(eq(spectra.id, spectrum.id));
    const after = bandContext(next, await speciesCount(spectrum.id, tx));
    const reopened = await deriveBandsAgain(tx, next, before, after);
    await record(tx, asker, {
      action: actionOf(spectrum, patch),
      subjectType: 'spectrum',
      subjectId: spectrum.id,
      detail: { ...patch, ...(reopened.length > 0 ? { reopened } : {}) },
    });
    for (const bandId of reopened)
      await record(tx, asker, {
        action: 'reopen',
        subjectType: 'band',
        subjectId: bandId,
        detail: { reason: REOPENED, spectrum: spectrum.id },
      });
  });
}

const REOPENED = 'Reopened: ε changed with the conditions of the spectrum';

function actionOf(spectrum: Spectrum, { state }: SpectrumPatch): string {
  if (!state || state === spectrum.state) return 'change';
  return state === 'withdrawn' ? 'withdraw' : 'register';
}

function stateColumns(
  { asker, spectrum }: SpectrumChange,
  { state, withdrawnReason }: SpectrumPatch,
): Partial<Spectrum> {
  if (!state || state === spectrum.state) return {};
  if (state === 'draft') throw refuse('#/state', 'A registered spectrum does not become a draft again: withdraw it');
  if (state === 'withdrawn') {
    if (spectrum.state === 'draft') throw refuse('#/state', 'A draft is deleted, not withdrawn');
    if (!withdrawnReason) throw refuse('#/withdrawnReason', 'Say why it is withdrawn');
    return { state, withdrawnReason };
  }
  if (spectrum.state === 'withdrawn' && !leads(asker, spectrum.labId))
    throw new HttpError(403, 'A lead of the measuring lab or a steward may take a withdrawal back');
  return { state, withdrawnReason: null };
}

/** Raise the version, if it is still the one that was read. @throws {HttpError} 412 */
export async function takeVersion(tx: Tx, { id, version }: Spectrum, columns: Partial<Spectrum> = {}): Promise<void> {
  const changed = await tx
    .update(spectra)
    .set({ ...columns, version: version + 1, updatedAt: nowIso() })
    .where(and(eq(spectra.id, id), eq(spectra.version, version)))
    .returning({ id: spectra.id });
  if (changed.length === 0) throw new HttpError(412, 'Somebody changed it meanwhile: read it again and repeat');
}

/** The ascending copy as the technique wants it; written anew where another technique means another quantity. */
async function curveUnder(tx: Tx, spectrum: Spectrum, technique: Spectrum['technique']) {
  const yUnit = spectrum.yUnit as YUnit;
  if (storedQuantity(technique, yUnit) === storedQuantity(spectrum.technique, yUnit)) return loadCurve(tx, spectrum.id);
  const file = await loadFilePoints(tx, spectrum.id);
  const { wavenumber, order } = ascendingOrder(file.x, spectrum.xUnit as XUnit);
  const inFileOrder = storedValues(file.y, technique, yUnit);
  const value = order.map((place) => inFileOrder[place]!);
  await tx
    .update(spectrumPoints)
    .set({ value: pack(value) })
    .where(eq(spectrumPoints.spectrumId, spectrum.id));
  return { x: wavenumber, value };
}

const solventRows = (tx: Tx, spectrumId: string) =>
  tx
    .select({ name: spectrumSolvents.name, volumeFraction: spectrumSolvents.volumeFraction })
    .from(spectrumSolvents)
    .where(eq(spectrumSolvents.spectrumId, spectrumId))
    .orderBy(asc(spectrumSolvents.ordinal));

/** @returns ids of the bands that had been judged and are proposed again */
async function deriveBandsAgain(
  tx: Tx,
  next: Spectrum,
  before: ReturnType<typeof bandContext>,
  after: ReturnType<typeof bandContext>,
): Promise<string[]> {
  const reopened: string[] = [];
  const stored = storedQuantity(next.technique, next.yUnit as YUnit);
  for (const band of await tx.select().from(bands).where(eq(bands.spectrumId, next.id))) {
    const height = rebaseHeight(band, stored, before.cell, after.cell);
    const derived = deriveBand({ ...band, ...height }, after);
    const moved = derived.epsilon !== band.epsilon;
    if (!moved && derived.uncertainty === band.uncertainty) continue;
    const judged = moved && band.state !== 'proposed';
    if (judged) reopened.push(band.id);
    await tx
      .update(bands)
      .set({
        ...height,
        ...derived,
        version: band.version + 1,
        ...(judged ? { state: 'proposed', judgedBy: null, judgedAt: null, judgement: REOPENED } : {}),
      })
      .where(eq(bands.id, band.id));
  }
  return reopened;
}

/**
 * Delete a draft with its points and bands. Its original stays in the store: it is known by content, and another
 * spectrum may be read from the same file.
 *
 * @throws {HttpError} 409 for what is no draft, 412
 */
export async function deleteDraft({ asker, spectrum }: SpectrumChange): Promise<void> {
  if (spectrum.state !== 'draft')
    throw new HttpError(409, 'Only a draft can be deleted: withdraw a registered spectrum');
  const { write } = await database();
  await write(async (tx) => {
    await takeVersion(tx, spectrum);
    for (const table of [bands, spectrumPoints, spectrumSolvents, spectrumSpecies])
      await tx.delete(table).where(eq(table.spectrumId, spectrum.id));
    await tx.delete(spectra).where(eq(spectra.id, spectrum.id));
    await record(tx, asker, {
      action: 'delete-draft',
      subjectType: 'spectrum',
      subjectId: spectrum.id,
      detail: { sha256: spectrum.fileSha256, block: spectrum.block, column: spectrum.column },
    });
  });
}
