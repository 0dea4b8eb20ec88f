import { generateRegistrationOptions, verifyRegistrationResponse } from '@simplewebauthn/server';
import { COSEALG } from '@simplewebauthn/server/helpers';
import { and, eq } from 'drizzle-orm';
import type { PasskeyInput, RecoveryCodes, WithPassword } from '#src/contracts/second-factor.ts';
import { isUniqueViolation } from '#src/db/client.ts';
import { secondFactors } from '#src/db/schema/index.ts';
import type { FactorsChange } from '../access/second-factor.ts';
import { forgiveProof, provePassword } from '../accounts/prove-password.ts';
import { database } from '../database.ts';
import { HttpError } from '../http.ts';
import { newId, nowIso } from '../ids.ts';
import { log } from '../log.ts';
import { beginToCount } from './begin-to-count.ts';
import { CHALLENGE_LIFE_MS, keepChallenge, takeChallenge } from './challenges.ts';
import { requireRoom } from './factors.ts';
import { relyingParty } from './relying-party.ts';
import { confirmedFactors } from './rule.ts';

/** Signatures that authenticators make and Node checks without more. */
const ALGORITHMS = [COSEALG.EdDSA, COSEALG.ES256, COSEALG.RS256];

/** Passkeys of an account, as options name them to a browser. */
export async function passkeysOf(accountId: string): Promise<{ id: string; transports: string[] }[]> {
  const { db } = await database();
  const rows = await db
    .select({ id: secondFactors.credentialId, transports: secondFactors.transports })
    .from(secondFactors)
    .where(and(confirmedFactors(accountId), eq(secondFactors.kind, 'passkey')));
  return rows.map(({ id, transports }) => ({ id: id!, transports: transports ?? [] }));
}

/**
 * Begin to set up a passkey.
 *
 * @returns what the browser has to ask of the authenticator; its challenge holds for one answer and five minutes
 * @throws {HttpError} 422 for a wrong password, 409 when there are too many factors
 */
export async function startPasskey({ asker }: FactorsChange, { password }: WithPassword) {
  await provePassword(asker, password, 'password');
  await requireRoom(asker);
  const { id, name } = relyingParty();
  const options = await generateRegistrationOptions({
    rpID: id,
    rpName: name,
    userID: new TextEncoder().encode(asker.accountId),
    userName: asker.email,
    userDisplayName: asker.name,
    timeout: CHALLENGE_LIFE_MS,
    attestationType: 'none',
    excludeCredentials: await passkeysOf(asker.accountId),
    authenticatorSelection: { residentKey: 'preferred', userVerification: 'preferred' },
    supportedAlgorithmIDs: ALGORITHMS,
  });
  await keepChallenge(asker.accountId, 'register', options.challenge);
  const { write } = await database();
  await write((tx) => forgiveProof(tx, asker.accountId));
  return options;
}

const refuse = (detail: string) =>
  new HttpError(422, detail, {
    title: 'The passkey was not set up',
    errors: [{ pointer: '#/response', detail }],
  });

/**
 * Set up a passkey by the answer to `startPasskey`.
 *
 * @throws {HttpError} 422 for an answer that is late, used or not for this registry; 409 for a passkey that is set up
 */
export async function addPasskey(
  { asker }: FactorsChange,
  { name, response, endOthers }: PasskeyInput,
): Promise<RecoveryCodes> {
  const challenge = await takeChallenge(asker.accountId, 'register', response.response.clientDataJSON);
  if (challenge === null) throw refuse('This answer came too late, or was given before: begin again');
  const { credential } = await registered(response, challenge);
  const now = nowIso();
  const row = {
    id: newId(),
    accountId: asker.accountId,
    kind: 'passkey' as const,
    name,
    credentialId: credential.id,
    publicKey: Buffer.from(credential.publicKey).toString('base64url'),
    counter: credential.counter,
    transports: response.response.transports ?? [],
    createdAt: now,
    confirmedAt: now,
  };
  const { write } = await database();
  try {
    return await write(async (tx) => {
      await tx.insert(secondFactors).values(row);
      return { recoveryCodes: await beginToCount(tx, asker, row, endOthers) };
    });
  } catch (error) {
    if (isUniqueViolation(error)) throw new HttpError(409, 'This passkey is set up already');
    throw error;
  }
}

async function registered({ response: { transports, ...given }, ...key }: PasskeyInput['response'], challenge: string) {
  const { id, origins } = relyingParty();
  const response = {
    ...key,
    response: { ...given, ...(transports ? { transports } : {}) },
    clientExtensionResults: {},
  };
  try {
    const { registrationInfo } = await verifyRegistrationResponse({
      response,
      expectedChallenge: challenge,
      expectedOrigin: origins,
      expectedRPID: id,
      requireUserVerification: false,
      supportedAlgorithmIDs: ALGORITHMS,
    });
    if (registrationInfo) return registrationInfo;
  } catch (error) {
    log.warn({ reason: error instanceof Error ? error.message : 'unknown' }, 'passkey not set up');
  }
  throw refuse('The answer is not one that an authenticator gives to this registry: begin again on a page of it');
}
