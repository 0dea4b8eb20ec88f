import { and, eq, inArray, isNull, lte, or, type SQL, sql } from 'drizzle-orm';
import { bands, complexes, folioItems, preparations, spectra } from '../../db/schema/index.ts';
import { nowIso } from '../ids.ts';
import { type Asker, isMember, labsWith } from './asker.ts';

// What each asker sees, as conditions of a query. Lists, counts, facets, strips and single records all use these, so
// that nothing can be counted that cannot be opened. The table they put into SQL is design §8.

const never = sql`0`;
const any = (...conditions: (SQL | undefined)[]): SQL => or(...conditions) ?? never;
const all = (...conditions: (SQL | undefined)[]): SQL => and(...conditions) ?? sql`1`;

/** Visibility of a record that belongs to a lab, for a member. */
function memberSight(asker: Asker, t: typeof complexes | typeof preparations | typeof spectra): SQL {
  if (asker.steward) return sql`1`;
  const mine = [...asker.labs.keys()];
  const shared = any(eq(t.visibility, 'programme'), mine.length ? inArray(t.labId, mine) : undefined);
  const leading = labsWith(asker, 'lead');
  // Who left a lab leaves its drafts behind, the own ones too.
  const own = mine.length ? all(eq(t.makerId, asker.accountId), inArray(t.labId, mine)) : undefined;
  const draft = any(own, leading.length ? inArray(t.labId, leading) : undefined);
  return any(all(inArray(t.state, ['registered', 'withdrawn']), shared), all(eq(t.state, 'draft'), draft));
}

/** Items of the folios granted to a guest, as far as a member of the folio's lab may share them. */
function granted(grants: Asker['grants']): SQL {
  const inFolios = (some: Asker['grants']) =>
    sql`${complexes.id} in (select ${folioItems.complexId} from ${folioItems} where ${inArray(
      folioItems.folioId,
      some.map((g) => g.folioId),
    )})`;
  if (grants.length === 0) return never;
  const labIds = [...new Set(grants.map((g) => g.labId))];
  return any(
    all(eq(complexes.visibility, 'programme'), inFolios(grants)),
    ...labIds.map((labId) =>
      all(
        eq(complexes.visibility, 'lab'),
        eq(complexes.labId, labId),
        inFolios(grants.filter((g) => g.labId === labId)),
      ),
    ),
  );
}

const openComplex = (): SQL =>
  all(eq(complexes.state, 'registered'), any(isNull(complexes.embargoUntil), lte(complexes.embargoUntil, nowIso())));

/** Complexes that live: one that was merged away is nowhere to be seen, its accession leads to where it lives on. */
const living = (): SQL => isNull(complexes.mergedInto);

/** Complexes in the asker's sight. A query that uses it has `complex` in its FROM. */
export function complexSight(asker: Asker): SQL {
  const asGuest = all(openComplex(), granted(asker.grants));
  return all(living(), isMember(asker) ? any(memberSight(asker, complexes), asGuest) : asGuest);
}

/** Complexes of which the asker may take files away: every member's, and a guest's granted at download level. */
export function complexDownload(asker: Asker): SQL {
  const asGuest = all(openComplex(), granted(asker.grants.filter((g) => g.level === 'download')));
  return all(living(), isMember(asker) ? any(memberSight(asker, complexes), asGuest) : asGuest);
}

/** Preparations in sight, of complexes in sight. A query that uses it has both tables in its FROM. */
export function preparationSight(asker: Asker): SQL {
  // Guests see none, nor do members of complexes that they see as guests: what they need stands in the spectra.
  return isMember(asker) ? all(living(), memberSight(asker, complexes), memberSight(asker, preparations)) : never;
}

/** Spectra that one grant opens, of complexes that this same grant opens. */
function grantedSpectra(grant: Asker['grants'][number]): SQL {
  const listed = sql`exists (select 1 from ${folioItems} join ${complexes} shared on shared.id = ${folioItems.complexId}
    where ${folioItems.folioId} = ${grant.folioId} and ${folioItems.complexId} = ${spectra.complexId}
    and (shared.visibility = 'programme' or shared.lab_id = ${grant.labId})
    and (${folioItems.spectra} is null or exists (select 1 from json_each(${folioItems.spectra}) where value = ${spectra.id})))`;
  const shareable = any(eq(spectra.visibility, 'programme'), eq(spectra.labId, grant.labId));
  return all(eq(spectra.state, 'registered'), shareable, listed);
}

/**
 * Spectra that a member sees as a member. Somebody who is a guest elsewhere sees more complexes than that, and of those
 * only what was granted.
 */
function memberSpectra(asker: Asker): SQL {
  const own = memberSight(asker, spectra);
  if (asker.grants.length === 0) return own;
  return all(
    own,
    sql`${spectra.complexId} in (select ${complexes.id} from ${complexes} where ${memberSight(asker, complexes)})`,
  );
}

// The two below are for queries that are held to complexes in sight already: they spare them a second look at each.

/** Spectra in sight of a complex in sight. */
export function spectrumSightWithin(asker: Asker): SQL {
  const asGuest = any(...asker.grants.map(grantedSpectra));
  return isMember(asker) ? any(memberSpectra(asker), asGuest) : asGuest;
}

/** Bands in sight of a complex in sight: a guest of a folio that shows attested ones sees no others. */
export function bandSightWithin(asker: Asker): SQL {
  const shown = (g: Asker['grants'][number]) => (g.shows === 'attested' ? eq(bands.state, 'attested') : undefined);
  const asGuest = any(...asker.grants.map((g) => all(grantedSpectra(g), shown(g))));
  return isMember(asker) ? any(memberSpectra(asker), asGuest) : asGuest;
}

/** Spectra in sight, of complexes in sight. A query that uses it has `complex` and `spectrum` in its FROM. */
export const spectrumSight = (asker: Asker): SQL => all(complexSight(asker), spectrumSightWithin(asker));

/** Spectra whose files and full points the asker may take away. */
export function spectrumDownload(asker: Asker): SQL {
  const asGuest = any(...asker.grants.filter((g) => g.level === 'download').map(grantedSpectra));
  return all(complexDownload(asker), isMember(asker) ? any(memberSpectra(asker), asGuest) : asGuest);
}

/** Bands in sight. `complex`, `spectrum` and `band` are in the FROM. */
export const bandSight = (asker: Asker): SQL => all(complexSight(asker), bandSightWithin(asker));
