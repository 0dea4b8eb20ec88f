import { and, eq } from 'drizzle-orm';
import { accounts, type labs, memberships } from '../../db/schema/index.ts';
import { database } from '../database.ts';
import { HttpError, notInSight } from '../http.ts';
import type { Asker } from './asker.ts';
import { type Access, leads } from './records.ts';
import { seeLab } from './sharing.ts';

// Proofs of access to people: members of labs, and accounts. As in records.ts, only this folder makes them.

interface OfMember {
  readonly lab: typeof labs.$inferSelect;
  readonly account: typeof accounts.$inferSelect;
  readonly membership: typeof memberships.$inferSelect;
}
export interface MemberAccess extends Access<'see' | 'role' | 'end'>, OfMember {}
export interface MemberRole extends Access<'role'>, OfMember {}
export interface MemberEnd extends Access<'end'>, OfMember {}
export interface MemberAdd extends Access<'add'> {
  readonly lab: typeof labs.$inferSelect;
}
export interface StewardAccess extends Access<'steward'> {}
export interface AccountAccess extends Access<'account'> {
  readonly account: typeof accounts.$inferSelect;
}

const prove = <A extends object>(facts: object): A => facts as A;

/** A person of a lab; members of the programme know each other. @throws {HttpError} 404 */
export async function seeMember(asker: Asker, labId: string, accountId: string): Promise<MemberAccess> {
  const { lab } = await seeLab(asker, labId);
  const { db } = await database();
  const [row] = await db
    .select()
    .from(memberships)
    .innerJoin(accounts, eq(accounts.id, memberships.accountId))
    .where(and(eq(memberships.labId, lab.id), eq(memberships.accountId, accountId)));
  if (!row) throw notInSight();
  return prove({ asker, lab, account: row.account, membership: row.membership });
}

/** @throws {HttpError} 403 for who does not lead the lab, 404 */
export async function mayChangeRole(asker: Asker, labId: string, accountId: string): Promise<MemberRole> {
  if (!leads(asker, labId)) throw new HttpError(403, 'Leads of the lab and stewards decide on roles');
  const { lab, account, membership } = await seeMember(asker, labId, accountId);
  return prove({ asker, lab, account, membership });
}

/** Oneself, or somebody of a lab that the asker leads. @throws {HttpError} 403, 404 */
export async function mayEndMembership(asker: Asker, labId: string, accountId: string): Promise<MemberEnd> {
  if (accountId !== asker.accountId && !leads(asker, labId))
    throw new HttpError(403, 'Leads of the lab and stewards remove people; you may leave it yourself');
  const { lab, account, membership } = await seeMember(asker, labId, accountId);
  return prove({ asker, lab, account, membership });
}

/** @throws {HttpError} 404, 403 for who is no steward */
export async function mayAddMember(asker: Asker, labId: string): Promise<MemberAdd> {
  const { lab } = await seeLab(asker, labId);
  if (!asker.steward) throw new HttpError(403, 'Stewards add people directly: invite them instead');
  return prove({ asker, lab });
}

/** @throws {HttpError} 403 for who is no steward */
export function asSteward(asker: Asker): StewardAccess {
  if (!asker.steward) throw new HttpError(403, 'Only a steward may do this');
  return prove({ asker });
}

/** Any account, for stewards. @throws {HttpError} 403, 404 */
export async function seeAccount(asker: Asker, id: string): Promise<AccountAccess> {
  asSteward(asker);
  const { db } = await database();
  const [account] = await db.select().from(accounts).where(eq(accounts.id, id));
  if (!account) throw notInSight();
  return prove({ asker, account });
}
