import { and, eq, type SQL } from 'drizzle-orm';
import { normaliseAccession } from '../../contracts/accession.ts';
import { bands, complexes, labs, preparations, spectra } from '../../db/schema/index.ts';
import { livingAccession } from '../complexes/alias.ts';
import { database } from '../database.ts';
import { HttpError, notInSight } from '../http.ts';
import type { Asker } from './asker.ts';
import { bandSight, complexSight, preparationSight, spectrumDownload, spectrumSight } from './sight.ts';

// Proofs of access. Only this folder makes them, and the services ask for one: an endpoint that forgets to ask does
// not compile.

declare const proof: unique symbol;
export interface Access<What extends string> {
  readonly asker: Asker;
  readonly [proof]: What;
}
export interface ComplexAccess extends Access<'see' | 'change'> {
  readonly complex: typeof complexes.$inferSelect;
  /** The accession that was asked for, where that record was merged into this one. */
  readonly alias: string | null;
}
export interface ComplexChange extends ComplexAccess {
  readonly [proof]: 'change';
}
export interface PreparationAccess extends Access<'see' | 'change'> {
  readonly complex: typeof complexes.$inferSelect;
  readonly preparation: typeof preparations.$inferSelect;
}
export interface PreparationChange extends PreparationAccess {
  readonly [proof]: 'change';
}
export interface SpectrumAccess extends Access<'see' | 'take' | 'change' | 'propose'> {
  readonly complex: typeof complexes.$inferSelect;
  readonly spectrum: typeof spectra.$inferSelect;
}
export interface SpectrumTake extends SpectrumAccess {
  readonly [proof]: 'take';
}
export interface SpectrumChange extends SpectrumAccess {
  readonly [proof]: 'change';
}
export interface SpectrumPropose extends SpectrumAccess {
  readonly [proof]: 'propose';
}
export interface BandJudge extends SpectrumAccess {
  readonly band: typeof bands.$inferSelect;
}

/**
 * The accession on a path, in its normal spelling. One that cannot be an accession is like one that nobody has.
 *
 * @throws {HttpError} 404
 */
export function accessionParam(params: Record<string, string>): string {
  const accession = normaliseAccession(params.accession ?? '');
  if (accession === null) throw notInSight();
  return accession;
}

const grant = <T extends object>(access: T) => access as T & { readonly [proof]: never };

/** Whether the asker leads a lab, or is the steward. */
export const leads = (asker: Asker, labId: string): boolean => asker.steward || asker.labs.get(labId) === 'lead';

/** Whether the asker works in a lab, or is the steward. */
export const worksIn = (asker: Asker, labId: string): boolean => asker.steward || asker.labs.has(labId);

/** @throws {HttpError} 403 when the asker has no role in the lab for which something is to be made */
export function requireLab(asker: Asker, labId: string): void {
  if (!worksIn(asker, labId))
    throw new HttpError(403, 'You can only do this for a lab you belong to', {
      errors: [{ pointer: '#/lab', detail: 'Choose one of your own labs' }],
    });
}

type Owned = Pick<typeof spectra.$inferSelect, 'visibility' | 'labId' | 'state' | 'makerId'>;

/**
 * Whether the asker sees a record in sight as a member, and not only since a folio with it was shared with them: who
 * belongs to a lab may be a guest of another lab's folio, and is told of its records what guests are told.
 */
export function seesAsMember(asker: Asker, ...records: Owned[]): boolean {
  const one = ({ visibility, labId, state, makerId }: Owned) =>
    state === 'draft'
      ? makerId === asker.accountId || asker.labs.get(labId) === 'lead'
      : visibility === 'programme' || asker.labs.has(labId);
  return asker.steward || (asker.labs.size > 0 && records.every(one));
}

/** @throws {HttpError} 403 for who sees a complex as a guest only */
export function requireMemberSight(asker: Asker, complex: Owned): void {
  if (!seesAsMember(asker, complex))
    throw new HttpError(403, 'You see this complex as a guest of a folio: guests read only');
}

async function findComplex(condition: SQL | undefined) {
  const { db } = await database();
  const [row] = await db.select().from(complexes).where(condition);
  if (!row) throw notInSight();
  return row;
}

/** A complex in sight, by its accession or by that of a record merged into it. @throws {HttpError} 404 */
export async function seeComplex(asker: Asker, accession: string): Promise<ComplexAccess> {
  const complex = await findComplex(and(eq(complexes.accession, livingAccession(accession)), complexSight(asker)));
  return grant({ asker, complex, alias: complex.accession === accession ? null : accession });
}

/** Its maker may change a draft as long as they work in the lab; a registered one its lab's leads and the steward. */
export const canChangeComplex = (asker: Asker, complex: typeof complexes.$inferSelect): boolean =>
  asker.scopes.has('write') &&
  (leads(asker, complex.labId) ||
    (complex.state === 'draft' && complex.makerId === asker.accountId && worksIn(asker, complex.labId)));

/** @throws {HttpError} 404 not in sight, 403 seen but not to be changed by this asker */
export async function mayChangeComplex(asker: Asker, accession: string): Promise<ComplexChange> {
  const { complex, alias } = await seeComplex(asker, accession);
  if (!canChangeComplex(asker, complex))
    throw new HttpError(403, 'A lead of the home lab or a steward may change a registered complex');
  return grant({ asker, complex, alias });
}

