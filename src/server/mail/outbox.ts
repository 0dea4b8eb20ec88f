import { desc, sql } from 'drizzle-orm';
import type { Page } from '#src/contracts/common.ts';
import type { MailRecord } from '#src/contracts/sharing.ts';
import { mails } from '#src/db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import { database } from '../database.ts';
import { HttpError, notInSight } from '../http.ts';
import { behind, cursorScope, cutPage, readCursor } from '../paging.ts';
import { settings } from '../settings.ts';
import { ACCOUNT_LINK_KINDS, withoutLinks } from './secret-links.ts';

const LEFT_OUT = 'the link is left out here: whoever holds it could take the account over';

/**
 * Mail of this registry, newest first, with the links in it; those that open an account are left out. In demo mode it
 * is open to whoever sits at this machine, since that mode listens nowhere else; in production there is no such thing.
 *
 * @throws {HttpError} 404 in production mode, 403 by access token
 */
export async function listOutbox(
  asker: Asker | null,
  query: { limit: number; cursor?: string | undefined },
): Promise<Page<MailRecord>> {
  if (settings().mode !== 'demo') throw notInSight();
  if (asker?.tokenId) throw new HttpError(403, 'Not for access tokens: open it in a browser');
  const { db } = await database();
  const scope = cursorScope(asker?.accountId ?? '', 'outbox', query);
  const id = sql`${mails.id}`;
  const [found, [counted]] = await Promise.all([
    db
      .select()
      .from(mails)
      .where(behind(readCursor(query.cursor, scope), id, id, true))
      .orderBy(desc(mails.id))
      .limit(query.limit + 1),
    db.select({ total: sql<number>`count(*)` }).from(mails),
  ]);
  const { rows, next } = cutPage(found, query.limit, scope, (mail) => ({ value: mail.id, id: mail.id }));
  return { items: rows.map(toRecord), total: counted?.total ?? 0, next };
}

const toRecord = ({ id, kind, to, subject, text, state, createdAt }: typeof mails.$inferSelect): MailRecord => ({
  id,
  kind,
  to,
  subject,
  text: ACCOUNT_LINK_KINDS.has(kind) ? withoutLinks(text, LEFT_OUT) : text,
  state,
  createdAt,
});
