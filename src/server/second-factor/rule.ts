import { and, eq, isNotNull } from 'drizzle-orm';
import type { Db, Tx } from '../../db/client.ts';
import { secondFactors } from '../../db/schema/index.ts';
import { settings } from '../settings.ts';

/** Whether an account has its rights of a steward only with a second factor: in production, not in a demo. */
export const factorRequired = ({ steward }: { steward: boolean }): boolean =>
  steward && settings().mode === 'production';

export const confirmedFactors = (accountId: string) =>
  and(eq(secondFactors.accountId, accountId), isNotNull(secondFactors.confirmedAt));

/** Whether an account has a factor that counts. */
export async function hasFactor(db: Db | Tx, accountId: string): Promise<boolean> {
  const found = await db
    .select({ id: secondFactors.id })
    .from(secondFactors)
    .where(confirmedFactors(accountId))
    .limit(1);
  return found.length > 0;
}
