import { and, eq, inArray, isNull, or, type SQL, sql } from 'drizzle-orm';
import { accessTokens, bundles, folios, labs } from '../../db/schema/index.ts';
import { database } from '../database.ts';
import { HttpError, notInSight } from '../http.ts';
import { type Asker, isMember, type Level, labsWith } from './asker.ts';
import { type Access, leads, worksIn } from './records.ts';

// Proofs of access to what is shared and with whom. As in records.ts: services ask for one, and only this folder
// makes them.

interface OfLab {
  readonly lab: typeof labs.$inferSelect;
}
export interface LabAccess extends Access<'see' | 'change' | 'invite'>, OfLab {}
export interface LabChange extends Access<'change'>, OfLab {}
export interface LabInvite extends Access<'invite'>, OfLab {}
interface OfFolio {
  readonly folio: typeof folios.$inferSelect;
}
export interface FolioAccess extends Access<'see' | 'change' | 'invite'>, OfFolio {}
export interface FolioChange extends Access<'change'>, OfFolio {}
/** Leads of the folio's lab and stewards: who may read it, and who is asked to. */
export interface FolioInvite extends Access<'invite'>, OfFolio {}
export interface BundleAccess extends Access<'see'> {
  readonly bundle: typeof bundles.$inferSelect;
}
export interface TokenRevoke extends Access<'change'> {
  readonly token: typeof accessTokens.$inferSelect;
}

/** For the files of this folder alone. */
export const prove = <A extends object>(facts: object): A => facts as A;

/** Nobody else can ever invite, so that the role is judged before the record (design §8). */
export function requireLeading(asker: Asker): void {
  if (!asker.steward && labsWith(asker, 'lead').length === 0)
    throw new HttpError(403, 'Leads of a lab and stewards invite and see invitations');
}

/** Labs are known to every member of the programme. @throws {HttpError} 404 */
export async function seeLab(asker: Asker, id: string): Promise<LabAccess> {
  const { db } = await database();
  const [lab] = isMember(asker) ? await db.select().from(labs).where(eq(labs.id, id)) : [];
  if (!lab) throw notInSight();
  return prove({ asker, lab });
}

/** @throws {HttpError} 404, 403 */
export async function mayChangeLab(asker: Asker, id: string): Promise<LabChange> {
  const { lab } = await seeLab(asker, id);
  if (!leads(asker, lab.id)) throw new HttpError(403, 'A lead of the lab or a steward may change it');
  return prove({ asker, lab });
}

/** @throws {HttpError} 403 for who leads no such lab, 404 */
export async function mayInviteToLab(asker: Asker, id: string): Promise<LabInvite> {
  requireLeading(asker);
  const { lab } = await seeLab(asker, id);
  if (!leads(asker, lab.id)) throw new HttpError(403, 'Leads invite into their own labs');
  return prove({ asker, lab });
}

/** Folios in sight: those of the asker's labs, and those granted. A query that uses it has `folio` in its FROM. */
export function folioSight(asker: Asker): SQL {
  if (asker.steward) return sql`1`;
  const mine = [...asker.labs.keys()];
  const granted = asker.grants.map((g) => g.folioId);
  return (
    or(
      mine.length ? inArray(folios.labId, mine) : undefined,
      granted.length ? inArray(folios.id, granted) : undefined,
    ) ?? sql`0`
  );
}

/** A folio in sight. @throws {HttpError} 404 */
export async function seeFolio(asker: Asker, id: string): Promise<FolioAccess> {
  const { db } = await database();
  const [folio] = await db
    .select()
    .from(folios)
    .where(and(eq(folios.id, id), folioSight(asker)));
  if (!folio) throw notInSight();
  return prove({ asker, folio });
}

type FolioFacts = Pick<typeof folios.$inferSelect, 'id' | 'labId' | 'makerId'>;

/** Leads of its lab, who made it as long as they work there, and stewards. */
export const canChangeFolio = (asker: Asker, folio: FolioFacts): boolean =>
  asker.scopes.has('write') &&
  (leads(asker, folio.labId) || (folio.makerId === asker.accountId && worksIn(asker, folio.labId)));

/** The level at which a guest reads a folio; null for members of its lab and stewards, who are no guests of it. */
export function guestLevel(asker: Asker, folio: Pick<FolioFacts, 'id' | 'labId'>): Level | null {
  if (worksIn(asker, folio.labId)) return null;
  const levels = asker.grants.filter((g) => g.folioId === folio.id).map((g) => g.level);
  return levels.includes('download') ? 'download' : 'view';
}

/** @throws {HttpError} 404, 403 */
export async function mayChangeFolio(asker: Asker, id: string): Promise<FolioChange> {
  const { folio } = await seeFolio(asker, id);
  if (!canChangeFolio(asker, folio))
    throw new HttpError(403, 'Who made a folio, a lead of its lab or a steward may change it');
  return prove({ asker, folio });
}

/** @throws {HttpError} 403 for who leads no lab, 404, 403 for a folio of a lab that another leads */
export async function mayInviteToFolio(asker: Asker, id: string): Promise<FolioInvite> {
  requireLeading(asker);
  const { folio } = await seeFolio(asker, id);
  if (!leads(asker, folio.labId))
    throw new HttpError(403, 'Leads of a folio’s lab and stewards decide who else reads it');
  return prove({ asker, folio });
}

/** A bundle that the asker ordered, as long as its folio is in sight. @throws {HttpError} 404 */
export async function seeBundle(asker: Asker, id: string): Promise<BundleAccess> {
  const { db } = await database();
  const [row] = await db
    .select()
    .from(bundles)
    .leftJoin(folios, eq(folios.id, bundles.folioId))
    .where(
      and(eq(bundles.id, id), eq(bundles.requestedBy, asker.accountId), or(isNull(bundles.folioId), folioSight(asker))),
    );
  if (!row) throw notInSight();
  return prove({ asker, bundle: row.bundle });
}

/** One of the asker's own tokens. @throws {HttpError} 404 */
export async function mayRevokeToken(asker: Asker, id: string): Promise<TokenRevoke> {
  const { db } = await database();
  const [token] = await db
    .select()
    .from(accessTokens)
    .where(and(eq(accessTokens.id, id), eq(accessTokens.accountId, asker.accountId)));
  if (!token) throw notInSight();
  return prove({ asker, token });
}
