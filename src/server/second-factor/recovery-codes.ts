import { and, count, eq, isNull } from 'drizzle-orm';
import { Secret } from 'otpauth';
import type { Db, Tx } from '#src/db/client.ts';
import { recoveryCodes } from '#src/db/schema/index.ts';
import { nowIso, sha256 } from '../ids.ts';

export const RECOVERY_CODES = 10;
/** 28 letters of five bits: above the 112 bits from which on a plain hash keeps a code (ASVS 6.5.2). */
const LETTERS = 28;

const newCode = (): string => {
  const letters = new Secret({ size: Math.ceil((LETTERS * 5) / 8) }).base32.slice(0, LETTERS);
  return letters.replace(/(.{4})(?=.)/g, '$1-');
};

/** What was typed, as it was printed: without gaps, and with the letters that are taken for figures. */
const plain = (typed: string): string =>
  typed.toUpperCase().replace(/[\s-]/g, '').replaceAll('0', 'O').replaceAll('1', 'I').replaceAll('8', 'B');

const hashOf = (typed: string): string => sha256(plain(typed));

/** Make ten new codes; the ones before open nothing from here on. Only their hashes stay. */
export async function replaceRecoveryCodes(tx: Tx, accountId: string): Promise<string[]> {
  const codes = Array.from({ length: RECOVERY_CODES }, newCode);
  const createdAt = nowIso();
  await tx.delete(recoveryCodes).where(eq(recoveryCodes.accountId, accountId));
  await tx.insert(recoveryCodes).values(codes.map((code) => ({ accountId, hash: hashOf(code), createdAt })));
  return codes;
}

const unused = (accountId: string) => and(eq(recoveryCodes.accountId, accountId), isNull(recoveryCodes.usedAt));

/** Use a code up. Whether there was such a code, not used before. */
export async function useRecoveryCode(tx: Tx, accountId: string, typed: string): Promise<boolean> {
  const used = await tx
    .update(recoveryCodes)
    .set({ usedAt: nowIso() })
    .where(and(unused(accountId), eq(recoveryCodes.hash, hashOf(typed))))
    .returning({ hash: recoveryCodes.hash });
  return used.length > 0;
}

export async function recoveryCodesLeft(db: Db | Tx, accountId: string): Promise<number> {
  const [row] = await db.select({ left: count() }).from(recoveryCodes).where(unused(accountId));
  return row?.left ?? 0;
}
