import { and, asc, eq, inArray, max, sql } from 'drizzle-orm';
import type { FolioRecord } from '#src/contracts/sharing.ts';
import { complexes, editions, folioItems, type folios, grants, labs, spectra } from '#src/db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import { leads } from '../access/records.ts';
import { canChangeFolio, type FolioAccess, guestLevel } from '../access/sharing.ts';
import { complexSight, spectrumSight } from '../access/sight.ts';
import { database } from '../database.ts';
import { contactsOf } from '../grants/contact.ts';
import { grantRows } from '../grants/record.ts';
import { openRequests } from '../grants/requests.ts';

type Row = typeof folios.$inferSelect;

/** Folios as this asker gets them: items in sight only, grants for those who give them. */
export async function folioRecords(asker: Asker, rows: Row[]): Promise<FolioRecord[]> {
  if (rows.length === 0) return [];
  const { db } = await database();
  const ids = rows.map((folio) => folio.id);
  const led = rows.filter((folio) => leads(asker, folio.labId)).map((folio) => folio.id);
  const [labNames, items, given, frozen, own, asked, contacts] = await Promise.all([
    db.select({ id: labs.id, name: labs.name }).from(labs),
    itemsInSight(asker, ids),
    grantRows(led),
    db
      .select({ folioId: editions.folioId, number: max(editions.number) })
      .from(editions)
      .where(inArray(editions.folioId, ids))
      .groupBy(editions.folioId),
    ownGrants(asker, ids),
    asker.grants.length > 0 ? openRequests(asker, ids) : [],
    contactsOf(asker.grants.length > 0 ? rows.map((folio) => folio.labId) : []),
  ]);
  return rows.map((folio) => {
    const level = guestLevel(asker, folio);
    const isGuest = level !== null;
    const held = own.filter((grant) => grant.folioId === folio.id);
    return {
      id: folio.id,
      name: folio.name,
      description: folio.description,
      lab: labNames.find((lab) => lab.id === folio.labId)!,
      items: items
        .filter((item) => item.folioId === folio.id)
        .map(({ accession, spectra }) => ({ accession, spectra })),
      grants: given.filter((grant) => grant.folioId === folio.id).map(({ folioId: _, ...grant }) => grant),
      licence: folio.licence,
      embargoUntil: folio.embargoUntil,
      shows: folio.shows,
      edition: frozen.find((edition) => edition.folioId === folio.id)?.number ?? null,
      level,
      expires: isGuest ? lastEnd(held) : null,
      terms: isGuest && held.length > 0 ? ownTerms(held, folio.licence) : null,
      contact: isGuest ? (contacts.get(folio.labId)?.name ?? null) : null,
      asked: isGuest
        ? asked
            .filter((request) => request.folioId === folio.id)
            .map(({ id, wants, createdAt }) => ({ id, wants, createdAt }))
        : [],
      may: {
        change: canChangeFolio(asker, folio),
        invite: leads(asker, folio.labId) && asker.tokenId === null,
        download: level !== 'view',
        delete: leads(asker, folio.labId) && asker.scopes.has('write'),
      },
    };
  });
}

/** One folio as this asker gets it. */
export async function folioRecord({ asker, folio }: Pick<FolioAccess, 'asker' | 'folio'>): Promise<FolioRecord> {
  const [record] = await folioRecords(asker, [folio]);
  return record!;
}

async function itemsInSight(asker: Asker, folioIds: string[]) {
  const { db } = await database();
  const rows = await db
    .select({ folioId: folioItems.folioId, accession: complexes.accession, spectra: folioItems.spectra })
    .from(folioItems)
    .innerJoin(complexes, eq(complexes.id, folioItems.complexId))
    .where(and(inArray(folioItems.folioId, folioIds), complexSight(asker)))
    .orderBy(asc(folioItems.folioId), asc(folioItems.ordinal));
  const named = rows.flatMap((row) => row.spectra ?? []);
  const seen =
    named.length === 0
      ? []
      : await db
          .select({ id: spectra.id })
          .from(spectra)
          .innerJoin(complexes, eq(complexes.id, spectra.complexId))
          .where(
            and(sql`${spectra.id} in (select value from json_each(${JSON.stringify(named)}))`, spectrumSight(asker)),
          );
  const inSight = new Set(seen.map((row) => row.id));
  return rows.map((row) => ({
    ...row,
    spectra: row.spectra === null ? ('all' as const) : row.spectra.filter((id) => inSight.has(id)),
  }));
}

/** What the asker's own access to each folio is, for a guest. */
async function ownGrants(asker: Asker, folioIds: string[]) {
  const { db } = await database();
  const held = asker.grants.filter((grant) => folioIds.includes(grant.folioId)).map((grant) => grant.id);
  if (held.length === 0) return [];
  return db.select().from(grants).where(inArray(grants.id, held));
}

type Grant = typeof grants.$inferSelect;

const lastEnd = (held: Grant[]): string | null =>
  held.reduce<string | null>((last, { expiresAt }) => (last === null || expiresAt > last ? expiresAt : last), null);

/** The terms as they were accepted last. */
function ownTerms(held: Grant[], licence: string): FolioRecord['terms'] {
  const at = ({ termsAcceptedAt }: Grant) => termsAcceptedAt ?? '';
  const last = held.reduce((a, b) => (at(b) > at(a) ? b : a));
  // Grants of before the licence was noted with them have none: what was accepted then cannot be told from here.
  const isCurrent = last.termsAcceptedAt !== null && (last.termsLicence ?? licence) === licence;
  return { acceptedAt: last.termsAcceptedAt, licence: last.termsLicence, isCurrent };
}
