import { generateAuthenticationOptions } from '@simplewebauthn/server';
import { eq } from 'drizzle-orm';
import type { PasskeySignIn } from '#src/contracts/second-factor.ts';
import { accounts } from '#src/db/schema/index.ts';
import { database } from '../database.ts';
import { HttpError } from '../http.ts';
import { passwordFits } from '../passwords.ts';
import { countAttempt } from '../rate-limit.ts';
import { CHALLENGE_LIFE_MS, keepChallenge } from './challenges.ts';
import { passkeysOf } from './passkeys.ts';
import { relyingParty } from './relying-party.ts';

/**
 * What the browser has to ask of a passkey, for who knows the password. Attempts count as those to sign in do.
 *
 * @throws {HttpError} 401 for a wrong password, and in the same way for an unknown address; 409 without a passkey; 429
 */
export async function signInOptions({ email, password }: PasskeySignIn) {
  await countAttempt(`sign-in:${email}`, { most: 10, windowMs: 15 * 60 * 1000 });
  const { db } = await database();
  const [account] = await db.select().from(accounts).where(eq(accounts.email, email));
  // The same work for an unknown address as for a wrong password.
  const fits = await passwordFits(account?.passwordHash ?? null, password);
  if (!account || !fits || account.state !== 'active')
    throw new HttpError(401, 'Address and password do not belong together', {
      headers: { 'www-authenticate': 'Bearer realm="zaffre"' },
    });
  const allowCredentials = await passkeysOf(account.id);
  if (allowCredentials.length === 0) throw new HttpError(409, 'This account has no passkey: sign in by a code');
  const options = await generateAuthenticationOptions({
    rpID: relyingParty().id,
    allowCredentials,
    timeout: CHALLENGE_LIFE_MS,
    userVerification: 'preferred',
  });
  await keepChallenge(account.id, 'sign-in', options.challenge);
  return options;
}
