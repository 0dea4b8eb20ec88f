import { and, eq, isNull, sql } from 'drizzle-orm';
import type { PasswordChange } from '#src/contracts/account.ts';
import type { Tx } from '#src/db/client.ts';
import { accessTokens, accounts, passwordResets } from '#src/db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import { database } from '../database.ts';
import { HttpError } from '../http.ts';
import { newId, nowIso } from '../ids.ts';
import { passwordChanged } from '../mail/account-mails.ts';
import { queueMail } from '../mail.ts';
import { hashPassword } from '../passwords.ts';
import { endSessions } from '../sessions.ts';
import { record } from '../trail.ts';
import { passwordFault } from './password-rule.ts';
import { forgiveProof, provePassword } from './prove-password.ts';

/** @throws {HttpError} 422 that points to the password and says why it is too easy to guess */
export async function requireGoodPassword(password: string, person: { email: string; name: string }): Promise<void> {
  const detail = await passwordFault(password, person);
  if (detail) throw new HttpError(422, detail, { errors: [{ pointer: '#/password', detail }] });
}

/**
 * Change one's own password. The session that asks goes on; the others end unless told otherwise, and links by mail to
 * choose a password end in any case.
 *
 * @returns how many sessions ended and how many access tokens were revoked
 * @throws {HttpError} 422 for a wrong present or a weak new password, 409 when it was changed meanwhile, 429
 */
export async function changePassword(asker: Asker, input: PasswordChange) {
  const account = await provePassword(asker, input.current, 'current');
  await requireGoodPassword(input.password, account);
  const passwordHash = await hashPassword(input.password);
  const { write } = await database();
  return write(async (tx) => {
    const unchanged = and(eq(accounts.id, account.id), eq(accounts.passwordHash, account.passwordHash ?? ''));
    const changed = await tx
      .update(accounts)
      .set({ passwordHash, version: sql`${accounts.version} + 1` })
      .where(unchanged)
      .returning({ id: accounts.id });
    if (changed.length === 0) throw new HttpError(409, 'Your password was changed meanwhile: sign in again');
    const sessionsEnded = input.endOthers ? await endSessions(tx, account.id, asker.sessionId) : 0;
    const tokensRevoked = input.revokeTokens ? await revokeAllTokens(tx, account.id) : 0;
    await forgiveProof(tx, account.id);
    await afterNewPassword(tx, asker, account, { byLink: false, sessionsEnded, tokensRevoked });
    return { sessionsEnded, tokensRevoked };
  });
}

async function revokeAllTokens(tx: Tx, accountId: string): Promise<number> {
  const revoked = await tx
    .update(accessTokens)
    .set({ revokedAt: nowIso() })
    .where(and(eq(accessTokens.accountId, accountId), isNull(accessTokens.revokedAt)))
    .returning({ id: accessTokens.id });
  return revoked.length;
}

/** What follows a new password however it was set: links to choose one end, its owner is told, the trail has it. */
export async function afterNewPassword(
  tx: Tx,
  actor: { accountId: string },
  account: { id: string; email: string },
  detail: { byLink: boolean; sessionsEnded: number; tokensRevoked: number },
): Promise<void> {
  await endPasswordResets(tx, account.id);
  const mail = passwordChanged({ at: nowIso(), ...detail });
  await queueMail(tx, { key: `password-changed:${newId()}`, kind: 'password-changed', to: account.email, ...mail });
  await record(tx, actor, { action: 'change-password', subjectType: 'account', subjectId: account.id, detail });
}

/** Links to choose a new password open nothing any more. */
export async function endPasswordResets(tx: Tx, accountId: string): Promise<void> {
  const open = and(eq(passwordResets.accountId, accountId), isNull(passwordResets.usedAt));
  await tx.update(passwordResets).set({ usedAt: nowIso() }).where(open);
}
