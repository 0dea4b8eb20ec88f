import { and, asc, eq, ne } from 'drizzle-orm';
import type { FactorOverview, RecoveryCodes, WithPassword } from '#src/contracts/second-factor.ts';
import type { Tx } from '#src/db/client.ts';
import { accounts, recoveryCodes, secondFactors, sessions } from '#src/db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import type { FactorChange, FactorsChange } from '../access/second-factor.ts';
import { forgiveProof, provePassword } from '../accounts/prove-password.ts';
import { database } from '../database.ts';
import { HttpError, notInSight } from '../http.ts';
import { newId } from '../ids.ts';
import { factorRemoved, recoveryCodesRenewed } from '../mail/second-factor-mails.ts';
import { queueMail } from '../mail.ts';
import { record } from '../trail.ts';
import { recoveryCodesLeft, replaceRecoveryCodes } from './recovery-codes.ts';
import { confirmedFactors, factorRequired, hasFactor } from './rule.ts';

/** More factors than anybody carries. */
const MOST_FACTORS = 20;

/** The asker's own factors that count, oldest first, and how many recovery codes are left; no secret among it. */
export async function listFactors({ accountId }: Asker): Promise<FactorOverview> {
  const { db } = await database();
  const factors = await db
    .select({
      id: secondFactors.id,
      kind: secondFactors.kind,
      name: secondFactors.name,
      createdAt: secondFactors.createdAt,
      lastUsedAt: secondFactors.lastUsedAt,
    })
    .from(secondFactors)
    .where(confirmedFactors(accountId))
    .orderBy(asc(secondFactors.id));
  const required = await isRequired(db, accountId);
  return { required, factors, recoveryCodesLeft: await recoveryCodesLeft(db, accountId) };
}

async function isRequired(db: Pick<Tx, 'select'>, accountId: string): Promise<boolean> {
  const [account] = await db.select({ steward: accounts.steward }).from(accounts).where(eq(accounts.id, accountId));
  return account !== undefined && factorRequired(account);
}

/** @throws {HttpError} 409 when an account has as many factors as it may have */
export async function requireRoom({ accountId }: Asker): Promise<void> {
  const { db } = await database();
  const held = await db.select({ id: secondFactors.id }).from(secondFactors).where(confirmedFactors(accountId));
  if (held.length >= MOST_FACTORS)
    throw new HttpError(409, `An account has at most ${MOST_FACTORS} second factors: remove one first`);
}

/**
 * Remove a factor. With the last one the recovery codes go, and no session counts as begun with a factor any more.
 *
 * @throws {HttpError} 422 for a wrong password, 409 for the last factor of a steward in production
 */
export async function removeFactor({ asker, factor }: FactorChange, { password }: WithPassword): Promise<void> {
  await provePassword(asker, password, 'password');
  const { accountId } = asker;
  const { id, kind, name } = factor;
  const { write } = await database();
  await write(async (tx) => {
    const others = and(confirmedFactors(accountId), ne(secondFactors.id, id));
    const left = (await tx.select({ id: secondFactors.id }).from(secondFactors).where(others)).length;
    if (left === 0 && factor.confirmedAt && (await isRequired(tx, accountId)))
      throw new HttpError(409, 'A steward keeps at least one second factor: set up another one, then remove this one');
    const removed = await tx.delete(secondFactors).where(eq(secondFactors.id, id)).returning({ id: secondFactors.id });
    if (removed.length === 0) throw notInSight();
    await forgiveProof(tx, accountId);
    if (!factor.confirmedAt) return;
    if (left === 0) await forgetFactors(tx, accountId);
    const entry = { action: 'second-factor.removed', subjectType: 'account' as const, subjectId: accountId };
    await record(tx, asker, { ...entry, detail: { factor: id, kind, name, left } });
    const mailKind = 'second-factor.removed';
    const mail = { key: `${mailKind}:${id}`, kind: mailKind, to: asker.email };
    await queueMail(tx, { ...mail, ...factorRemoved({ kind, name, left }) });
  });
}

/** What an account without any factor has no use for. */
export async function forgetFactors(tx: Tx, accountId: string): Promise<void> {
  await tx.delete(secondFactors).where(eq(secondFactors.accountId, accountId));
  await tx.delete(recoveryCodes).where(eq(recoveryCodes.accountId, accountId));
  await tx.update(sessions).set({ secondFactor: false }).where(eq(sessions.accountId, accountId));
}

/**
 * Make new recovery codes; the ones before no longer work.
 *
 * @throws {HttpError} 422 for a wrong password, 409 where there is no factor that they could stand in for
 */
export async function renewRecoveryCodes({ asker }: FactorsChange, { password }: WithPassword): Promise<RecoveryCodes> {
  await provePassword(asker, password, 'password');
  const { accountId, email } = asker;
  const { write } = await database();
  return write(async (tx) => {
    if (!(await hasFactor(tx, accountId)))
      throw new HttpError(409, 'Recovery codes stand in for a second factor: set one up first');
    await forgiveProof(tx, accountId);
    const codes = await replaceRecoveryCodes(tx, accountId);
    const kind = 'recovery-codes.renewed';
    await record(tx, asker, { action: kind, subjectType: 'account', subjectId: accountId });
    await queueMail(tx, { key: `${kind}:${newId()}`, kind, to: email, ...recoveryCodesRenewed() });
    return { recoveryCodes: codes };
  });
}
