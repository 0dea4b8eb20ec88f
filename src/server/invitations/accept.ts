import { and, eq, gt, isNull, sql } from 'drizzle-orm';
import type { Acceptance, InvitationPreview } from '#src/contracts/invitations.ts';
import { isUniqueViolation, type Tx } from '#src/db/client.ts';
import { accounts, folios, grants, invitations, labs, memberships } from '#src/db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import { passwordFault } from '../accounts/password-rule.ts';
import { database } from '../database.ts';
import { HttpError } from '../http.ts';
import { newId, nowIso, sha256 } from '../ids.ts';
import { hashPassword } from '../passwords.ts';
import { countAttempt } from '../rate-limit.ts';
import { record } from '../trail.ts';
import { invitationRows } from './record.ts';

type Invitation = typeof invitations.$inferSelect;

/** One answer for a token that never was, was used, lapsed or was revoked: which of them is nobody's business. */
const noInvitation = () =>
  new HttpError(404, 'This invitation does not work, or no longer: ask the one who sent it for a new one');

/** The tokens have 256 random bits; the limit keeps a client from hammering all the same. */
const limitAttempts = (clientAddress: string) =>
  countAttempt(`invitation:${clientAddress}`, { most: 60, windowMs: 15 * 60 * 1000 });

const stillOpen = () =>
  and(isNull(invitations.acceptedAt), isNull(invitations.revokedAt), gt(invitations.expiresAt, nowIso()));

async function find(token: string) {
  const { db } = await database();
  const [row] = await invitationRows(db, and(eq(invitations.tokenHash, sha256(token)), stillOpen())!);
  if (!row) throw noInvitation();
  const [account] = await db.select().from(accounts).where(eq(accounts.email, row.invitation.email));
  return { ...row, account };
}

/** What an invitation offers, for the page that its link opens. @throws {HttpError} 404, 429 */
export async function previewInvitation(token: string, clientAddress: string): Promise<InvitationPreview> {
  await limitAttempts(clientAddress);
  const { invitation, folio, inviter, account, ...joined } = await find(token);
  const lab = joined.lab ?? (folio && (await labOf(folio.labId)));
  if (!lab) throw noInvitation();
  return {
    email: invitation.email,
    invitedBy: inviter.name,
    lab: { id: lab.id, name: lab.name },
    role: invitation.role,
    folio: folio && { name: folio.name, licence: folio.licence },
    level: invitation.level,
    hasAccount: account !== undefined,
    expiresAt: invitation.expiresAt,
    accessUntil: invitation.grantExpiresAt,
  };
}

async function labOf(id: string) {
  const { db } = await database();
  const [lab] = await db.select().from(labs).where(eq(labs.id, id));
  return lab;
}

/** What was accepted: whose it is now, and where it leads. */
export interface Accepted {
  email: string;
  folio: string | null;
  lab: string | null;
}

/**
 * Accept an invitation, once. A new address gets an account with the name and password sent; an address that has one
 * must be signed in as that account, and its password stays what it is.
 *
 * @param asker - who is signed in, or null
 * @throws {HttpError} 404 for a token that does not work, 401 where the address has an account, 403 when signed in as
 *   somebody else or by an access token, 409 when the folio's licence is no longer the one shown, 422 without a name or
 *   a good password, 429
 */
export async function acceptInvitation(
  asker: Asker | null,
  { token, name, password, licence }: Acceptance,
  clientAddress: string,
): Promise<Accepted> {
  await limitAttempts(clientAddress);
  const { invitation, account } = await find(token);
  if (asker?.tokenId) throw new HttpError(403, 'Not for access tokens: sign in to do this');
  if (asker && asker.accountId !== account?.id)
    throw new HttpError(403, 'This invitation is for another address than the one you are signed in with');
  if (account && !asker) throw signInFirst();
  const made = account ? null : await newAccount(invitation.email, name, password);
  const accountId = account?.id ?? made!.id;

  const { write } = await database();
  return write(async (tx) => {
    // The condition makes it single-use also when two requests come at once: only one of them finds it open.
    const [taken] = await tx
      .update(invitations)
      .set({ acceptedAt: nowIso() })
      .where(and(eq(invitations.id, invitation.id), stillOpen()))
      .returning();
    if (!taken) throw noInvitation();
    if (made) await tx.insert(accounts).values(made).catch(addressTaken);
    await tx.update(invitations).set({ acceptedBy: accountId }).where(eq(invitations.id, taken.id));
    const lab = taken.labId ? await join(tx, taken, accountId) : null;
    const folio = taken.folioId ? await grantFolio(tx, taken, accountId, licence) : null;
    const detail = { invitation: taken.id, lab, folio, newAccount: made !== null };
    await record(tx, { accountId }, { action: 'accept', subjectType: 'invitation', subjectId: taken.id, detail });
    return { email: taken.email, folio, lab };
  });
}

const signInFirst = () =>
  new HttpError(401, 'This address has an account: sign in with it, then open the link again', {
    headers: { 'www-authenticate': 'Bearer realm="zaffre"' },
  });

function addressTaken(error: unknown): never {
  throw isUniqueViolation(error) ? signInFirst() : error;
}

async function newAccount(email: string, name: string | undefined, password: string | undefined) {
  const errors = [
    ...(name ? [] : [{ pointer: '#/name', detail: 'Tell your name: others see it beside what you do' }]),
    ...(password ? [] : [{ pointer: '#/password', detail: 'Choose a password of at least 15 characters' }]),
  ];
  if (!name || !password) throw new HttpError(422, 'A new account needs a name and a password', { errors });
  const fault = await passwordFault(password, { email, name });
  if (fault) throw new HttpError(422, fault, { errors: [{ pointer: '#/password', detail: fault }] });
  return { id: newId(), email, name, passwordHash: await hashPassword(password), createdAt: nowIso() };
}

/** A member's role rises by an invitation; it never falls by one. */
async function join(tx: Tx, { labId, role }: Invitation, accountId: string): Promise<string> {
  const key = and(eq(memberships.accountId, accountId), eq(memberships.labId, labId!));
  const [held] = await tx.select().from(memberships).where(key);
  if (!held)
    await tx.insert(memberships).values({ accountId, labId: labId!, role: role ?? 'contributor', createdAt: nowIso() });
  else if (role === 'lead') await tx.update(memberships).set({ role }).where(key);
  return labId!;
}

/** A guest who reads the folio already gets the level and the end of the newer invitation. */
async function grantFolio(tx: Tx, invitation: Invitation, accountId: string, shown?: string): Promise<string | null> {
  const [folio] = await tx.select().from(folios).where(eq(folios.id, invitation.folioId!));
  if (!folio) throw noInvitation();
  if (shown && shown !== folio.licence)
    throw new HttpError(409, `The licence of the folio is ${folio.licence} by now: read the invitation again`);
  const terms = {
    level: invitation.level ?? ('view' as const),
    expiresAt: invitation.grantExpiresAt!,
    termsAcceptedAt: nowIso(),
    termsLicence: folio.licence,
    grantedBy: invitation.invitedBy,
  };
  const live = and(eq(grants.folioId, folio.id), eq(grants.accountId, accountId), isNull(grants.revokedAt));
  const renewed = await tx
    .update(grants)
    .set({ ...terms, version: sql`${grants.version} + 1` })
    .where(live)
    .returning({ id: grants.id });
  if (renewed.length === 0)
    await tx.insert(grants).values({ id: newId(), folioId: folio.id, accountId, createdAt: nowIso(), ...terms });
  return folio.id;
}
