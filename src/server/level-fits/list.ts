import { and, desc, eq } from 'drizzle-orm';
import type { LevelFitRecord } from '../../contracts/level-fits.ts';
import { accounts, levelFits } from '../../db/schema/index.ts';
import { canWithdrawFit, levelFitSight } from '../access/level-fits.ts';
import { type ComplexAccess, seesAsMember } from '../access/records.ts';
import { database } from '../database.ts';

/** Saved fits of a complex that the asker sees, latest first; one of them with `id`. */
export async function listLevelFits({ asker, complex }: ComplexAccess, id?: string): Promise<LevelFitRecord[]> {
  const { db } = await database();
  const rows = await db
    .select({ fit: levelFits, maker: accounts.name })
    .from(levelFits)
    .innerJoin(accounts, eq(accounts.id, levelFits.makerId))
    .where(
      and(
        eq(levelFits.complexId, complex.id),
        id === undefined ? undefined : eq(levelFits.id, id),
        levelFitSight(asker, complex),
      ),
    )
    .orderBy(desc(levelFits.createdAt), desc(levelFits.id));
  const named = seesAsMember(asker, complex);
  return rows.map(({ fit, maker }) => ({
    id: fit.id,
    complex: complex.accession,
    centre: fit.centreOrdinal,
    // Stored as it passed the contract.
    input: fit.input as LevelFitRecord['input'],
    result: fit.result as LevelFitRecord['result'],
    release: fit.release,
    // Notes are remarks between members.
    note: named ? fit.note : null,
    visibility: fit.visibility,
    madeBy: named ? maker : null,
    createdAt: fit.createdAt,
    may: { withdraw: canWithdrawFit(asker, complex, fit) },
  }));
}
