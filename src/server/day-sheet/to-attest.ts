import { and, count, desc, eq, inArray, ne, not, type SQL, sql } from 'drizzle-orm';
import type { DaySheet } from '#src/contracts/day-sheet.ts';
import { bands, complexes, labs, spectra } from '#src/db/schema/index.ts';
import { type Asker, labsWith } from '../access/asker.ts';
import { bandSight } from '../access/sight.ts';
import { database } from '../database.ts';

const SHOWN = 8;

/**
 * Bands that the asker might judge, as `canJudge` of access/records.ts has it: a lead every one in sight, a
 * contributor those measured by another lab that allows it, nobody else any.
 */
function mayJudge(asker: Asker): SQL | null {
  if (labsWith(asker, 'lead').length > 0) return sql`1`;
  const mine = [...asker.labs.keys()];
  if (mine.length === 0) return null;
  return and(eq(labs.outsideAttest, true), not(inArray(spectra.labId, mine)))!;
}

/** Spectra whose proposed assignments wait for somebody like the asker; those of labs the asker leads come first. */
export async function bandsToAttest(asker: Asker): Promise<DaySheet['toAttest']> {
  const judged = mayJudge(asker);
  if (!judged) return { items: [], total: 0 };
  const { db } = await database();
  const waiting = and(
    eq(bands.state, 'proposed'),
    ne(bands.class, 'unassigned'),
    ne(bands.proposedBy, asker.accountId),
    eq(spectra.state, 'registered'),
    judged,
    // What is seen as a guest of a folio is not one's own to judge.
    bandSight({ ...asker, grants: [] }),
  );
  const led = labsWith(asker, 'lead');
  const ofOwnLab = sql`(${led.length > 0 ? inArray(spectra.labId, led) : sql`null`})`;
  const [rows, [counted]] = await Promise.all([
    db
      .select({
        id: spectra.id,
        title: spectra.title,
        formula: complexes.formula,
        lab: labs.name,
        bands: count(),
        classes: sql<string>`group_concat(distinct ${bands.class})`,
      })
      .from(bands)
      .innerJoin(spectra, eq(spectra.id, bands.spectrumId))
      .innerJoin(complexes, eq(complexes.id, spectra.complexId))
      .innerJoin(labs, eq(labs.id, spectra.labId))
      .where(waiting)
      .groupBy(spectra.id)
      .orderBy(desc(ofOwnLab), desc(spectra.createdAt), desc(spectra.id))
      .limit(SHOWN),
    db
      .select({ total: sql<number>`count(distinct ${spectra.id})` })
      .from(bands)
      .innerJoin(spectra, eq(spectra.id, bands.spectrumId))
      .innerJoin(complexes, eq(complexes.id, spectra.complexId))
      .innerJoin(labs, eq(labs.id, spectra.labId))
      .where(waiting),
  ]);
  return {
    items: rows.map(({ classes, ...row }) => ({ ...row, classes: classes.split(',').sort() })),
    total: counted?.total ?? 0,
  };
}
