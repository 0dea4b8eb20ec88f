import { and, eq, inArray } from 'drizzle-orm';
import type { SpectrumMetadata, SpectrumPatch } from '#src/contracts/spectra.ts';
import type { Tx } from '#src/db/client.ts';
import { complexes, instruments, type spectra, spectrumSolvents, spectrumSpecies } from '#src/db/schema/index.ts';
import type { Asker } from '#src/server/access/asker.ts';
import { complexSight } from '#src/server/access/sight.ts';
import { livingAccessions } from '#src/server/complexes/alias.ts';
import { database } from '#src/server/database.ts';
import { refuse } from './refuse.ts';

/** Conditions as they come with an upload or as a patch: what is undefined is left alone, null clears. */
export type Conditions = Omit<SpectrumPatch, 'state' | 'withdrawnReason'>;
type Columns = Partial<typeof spectra.$inferInsert>;
export type SolventShare = { name: string; volumeFraction: number };
export type SpeciesRow = { complexId: string; fraction: number | null; basis: string };

const PLAIN = [
  'technique',
  'phase',
  'concentration',
  'weighing',
  'pathLength',
  'temperature',
  'bandwidth',
  'cell',
  'polarisation',
  'operator',
  'measuredAt',
  'title',
  'notes',
  'visibility',
] as const;
const MEDIUM = ['pH', 'ionicStrength', 'electrolyte', 'atmosphere', 'age'] as const;
const NEEDED = ['technique', 'title', 'visibility'] as const;
/** Volumes before mixing need not add up to the last digit. */
const SHARE_SLACK = 0.02;

/**
 * The columns that conditions fill. Uncertainties are stored as standard ones: what came with k is divided by it.
 *
 * @throws {HttpError} 422 where null would clear what every spectrum has
 */
export function conditionColumns(given: Conditions): Columns {
  for (const name of NEEDED)
    if (given[name] === null) throw refuse(`#/${name}`, `Every spectrum has a ${name}: it cannot be cleared`);
  const columns: Record<string, unknown> = {};
  for (const name of PLAIN) if (given[name] !== undefined) columns[name] = given[name];
  const { medium, instrument } = given;
  if (medium !== undefined)
    for (const name of MEDIUM) {
      const value = medium === null ? null : medium[name];
      if (value !== undefined) columns[name] = value;
    }
  for (const name of ['concentrationUncertainty', 'pathLengthUncertainty'] as const) {
    const value = given[name];
    if (value !== undefined) columns[name] = value === null ? null : value / (given.k ?? 1);
  }
  if (instrument !== undefined) columns.instrumentId = instrument;
  return columns as Columns;
}

/**
 * The solvent or the parts of a mixture, largest share first; undefined where nothing was told.
 *
 * @throws {HttpError} 422 when the shares do not add up to 1
 */
export function solventShares(given: SpectrumMetadata['solvent'] | null): SolventShare[] | undefined {
  if (given === undefined) return undefined;
  if (given === null) return [];
  if (typeof given === 'string') return [{ name: given, volumeFraction: 1 }];
  const sum = given.reduce((total, { volumeFraction }) => total + volumeFraction, 0);
  if (Math.abs(sum - 1) > SHARE_SLACK)
    throw refuse('#/solvent', `The volume fractions add up to ${Number(sum.toPrecision(4))}, not to 1`);
  return [...given].sort((a, b) => b.volumeFraction - a.volumeFraction);
}

/**
 * What absorbs: the complex alone unless told otherwise.
 *
 * @returns undefined where nothing was told
 * @throws {HttpError} 422 for an accession out of the asker's sight, one named twice, or a list without the complex
 */
export async function speciesRows(
  asker: Asker,
  given: SpectrumMetadata['species'] | null,
  complexId: string,
): Promise<SpeciesRow[] | undefined> {
  if (given === undefined) return undefined;
  if (given === null) return [{ complexId, fraction: null, basis: 'declared' }];
  const { db } = await database();
  const told = given.map(({ accession }) => accession);
  const accessions = told.map(await livingAccessions(db, told));
  const found = await db
    .select({ id: complexes.id, accession: complexes.accession })
    .from(complexes)
    .where(and(inArray(complexes.accession, accessions), complexSight(asker)));
  const rows = given.map(({ fraction, basis }, i) => {
    const complex = found.find((row) => row.accession === accessions[i]);
    if (!complex) throw refuse(`#/species/${i}/accession`, 'There is no such complex in your sight');
    return { complexId: complex.id, fraction: fraction ?? null, basis };
  });
  if (new Set(accessions).size < accessions.length) throw refuse('#/species', 'A species is named twice');
  if (!rows.some((row) => row.complexId === complexId))
    throw refuse('#/species', 'The complex of the spectrum is not among its species');
  return rows;
}

/** @throws {HttpError} 422 when there is no such instrument */
export async function requireInstrument(id: string | null | undefined): Promise<void> {
  if (!id) return;
  const { db } = await database();
  const [row] = await db.select({ id: instruments.id }).from(instruments).where(eq(instruments.id, id));
  if (!row) throw refuse('#/instrument', 'There is no such instrument');
}

/** Highest absorbance that the lab trusts on an instrument; null where none is named or it has none. */
export async function absorbanceLimitOf(instrumentId: string | null | undefined): Promise<number | null> {
  if (!instrumentId) return null;
  const { db } = await database();
  const [row] = await db
    .select({ limit: instruments.absorbanceLimit })
    .from(instruments)
    .where(eq(instruments.id, instrumentId));
  return row?.limit ?? null;
}

/** Put solvents and species in the place of those that stand; undefined leaves them. */
export async function replaceParts(
  tx: Tx,
  spectrumId: string,
  { solvents, species }: { solvents: SolventShare[] | undefined; species: SpeciesRow[] | undefined },
): Promise<void> {
  if (solvents) {
    await tx.delete(spectrumSolvents).where(eq(spectrumSolvents.spectrumId, spectrumId));
    if (solvents.length > 0)
      await tx.insert(spectrumSolvents).values(solvents.map((share, ordinal) => ({ spectrumId, ordinal, ...share })));
  }
  if (species) {
    await tx.delete(spectrumSpecies).where(eq(spectrumSpecies.spectrumId, spectrumId));
    await tx.insert(spectrumSpecies).values(species.map((row) => ({ spectrumId, ...row })));
  }
}
