import { and, eq, gt, inArray, isNull } from 'drizzle-orm';
import type { Db, Tx } from '#src/db/client.ts';
import { accessTokens, accounts, folios, invitations, memberships } from '#src/db/schema/index.ts';
import { nowIso } from '../ids.ts';

/** Access tokens that still open something. */
export const liveToken = (accountId: string) =>
  and(eq(accessTokens.accountId, accountId), isNull(accessTokens.revokedAt), gt(accessTokens.expiresAt, nowIso()));

/** Invitations that a person sent and that can still be accepted. */
export const openInvitationOf = (accountId: string) =>
  and(
    eq(invitations.invitedBy, accountId),
    isNull(invitations.acceptedAt),
    isNull(invitations.revokedAt),
    gt(invitations.expiresAt, nowIso()),
  );

/** Revoke a person's access tokens, or only those that were made for one lab. How many still worked. */
export async function revokeTokens(tx: Tx, accountId: string, labId?: string): Promise<number> {
  const revoked = await tx
    .update(accessTokens)
    .set({ revokedAt: nowIso() })
    .where(and(liveToken(accountId), labId ? eq(accessTokens.labId, labId) : undefined))
    .returning({ id: accessTokens.id });
  return revoked.length;
}

/** Labs for which an account may invite, as the transaction has it; "all" for a steward. */
async function invitesFor(tx: Tx, accountId: string): Promise<ReadonlySet<string> | 'all'> {
  const [account] = await tx
    .select({ state: accounts.state, steward: accounts.steward })
    .from(accounts)
    .where(eq(accounts.id, accountId));
  if (account?.state !== 'active') return new Set();
  if (account.steward) return 'all';
  const led = await tx
    .select({ labId: memberships.labId })
    .from(memberships)
    .where(and(eq(memberships.accountId, accountId), eq(memberships.role, 'lead')));
  return new Set(led.map(({ labId }) => labId));
}

/**
 * Revoke the open invitations that a person sent and could not send any more: into a lab, or to a folio of a lab, that
 * they do not lead now. To be called after the change that took the right away.
 *
 * @returns their ids
 */
export async function revokeUnbackedInvitations(tx: Tx, accountId: string): Promise<string[]> {
  const backed = await invitesFor(tx, accountId);
  if (backed === 'all') return [];
  const open = await tx
    .select({ id: invitations.id, labId: invitations.labId, folioLab: folios.labId })
    .from(invitations)
    .leftJoin(folios, eq(folios.id, invitations.folioId))
    .where(openInvitationOf(accountId));
  const ids = open.filter(({ labId, folioLab }) => !backed.has(labId ?? folioLab ?? '')).map(({ id }) => id);
  if (ids.length > 0) await tx.update(invitations).set({ revokedAt: nowIso() }).where(inArray(invitations.id, ids));
  return ids;
}

/** How many invitations of a person are still open. */
export const countOpenInvitations = (db: Db | Tx, accountId: string): Promise<number> =>
  db.$count(invitations, openInvitationOf(accountId));
/** How many access tokens of a person still work. */
export const countTokens = (db: Db | Tx, accountId: string): Promise<number> =>
  db.$count(accessTokens, liveToken(accountId));
