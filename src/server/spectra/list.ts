import { and, count, desc, eq, inArray, or, type SQL, sql } from 'drizzle-orm';
import { normaliseAccession } from '#src/contracts/accession.ts';
import type { FacetCount, Page } from '#src/contracts/common.ts';
import type { SpectrumQuery, SpectrumSummary } from '#src/contracts/spectra.ts';
import type { Db } from '#src/db/client.ts';
import { complexes, instruments, labs, spectra, spectrumSolvents } from '#src/db/schema/index.ts';
import type { Asker } from '#src/server/access/asker.ts';
import { spectrumSight } from '#src/server/access/sight.ts';
import { livingAccession } from '#src/server/complexes/alias.ts';
import { database } from '#src/server/database.ts';
import { behind, cursorScope, cutPage, readCursor } from '#src/server/paging.ts';
import { solventsOf, summaryColumns, summaryOf } from './summary.ts';

type Filters = Record<'complex' | 'lab' | 'technique' | 'instrument' | 'flag' | 'state' | 'q', SQL | undefined>;

const hasFlag = (codes: string[]) =>
  sql`exists (select 1 from json_each(${spectra.flags}) as flag where ${inArray(sql`json_extract(flag.value, '$.code')`, codes)})`;

function filtersOf(query: SpectrumQuery): Filters {
  const { complex, lab, technique, instrument, flag, state, q } = query;
  return {
    complex:
      complex === undefined
        ? undefined
        : eq(complexes.accession, livingAccession(normaliseAccession(complex) ?? complex)),
    lab: lab?.length ? inArray(spectra.labId, lab) : undefined,
    technique: technique?.length ? inArray(spectra.technique, technique) : undefined,
    instrument: instrument?.length ? inArray(spectra.instrumentId, instrument) : undefined,
    flag: flag?.length ? hasFlag(flag) : undefined,
    state: state?.length ? inArray(spectra.state, state) : undefined,
    q: q ? matches(q) : undefined,
  };
}

/** Every word somewhere in title, accession, formula, file name or solvent. */
function matches(q: string): SQL | undefined {
  const words = q.split(/\s+/).filter((word) => word !== '');
  return and(
    ...words.map((word) => {
      const pattern = `%${word.replace(/[\\%_]/g, (sign) => `\\${sign}`)}%`;
      const like = (column: SQL | typeof spectra.title) => sql`${column} like ${pattern} escape '\\'`;
      return or(
        like(spectra.title),
        like(sql`${complexes.accession}`),
        like(sql`${complexes.formula}`),
        like(sql`${spectra.fileName}`),
        sql`exists (select 1 from ${spectrumSolvents} where ${spectrumSolvents.spectrumId} = ${spectra.id} and ${like(sql`${spectrumSolvents.name}`)})`,
      );
    }),
  );
}

const SORTS = { created: spectra.createdAt, title: spectra.title, complex: complexes.accession } as const;

/** A page of the spectra in the asker's sight, with counts beside every choice where they are asked for. */
export async function listSpectra(asker: Asker, query: SpectrumQuery): Promise<Page<SpectrumSummary>> {
  const { db } = await database();
  const filters = filtersOf(query);
  const where = and(spectrumSight(asker), ...Object.values(filters));
  const falling = query.sort.startsWith('-');
  const key = query.sort.replace('-', '') as keyof typeof SORTS;
  const by = sql`${SORTS[key]}`;
  const scope = cursorScope(asker.accountId, 'spectra', query);
  const cursor = readCursor(query.cursor, scope);
  const direction = sql.raw(falling ? 'desc' : 'asc');

  const [found, [total], facets] = await Promise.all([
    db
      .select(summaryColumns(asker))
      .from(spectra)
      .innerJoin(complexes, eq(complexes.id, spectra.complexId))
      .innerJoin(labs, eq(labs.id, spectra.labId))
      .where(and(where, behind(cursor, by, sql`${spectra.id}`, falling)))
      .orderBy(sql`${by} ${direction}, ${spectra.id} ${direction}`)
      .limit(query.limit + 1),
    db.select({ n: count() }).from(spectra).innerJoin(complexes, eq(complexes.id, spectra.complexId)).where(where),
    query.facets === '1' ? facetsOf(db, asker, filters) : undefined,
  ]);
  const page = cutPage(found, query.limit, scope, ({ spectrum, complex }) => ({
    value: { created: spectrum.createdAt, title: spectrum.title, complex: complex.accession }[key],
    id: spectrum.id,
  }));
  const solventOf = await solventsOf(
    db,
    page.rows.map(({ spectrum }) => spectrum.id),
  );
  return {
    items: page.rows.map((row) => summaryOf(row, solventOf(row.spectrum.id))),
    total: total?.n ?? 0,
    next: page.next,
    ...(facets ? { facets } : {}),
  };
}

/** How many spectra each choice would leave, every other filter kept. */
async function facetsOf(db: Db, asker: Asker, filters: Filters): Promise<Record<string, FacetCount[]>> {
  const without = (own: keyof Filters) => and(spectrumSight(asker), ...Object.values({ ...filters, [own]: undefined }));
  const [lab, technique, instrument, flag] = await Promise.all([
    db
      .select({ value: labs.id, label: labs.name, count: count() })
      .from(spectra)
      .innerJoin(complexes, eq(complexes.id, spectra.complexId))
      .innerJoin(labs, eq(labs.id, spectra.labId))
      .where(without('lab'))
      .groupBy(labs.id)
      .orderBy(desc(count()), labs.name),
    db
      .select({ value: spectra.technique, count: count() })
      .from(spectra)
      .innerJoin(complexes, eq(complexes.id, spectra.complexId))
      .where(without('technique'))
      .groupBy(spectra.technique)
      .orderBy(desc(count()), spectra.technique),
    db
      .select({ value: instruments.id, label: instruments.name, count: count() })
      .from(spectra)
      .innerJoin(complexes, eq(complexes.id, spectra.complexId))
      .innerJoin(instruments, eq(instruments.id, spectra.instrumentId))
      .where(without('instrument'))
      .groupBy(instruments.id)
      .orderBy(desc(count()), instruments.name),
    db
      .select({
        value: sql<string>`json_extract(flag.value, '$.code')`,
        count: sql<number>`count(distinct ${spectra.id})`,
      })
      .from(spectra)
      .innerJoin(complexes, eq(complexes.id, spectra.complexId))
      .innerJoin(sql`json_each(${spectra.flags}) as flag`, sql`1`)
      .where(without('flag'))
      .groupBy(sql`1`)
      .orderBy(sql`2 desc, 1`),
  ]);
  return { lab, technique, instrument, flag };
}
