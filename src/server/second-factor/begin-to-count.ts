import { and, eq, ne } from 'drizzle-orm';
import type { Tx } from '#src/db/client.ts';
import { secondFactors, sessions } from '#src/db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import { factorAdded } from '../mail/second-factor-mails.ts';
import { queueMail } from '../mail.ts';
import { endSessions } from '../sessions.ts';
import { record } from '../trail.ts';
import { replaceRecoveryCodes } from './recovery-codes.ts';
import { confirmedFactors } from './rule.ts';

type Factor = Pick<typeof secondFactors.$inferSelect, 'id' | 'kind' | 'name'>;

/**
 * What follows when a factor begins to count, in the transaction that confirms it: the trail, a mail to the owner, and
 * with the first one recovery codes and the end of the other sessions. The session in which it was shown has it.
 *
 * @returns the recovery codes, ten at the first factor, else none
 */
export async function beginToCount(tx: Tx, asker: Asker, factor: Factor, endOthers: boolean): Promise<string[]> {
  const { accountId, sessionId, email } = asker;
  const others = await tx
    .select({ id: secondFactors.id })
    .from(secondFactors)
    .where(and(confirmedFactors(accountId), ne(secondFactors.id, factor.id)));
  const first = others.length === 0;
  const sessionsEnded = first && endOthers ? await endSessions(tx, accountId, sessionId) : 0;
  if (sessionId) await tx.update(sessions).set({ secondFactor: true }).where(eq(sessions.id, sessionId));
  const recoveryCodes = first ? await replaceRecoveryCodes(tx, accountId) : [];
  const { id, kind, name } = factor;
  await record(tx, asker, {
    action: 'second-factor.added',
    subjectType: 'account',
    subjectId: accountId,
    detail: { factor: id, kind, name, sessionsEnded, recoveryCodes: recoveryCodes.length },
  });
  await queueMail(tx, {
    key: `second-factor-added:${id}`,
    kind: 'second-factor.added',
    to: email,
    ...factorAdded({ kind, name }),
  });
  return recoveryCodes;
}
