import { generateAuthenticationOptions } from '@simplewebauthn/server';
import type { PasskeySignIn } from '#src/contracts/second-factor.ts';
import { accountOfCredentials } from '../accounts/credentials.ts';
import { HttpError } from '../http.ts';
import { CHALLENGE_LIFE_MS, keepChallenge } from './challenges.ts';
import { passkeysOf } from './passkeys.ts';
import { relyingParty } from './relying-party.ts';

/**
 * What the browser has to ask of a passkey, for who knows the password. Attempts count as those to sign in do.
 *
 * @param clientAddress - the client's network address, as the sign-in counts it
 * @throws {HttpError} 401 for a wrong password, and in the same way for an unknown address; 409 without a passkey; 429
 */
export async function signInOptions({ email, password }: PasskeySignIn, clientAddress: string) {
  const account = await accountOfCredentials({ email, password }, clientAddress);
  if (!account)
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
