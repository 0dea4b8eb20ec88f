import { and, asc, eq, gt, inArray, isNull, max, sql } from 'drizzle-orm';
import type { FolioRecord, GrantRecord } from '#src/contracts/sharing.ts';
import { accounts, complexes, editions, folioItems, type folios, grants, labs, spectra } from '#src/db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import { leads } from '../access/records.ts';
import { canChangeFolio, type FolioAccess, type FolioInvite, guestLevel } from '../access/sharing.ts';
import { complexSight, spectrumSight } from '../access/sight.ts';
import { database } from '../database.ts';
import { nowIso } from '../ids.ts';

type Row = typeof folios.$inferSelect;

/** Folios as this asker gets them: items in sight only, grants for those who give them. */
export async function folioRecords(asker: Asker, rows: Row[]): Promise<FolioRecord[]> {
  if (rows.length === 0) return [];
  const { db } = await database();
  const ids = rows.map((folio) => folio.id);
  const led = rows.filter((folio) => leads(asker, folio.labId)).map((folio) => folio.id);
  const [labNames, items, given, frozen, ends] = await Promise.all([
    db.select({ id: labs.id, name: labs.name }).from(labs),
    itemsInSight(asker, ids),
    grantRows(led),
    db
      .select({ folioId: editions.folioId, number: max(editions.number) })
      .from(editions)
      .where(inArray(editions.folioId, ids))
      .groupBy(editions.folioId),
    ownEnds(asker, ids),
  ]);
  return rows.map((folio) => {
    const level = guestLevel(asker, folio);
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
      expires: level === null ? null : (ends.find((end) => end.folioId === folio.id)?.expires ?? null),
      may: {
        change: canChangeFolio(asker, folio),
        invite: leads(asker, folio.labId) && asker.tokenId === null,
        download: level !== 'view',
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

async function grantRows(folioIds: string[]): Promise<(GrantRecord & { folioId: string })[]> {
  if (folioIds.length === 0) return [];
  const { db } = await database();
  const rows = await db
    .select({ grant: grants, email: accounts.email, name: accounts.name })
    .from(grants)
    .innerJoin(accounts, eq(accounts.id, grants.accountId))
    .where(inArray(grants.folioId, folioIds))
    .orderBy(asc(accounts.email), asc(grants.id));
  return rows.map(({ grant, email, name }) => ({
    folioId: grant.folioId,
    id: grant.id,
    email,
    name,
    level: grant.level,
    expires: grant.expiresAt,
    termsAcceptedAt: grant.termsAcceptedAt,
    revoked: grant.revokedAt !== null,
  }));
}

/** Who may read a folio and who might once, by address. */
export async function listGrants({ folio }: FolioInvite): Promise<GrantRecord[]> {
  return (await grantRows([folio.id])).map(({ folioId: _, ...grant }) => grant);
}

/** When the asker's own access to each folio ends. */
async function ownEnds(asker: Asker, folioIds: string[]) {
  const { db } = await database();
  return db
    .select({ folioId: grants.folioId, expires: max(grants.expiresAt) })
    .from(grants)
    .where(
      and(
        eq(grants.accountId, asker.accountId),
        inArray(grants.folioId, folioIds),
        isNull(grants.revokedAt),
        gt(grants.expiresAt, nowIso()),
      ),
    )
    .groupBy(grants.folioId);
}
