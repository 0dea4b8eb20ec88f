import { and, eq, or, sql } from 'drizzle-orm';
import type { FolioReader } from '#src/contracts/oversight.ts';
import { accessLog, accounts, folioItems, grants, spectra } from '#src/db/schema/index.ts';
import type { FolioInvite } from '../access/sharing.ts';
import { database } from '../database.ts';
import { nowIso } from '../ids.ts';
import { ofFolio } from './list-access.ts';

/**
 * Everybody who was granted a folio, with when they last looked at it or at a record in it, and when they last took a
 * file of it away. Who had several grants is told once, by the one that holds longest. Those who never came stand last.
 */
export async function folioReaders({ folio }: FolioInvite): Promise<FolioReader[]> {
  const { db } = await database();
  const inFolio = sql`(select ${folioItems.complexId} from ${folioItems} where ${folioItems.folioId} = ${folio.id})`;
  const touches = or(
    ofFolio(folio.id),
    and(eq(accessLog.subjectType, 'complex'), sql`${accessLog.subjectId} in ${inFolio}`),
    and(
      eq(accessLog.subjectType, 'spectrum'),
      sql`${accessLog.subjectId} in (select ${spectra.id} from ${spectra} where ${spectra.complexId} in ${inFolio})`,
    ),
  );
  const readers = sql`(select ${grants.accountId} from ${grants} where ${grants.folioId} = ${folio.id})`;
  const [given, done] = await Promise.all([
    db
      .select({
        id: accounts.id,
        name: accounts.name,
        email: accounts.email,
        level: grants.level,
        expires: grants.expiresAt,
        revokedAt: grants.revokedAt,
      })
      .from(grants)
      .innerJoin(accounts, eq(accounts.id, grants.accountId))
      .where(eq(grants.folioId, folio.id)),
    db
      .select({
        accountId: accessLog.accountId,
        kind: accessLog.kind,
        times: sql<number>`sum(${accessLog.count})`,
        last: sql<string>`max(${accessLog.lastAt})`,
      })
      .from(accessLog)
      .where(and(touches, sql`${accessLog.accountId} in ${readers}`))
      .groupBy(accessLog.accountId, accessLog.kind),
  ]);
  const now = nowIso();
  const isOver = (grant: (typeof given)[number]) => grant.revokedAt !== null || grant.expires <= now;
  const best = new Map<string, (typeof given)[number]>();
  for (const grant of given) {
    const other = best.get(grant.id);
    const isBetter = !other || (isOver(other) !== isOver(grant) ? isOver(other) : other.expires < grant.expires);
    if (isBetter) best.set(grant.id, grant);
  }
  const told = (accountId: string, kind: 'look' | 'download') =>
    done.find((row) => row.accountId === accountId && row.kind === kind);
  return [...best.values()]
    .map((grant) => {
      const [look, download] = [told(grant.id, 'look'), told(grant.id, 'download')];
      return {
        account: { id: grant.id, name: grant.name, email: grant.email },
        level: grant.level,
        expires: grant.expires,
        ended: isOver(grant),
        looks: look?.times ?? 0,
        lastLook: look?.last ?? null,
        downloads: download?.times ?? 0,
        lastDownload: download?.last ?? null,
      };
    })
    .sort((a, b) => (b.lastLook ?? '').localeCompare(a.lastLook ?? '') || a.account.name.localeCompare(b.account.name));
}
