import { and, count, desc, eq, gte, inArray, lte, or, type SQL, sql } from 'drizzle-orm';
import { normaliseAccession } from '#src/contracts/accession.ts';
import type { Page } from '#src/contracts/common.ts';
import type { AccessLogQuery, AccessLogRow } from '#src/contracts/oversight.ts';
import type { Db } from '#src/db/client.ts';
import { accessLog, accounts, bundles, complexes, folios, spectra } from '#src/db/schema/index.ts';
import type { AccessLogReading } from '../access/oversight.ts';
import { database } from '../database.ts';
import { notInSight } from '../http.ts';
import { behind, cursorScope, cutPage, readCursor } from '../paging.ts';
import { likePattern } from './like-pattern.ts';
import { nameSubjects } from './subjects.ts';

const isOf = (type: string) => sql`${accessLog.subjectType} = ${type}`;

/** What is told to the leads of some labs: their complexes, spectra and folios, and the bundles of these folios. */
function sightOf(ofLabs: AccessLogReading['ofLabs']): SQL | undefined {
  if (ofLabs === null) return undefined;
  const own = (table: typeof complexes | typeof spectra | typeof folios) =>
    sql`${accessLog.subjectId} in (select ${table.id} from ${table} where ${inArray(table.labId, [...ofLabs])})`;
  const ownBundle = sql`${accessLog.subjectId} in (select ${bundles.id} from ${bundles} join ${folios} on ${folios.id} = ${bundles.folioId} where ${inArray(folios.labId, [...ofLabs])})`;
  return or(
    and(isOf('complex'), own(complexes)),
    and(isOf('spectrum'), own(spectra)),
    and(isOf('folio'), own(folios)),
    and(isOf('bundle'), ownBundle),
  );
}

/** A folio and its bundles. */
export const ofFolio = (folioId: string): SQL =>
  sql`((${isOf('folio')} and ${accessLog.subjectId} = ${folioId}) or (${isOf('bundle')}
    and ${accessLog.subjectId} in (select ${bundles.id} from ${bundles} where ${bundles.folioId} = ${folioId})))`;

/** The one record that is asked for. @throws {HttpError} 404 when it is not of the labs that are told of */
async function subjectFilter(
  db: Db,
  { ofLabs }: AccessLogReading,
  query: AccessLogQuery,
): Promise<(SQL | undefined)[]> {
  const { complex, spectrum, folio } = query;
  const ownOrAll = (labId: string) => ofLabs === null || ofLabs.includes(labId);
  const seek = async (table: typeof complexes | typeof spectra | typeof folios, condition: SQL) => {
    const [row] = await db.select({ id: table.id, labId: table.labId }).from(table).where(condition);
    if (!row || !ownOrAll(row.labId)) throw notInSight();
    return row.id;
  };
  const of = (type: string, id: string) => and(isOf(type), eq(accessLog.subjectId, id));
  const accession = complex && (normaliseAccession(complex) ?? complex);
  return [
    accession ? of('complex', await seek(complexes, eq(complexes.accession, accession))) : undefined,
    spectrum ? of('spectrum', await seek(spectra, eq(spectra.id, spectrum))) : undefined,
    folio ? ofFolio(await seek(folios, eq(folios.id, folio))) : undefined,
  ];
}

/** One text that tells a row of the log from all others: the key of its table. */
const rowId = sql<string>`${accessLog.accountId} || ' ' || ${accessLog.kind} || ' ' || ${accessLog.subjectType} || ' ' || ${accessLog.subjectId} || ' ' || ${accessLog.day}`;

/**
 * A page of who looked and who downloaded, the latest first. What happened in the last second may not be in it yet.
 *
 * @throws {HttpError} 404 for a record or folio that is not one of the labs that the asker leads
 */
export async function listAccess(access: AccessLogReading, query: AccessLogQuery): Promise<Page<AccessLogRow>> {
  const { db } = await database();
  const { kind, subjectType, account, from, to, q } = query;
  const like = (column: typeof accounts.name | typeof accounts.email) =>
    sql`${column} like ${likePattern(q ?? '')} escape '\\'`;
  const where = and(
    sightOf(access.ofLabs),
    ...(await subjectFilter(db, access, query)),
    kind ? eq(accessLog.kind, kind) : undefined,
    subjectType?.length ? inArray(accessLog.subjectType, subjectType) : undefined,
    account ? eq(accessLog.accountId, account) : undefined,
    from ? gte(accessLog.day, from) : undefined,
    to ? lte(accessLog.day, to) : undefined,
    q ? or(like(accounts.name), like(accounts.email)) : undefined,
  );
  const scope = cursorScope(access.asker.accountId, 'access-log', query);
  const by = sql`${accessLog.lastAt}`;
  const [found, [total]] = await Promise.all([
    db
      .select({ row: accessLog, id: rowId, person: { id: accounts.id, name: accounts.name, email: accounts.email } })
      .from(accessLog)
      .innerJoin(accounts, eq(accounts.id, accessLog.accountId))
      .where(and(where, behind(readCursor(query.cursor, scope), by, rowId, true)))
      .orderBy(desc(accessLog.lastAt), desc(rowId))
      .limit(query.limit + 1),
    db.select({ n: count() }).from(accessLog).innerJoin(accounts, eq(accounts.id, accessLog.accountId)).where(where),
  ]);
  const page = cutPage(found, query.limit, scope, ({ row, id }) => ({ value: row.lastAt, id }));
  const subjectOf = await nameSubjects(
    db,
    page.rows.map(({ row }) => ({ type: row.subjectType, id: row.subjectId })),
  );
  return {
    items: page.rows.map(({ row, person }) => ({
      account: person,
      kind: row.kind,
      subject: subjectOf(row.subjectType, row.subjectId),
      day: row.day,
      count: row.count,
      firstAt: row.firstAt,
      lastAt: row.lastAt,
    })),
    total: total?.n ?? 0,
    next: page.next,
  };
}
