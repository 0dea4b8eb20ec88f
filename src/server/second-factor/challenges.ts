import { and, eq, gt, lt } from 'drizzle-orm';
import { challenges } from '#src/db/schema/index.ts';
import { database } from '../database.ts';
import { newId, nowIso } from '../ids.ts';

type Purpose = (typeof challenges.$inferSelect)['purpose'];

/** How long an authenticator may take to answer, in milliseconds. */
export const CHALLENGE_LIFE_MS = 5 * 60 * 1000;

/** Keep a challenge for the one answer to it. */
export async function keepChallenge(accountId: string, purpose: Purpose, challenge: string): Promise<void> {
  const { write } = await database();
  const createdAt = nowIso();
  const expiresAt = new Date(Date.parse(createdAt) + CHALLENGE_LIFE_MS).toISOString();
  await write(async (tx) => {
    await tx.delete(challenges).where(lt(challenges.expiresAt, createdAt));
    await tx.insert(challenges).values({ id: newId(), accountId, purpose, challenge, createdAt, expiresAt });
  });
}

/**
 * Take the challenge that an answer names. It is gone afterwards, whatever becomes of the answer.
 *
 * @param clientData - base64url of the answer's client data
 * @returns null where it names none that was put to this account for this purpose and still holds
 */
export async function takeChallenge(accountId: string, purpose: Purpose, clientData: string): Promise<string | null> {
  const named = challengeIn(clientData);
  if (named === null) return null;
  const { write } = await database();
  const [taken] = await write((tx) =>
    tx
      .delete(challenges)
      .where(
        and(
          eq(challenges.accountId, accountId),
          eq(challenges.purpose, purpose),
          eq(challenges.challenge, named),
          gt(challenges.expiresAt, nowIso()),
        ),
      )
      .returning({ challenge: challenges.challenge }),
  );
  return taken?.challenge ?? null;
}

function challengeIn(clientData: string): string | null {
  try {
    const { challenge } = JSON.parse(Buffer.from(clientData, 'base64url').toString()) as { challenge?: unknown };
    return typeof challenge === 'string' ? challenge : null;
  } catch {
    return null;
  }
}
