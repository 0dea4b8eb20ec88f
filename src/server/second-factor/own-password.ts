import { eq } from 'drizzle-orm';
import { accounts } from '#src/db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import { database } from '../database.ts';
import { HttpError } from '../http.ts';
import { passwordFits } from '../passwords.ts';
import { countAttempt } from '../rate-limit.ts';

/**
 * Ask for the password again before a factor changes: who sits down at an open session knows it not.
 *
 * @throws {HttpError} 422 at `#/password` when it is wrong, 429 after too many attempts
 */
export async function requireOwnPassword({ accountId }: Asker, password: string): Promise<void> {
  await countAttempt(`second-factor-password:${accountId}`, { most: 20, windowMs: 15 * 60 * 1000 });
  const { db } = await database();
  const [account] = await db.select({ hash: accounts.passwordHash }).from(accounts).where(eq(accounts.id, accountId));
  if (!(await passwordFits(account?.hash ?? null, password)))
    throw new HttpError(422, 'Nothing was changed: the password is not the one of your account', {
      title: 'The password does not fit',
      errors: [{ pointer: '#/password', detail: 'This is not the password of your account' }],
    });
}
