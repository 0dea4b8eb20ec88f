import { and, count, desc, eq, gt, gte, inArray, isNull, lt, lte, or, type SQL, sql } from 'drizzle-orm';
import type { FacetCount, Page } from '#src/contracts/common.ts';
import type { TrailEntryRecord, TrailFilter, TrailQuery, TrailRow } from '#src/contracts/oversight.ts';
import type { Db } from '#src/db/client.ts';
import { accessTokens, accounts, trail } from '#src/db/schema/index.ts';
import type { TrailReading } from '../access/oversight.ts';
import { database } from '../database.ts';
import { notInSight } from '../http.ts';
import { cursorScope, cutPage, readCursor } from '../paging.ts';
import { likePattern } from './like-pattern.ts';
import { nameSubjects, subjectIdsLike } from './subjects.ts';

type Filters = Record<'action' | 'subjectType' | 'rest', SQL | undefined>;

const isDay = (moment: string) => moment.length === 10;
/** The first moment after a day or an instant. */
const after = (to: string) => (isDay(to) ? new Date(Date.parse(to) + 24 * 3600 * 1000).toISOString() : to);

function filtersOf({ action, subjectType, subject, actor, from, to, q }: TrailFilter): Filters {
  const pattern = q ? likePattern(q) : '';
  const like = (column: SQL | typeof trail.action) => sql`${column} like ${pattern} escape '\\'`;
  return {
    action: action?.length ? inArray(trail.action, action) : undefined,
    subjectType: subjectType?.length ? inArray(trail.subjectType, subjectType) : undefined,
    rest: and(
      subject ? eq(trail.subjectId, subject) : undefined,
      actor ? (actor === 'program' ? isNull(trail.actorId) : eq(trail.actorId, actor)) : undefined,
      from ? gte(trail.at, from) : undefined,
      to ? (isDay(to) ? lt(trail.at, after(to)) : lte(trail.at, to)) : undefined,
      q
        ? or(
            like(trail.action),
            like(sql`${trail.detail}`),
            eq(trail.hash, q),
            eq(trail.subjectId, q),
            sql`${trail.subjectId} in ${subjectIdsLike(pattern)}`,
            sql`${trail.actorId} in (select ${accounts.id} from ${accounts} where ${like(sql`${accounts.name}`)} or ${like(sql`${accounts.email}`)})`,
          )
        : undefined,
    ),
  };
}

const columns = {
  row: trail,
  person: { id: accounts.id, name: accounts.name, email: accounts.email },
  token: { id: accessTokens.id, name: accessTokens.name },
};
const joined = (db: Db) =>
  db
    .select(columns)
    .from(trail)
    .leftJoin(accounts, eq(accounts.id, trail.actorId))
    .leftJoin(accessTokens, eq(accessTokens.id, trail.tokenId));
type Joined = Awaited<ReturnType<typeof joined>>[number];

async function toRows(db: Db, found: readonly Joined[]): Promise<TrailRow[]> {
  const subjectOf = await nameSubjects(
    db,
    found.map(({ row }) => ({ type: row.subjectType, id: row.subjectId })),
  );
  return found.map(({ row, person, token }) => ({
    seq: row.seq,
    at: row.at,
    actor: person ?? (row.actorId ? { id: row.actorId, name: row.actorId, email: '' } : null),
    token,
    action: row.action,
    subject: subjectOf(row.subjectType, row.subjectId),
    detail: row.detail,
    hash: row.hash,
  }));
}

/** A page of the trail, with counts beside actions and kinds of record where they are asked for. */
export async function listTrail({ asker }: TrailReading, query: TrailQuery): Promise<Page<TrailRow>> {
  const { db } = await database();
  const filters = filtersOf(query);
  const where = and(...Object.values(filters));
  const falling = query.sort === '-seq';
  const scope = cursorScope(asker.accountId, 'trail', query);
  const cursor = readCursor(query.cursor, scope);
  const last = Number(cursor?.value);
  const behind = cursor ? (falling ? lt(trail.seq, last) : gt(trail.seq, last)) : undefined;
  const [found, [total], facets] = await Promise.all([
    joined(db)
      .where(and(where, behind))
      .orderBy(falling ? desc(trail.seq) : trail.seq)
      .limit(query.limit + 1),
    db.select({ n: count() }).from(trail).where(where),
    query.facets === '1' ? facetsOf(db, filters) : undefined,
  ]);
  const page = cutPage(found, query.limit, scope, ({ row }) => ({ value: row.seq, id: String(row.seq) }));
  return { items: await toRows(db, page.rows), total: total?.n ?? 0, next: page.next, ...(facets ? { facets } : {}) };
}

async function facetsOf(db: Db, filters: Filters): Promise<Record<string, FacetCount[]>> {
  const of = (column: typeof trail.action | typeof trail.subjectType, own: keyof Filters) =>
    db
      .select({ value: column, count: count() })
      .from(trail)
      .where(and(...Object.values({ ...filters, [own]: undefined })))
      .groupBy(column)
      .orderBy(desc(count()), column);
  const [action, subjectType] = await Promise.all([of(trail.action, 'action'), of(trail.subjectType, 'subjectType')]);
  return { action, subjectType };
}

/** Rows of the same record that are looked through for what was before. */
const LOOK_BACK = 500;

/**
 * One row, with what its fields were before: what the latest earlier row of the same record told of each.
 *
 * @throws {HttpError} 404
 */
export async function readTrailRow(_: TrailReading, number: string): Promise<TrailEntryRecord> {
  if (!/^\d{1,15}$/.test(number)) throw notInSight();
  const seq = Number(number);
  const { db } = await database();
  const found = await joined(db).where(eq(trail.seq, seq));
  const [entry] = await toRows(db, found);
  const row = found[0]?.row;
  if (!entry || !row) throw notInSight();
  const earlier = await db
    .select({ detail: trail.detail })
    .from(trail)
    .where(
      and(eq(trail.subjectType, row.subjectType), eq(trail.subjectId, row.subjectId), sql`${trail.seq} < ${row.seq}`),
    )
    .orderBy(desc(trail.seq))
    .limit(LOOK_BACK);
  const before: Record<string, unknown> = {};
  for (const name of Object.keys(row.detail)) {
    const told = earlier.find(({ detail }) => Object.hasOwn(detail, name));
    if (told) before[name] = told.detail[name];
  }
  return { ...entry, previousHash: row.previousHash, before };
}

/** Rows of an export read at once. */
const CHUNK = 500;

/** All rows that fit a filter, rising, chunk by chunk, so that memory is flat. */
export async function* trailRows(
  db: Db,
  filter: TrailFilter,
): AsyncGenerator<{ stored: typeof trail.$inferSelect; shown: TrailRow }[]> {
  const where = and(...Object.values(filtersOf(filter)));
  for (let last = 0; ; ) {
    const found = await joined(db)
      .where(and(where, gt(trail.seq, last)))
      .orderBy(trail.seq)
      .limit(CHUNK);
    const shown = await toRows(db, found);
    if (found.length > 0) yield found.map(({ row }, i) => ({ stored: row, shown: shown[i]! }));
    if (found.length < CHUNK) return;
    last = found.at(-1)!.row.seq;
  }
}
