import { verifyAuthenticationResponse } from '@simplewebauthn/server';
import { and, eq } from 'drizzle-orm';
import * as z from 'zod';
import { secondFactors } from '#src/db/schema/index.ts';
import { database } from '../database.ts';
import { nowIso } from '../ids.ts';
import { log } from '../log.ts';
import { takeChallenge } from './challenges.ts';
import { relyingParty } from './relying-party.ts';
import { confirmedFactors } from './rule.ts';

/** What a browser answers to request options (WebAuthn §5.2.2), as far as it is read here. */
const Assertion = z.object({
  id: z.string().max(2000),
  rawId: z.string().max(2000),
  type: z.literal('public-key'),
  response: z.object({ clientDataJSON: z.string(), authenticatorData: z.string(), signature: z.string() }),
});

/** The answer of a passkey from its JSON text; null for anything else. */
function readAssertion(text: string): z.infer<typeof Assertion> | null {
  try {
    return Assertion.safeParse(JSON.parse(text)).data ?? null;
  } catch {
    return null;
  }
}

/**
 * Whether a passkey of the account signed a challenge that was put to it. The challenge is used up either way. A
 * signature counter that did not rise is refused: the key may have been copied (WebAuthn §7.2, step 22).
 *
 * @param text - the assertion as JSON
 */
export async function passesPasskey(accountId: string, text: string): Promise<boolean> {
  const answer = readAssertion(text);
  const challenge = answer && (await takeChallenge(accountId, 'sign-in', answer.response.clientDataJSON));
  if (!answer || !challenge) return false;
  const { db, write } = await database();
  const ofAccount = and(confirmedFactors(accountId), eq(secondFactors.credentialId, answer.id));
  const [key] = await db.select().from(secondFactors).where(ofAccount);
  if (!key) return false;
  const counter = await newCounter(answer, challenge, key);
  if (counter === null) return false;
  const used = await write((tx) =>
    tx
      .update(secondFactors)
      .set({ counter, lastUsedAt: nowIso() })
      // Of two answers that come at once with one counter, one counts.
      .where(and(ofAccount, eq(secondFactors.counter, key.counter ?? 0)))
      .returning({ id: secondFactors.id }),
  );
  return used.length > 0;
}

async function newCounter(
  answer: z.infer<typeof Assertion>,
  expectedChallenge: string,
  key: typeof secondFactors.$inferSelect,
): Promise<number | null> {
  const { id, origins } = relyingParty();
  try {
    const { verified, authenticationInfo } = await verifyAuthenticationResponse({
      response: { ...answer, clientExtensionResults: {} },
      expectedChallenge,
      expectedOrigin: origins,
      expectedRPID: id,
      credential: {
        id: answer.id,
        publicKey: new Uint8Array(Buffer.from(key.publicKey ?? '', 'base64url')),
        counter: key.counter ?? 0,
      },
      // The password was asked for already: a key that cannot ask for a PIN is a second factor all the same.
      requireUserVerification: false,
    });
    return verified ? authenticationInfo.newCounter : null;
  } catch (error) {
    log.warn({ factor: key.id, reason: error instanceof Error ? error.message : 'unknown' }, 'passkey refused');
    return null;
  }
}
