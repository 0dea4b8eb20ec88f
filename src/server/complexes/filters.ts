import { and, eq, inArray, type SQL, sql } from 'drizzle-orm';
import type { ComplexFilters } from '../../contracts/complexes.ts';
import { bands, centres, complexes, complexLigands, folioItems, spectra } from '../../db/schema/index.ts';
import { type Asker, isMember } from '../access/asker.ts';
import { bandSightWithin, complexSight, spectrumSightWithin } from '../access/sight.ts';
import { ligandsWithFragment } from '../ligands/fragment.ts';

/** A filter of the table of complexes: what it is called in the query, and its condition. */
export type Conditions = Partial<Record<keyof ComplexFilters | 'bandWindow', SQL>>;

// Filters ask for membership in a set that does not depend on the row, so that SQLite makes each set once.

const hasCentre = (condition: SQL) =>
  sql`${complexes.id} in (select ${centres.complexId} from ${centres} where ${condition})`;

function bandCondition(asker: Asker, { bandFrom, bandTo, minEpsilon, bandClass }: ComplexFilters): SQL | undefined {
  if (bandFrom === undefined && bandTo === undefined && minEpsilon === undefined && !bandClass?.length)
    return undefined;
  const where = and(
    bandSightWithin(asker),
    // Wavelength rises as wavenumber falls: the window's ends change places.
    bandTo === undefined ? undefined : sql`${bands.wavenumber} >= ${1e7 / bandTo}`,
    bandFrom === undefined ? undefined : sql`${bands.wavenumber} <= ${1e7 / bandFrom}`,
    minEpsilon === undefined ? undefined : sql`${bands.epsilon} >= ${minEpsilon}`,
    bandClass?.length ? inArray(bands.class, bandClass) : undefined,
  );
  return sql`${complexes.id} in (select ${spectra.complexId} from ${bands} join ${spectra} on ${spectra.id} = ${bands.spectrumId} where ${where})`;
}

const likeText = (text: string) => `%${text.toLowerCase().replace(/[\\%_]/g, '\\$&')}%`;

/**
 * The text that a search looks in. What was typed at registration, counter-ions and all, is for members: guests find by
 * what they are shown.
 */
const searched = (asker: Asker): SQL =>
  isMember(asker)
    ? sql`${complexes.search}`
    : sql`lower(${complexes.accession} || ' ' || ${complexes.formula} || ' ' || coalesce(${complexes.descriptor}, '') || ' ' || ${complexes.hill} || ' ' || coalesce((select group_concat(${complexLigands.abbreviation}, ' ') from ${complexLigands} where ${complexLigands.complexId} = ${complexes.id}), '') || ' ' || coalesce((select group_concat(merged.accession, ' ') from ${complexes} merged where merged.merged_into = ${complexes.accession}), ''))`;

const hasLigand = (abbreviations: string[]): SQL =>
  abbreviations.length === 0
    ? sql`0`
    : sql`${complexes.id} in (select ${complexLigands.complexId} from ${complexLigands} where ${inArray(complexLigands.abbreviation, abbreviations)})`;

/**
 * The conditions that a query sets, one a filter, so that a facet can leave its own out.
 *
 * @throws {HttpError} 400 for a substructure that is no SMILES
 */
export async function filterConditions(asker: Asker, f: ComplexFilters): Promise<Conditions> {
  const conditions: Conditions = {};
  if (f.metal?.length) conditions.metal = hasCentre(inArray(centres.element, f.metal));
  if (f.oxidationState?.length)
    conditions.oxidationState = hasCentre(inArray(centres.oxidationState, f.oxidationState));
  if (f.dCount?.length) conditions.dCount = hasCentre(inArray(centres.dCount, f.dCount));
  if (f.geometry?.length) conditions.geometry = hasCentre(inArray(centres.geometry, f.geometry));
  if (f.spinState?.length) conditions.spinState = hasCentre(inArray(centres.spinState, f.spinState));
  if (f.pointGroup?.length) conditions.pointGroup = inArray(complexes.pointGroup, f.pointGroup);
  if (f.ligand?.length) conditions.ligand = hasLigand(f.ligand);
  if (f.substructure) conditions.substructure = hasLigand(await ligandsWithFragment(f.substructure));
  if (f.lab?.length)
    conditions.lab = sql`(${inArray(complexes.labId, f.lab)} or ${complexes.id} in (select ${spectra.complexId} from ${spectra} where ${and(inArray(spectra.labId, f.lab), spectrumSightWithin(asker))}))`;
  if (f.folio)
    conditions.folio = sql`${complexes.id} in (select ${folioItems.complexId} from ${folioItems} where ${and(eq(folioItems.folioId, f.folio), folioInSight(asker))})`;
  const band = bandCondition(asker, f);
  if (band) conditions.bandWindow = band;
  if (f.q) conditions.q = sql`${searched(asker)} like ${likeText(f.q)} escape '\\'`;
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
  return and(complexSight(asker), ...kept.map(([, condition]) => condition))!;
}
