import { and, eq, isNotNull, or, sql } from 'drizzle-orm';
import type { AddressChangeInput, AddressChangePreview, AddressConfirmation } from '#src/contracts/account.ts';
import { isUniqueViolation, type Tx } from '#src/db/client.ts';
import { accounts, addressChanges } from '#src/db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import { database } from '../database.ts';
import { HttpError } from '../http.ts';
import { newId, newSecret, nowIso, sha256 } from '../ids.ts';
import { addressChanged, addressChangeFromOld, addressChangeToNew, addressHasAccount } from '../mail/account-mails.ts';
import { queueMail } from '../mail.ts';
import { countAttempt } from '../rate-limit.ts';
import { settings } from '../settings.ts';
import { record } from '../trail.ts';
import { endPasswordResets } from './change-password.ts';
import type { AccountRow } from './credentials.ts';
import { pendingChange } from './profile.ts';
import { forgiveProof, provePassword } from './prove-password.ts';
import { countLinkUse } from './reset-password.ts';

const HOUR = 3600 * 1000; // ms
/** How long both addresses have to confirm. */
const OPEN_FOR_MS = 24 * HOUR;
/** So that nobody's account becomes a way to send mail to the world. */
const LIMIT = { most: 5, windowMs: HOUR };
/** One answer for every address, so that nobody learns by it who has an account. */
const ASKED = {
  detail: 'Both addresses have been sent a mail. The change takes effect when both have confirmed it, within a day.',
};
const noLink = () => new HttpError(404, 'This link does not work, or no longer: ask for the change once more');

type Change = typeof addressChanges.$inferSelect;

/**
 * Ask for another address for one's account. An older request ends. Where the new address has an account already, it
 * is told so by mail, and the asker sees what they would see otherwise: a request that is never confirmed.
 *
 * @throws {HttpError} 422 for a wrong password and for the address one has, 429
 */
export async function askAddressChange(asker: Asker, { email, password }: AddressChangeInput): Promise<typeof ASKED> {
  const account = await provePassword(asker, password, 'password');
  if (email === account.email) {
    const detail = 'This is the address of your account already';
    throw new HttpError(422, detail, { errors: [{ pointer: '#/email', detail }] });
  }
  await countAttempt(`address-change:${account.id}`, LIMIT);
  const [oldToken, newToken] = [newSecret(), newSecret()];
  const now = Date.now();
  const change = {
    id: newId(now),
    accountId: account.id,
    newEmail: email,
    oldTokenHash: sha256(oldToken),
    newTokenHash: sha256(newToken),
    createdAt: new Date(now).toISOString(),
    expiresAt: new Date(now + OPEN_FOR_MS).toISOString(),
  };
  const { write } = await database();
  await write(async (tx) => {
    await cancelPending(tx, account.id);
    await tx.insert(addressChanges).values(change);
    await mailBoth(tx, account, change, { oldToken, newToken });
    await forgiveProof(tx, account.id);
    const detail = { change: change.id, newEmail: email };
    await record(tx, asker, { action: 'ask-address', subjectType: 'account', subjectId: account.id, detail });
  });
  return ASKED;
}

async function mailBoth(
  tx: Tx,
  account: AccountRow,
  { id, newEmail, expiresAt }: Pick<Change, 'id' | 'newEmail' | 'expiresAt'>,
  { oldToken, newToken }: { oldToken: string; newToken: string },
): Promise<void> {
  const origin = settings().publicOrigin;
  // In the fragment, so that the token reaches no server log and no Referer header.
  const link = (token: string) => `${origin}/confirm-address#${token}`;
  const fromOld = addressChangeFromOld({ newEmail, link: link(oldToken), expiresAt });
  await queueMail(tx, { key: `address-change:${id}:old`, kind: 'address-change', to: account.email, ...fromOld });
  const [taken] = await tx.select({ id: accounts.id }).from(accounts).where(eq(accounts.email, newEmail));
  const key = `address-change:${id}:new`;
  if (taken) {
    await queueMail(tx, { key, kind: 'address-taken', to: newEmail, ...addressHasAccount({ origin }) });
    return;
  }
  const { name, email: oldEmail } = account;
  const toNew = addressChangeToNew({ name, oldEmail, link: link(newToken), expiresAt });
  await queueMail(tx, { key, kind: 'address-change', to: newEmail, ...toNew });
}

