import { and, type SQL, sql } from 'drizzle-orm';
import type { FacetCount } from '../../contracts/common.ts';
import type { ComplexFilters } from '../../contracts/complexes.ts';
import type { Db } from '../../db/client.ts';
import { bands, centres, complexes, complexLigands, labs, spectra } from '../../db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import { bandSightWithin, spectrumSightWithin } from '../access/sight.ts';
import { type Conditions, filterConditions, whereOf } from './filters.ts';

/** Width of a bin of the band histogram, nm; it runs from 200 to 1100. */
const BIN = 25;

/** A facet: the filter that it counts for, and the (id, value) pairs of a set of hits. */
interface Facet {
  own: keyof Conditions;
  pairs: (hits: SQL) => SQL;
}

const ofCentre = (own: keyof Conditions, value: SQL): Facet => ({
  own,
  pairs: (hits) =>
    sql`select hit.id, ${value} as value, null as label from ${hits} hit join ${centres} on ${centres.complexId} = hit.id`,
});

function facetsFor(asker: Asker): Record<string, Facet> {
  const bin = sql`cast(1e7 / ${bands.wavenumber} / ${BIN} as integer) * ${BIN}`;
  const visible = and(bandSightWithin(asker), sql`${bands.wavenumber} between ${1e7 / 1100} and ${1e7 / 200}`);
  return {
    metal: ofCentre('metal', sql`${centres.element}`),
    oxidationState: ofCentre('oxidationState', sql`${centres.oxidationState}`),
    dCount: ofCentre('dCount', sql`${centres.dCount}`),
    geometry: ofCentre('geometry', sql`${centres.geometry}`),
    spinState: ofCentre('spinState', sql`${centres.spinState}`),
    pointGroup: {
      own: 'pointGroup',
      pairs: (hits) => sql`select hit.id, hit.point_group as value, null as label from ${hits} hit`,
    },
    ligand: {
      own: 'ligand',
      pairs: (hits) =>
        sql`select hit.id, ${complexLigands.abbreviation} as value, null as label from ${hits} hit join ${complexLigands} on ${complexLigands.complexId} = hit.id`,
    },
    lab: {
      own: 'lab',
      pairs: (hits) =>
        sql`select hit.id, ${labs.id} as value, ${labs.name} as label from ${hits} hit join ${labs} on ${labs.id} = hit.lab_id
          union select hit.id, ${labs.id}, ${labs.name} from ${hits} hit join ${spectra} on ${spectra.complexId} = hit.id
          join ${labs} on ${labs.id} = ${spectra.labId} where ${spectrumSightWithin(asker)}`,
    },
    band: {
      own: 'bandWindow',
      pairs: (hits) => sql`select hit.id, ${bin} as value, null as label from ${hits} hit
        join ${spectra} on ${spectra.complexId} = hit.id join ${bands} on ${bands.spectrumId} = ${spectra.id} where ${visible}`,
    },
  };
}

/**
 * How many complexes each choice of each filter would leave, every other filter kept.
 *
 * One statement: the hits of all filters are made once and counted for every facet whose own filter is not set; a
 * facet whose filter is set gets its hits without it.
 *
 * @returns for each filter its values with counts, most frequent first (the histogram by wavelength)
 */
export async function facets(db: Db, asker: Asker, query: ComplexFilters): Promise<Record<string, FacetCount[]>> {
  const conditions = await filterConditions(asker, query);
  const table = Object.entries(facetsFor(asker));
  const nameOf = (own: keyof Conditions) => sql.raw(own in conditions ? `hits_without_${own}` : 'hits');
  const set = (name: SQL, without?: keyof Conditions) =>
    sql`${name} as materialized (select ${complexes.id} as id, ${complexes.labId} as lab_id, ${complexes.pointGroup} as point_group from ${complexes} where ${whereOf(asker, conditions, without)})`;
  const sets = [
    set(sql.raw('hits')),
    ...table.filter(([, { own }]) => own in conditions).map(([, { own }]) => set(nameOf(own), own)),
  ];
  const counts = table.map(
    ([name, { own, pairs }]) =>
      sql`select ${name} as facet, value, label, count(*) as count from (select distinct id, value, label from (${pairs(nameOf(own))})) where value is not null group by value`,
  );
  const rows = await db.all<{ facet: string; value: string | number; label: string | null; count: number }>(
    sql`with ${sql.join(sets, sql`, `)} ${sql.join(counts, sql` union all `)}`,
  );

  const found: Record<string, FacetCount[]> = Object.fromEntries(table.map(([name]) => [name, []]));
  for (const { facet, value, label, count } of rows)
    found[facet]?.push({ value, count, ...(label === null ? {} : { label }) });
  for (const [name, list] of Object.entries(found))
    list.sort(name === 'band' ? (a, b) => Number(a.value) - Number(b.value) : (a, b) => b.count - a.count);
  return found;
}
