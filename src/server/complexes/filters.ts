import { and, eq, exists, inArray, isNull, type SQL, sql } from 'drizzle-orm';
import type { ComplexFilters } from '../../contracts/complexes.ts';
import type { Db } from '../../db/client.ts';
import { bands, centres, complexes, complexLigands, folioItems, spectra } from '../../db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import { bandSight, complexSight, spectrumSight } from '../access/sight.ts';

/** A filter of the table of complexes: what it is called in the query, and its condition. */
type Conditions = Partial<Record<keyof ComplexFilters | 'bandWindow', SQL>>;

const hasCentre = (db: Db, condition: SQL) =>
  exists(
    db
      .select({ one: sql`1` })
      .from(centres)
      .where(and(eq(centres.complexId, complexes.id), condition)),
  );

function bandCondition(
  db: Db,
  asker: Asker,
  { bandFrom, bandTo, minEpsilon, bandClass }: ComplexFilters,
): SQL | undefined {
  if (bandFrom === undefined && bandTo === undefined && minEpsilon === undefined && !bandClass?.length)
    return undefined;
  return exists(
    db
      .select({ one: sql`1` })
      .from(bands)
      .innerJoin(spectra, eq(spectra.id, bands.spectrumId))
      .where(
        and(
          eq(spectra.complexId, complexes.id),
          bandSight(asker),
          // Wavelength rises as wavenumber falls: the window's ends change places.
          bandTo === undefined ? undefined : sql`${bands.wavenumber} >= ${1e7 / bandTo}`,
          bandFrom === undefined ? undefined : sql`${bands.wavenumber} <= ${1e7 / bandFrom}`,
          minEpsilon === undefined ? undefined : sql`${bands.epsilon} >= ${minEpsilon}`,
          bandClass?.length ? inArray(bands.class, bandClass) : undefined,
        ),
      ),
  );
}

const likeText = (text: string) => `%${text.toLowerCase().replace(/[\\%_]/g, '\\$&')}%`;

/** The conditions that a query sets, one a filter, so that a facet can leave its own out. */
export function filterConditions(db: Db, asker: Asker, f: ComplexFilters): Conditions {
  const conditions: Conditions = {};
  if (f.metal?.length) conditions.metal = hasCentre(db, inArray(centres.element, f.metal));
  if (f.oxidationState?.length)
    conditions.oxidationState = hasCentre(db, inArray(centres.oxidationState, f.oxidationState));
  if (f.dCount?.length) conditions.dCount = hasCentre(db, inArray(centres.dCount, f.dCount));
  if (f.geometry?.length) conditions.geometry = hasCentre(db, inArray(centres.geometry, f.geometry));
  if (f.spinState?.length) conditions.spinState = hasCentre(db, inArray(centres.spinState, f.spinState));
  if (f.pointGroup?.length) conditions.pointGroup = inArray(complexes.pointGroup, f.pointGroup);
  if (f.ligand?.length)
    conditions.ligand = exists(
      db
        .select({ one: sql`1` })
        .from(complexLigands)
        .where(and(eq(complexLigands.complexId, complexes.id), inArray(complexLigands.abbreviation, f.ligand))),
    );
  if (f.lab?.length)
    conditions.lab = sql`(${inArray(complexes.labId, f.lab)} or ${exists(
      db
        .select({ one: sql`1` })
        .from(spectra)
        .where(and(eq(spectra.complexId, complexes.id), inArray(spectra.labId, f.lab), spectrumSight(asker))),
    )})`;
  if (f.folio)
    conditions.folio = exists(
      db
        .select({ one: sql`1` })
        .from(folioItems)
        .where(and(eq(folioItems.complexId, complexes.id), eq(folioItems.folioId, f.folio), folioInSight(asker))),
    );
  const band = bandCondition(db, asker, f);
  if (band) conditions.bandWindow = band;
  if (f.q) conditions.q = sql`${complexes.search} like ${likeText(f.q)} escape '\\'`;
  conditions.state = f.state?.length ? inArray(complexes.state, f.state) : sql`${complexes.state} <> 'withdrawn'`;
  return conditions;
}

/** Folios whose content the asker may filter by: those of own labs and those granted. */
function folioInSight(asker: Asker): SQL {
  if (asker.steward) return sql`1`;
  const granted = asker.grants.map((g) => g.folioId);
  const labIds = [...asker.labs.keys()];
  const own = labIds.length
    ? sql`${folioItems.folioId} in (select id from folio where ${inArray(sql`folio.lab_id`, labIds)})`
    : sql`0`;
  return granted.length ? sql`(${own} or ${inArray(folioItems.folioId, granted)})` : own;
}

/** All of a query's conditions but one, with the asker's sight. */
export function whereOf(asker: Asker, conditions: Conditions, without?: keyof Conditions): SQL {
  const kept = Object.entries(conditions).filter(([name]) => name !== without);
  return and(complexSight(asker), isNull(complexes.mergedInto), ...kept.map(([, condition]) => condition))!;
}
