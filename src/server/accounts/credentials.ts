import { eq } from 'drizzle-orm';
import { LONGEST_PASSWORD_BYTES } from '#src/contracts/account.ts';
import { accounts } from '#src/db/schema/index.ts';
import { database } from '../database.ts';
import { log } from '../log.ts';
import { passwordFits } from '../passwords.ts';
import { countSignIn } from './throttle.ts';

export type AccountRow = typeof accounts.$inferSelect;

/** An address as it is kept: no space around it, small letters. */
export const plainAddress = (typed: string): string => typed.trim().toLowerCase();

/**
 * The account that an address and a password open, or null. Unknown address, wrong password, account without a
 * password and closed account cost the same work and give the same answer; the log alone tells them apart.
 *
 * Every call counts as an attempt; `forgiveSignIn` takes that back after a whole sign-in.
 *
 * @param given.email - in any case, as it was typed
 * @throws {HttpError} 429 with Retry-After
 */
export async function accountOfCredentials(
  given: { email: string; password: string },
  clientAddress: string | null,
): Promise<AccountRow | null> {
  const email = plainAddress(given.email);
  if (!email || !given.password || Buffer.byteLength(given.password) > LONGEST_PASSWORD_BYTES) return null;
  const { db } = await database();
  const [account] = await db.select().from(accounts).where(eq(accounts.email, email));
  const address = clientAddress ?? 'unknown';
  await countSignIn({ email, accountId: account?.id, address }).catch((error: unknown) => {
    refusedSignIn('too many attempts', { account: account?.id, address });
    throw error;
  });
  const fits = await passwordFits(account?.passwordHash ?? null, given.password);
  if (account && fits && account.state === 'active') return account;
  const reason = !account ? 'unknown address' : fits ? 'closed account' : 'wrong password';
  refusedSignIn(reason, { account: account?.id, address });
  return null;
}

/** Tell the log of a sign-in that was refused: never what was typed, since people type passwords into the wrong field. */
export const refusedSignIn = (reason: string, who: { account: string | undefined; address: string | null }): void =>
  log.warn({ reason, ...who }, 'sign-in refused');
