import { and, desc, eq, type SQL, sql } from 'drizzle-orm';
import type { FacetCount } from '../../contracts/common.ts';
import type { ComplexFilters } from '../../contracts/complexes.ts';
import type { Db } from '../../db/client.ts';
import { bands, centres, complexes, complexLigands, labs, spectra } from '../../db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import { bandSight } from '../access/sight.ts';
import { filterConditions, whereOf } from './filters.ts';

/** Width of a bin of the band histogram, nm; it runs from 200 to 1100. */
const BIN = 25;
const count = sql<number>`count(distinct ${complexes.id})`;

/**
 * How many complexes each choice of each filter would leave, every other filter kept.
 *
 * @returns for each filter its values with counts, most frequent first (the histogram by wavelength)
 */
export async function facets(db: Db, asker: Asker, query: ComplexFilters): Promise<Record<string, FacetCount[]>> {
  const conditions = filterConditions(db, asker, query);
  const where = (own: Parameters<typeof whereOf>[2]) => whereOf(asker, conditions, own);

  const ofCentre = (value: SQL | typeof centres.element, own: Parameters<typeof whereOf>[2]) =>
    db
      .select({ value: sql<string | number | null>`${value}`, count })
      .from(complexes)
      .innerJoin(centres, eq(centres.complexId, complexes.id))
      .where(where(own))
      .groupBy(sql`1`)
      .orderBy(desc(sql`2`));

  const bin = sql<number>`cast(1e7 / ${bands.wavenumber} / ${BIN} as integer) * ${BIN}`;
  const [metal, oxidationState, dCount, geometry, spinState, pointGroup, ligand, lab, band] = await Promise.all([
    ofCentre(centres.element, 'metal'),
    ofCentre(sql`${centres.oxidationState}`, 'oxidationState'),
    ofCentre(sql`${centres.dCount}`, 'dCount'),
    ofCentre(sql`${centres.geometry}`, 'geometry'),
    ofCentre(sql`${centres.spinState}`, 'spinState'),
    db
      .select({ value: complexes.pointGroup, count })
      .from(complexes)
      .where(where('pointGroup'))
      .groupBy(sql`1`)
      .orderBy(desc(sql`2`)),
    db
      .select({ value: complexLigands.abbreviation, count })
      .from(complexes)
      .innerJoin(complexLigands, eq(complexLigands.complexId, complexes.id))
      .where(where('ligand'))
      .groupBy(sql`1`)
      .orderBy(desc(sql`2`))
      .limit(60),
    db
      .select({ value: labs.id, label: labs.name, count })
      .from(complexes)
      .innerJoin(labs, eq(labs.id, complexes.labId))
      .where(where('lab'))
      .groupBy(labs.id)
      .orderBy(desc(sql`3`)),
    db
      .select({ value: bin, count })
      .from(bands)
      .innerJoin(spectra, eq(spectra.id, bands.spectrumId))
      .innerJoin(complexes, eq(complexes.id, spectra.complexId))
      .where(
        and(where('bandWindow'), bandSight(asker), sql`${bands.wavenumber} between ${1e7 / 1100} and ${1e7 / 200}`),
      )
      .groupBy(sql`1`)
      .orderBy(sql`1`),
  ]);
  const known = <T extends { value: string | number | null }>(rows: T[]) =>
    rows.filter((row): row is T & { value: string | number } => row.value !== null);
  return {
    metal: known(metal),
    oxidationState: known(oxidationState),
    dCount: known(dCount),
    geometry: known(geometry),
    spinState: known(spinState),
    pointGroup: known(pointGroup),
    ligand,
    lab,
    band,
  };
}
