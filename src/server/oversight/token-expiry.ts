import { and, eq, gt, isNull, lte, sql } from 'drizzle-orm';
import { accessTokens, accounts } from '#src/db/schema/index.ts';
import { database } from '../database.ts';
import { compose, oneLine } from '../mail/templates.ts';
import { queueMail } from '../mail.ts';
import { settings } from '../settings.ts';

const DAY = 24 * 3600 * 1000; // ms
/** How long before its end people are told, and how long a token must live at all to be worth a mail, in milliseconds. */
const TOLD_BEFORE_MS = 7 * DAY;
const LONG_LIVED_MS = 14 * DAY;

/** "1 December 2026" in UTC. */
const day = (iso: string) =>
  new Date(iso).toLocaleDateString('en-GB', { day: 'numeric', month: 'long', year: 'numeric', timeZone: 'UTC' });

/**
 * Queue a mail to the owner of each token that ends within a week, so that no instrument falls silent unforeseen. Each
 * token is told of once, however often this is called; short-lived ones are not.
 *
 * @returns how many tokens end within the week and are told of
 */
export async function tokenExpiryMails(now = Date.now()): Promise<number> {
  const { db, write } = await database();
  const at = (ms: number) => new Date(ms).toISOString();
  const ending = await db
    .select({ token: accessTokens, email: accounts.email })
    .from(accessTokens)
    .innerJoin(accounts, eq(accounts.id, accessTokens.accountId))
    .where(
      and(
        eq(accounts.state, 'active'),
        isNull(accessTokens.revokedAt),
        gt(accessTokens.expiresAt, at(now)),
        lte(accessTokens.expiresAt, at(now + TOLD_BEFORE_MS)),
        sql`julianday(${accessTokens.expiresAt}) - julianday(${accessTokens.createdAt}) >= ${LONG_LIVED_MS / DAY}`,
      ),
    );
  if (ending.length === 0) return 0;
  await write(async (tx) => {
    for (const { token, email } of ending) {
      const mail = compose(`The access token "${token.name}" ends on ${day(token.expiresAt)}`, [
        `Your access token "${oneLine(token.name)}" ends on ${day(token.expiresAt)} (UTC). What uses it is refused from then on.`,
        token.lastUsedAt ? `It was last used on ${day(token.lastUsedAt)}.` : 'It was never used.',
        { label: 'Make a new one', link: `${settings().publicOrigin}/tokens` },
      ]);
      await queueMail(tx, { key: `token-expiry:${token.id}`, kind: 'token-expiry', to: email, ...mail });
    }
  });
  return ending.length;
}
