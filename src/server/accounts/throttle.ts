import { and, eq, gt, inArray, sql } from 'drizzle-orm';
import type { Tx } from '#src/db/client.ts';
import { limits, sessions } from '#src/db/schema/index.ts';
import { database } from '../database.ts';
import { sha256 } from '../ids.ts';
import { countAttempt } from '../rate-limit.ts';

const MINUTE = 60 * 1000; // ms
const DAY = 24 * 60 * MINUTE;

/**
 * Three limits, each against another way of guessing. All count every attempt before the password is looked at, so
 * that attempts sent at once are counted, too, and all count addresses without an account like those with one.
 *
 * - One client against one account: 10 in a quarter of an hour. A person who mistypes gets on; a guesser has 960 tries a
 *   day against 15 characters. It locks nobody out but the one who guesses.
 * - Any clients against one account: 100 in an hour, the most that NIST SP 800-63B (§3.2.2) lets pass before something is
 *   done. One stranger cannot use it up (the first limit lets 40 an hour of his through, and what it refuses does not
 *   count here); a stranger with many addresses can, but then locks out only places from which the person has not
 *   signed in during the last 30 days. At their usual desk they still get in.
 * - One client against many accounts: 60 in a quarter of an hour. A successful sign-in is given back, so that a whole
 *   building behind one address may sign in of a morning.
 */
const PAIR = { most: 10, windowMs: 15 * MINUTE };
const ACCOUNT = { most: 100, windowMs: 60 * MINUTE };
const CLIENT = { most: 60, windowMs: 15 * MINUTE };
const KNOWN_FOR = 30 * DAY;

/** Addresses are hashed: what strangers type is not kept, and a key has one length. */
const keysOf = (email: string, address: string) => {
  const account = sha256(email).slice(0, 32);
  return {
    pair: `sign-in:${account}:${address}`,
    account: `sign-in:${account}`,
    client: `sign-in-from:${address}`,
  };
};

/** Who tries to sign in, from where. */
export interface Attempt {
  /** In small letters. */
  email: string;
  /** The account of that address, if there is one. */
  accountId: string | undefined;
  address: string;
}

/** Count an attempt to prove a password. @throws {HttpError} 429 with Retry-After */
export async function countSignIn({ email, accountId, address }: Attempt): Promise<void> {
  const keys = keysOf(email, address);
  const isKnown = await hasSignedInFrom(accountId ?? '', address);
  await countAttempt(keys.client, CLIENT);
  await countAttempt(keys.pair, PAIR);
  if (!isKnown) await countAttempt(keys.account, ACCOUNT);
}

async function hasSignedInFrom(accountId: string, address: string): Promise<boolean> {
  const { db } = await database();
  const since = new Date(Date.now() - KNOWN_FOR).toISOString();
  const from = and(eq(sessions.accountId, accountId), eq(sessions.address, address), gt(sessions.createdAt, since));
  const found = await db.select({ id: sessions.id }).from(sessions).where(from).limit(1);
  return found.length > 0;
}

/** Forget the attempts on an account, by everybody, after somebody proved to be its owner. */
export async function forgiveAccount(tx: Tx, email: string, address: string): Promise<void> {
  const { pair, account } = keysOf(email, address);
  await tx.delete(limits).where(inArray(limits.key, [pair, account]));
}

/** What a successful sign-in takes back: the attempts on the account, and its own one from the client's count. */
export async function forgiveSignIn(tx: Tx, email: string, address: string): Promise<void> {
  await forgiveAccount(tx, email, address);
  await tx
    .update(limits)
    .set({ count: sql`max(0, ${limits.count} - 1)` })
    .where(eq(limits.key, keysOf(email, address).client));
}
