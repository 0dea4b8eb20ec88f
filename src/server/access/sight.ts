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
  const draft = any(eq(t.makerId, asker.accountId), leading.length ? inArray(t.labId, leading) : undefined);
  return any(all(inArray(t.state, ['registered', 'withdrawn']), shared), all(eq(t.state, 'draft'), draft));
}

/** Items of the folios granted to a guest. */
const granted = (asker: Asker, folioIds = asker.grants.map((g) => g.folioId)): SQL =>
  folioIds.length
    ? sql`${complexes.id} in (select ${folioItems.complexId} from ${folioItems} where ${inArray(folioItems.folioId, folioIds)})`
    : never;

const openComplex = (): SQL =>
  all(eq(complexes.state, 'registered'), any(isNull(complexes.embargoUntil), lte(complexes.embargoUntil, nowIso())));

/** Complexes in the asker's sight. A query that uses it has `complex` in its FROM. */
export function complexSight(asker: Asker): SQL {
  const asGuest = all(openComplex(), granted(asker));
  return isMember(asker) ? any(memberSight(asker, complexes), asGuest) : asGuest;
}

/** Complexes of which the asker may take files away: every member's, and a guest's granted at download level. */
export function complexDownload(asker: Asker): SQL {
  const folioIds = asker.grants.filter((g) => g.level === 'download').map((g) => g.folioId);
  const asGuest = all(openComplex(), granted(asker, folioIds));
  return isMember(asker) ? any(memberSight(asker, complexes), asGuest) : asGuest;
}

/** Preparations in sight, of complexes in sight. A query that uses it has both tables in its FROM. */
export function preparationSight(asker: Asker): SQL {
  // Guests see no preparations of their own: what they need of one stands in its spectra.
  return isMember(asker) ? all(complexSight(asker), memberSight(asker, preparations)) : never;
}

/** Spectra that one grant opens. */
function grantedSpectra(grant: Asker['grants'][number]): SQL {
  const listed = sql`exists (select 1 from ${folioItems} where ${folioItems.folioId} = ${grant.folioId}
    and ${folioItems.complexId} = ${spectra.complexId}
    and (${folioItems.spectra} is null or exists (select 1 from json_each(${folioItems.spectra}) where value = ${spectra.id})))`;
  const shareable = any(eq(spectra.visibility, 'programme'), eq(spectra.labId, grant.labId));
  return all(openComplex(), eq(spectra.state, 'registered'), shareable, listed);
}

/** Spectra in sight, of complexes in sight. A query that uses it has `complex` and `spectrum` in its FROM. */
export function spectrumSight(asker: Asker): SQL {
  const asGuest = any(...asker.grants.map(grantedSpectra));
  return isMember(asker) ? any(all(complexSight(asker), memberSight(asker, spectra)), asGuest) : asGuest;
}

/** Spectra whose files and full points the asker may take away. */
export function spectrumDownload(asker: Asker): SQL {
  const asGuest = any(...asker.grants.filter((g) => g.level === 'download').map(grantedSpectra));
  return isMember(asker) ? any(all(complexSight(asker), memberSight(asker, spectra)), asGuest) : asGuest;
}

/** Bands in sight: a guest of a folio that shows attested ones sees no others. All three tables are in the FROM. */
export function bandSight(asker: Asker): SQL {
  const asGuest = any(
    ...asker.grants.map((g) =>
      all(grantedSpectra(g), g.shows === 'attested' ? eq(bands.state, 'attested') : undefined),
    ),
  );
  return isMember(asker) ? any(all(complexSight(asker), memberSight(asker, spectra)), asGuest) : asGuest;
}
