import { eq } from 'drizzle-orm';
import type { Tx } from '#src/db/client.ts';
import { accounts, limits } from '#src/db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import { database } from '../database.ts';
import { HttpError } from '../http.ts';
import { log } from '../log.ts';
import { passwordFits } from '../passwords.ts';
import { countAttempt } from '../rate-limit.ts';
import type { AccountRow } from './credentials.ts';

/** Who found an open browser may guess as often as at the door. */
const LIMIT = { most: 10, windowMs: 15 * 60 * 1000 };
const keyOf = (accountId: string) => `password:${accountId}`;

/**
 * The asker's account, once the asker has shown its password again, for what a borrowed session must not do.
 *
 * @param field - of the body, to which a refusal points
 * @throws {HttpError} 422 for a wrong password, 429 with Retry-After
 */
export async function provePassword(asker: Asker, password: string, field: string): Promise<AccountRow> {
  await countAttempt(keyOf(asker.accountId), LIMIT);
  const { db } = await database();
  const [account] = await db.select().from(accounts).where(eq(accounts.id, asker.accountId));
  if (account && (await passwordFits(account.passwordHash, password))) return account;
  log.warn({ account: asker.accountId }, 'the password asked for again was wrong');
  const detail = 'This is not your present password';
  throw new HttpError(422, detail, { errors: [{ pointer: `#/${field}`, detail }] });
}

/** Forget the attempts of `provePassword`, when what followed was done. */
export async function forgiveProof(tx: Tx, accountId: string): Promise<void> {
  await tx.delete(limits).where(eq(limits.key, keyOf(accountId)));
}
