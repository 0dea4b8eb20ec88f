import { and, eq, isNull, lt, or } from 'drizzle-orm';
import { accounts, limits, secondFactors } from '#src/db/schema/index.ts';
import { database } from '../database.ts';
import { newId, nowIso } from '../ids.ts';
import { log } from '../log.ts';
import { recoveryCodeUsed } from '../mail/second-factor-mails.ts';
import { queueMail } from '../mail.ts';
import { countAttempt } from '../rate-limit.ts';
import { record } from '../trail.ts';
import { passesPasskey } from './assertion.ts';
import { decipher } from './cipher.ts';
import { recoveryCodesLeft, useRecoveryCode } from './recovery-codes.ts';
import { confirmedFactors } from './rule.ts';
import { totpStep } from './totp.ts';

const QUARTER_HOUR = 15 * 60 * 1000; // ms
const DAY = 24 * 3600 * 1000; // ms

/** The kinds of confirmed factors that an account has, each once; none: the password alone signs it in. */
export async function factorKinds(accountId: string): Promise<('totp' | 'passkey')[]> {
  const { db } = await database();
  const rows = await db
    .selectDistinct({ kind: secondFactors.kind })
    .from(secondFactors)
    .where(confirmedFactors(accountId));
  return rows.map(({ kind }) => kind);
}

/**
 * Whether a second factor is shown, to be asked once the password is known to be right. What is shown is used up: no
 * code and no answer of a passkey counts twice.
 *
 * @param given - `code`: six digits of an app, or a recovery code; `passkey`: the assertion as JSON text
 * @throws {HttpError} 429 after too many codes for the account, right or wrong
 */
export async function passesSecondFactor(
  accountId: string,
  given: { code?: string | undefined; passkey?: string | undefined },
): Promise<boolean> {
  if (given.passkey) return passesPasskey(accountId, given.passkey);
  const code = given.code?.trim();
  if (!code || code.length > 100) return false;
  const key = `second-factor:${accountId}`;
  await countAttempt(key, { most: 10, windowMs: QUARTER_HOUR });
  // Three of a million codes fit at any moment: patience must not find one either.
  await countAttempt(`second-factor-day:${accountId}`, { most: 50, windowMs: DAY });
  const digits = code.replace(/[\s-]/g, '');
  const passes = await (/^\d{6}$/.test(digits) ? passesTotp(accountId, digits) : passesRecovery(accountId, code));
  const { write } = await database();
  if (passes) await write((tx) => tx.delete(limits).where(eq(limits.key, key)));
  return passes;
}

async function passesTotp(accountId: string, code: string): Promise<boolean> {
  const { db } = await database();
  const rows = await db
    .select()
    .from(secondFactors)
    .where(and(confirmedFactors(accountId), eq(secondFactors.kind, 'totp')));
  for (const row of rows) if (await takeTotp(row, code)) return true;
  return false;
}

/** Take a code of one app, where it fits and neither it nor a later one was taken before. */
async function takeTotp(
  { id, secret }: Pick<typeof secondFactors.$inferSelect, 'id' | 'secret'>,
  code: string,
): Promise<boolean> {
  const step = fittingStep(id, secret, code);
  if (step === null) return false;
  const { write } = await database();
  const notTaken = or(isNull(secondFactors.lastStep), lt(secondFactors.lastStep, step));
  const taken = await write((tx) =>
    tx
      .update(secondFactors)
      .set({ lastStep: step, lastUsedAt: nowIso() })
      .where(and(eq(secondFactors.id, id), notTaken))
      .returning({ id: secondFactors.id }),
  );
  return taken.length > 0;
}

function fittingStep(id: string, secret: string | null, code: string): number | null {
  try {
    return totpStep(decipher(secret ?? '', id), code, Date.now());
  } catch {
    log.error({ factor: id }, 'the secret of a factor cannot be read: AUTH_SECRET changed, or the row was altered');
    return null;
  }
}

async function passesRecovery(accountId: string, code: string): Promise<boolean> {
  const { write } = await database();
  return write(async (tx) => {
    if (!(await useRecoveryCode(tx, accountId, code))) return false;
    const left = await recoveryCodesLeft(tx, accountId);
    const entry = { action: 'recovery-code.used', subjectType: 'account' as const, subjectId: accountId };
    await record(tx, { accountId }, { ...entry, detail: { left } });
    const [account] = await tx.select({ email: accounts.email }).from(accounts).where(eq(accounts.id, accountId));
    const kind = 'second-factor.recovery';
    if (account) await queueMail(tx, { key: `${kind}:${newId()}`, kind, to: account.email, ...recoveryCodeUsed(left) });
    return true;
  });
}
