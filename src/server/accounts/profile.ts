import { and, desc, eq, gt, isNull, sql } from 'drizzle-orm';
import type { Account, AccountPatch } from '#src/contracts/account.ts';
import { accounts, addressChanges } from '#src/db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import { ownLabs } from '../access/frame-user.ts';
import { database } from '../database.ts';
import { HttpError } from '../http.ts';
import { nowIso } from '../ids.ts';
import { factorRequired } from '../second-factor/rule.ts';
import { factorKinds } from '../second-factor/verify.ts';
import { record } from '../trail.ts';

/** A change of address that both sides may still confirm. */
export const pendingChange = () =>
  and(isNull(addressChanges.doneAt), isNull(addressChanges.cancelledAt), gt(addressChanges.expiresAt, nowIso()));

/** The asker's own account, as the page of it shows it. */
export async function accountRecord(asker: Asker): Promise<Account> {
  const { db } = await database();
  const [[account], [change], labs, factors] = await Promise.all([
    db.select().from(accounts).where(eq(accounts.id, asker.accountId)),
    db
      .select()
      .from(addressChanges)
      .where(and(eq(addressChanges.accountId, asker.accountId), pendingChange()))
      .orderBy(desc(addressChanges.id))
      .limit(1),
    ownLabs(asker),
    factorKinds(asker.accountId),
  ]);
  const { id, name, email, steward, createdAt } = account!;
  return {
    id,
    name,
    email,
    steward,
    labs,
    factors,
    secondFactorRequired: factorRequired({ steward }),
    addressChange: change
      ? {
          newEmail: change.newEmail,
          oldConfirmed: change.oldConfirmedAt !== null,
          newConfirmed: change.newConfirmedAt !== null,
          createdAt: change.createdAt,
          expiresAt: change.expiresAt,
        }
      : null,
    createdAt,
  };
}

/** Change one's own name. @throws {HttpError} 412 when the account was closed meanwhile */
export async function changeAccount(asker: Asker, { name }: AccountPatch): Promise<Account> {
  const { write } = await database();
  await write(async (tx) => {
    const [before] = await tx.select().from(accounts).where(eq(accounts.id, asker.accountId));
    if (before?.state !== 'active') throw new HttpError(412, 'Your account was closed meanwhile');
    if (before.name === name) return;
    await tx
      .update(accounts)
      .set({ name, version: sql`${accounts.version} + 1` })
      .where(eq(accounts.id, asker.accountId));
    const detail = { name: { from: before.name, to: name } };
    await record(tx, asker, { action: 'change', subjectType: 'account', subjectId: asker.accountId, detail });
  });
  return accountRecord(asker);
}
