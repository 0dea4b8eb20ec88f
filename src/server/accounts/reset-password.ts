import { and, eq, gt, isNull, sql } from 'drizzle-orm';
import type { PasswordReset, PasswordResetPreview } from '#src/contracts/account.ts';
import type { Tx } from '#src/db/client.ts';
import { accounts, passwordResets } from '#src/db/schema/index.ts';
import { database } from '../database.ts';
import { HttpError } from '../http.ts';
import { newId, newSecret, nowIso, sha256 } from '../ids.ts';
import { enqueue, type JobHandler } from '../jobs.ts';
import { log } from '../log.ts';
import { passwordResetLink } from '../mail/account-mails.ts';
import { queueMail } from '../mail.ts';
import { hashPassword } from '../passwords.ts';
import { countAttempt } from '../rate-limit.ts';
import { endSessions } from '../sessions.ts';
import { settings } from '../settings.ts';
import { type Actor, record } from '../trail.ts';
import { afterNewPassword, endPasswordResets, requireGoodPassword } from './change-password.ts';
import { forgiveAccount } from './throttle.ts';

const HOUR = 3600 * 1000; // ms
const LINK_LIFE_MS = HOUR;
/** One answer for every address, so that nobody learns by it who has an account. */
const ASKED = {
  detail: 'If this address has an account, a link to choose a new password is on its way. It works for an hour.',
};
const noLink = () =>
  new HttpError(404, 'This link does not work, or no longer: ask for a new one and open the latest mail');

/** The tokens have 256 random bits; the limit keeps a client from hammering all the same. */
export const countLinkUse = (clientAddress: string) =>
  countAttempt(`account-link:${clientAddress}`, { most: 60, windowMs: HOUR / 4 });

/**
 * Ask for a link. Everything that depends on whether there is an account is done by a job, so that answer, status and
 * time are the same; the limits count known and unknown addresses alike.
 *
 * @throws {HttpError} 429: 20 an hour from one client, 5 an hour for one address
 */
export async function askPasswordReset(email: string, clientAddress: string): Promise<typeof ASKED> {
  await countAttempt(`reset-from:${clientAddress}`, { most: 20, windowMs: HOUR });
  await countAttempt(`reset:${sha256(email)}`, { most: 5, windowMs: HOUR });
  const { db, write } = await database();
  const [account] = await db.select({ id: accounts.id }).from(accounts).where(eq(accounts.email, email));
  await write((tx) => enqueue(tx, 'password-reset', { accountId: account?.id ?? null }));
  return ASKED;
}

/** The job behind it: mails a link to the account, if there is one and it is open. */
export const mailPasswordReset: JobHandler = async ({ accountId }, { id }) => {
  const { write } = await database();
  await write(async (tx) => {
    const [account] = await tx
      .select()
      .from(accounts)
      .where(eq(accounts.id, String(accountId ?? '')));
    if (account?.state !== 'active') return;
    const [made] = await tx.select({ id: passwordResets.id }).from(passwordResets).where(eq(passwordResets.id, id));
    if (!made) await sendReset(tx, { accountId: null }, account, id);
  });
};

/** Make a link for an account and mail it; older links end. `actor` is who asked, null for somebody not signed in. */
export async function sendReset(
  tx: Tx,
  actor: Actor,
  account: { id: string; email: string },
  id = newId(),
): Promise<void> {
  const token = newSecret();
  const expiresAt = new Date(Date.now() + LINK_LIFE_MS).toISOString();
  await endPasswordResets(tx, account.id);
  const tokenHash = sha256(token);
  await tx.insert(passwordResets).values({ id, accountId: account.id, tokenHash, createdAt: nowIso(), expiresAt });
  // In the fragment, so that the token reaches no server log and no Referer header.
  const mail = passwordResetLink({ link: `${settings().publicOrigin}/reset#${token}`, expiresAt });
  await queueMail(tx, { key: `password-reset:${id}`, kind: 'password-reset', to: account.email, ...mail });
  await record(tx, actor, { action: 'ask-reset', subjectType: 'account', subjectId: account.id });
}

const stillOpen = () => and(isNull(passwordResets.usedAt), gt(passwordResets.expiresAt, nowIso()));

async function find(token: string) {
  const { db } = await database();
  const [row] = await db
    .select({ reset: passwordResets, account: accounts })
    .from(passwordResets)
    .innerJoin(accounts, eq(accounts.id, passwordResets.accountId))
    .where(and(eq(passwordResets.tokenHash, sha256(token)), stillOpen()));
  if (row?.account.state !== 'active') throw noLink();
  return row;
}

/** Whose password a link would set, for the page that it opens. @throws {HttpError} 404, 429 */
export async function previewReset(token: string, clientAddress: string): Promise<PasswordResetPreview> {
  await countLinkUse(clientAddress);
  const { reset, account } = await find(token);
  return { email: account.email, expiresAt: reset.expiresAt };
}

/**
 * Set a new password by a link, once. Every session of the account ends; nobody is signed in, and second factors stay
 * as they are, so that a mailbox alone opens no account that has one.
 *
 * @throws {HttpError} 404 for a link that does not work, 422 for a weak password (the link stays good), 429
 */
export async function completeReset({ token, password }: PasswordReset, clientAddress: string): Promise<void> {
  await countLinkUse(clientAddress);
  const { reset, account } = await find(token);
  await requireGoodPassword(password, account);
  const passwordHash = await hashPassword(password);
  const { write } = await database();
  await write(async (tx) => {
    // The condition makes it single-use also when two requests come at once: only one of them finds it open.
    const taken = await tx
      .update(passwordResets)
      .set({ usedAt: nowIso() })
      .where(and(eq(passwordResets.id, reset.id), stillOpen()))
      .returning({ id: passwordResets.id });
    if (taken.length === 0) throw noLink();
    await tx
      .update(accounts)
      .set({ passwordHash, version: sql`${accounts.version} + 1` })
      .where(eq(accounts.id, account.id));
    const sessionsEnded = await endSessions(tx, account.id);
    await forgiveAccount(tx, account.email, clientAddress);
    await afterNewPassword(tx, { accountId: account.id }, account, { byLink: true, sessionsEnded, tokensRevoked: 0 });
  });
  log.info({ account: account.id }, 'a password was set by a link');
}
