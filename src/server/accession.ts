import { createHmac, randomBytes } from 'node:crypto';
import { eq, max } from 'drizzle-orm';
import { formatAccession } from '#src/contracts/accession.ts';
import type { Tx } from '../db/client.ts';
import { complexes, registrySettings } from '../db/schema/index.ts';
import { settings } from './settings.ts';

const HALF = 1000;
const ROUNDS = 8;
/** Where the highest number handed out is kept. */
const LAST = 'accession-last';

/**
 * A permutation of 0 … 999 999 chosen by a key: neither order nor gaps of the results tell how many were handed out.
 *
 * A balanced Feistel network over two digits-of-a-thousand, with addition in place of XOR so that it stays decimal.
 */
export function permuteNumber(counter: number, key: string): number {
  if (!Number.isInteger(counter) || counter < 0 || counter >= HALF * HALF)
    throw new RangeError(`no accession is left for number ${counter}`);
  let left = Math.floor(counter / HALF);
  let right = counter % HALF;
  for (let round = 0; round < ROUNDS; round++) {
    const digest = createHmac('sha256', key).update(`${round}:${right}`).digest();
    [left, right] = [right, (left + digest.readUInt32BE(0)) % HALF];
  }
  return left * HALF + right;
}

async function accessionKey(tx: Tx): Promise<string> {
  const [row] = await tx.select().from(registrySettings).where(eq(registrySettings.key, 'accession-key'));
  if (row) return row.value;
  const value = randomBytes(32).toString('base64url');
  await tx.insert(registrySettings).values({ key: 'accession-key', value });
  return value;
}

/** The next number and its accession, inside the transaction that stores the complex. Numbers are never reused. */
export async function nextAccession(tx: Tx): Promise<{ number: number; accession: string }> {
  const [row] = await tx.select({ last: max(complexes.number) }).from(complexes);
  // The highest number may have gone with a deleted draft.
  const [handedOut] = await tx.select().from(registrySettings).where(eq(registrySettings.key, LAST));
  const number = Math.max(row?.last ?? -1, Number(handedOut?.value ?? -1)) + 1;
  const value = String(number);
  await tx
    .insert(registrySettings)
    .values({ key: LAST, value })
    .onConflictDoUpdate({ target: registrySettings.key, set: { value } });
  return {
    number,
    accession: formatAccession(settings().accessionPrefix, permuteNumber(number, await accessionKey(tx))),
  };
}
