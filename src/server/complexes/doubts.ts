import { and, eq, inArray } from 'drizzle-orm';
import { bands, centres, complexes, spectra, spectrumSolvents } from '../../db/schema/index.ts';
import type { ComplexAccess } from '../access/records.ts';
import { bandSight } from '../access/sight.ts';
import { database } from '../database.ts';
import { verdictOf } from '../spectra/verdict.ts';

/** How many bands of a complex, of those in the asker's sight, have an assignment that something contradicts. */
export async function countDoubts({ asker, complex }: ComplexAccess): Promise<number> {
  const { db } = await database();
  const rows = await db
    .select({ band: bands })
    .from(bands)
    .innerJoin(spectra, eq(spectra.id, bands.spectrumId))
    .innerJoin(complexes, eq(complexes.id, spectra.complexId))
    .where(and(eq(spectra.complexId, complex.id), eq(spectra.state, 'registered'), bandSight(asker)));
  if (rows.length === 0) return 0;
  const ids = [...new Set(rows.map(({ band }) => band.spectrumId))];
  const [centreRows, solventRows] = await Promise.all([
    db.select().from(centres).where(eq(centres.complexId, complex.id)),
    db.select().from(spectrumSolvents).where(inArray(spectrumSolvents.spectrumId, ids)),
  ]);
  return rows.filter(({ band }) => {
    const solvents = solventRows.filter(({ spectrumId }) => spectrumId === band.spectrumId);
    return verdictOf(band, { centres: centreRows, solvents }) !== null;
  }).length;
}
