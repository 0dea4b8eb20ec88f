import { and, eq, gt, inArray, isNull } from 'drizzle-orm';
import { accessRequests, folios, grants, invitations } from '../../db/schema/index.ts';
import { database } from '../database.ts';
import { HttpError, notInSight } from '../http.ts';
import { nowIso } from '../ids.ts';
import type { Asker } from './asker.ts';
import { type Access, leads, worksIn } from './records.ts';
import { type FolioInvite, folioSight, mayInviteToFolio, prove, requireLeading, seeFolio } from './sharing.ts';

// Proofs of access to invitations, grants and requests for more, as in sharing.ts.

type Grant = typeof grants.$inferSelect;
type Folio = typeof folios.$inferSelect;

export interface GrantAccess extends FolioInvite {
  readonly grant: Grant;
}
export interface InvitationAccess extends Access<'change'> {
  readonly invitation: typeof invitations.$inferSelect;
}
export interface FolioDelete extends Access<'change'> {
  readonly folio: Folio;
}
/** A guest and the grants by which a folio is open to them. */
export interface OwnGrants extends Access<'see'> {
  readonly folio: Folio;
  readonly grants: readonly Grant[];
}
/** Somebody who reads a folio as a guest, or did until lately. */
export interface AskForMore extends Access<'see'> {
  readonly folio: Folio;
}
export interface RequestSettle extends Access<'change'> {
  readonly folio: Folio;
  readonly request: typeof accessRequests.$inferSelect;
}

/** How long after its end somebody may ask for an access again, and finds it on the day sheet. */
export const ENDED_DAYS = 90;

/** When a grant ended or will end, whichever way comes first. */
export const endOf = ({ revokedAt, expiresAt }: Pick<Grant, 'revokedAt' | 'expiresAt'>): string =>
  revokedAt && revokedAt < expiresAt ? revokedAt : expiresAt;

/** Whether an instant lies so far back that nobody is reminded of it. */
export const isLongAgo = (at: string): boolean =>
  at < new Date(Date.now() - ENDED_DAYS * 24 * 3600 * 1000).toISOString();

/** A grant of a folio of a lab that the asker leads. @throws {HttpError} 403, 404 also for a grant of another folio */
export async function mayChangeGrant(asker: Asker, folioId: string, grantId: string): Promise<GrantAccess> {
  const { folio } = await mayInviteToFolio(asker, folioId);
  const { db } = await database();
  const [grant] = await db
    .select()
    .from(grants)
    .where(and(eq(grants.id, grantId), eq(grants.folioId, folio.id)));
  if (!grant) throw notInSight();
  return prove({ asker, folio, grant });
}

/** An invitation into a lab that the asker leads, or to a folio of one. @throws {HttpError} 403, 404 */
export async function mayChangeInvitation(asker: Asker, id: string): Promise<InvitationAccess> {
  requireLeading(asker);
  const { db } = await database();
  const [row] = await db
    .select()
    .from(invitations)
    .leftJoin(folios, eq(folios.id, invitations.folioId))
    .where(eq(invitations.id, id));
  const labId = row?.invitation.labId ?? row?.folio?.labId;
  if (!row || !labId || !leads(asker, labId)) throw notInSight();
  return prove({ asker, invitation: row.invitation });
}

/** @throws {HttpError} 404, 403 for who leads neither its lab nor the registry */
export async function mayDeleteFolio(asker: Asker, id: string): Promise<FolioDelete> {
  const { folio } = await seeFolio(asker, id);
  if (!leads(asker, folio.labId)) throw new HttpError(403, 'A lead of its lab or a steward may delete a folio');
  return prove({ asker, folio });
}

/** @throws {HttpError} 404, 403 for members of its lab, who accept nothing to read their own */
export async function mayAcceptTerms(asker: Asker, id: string): Promise<OwnGrants> {
  const { folio } = await seeFolio(asker, id);
  if (worksIn(asker, folio.labId)) throw notAGuest();
  const { db } = await database();
  const held = asker.grants.filter((grant) => grant.folioId === folio.id).map((grant) => grant.id);
  return prove({ asker, folio, grants: await db.select().from(grants).where(inArray(grants.id, held)) });
}

const notAGuest = () => new HttpError(403, 'You read this folio as a member, not as a guest of it');

/**
 * A folio that the asker reads as a guest, or read until 90 days ago.
 *
 * @throws {HttpError} 403 for who sees it as a member, 404 for everybody else
 */
export async function mayAskForMore(asker: Asker, id: string): Promise<AskForMore> {
  const { db } = await database();
  const rows = await db
    .select()
    .from(grants)
    .innerJoin(folios, eq(folios.id, grants.folioId))
    .where(and(eq(grants.folioId, id), eq(grants.accountId, asker.accountId)));
  const folio = rows.find(({ grant }) => !isLongAgo(endOf(grant)))?.folio;
  if (folio && !worksIn(asker, folio.labId)) return prove({ asker, folio });
  const [seen] = await db
    .select({ id: folios.id })
    .from(folios)
    .where(and(eq(folios.id, id), folioSight(asker)));
  throw seen ? notAGuest() : notInSight();
}

/** A request to a lab that the asker leads. @throws {HttpError} 403, 404 */
export async function maySettleRequest(asker: Asker, id: string): Promise<RequestSettle> {
  requireLeading(asker);
  const { db } = await database();
  const [row] = await db
    .select()
    .from(accessRequests)
    .innerJoin(folios, eq(folios.id, accessRequests.folioId))
    .where(eq(accessRequests.id, id));
  if (!row || !leads(asker, row.folio.labId)) throw notInSight();
  return prove({ asker, folio: row.folio, request: row.access_request });
}

/** A folio that was open to the asker by grants which all ended, with the last of these ends. */
export interface EndedAccess extends Access<'see'> {
  readonly folio: Folio;
  readonly endedAt: string;
}

/**
 * Folios whose every grant to the asker ended, and which the asker does not see otherwise. Who never held a grant gets
 * nothing, as for a folio that never was.
 */
export async function endedAccess(asker: Asker, folioId?: string): Promise<EndedAccess[]> {
  const { db } = await database();
  const rows = await db
    .select()
    .from(grants)
    .innerJoin(folios, eq(folios.id, grants.folioId))
    .where(and(eq(grants.accountId, asker.accountId), folioId ? eq(grants.folioId, folioId) : undefined));
  const now = nowIso();
  return [...new Set(rows.map(({ folio }) => folio.id))].flatMap((id) => {
    const ofFolio = rows.filter((row) => row.folio.id === id);
    const { folio } = ofFolio[0]!;
    const endedAt = ofFolio
      .map(({ grant }) => endOf(grant))
      .sort()
      .at(-1)!;
    return endedAt > now || worksIn(asker, folio.labId) ? [] : [prove<EndedAccess>({ asker, folio, endedAt })];
  });
}

/** Grants that open their folio today, embargo or not. */
export const liveGrant = (now = nowIso()) => and(isNull(grants.revokedAt), gt(grants.expiresAt, now));
