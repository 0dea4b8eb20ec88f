import { and, desc, eq, gte, inArray, lte, ne } from 'drizzle-orm';
import { type SpectralSimilarity, spectralSimilarity } from '#src/chem/spectra/index.ts';
import type { SimilarSpectra } from '#src/contracts/spectra.ts';
import type { Db } from '#src/db/client.ts';
import { complexes, labs, spectra, spectrumPoints } from '#src/db/schema/index.ts';
import type { SpectrumAccess } from '../access/records.ts';
import { spectrumSight } from '../access/sight.ts';
import { database } from '../database.ts';
import { loadCurve, unpack } from './stored-points.ts';
import { solventsOf, summaryColumns, summaryOf } from './summary.ts';

/** Curves are read so many at a time, so that memory stays flat; the newest are compared, up to the second number. */
const BATCH = 100;
const MOST = 3000;

/**
 * Registered spectra in the asker's sight of the same technique, most similar in shape first; heights do not count, so
 * that concentration and path do not matter.
 */
export async function listSimilar({ asker, spectrum }: SpectrumAccess, limit: number): Promise<SimilarSpectra> {
  const { db } = await database();
  const mine = await loadCurve(db, spectrum.id);
  const candidates = await db
    .select({ id: spectra.id })
    .from(spectra)
    .innerJoin(complexes, eq(complexes.id, spectra.complexId))
    .where(
      and(
        spectrumSight(asker),
        eq(spectra.state, 'registered'),
        eq(spectra.technique, spectrum.technique),
        ne(spectra.id, spectrum.id),
        lte(spectra.xMin, spectrum.xMax),
        gte(spectra.xMax, spectrum.xMin),
      ),
    )
    .orderBy(desc(spectra.createdAt), desc(spectra.id))
    .limit(MOST);
  const found: (SpectralSimilarity & { id: string })[] = [];
  for (let at = 0; at < candidates.length; at += BATCH) {
    const ids = candidates.slice(at, at + BATCH).map(({ id }) => id);
    for (const row of await curvesOf(db, ids)) {
      const likeness = spectralSimilarity({ x: mine.x, y: mine.value }, { x: unpack(row.x), y: unpack(row.value) });
      if (likeness) found.push({ id: row.id, ...likeness });
    }
  }
  found.sort((a, b) => b.cosine - a.cosine || (a.id < b.id ? -1 : 1));
  return { items: await withSummaries(db, asker, found.slice(0, limit)), compared: found.length };
}

const curvesOf = (db: Db, ids: string[]) =>
  db
    .select({ id: spectrumPoints.spectrumId, x: spectrumPoints.wavenumber, value: spectrumPoints.value })
    .from(spectrumPoints)
    .where(inArray(spectrumPoints.spectrumId, ids));

async function withSummaries(
  db: Db,
  asker: SpectrumAccess['asker'],
  found: (SpectralSimilarity & { id: string })[],
): Promise<SimilarSpectra['items']> {
  const ids = found.map(({ id }) => id);
  const rows = ids.length
    ? await db
        .select(summaryColumns(asker))
        .from(spectra)
        .innerJoin(complexes, eq(complexes.id, spectra.complexId))
        .innerJoin(labs, eq(labs.id, spectra.labId))
        .where(and(inArray(spectra.id, ids), spectrumSight(asker)))
    : [];
  const solvents = await solventsOf(db, ids);
  const byId = new Map(rows.map((row) => [row.spectrum.id, summaryOf(row, solvents(row.spectrum.id))]));
  return found.flatMap(({ id, ...likeness }) => {
    const spectrum = byId.get(id);
    return spectrum ? [{ spectrum, ...likeness }] : [];
  });
}
