import { and, eq } from 'drizzle-orm';
import { secondFactors } from '../../db/schema/index.ts';
import { database } from '../database.ts';
import { HttpError, notInSight } from '../http.ts';
import { hasFactor } from '../second-factor/rule.ts';
import type { Asker } from './asker.ts';
import type { Access } from './records.ts';

/** One's own second factors, from a session that may change them. */
export interface FactorsChange extends Access<'change'> {}
export interface FactorChange extends FactorsChange {
  readonly factor: typeof secondFactors.$inferSelect;
}

/**
 * Who has a factor must have shown one to change anything about them: otherwise a session from before would be a way
 * round it.
 *
 * @throws {HttpError} 403
 */
export async function mayChangeFactors(asker: Asker): Promise<FactorsChange> {
  const { db } = await database();
  if (!asker.secondFactor && (await hasFactor(db, asker.accountId)))
    throw new HttpError(403, 'This session began without your second factor: sign out, and in again with it');
  return { asker } as FactorsChange;
}

/** @throws {HttpError} 404 for a factor that is not the asker's own, 403 as above */
export async function mayChangeFactor(asker: Asker, id: string): Promise<FactorChange> {
  const { db } = await database();
  const [factor] = await db
    .select()
    .from(secondFactors)
    .where(and(eq(secondFactors.id, id), eq(secondFactors.accountId, asker.accountId)));
  if (!factor) throw notInSight();
  return { ...(await mayChangeFactors(asker)), factor };
}
