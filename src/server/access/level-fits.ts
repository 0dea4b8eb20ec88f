import { and, eq, isNull, type SQL, sql } from 'drizzle-orm';
import { bands, complexes, levelFits, spectra } from '../../db/schema/index.ts';
import { database } from '../database.ts';
import { HttpError, notInSight } from '../http.ts';
import type { Asker } from './asker.ts';
import { type Access, leads, seesAsMember, worksIn } from './records.ts';
import { bandSight, complexSight, spectrumSight } from './sight.ts';

type Complex = typeof complexes.$inferSelect;
type LevelFit = typeof levelFits.$inferSelect;

export interface LevelFitChange extends Access<'change'> {
  readonly complex: Complex;
  readonly fit: LevelFit;
}

/**
 * Saved fits of a complex in sight that the asker sees: all spectra they rest on must be in sight. Who sees the complex
 * as a guest must see each of its bands as well, and a fit of typed wavenumbers is not shown to them at all.
 */
export function levelFitSight(asker: Asker, complex: Complex): SQL {
  const given = sql`json_each(${levelFits.input}, '$.bands') given`;
  const spectrumSeen = sql`exists (select 1 from ${spectra} join ${complexes} on ${complexes.id} = ${spectra.complexId}
    where ${spectra.id} = given.value ->> 'spectrum' and ${spectrumSight(asker)})`;
  const bandSeen = sql`exists (select 1 from ${bands} join ${spectra} on ${spectra.id} = ${bands.spectrumId}
    join ${complexes} on ${complexes.id} = ${spectra.complexId}
    where ${bands.id} = given.value ->> 'band' and ${bandSight(asker)})`;
  const asMember = seesAsMember(asker, complex);
  const shown = asMember
    ? sql`(given.value ->> 'spectrum' is null or ${spectrumSeen})`
    : sql`(${spectrumSeen} and ${bandSeen})`;
  const ofLab = worksIn(asker, complex.labId) ? undefined : mine(asker, asMember);
  return (
    and(isNull(levelFits.withdrawnAt), ofLab, sql`not exists (select 1 from ${given} where not ${shown})`) ?? sql`0`
  );
}

const mine = (asker: Asker, asMember: boolean): SQL =>
  asMember
    ? sql`(${levelFits.visibility} = 'programme' or ${levelFits.makerId} = ${asker.accountId})`
    : sql`${levelFits.visibility} = 'programme'`;

/** Its maker while a member, a lead of the complex's home lab and the steward may withdraw a fit. */
export const canWithdrawFit = (asker: Asker, complex: Complex, fit: LevelFit): boolean =>
  asker.scopes.has('write') &&
  (leads(asker, complex.labId) || (asker.labs.size > 0 && fit.makerId === asker.accountId));

/** @throws {HttpError} 404 not in sight, 403 seen but another's */
export async function mayWithdrawFit(asker: Asker, id: string): Promise<LevelFitChange> {
  const { db } = await database();
  const [row] = await db
    .select()
    .from(levelFits)
    .innerJoin(complexes, eq(complexes.id, levelFits.complexId))
    .where(and(eq(levelFits.id, id), complexSight(asker)));
  const [seen] = row
    ? await db
        .select({ id: levelFits.id })
        .from(levelFits)
        .where(and(eq(levelFits.id, id), levelFitSight(asker, row.complex)))
    : [];
  if (!row || !seen) throw notInSight();
  if (!canWithdrawFit(asker, row.complex, row.level_fit))
    throw new HttpError(403, 'Who saved a fit, a lead of the complex’s home lab or a steward may withdraw it');
  return { asker, complex: row.complex, fit: row.level_fit } as LevelFitChange;
}
