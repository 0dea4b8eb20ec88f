import { and, eq, isNull } from 'drizzle-orm';
import { toString as qrText } from 'qrcode';
import type { RecoveryCodes, TotpConfirmation, TotpInput, TotpStarted } from '#src/contracts/second-factor.ts';
import { secondFactors } from '#src/db/schema/index.ts';
import type { FactorChange, FactorsChange } from '../access/second-factor.ts';
import { forgiveProof, provePassword } from '../accounts/prove-password.ts';
import { database } from '../database.ts';
import { HttpError, notInSight } from '../http.ts';
import { newId, nowIso } from '../ids.ts';
import { countAttempt } from '../rate-limit.ts';
import { beginToCount } from './begin-to-count.ts';
import { decipher, encipher } from './cipher.ts';
import { requireRoom } from './factors.ts';
import { groupedBase32, newTotpSecret, totpStep, totpUri } from './totp.ts';

/** How long a begun factor may wait for its first code, in milliseconds. */
const BEGUN_FOR_MS = 3600 * 1000;

/**
 * Begin to set up an authenticator app: it counts when a code of it was confirmed. One that was begun before and never
 * confirmed is forgotten.
 *
 * @returns the shared secret, which is told in this answer and nowhere else
 * @throws {HttpError} 422 for a wrong password, 409 when there are too many factors
 */
export async function startTotp({ asker }: FactorsChange, { name, password }: TotpInput): Promise<TotpStarted> {
  await provePassword(asker, password, 'password');
  await requireRoom(asker);
  const { accountId, email } = asker;
  const [id, secret] = [newId(), newTotpSecret()];
  const { write } = await database();
  await write(async (tx) => {
    await forgiveProof(tx, accountId);
    await tx
      .delete(secondFactors)
      .where(
        and(eq(secondFactors.accountId, accountId), eq(secondFactors.kind, 'totp'), isNull(secondFactors.confirmedAt)),
      );
    const row = { id, accountId, kind: 'totp' as const, name, secret: encipher(secret, id), createdAt: nowIso() };
    await tx.insert(secondFactors).values(row);
  });
  const uri = totpUri(secret, email);
  return { id, secret: groupedBase32(secret), uri, qr: await qrText(uri, { type: 'svg', margin: 4 }) };
}

/**
 * Confirm an authenticator app by the code that it shows. That code is used up by it.
 *
 * @throws {HttpError} 422 for a code that does not fit, 409 when it was confirmed before or begun too long ago
 */
export async function confirmTotp(
  { asker, factor }: FactorChange,
  { code, endOthers }: TotpConfirmation,
): Promise<RecoveryCodes> {
  if (factor.kind !== 'totp' || !factor.secret) throw notInSight();
  if (factor.confirmedAt) throw new HttpError(409, 'This authenticator app was confirmed before');
  if (Date.parse(factor.createdAt) < Date.now() - BEGUN_FOR_MS)
    throw new HttpError(409, 'It was begun more than an hour ago: begin again, with a new secret');
  await countAttempt(`second-factor-confirm:${asker.accountId}`, { most: 20, windowMs: 15 * 60 * 1000 });
  const step = totpStep(decipher(factor.secret, factor.id), code.replace(/[\s-]/g, ''), Date.now());
  if (step === null)
    throw new HttpError(422, 'Type the six figures that the app shows just now, and see that its clock is right', {
      title: 'The code does not fit',
      errors: [{ pointer: '#/code', detail: 'This is not the code of this moment' }],
    });
  const { write } = await database();
  return write(async (tx) => {
    const now = nowIso();
    const confirmed = await tx
      .update(secondFactors)
      .set({ confirmedAt: now, lastUsedAt: now, lastStep: step })
      .where(and(eq(secondFactors.id, factor.id), isNull(secondFactors.confirmedAt)))
      .returning({ id: secondFactors.id });
    if (confirmed.length === 0) throw new HttpError(409, 'It was confirmed or removed meanwhile: read the list again');
    return { recoveryCodes: await beginToCount(tx, asker, factor, endOthers) };
  });
}
