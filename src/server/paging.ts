import { createHmac, timingSafeEqual } from 'node:crypto';
import { type SQL, sql } from 'drizzle-orm';
import type { Page } from '../contracts/common.ts';
import { HttpError } from './http.ts';
import { settings } from './settings.ts';

/** Where a page ended: the sort value and id of its last row. */
export interface Cursor {
  value: string | number;
  id: string;
}

const sign = (payload: string, scope: string) =>
  createHmac('sha256', settings().authSecret).update(`${scope}\n${payload}`).digest('base64url').slice(0, 22);

/**
 * What a cursor is good for: one asker and one list with one order and one set of filters. A cursor of somebody else,
 * or of another list, is refused.
 */
export function cursorScope(accountId: string, list: string, query: object): string {
  const { limit: _limit, cursor: _cursor, facets: _facets, ...filters } = query as Record<string, unknown>;
  return JSON.stringify([accountId, list, filters]);
}

/** @throws {HttpError} 400 for a cursor that is broken, foreign, or of another order or filter */
export function readCursor(text: string | undefined, scope: string): Cursor | null {
  if (text === undefined) return null;
  const [payload = '', mac = ''] = text.split('.');
  const expected = Buffer.from(sign(payload, scope));
  const given = Buffer.from(mac);
  if (expected.length !== given.length || !timingSafeEqual(expected, given))
    throw new HttpError(400, 'This cursor is not of this list: start again from the first page', {
      errors: [{ pointer: '#/cursor', detail: 'Use the `next` of the page before, with the same filters and order' }],
    });
  return JSON.parse(Buffer.from(payload, 'base64url').toString()) as Cursor;
}

export function writeCursor(cursor: Cursor, scope: string): string {
  const payload = Buffer.from(JSON.stringify(cursor)).toString('base64url');
  return `${payload}.${sign(payload, scope)}`;
}

/** Rows behind a cursor, in the order `by, id`, both rising or both falling. */
export function behind(cursor: Cursor | null, by: SQL, id: SQL, falling: boolean): SQL | undefined {
  if (!cursor) return undefined;
  return falling
    ? sql`(${by}, ${id}) < (${cursor.value}, ${cursor.id})`
    : sql`(${by}, ${id}) > (${cursor.value}, ${cursor.id})`;
}

/** Cut a page from one row more than it holds, and name the cursor of the next. */
export function cutPage<Row>(
  rows: Row[],
  limit: number,
  scope: string,
  keyOf: (row: Row) => Cursor,
): { rows: Row[]; next: string | null } {
  if (rows.length <= limit) return { rows, next: null };
  const page = rows.slice(0, limit);
  return { rows: page, next: writeCursor(keyOf(page.at(-1)!), scope) };
}

/** The Link header of a page (RFC 8288). */
export function linkHeader(url: URL, page: Pick<Page<unknown>, 'next'>): Record<string, string> {
  if (page.next === null) return {};
  const next = new URL(url);
  next.searchParams.set('cursor', page.next);
  return { link: `<${next.pathname}${next.search}>; rel="next"` };
}