async function cancelPending(tx: Tx, accountId: string): Promise<Change[]> {
  return tx
    .update(addressChanges)
    .set({ cancelledAt: nowIso() })
    .where(and(eq(addressChanges.accountId, accountId), pendingChange()))
    .returning();
}

/** Take back what was asked, if anything was; its links open nothing any more. */
export async function cancelAddressChange(asker: Asker): Promise<void> {
  const { write } = await database();
  await write(async (tx) => {
    for (const { id, newEmail } of await cancelPending(tx, asker.accountId)) {
      const entry = { action: 'cancel-address', subjectType: 'account' as const, subjectId: asker.accountId };
      await record(tx, asker, { ...entry, detail: { change: id, newEmail } });
    }
  });
}

/** The pending change that a token belongs to, whose it is, and which of the two addresses it stands for. */
async function find(db: Tx | Awaited<ReturnType<typeof database>>['db'], token: string) {
  const hash = sha256(token);
  const ofToken = or(eq(addressChanges.oldTokenHash, hash), eq(addressChanges.newTokenHash, hash));
  const [row] = await db
    .select({ change: addressChanges, account: accounts })
    .from(addressChanges)
    .innerJoin(accounts, eq(accounts.id, addressChanges.accountId))
    .where(and(ofToken, pendingChange()));
  if (row?.account.state !== 'active') throw noLink();
  return { ...row, side: row.change.oldTokenHash === hash ? ('old' as const) : ('new' as const) };
}

/** What a link would confirm, for the page that it opens. @throws {HttpError} 404, 429 */
export async function previewAddressChange(token: string, clientAddress: string): Promise<AddressChangePreview> {
  await countLinkUse(clientAddress);
  const { change, account, side } = await find((await database()).db, token);
  return {
    email: side === 'old' ? account.email : change.newEmail,
    newEmail: change.newEmail,
    confirmed: (side === 'old' ? change.oldConfirmedAt : change.newConfirmedAt) !== null,
    expiresAt: change.expiresAt,
  };
}

/**
 * Confirm for one of the two addresses; with the second confirmation the account has the new one. Sessions go on.
 *
 * @throws {HttpError} 404 for a link that does not work, 409 when the address got an account meanwhile, 429
 */
export async function confirmAddressChange(token: string, clientAddress: string): Promise<AddressConfirmation> {
  await countLinkUse(clientAddress);
  const { write } = await database();
  return write(async (tx) => {
    const { change, account, side } = await find(tx, token);
    const now = nowIso();
    const confirmed = side === 'old' ? { oldConfirmedAt: now } : { newConfirmedAt: now };
    await tx.update(addressChanges).set(confirmed).where(eq(addressChanges.id, change.id));
    const both = and(isNotNull(addressChanges.oldConfirmedAt), isNotNull(addressChanges.newConfirmedAt));
    const [done] = await tx
      .update(addressChanges)
      .set({ doneAt: now })
      .where(and(eq(addressChanges.id, change.id), both))
      .returning({ id: addressChanges.id });
    if (done) await giveAddress(tx, account, change);
    return { done: done !== undefined, newEmail: change.newEmail };
  }).catch((error: unknown) => {
    if (!isUniqueViolation(error)) throw error;
    throw new HttpError(409, 'The new address has an account of its own by now: nothing was changed');
  });
}

/** Invitations to the old address stay bound to it; a link to choose a password that lies in its mailbox ends. */
async function giveAddress(tx: Tx, { id, email: oldEmail }: AccountRow, { newEmail, ...change }: Change) {
  await tx
    .update(accounts)
    .set({ email: newEmail, version: sql`${accounts.version} + 1` })
    .where(eq(accounts.id, id));
  await endPasswordResets(tx, id);
  const mail = addressChanged({ oldEmail, newEmail, at: nowIso() });
  for (const to of [oldEmail, newEmail])
    await queueMail(tx, { key: `address-changed:${change.id}:${to}`, kind: 'address-changed', to, ...mail });
  const detail = { change: change.id, from: oldEmail, to: newEmail };
  await record(tx, { accountId: id }, { action: 'change-address', subjectType: 'account', subjectId: id, detail });
}
