import { and, count, desc, eq } from 'drizzle-orm';
import type { DaySheet } from '#src/contracts/day-sheet.ts';
import { complexes, labs, spectra } from '#src/db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import { complexSight, spectrumSight } from '../access/sight.ts';
import { database } from '../database.ts';

const SHOWN = 6;

/** Complexes that the asker began and did not register, the last touched first. */
export async function complexDrafts(asker: Asker): Promise<DaySheet['drafts']> {
  const { db } = await database();
  const mine = and(eq(complexes.state, 'draft'), eq(complexes.makerId, asker.accountId), complexSight(asker));
  const [items, [counted]] = await Promise.all([
    db
      .select({
        accession: complexes.accession,
        formula: complexes.formula,
        lab: labs.name,
        updatedAt: complexes.updatedAt,
      })
      .from(complexes)
      .innerJoin(labs, eq(labs.id, complexes.labId))
      .where(mine)
      .orderBy(desc(complexes.updatedAt), desc(complexes.id))
      .limit(SHOWN),
    db.select({ total: count() }).from(complexes).where(mine),
  ]);
  return { items, total: counted?.total ?? 0 };
}

/** Spectra that the asker uploaded and did not register. */
export async function spectrumDrafts(asker: Asker): Promise<DaySheet['spectrumDrafts']> {
  const { db } = await database();
  const mine = and(eq(spectra.state, 'draft'), eq(spectra.makerId, asker.accountId), spectrumSight(asker));
  const [items, [counted]] = await Promise.all([
    db
      .select({ id: spectra.id, title: spectra.title, formula: complexes.formula, createdAt: spectra.createdAt })
      .from(spectra)
      .innerJoin(complexes, eq(complexes.id, spectra.complexId))
      .where(mine)
      .orderBy(desc(spectra.createdAt), desc(spectra.id))
      .limit(SHOWN),
    db.select({ total: count() }).from(spectra).innerJoin(complexes, eq(complexes.id, spectra.complexId)).where(mine),
  ]);
  return { items, total: counted?.total ?? 0 };
}