/** A preparation in sight. @throws {HttpError} 404 */
export async function seePreparation(asker: Asker, id: string): Promise<PreparationAccess> {
  const { db } = await database();
  const [row] = await db
    .select()
    .from(preparations)
    .innerJoin(complexes, eq(complexes.id, preparations.complexId))
    .where(and(eq(preparations.id, id), preparationSight(asker)));
  if (!row) throw notInSight();
  return grant({ asker, complex: row.complex, preparation: row.preparation });
}

/** @throws {HttpError} 404, 403 */
export async function mayChangePreparation(asker: Asker, id: string): Promise<PreparationChange> {
  const seen = await seePreparation(asker, id);
  const own = seen.preparation.makerId === asker.accountId && worksIn(asker, seen.preparation.labId);
  if (!own && !leads(asker, seen.preparation.labId))
    throw new HttpError(403, 'Who made a preparation, a lead of that lab or a steward may change it');
  return grant({ asker, complex: seen.complex, preparation: seen.preparation });
}

async function findSpectrum(id: string, sight: SQL) {
  const { db } = await database();
  const [row] = await db
    .select()
    .from(spectra)
    .innerJoin(complexes, eq(complexes.id, spectra.complexId))
    .where(and(eq(spectra.id, id), sight));
  return row;
}

/** A spectrum in sight. @throws {HttpError} 404 */
export async function seeSpectrum(asker: Asker, id: string): Promise<SpectrumAccess> {
  const row = await findSpectrum(id, spectrumSight(asker));
  if (!row) throw notInSight();
  return grant({ asker, complex: row.complex, spectrum: row.spectrum });
}

/** Its file or all its points. @throws {HttpError} 404 not in sight, 403 for a guest who may only look */
export async function mayTakeSpectrum(asker: Asker, id: string): Promise<SpectrumTake> {
  const seen = await seeSpectrum(asker, id);
  if (!(await findSpectrum(id, spectrumDownload(asker))))
    throw new HttpError(403, 'Your access to this folio is for reading: ask its lab for downloads');
  return grant({ asker, complex: seen.complex, spectrum: seen.spectrum });
}

/** Whether the asker may take files of this spectrum; a member, too, may see one by a grant to look at it alone. */
export const canTakeSpectrum = async (asker: Asker, id: string): Promise<boolean> =>
  (await findSpectrum(id, spectrumDownload(asker))) !== undefined;

export const canChangeSpectrum = (asker: Asker, spectrum: typeof spectra.$inferSelect): boolean =>
  asker.scopes.has('write') &&
  (leads(asker, spectrum.labId) || (spectrum.makerId === asker.accountId && worksIn(asker, spectrum.labId)));

/** @throws {HttpError} 404, 403 */
export async function mayChangeSpectrum(asker: Asker, id: string): Promise<SpectrumChange> {
  const seen = await seeSpectrum(asker, id);
  if (!canChangeSpectrum(asker, seen.spectrum))
    throw new HttpError(403, 'Who uploaded a spectrum, a lead of the measuring lab or a steward may change it');
  return grant({ asker, complex: seen.complex, spectrum: seen.spectrum });
}

/** Bands are proposed by those who measured and by those whose complex it is. */
export const canPropose = (asker: Asker, seen: Pick<SpectrumAccess, 'complex' | 'spectrum'>): boolean =>
  asker.scopes.has('write') && (worksIn(asker, seen.spectrum.labId) || worksIn(asker, seen.complex.labId));

/** @throws {HttpError} 404, 403 */
export async function mayProposeBands(asker: Asker, id: string): Promise<SpectrumPropose> {
  const seen = await seeSpectrum(asker, id);
  if (!canPropose(asker, seen))
    throw new HttpError(403, 'Members of the measuring lab or of the complex’s home lab may propose bands');
  return grant({ asker, complex: seen.complex, spectrum: seen.spectrum });
}

/** A lead who sees a band as a member, or a contributor of another lab where the measuring lab allows it. */
export async function canJudge(asker: Asker, { complex, spectrum }: Pick<SpectrumAccess, 'complex' | 'spectrum'>) {
  if (!asker.scopes.has('write') || !seesAsMember(asker, complex, spectrum)) return false;
  if ([...asker.labs.values()].includes('lead')) return true;
  if (asker.labs.size === 0 || asker.labs.has(spectrum.labId)) return false;
  const { db } = await database();
  const [lab] = await db.select({ allows: labs.outsideAttest }).from(labs).where(eq(labs.id, spectrum.labId));
  return lab?.allows ?? false;
}

/** @throws {HttpError} 404; 403 for who may not judge, and always for who proposed it */
export async function mayJudgeBand(asker: Asker, id: string): Promise<BandJudge> {
  const { db } = await database();
  const [row] = await db
    .select()
    .from(bands)
    .innerJoin(spectra, eq(spectra.id, bands.spectrumId))
    .innerJoin(complexes, eq(complexes.id, spectra.complexId))
    .where(and(eq(bands.id, id), bandSight(asker)));
  if (!row) throw notInSight();
  if (row.band.proposedBy === asker.accountId)
    throw new HttpError(403, 'You proposed this assignment: another person must judge it');
  if (!(await canJudge(asker, row)))
    throw new HttpError(403, 'A lead, or a contributor of another lab where the measuring lab allows it, may judge');
  return grant({ asker, complex: row.complex, spectrum: row.spectrum, band: row.band });
}
