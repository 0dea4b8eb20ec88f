import { secondFactors } from '#src/db/schema/index.ts';
import { database } from '../database.ts';
import { newId } from '../ids.ts';
import { factorsReset } from '../mail/second-factor-mails.ts';
import { queueMail } from '../mail.ts';
import { endSessions } from '../sessions.ts';
import { record } from '../trail.ts';
import { forgetFactors } from './factors.ts';
import { confirmedFactors } from './rule.ts';

/**
 * Remove every second factor of a person who lost theirs and has no recovery code left: the operator's way, by a
 * script on the server's own machine. The person is signed out everywhere, and told.
 *
 * @returns how many factors there were; with none nothing happens
 */
export async function resetFactors({ id, email }: { id: string; email: string }): Promise<number> {
  const { write } = await database();
  return write(async (tx) => {
    const factors = (await tx.select({ id: secondFactors.id }).from(secondFactors).where(confirmedFactors(id))).length;
    if (factors === 0) return 0;
    await forgetFactors(tx, id);
    const sessionsEnded = await endSessions(tx, id);
    const kind = 'second-factor.reset';
    const entry = { action: kind, subjectType: 'account' as const, subjectId: id };
    await record(tx, { accountId: null }, { ...entry, detail: { factors, sessionsEnded, by: 'script' } });
    await queueMail(tx, { key: `${kind}:${newId()}`, kind, to: email, ...factorsReset() });
    return factors;
  });
}
