import { and, asc, count, eq, gt, inArray, isNotNull, isNull, max, or, sql } from 'drizzle-orm';
import type { PersonDetail, PersonRecord } from '#src/contracts/people.ts';
import type { Db } from '#src/db/client.ts';
import { type accounts, folios, grants, labs, memberships, secondFactors, sessions } from '#src/db/schema/index.ts';
import type { AccountAccess, StewardAccess } from '../access/people.ts';
import { database } from '../database.ts';
import { nowIso } from '../ids.ts';
import { listDrafts } from './drafts.ts';
import { countOpenInvitations, countTokens } from './revoke.ts';

type Row = typeof accounts.$inferSelect;

/** Accounts as stewards get them. */
export async function accountRecords(_proof: Pick<StewardAccess, 'asker'>, rows: Row[]): Promise<PersonRecord[]> {
  if (rows.length === 0) return [];
  const { db } = await database();
  const ids = rows.map(({ id }) => id);
  const [held, readable, signIns, factors] = await Promise.all([
    labsOf(db, ids),
    readableFolios(db, ids),
    db
      .select({ id: sessions.accountId, at: max(sessions.createdAt) })
      .from(sessions)
      .where(inArray(sessions.accountId, ids))
      .groupBy(sessions.accountId),
    db
      .selectDistinct({ id: secondFactors.accountId })
      .from(secondFactors)
      .where(and(inArray(secondFactors.accountId, ids), isNotNull(secondFactors.confirmedAt))),
  ]);
  return rows.map(({ id, name, email, steward, state, deactivatedAt, createdAt }) => ({
    id,
    name,
    email,
    steward,
    state,
    deactivatedAt,
    createdAt,
    labs: held.filter(({ account }) => account === id).map(({ account: _, ...lab }) => lab),
    folios: readable.find((row) => row.id === id)?.n ?? 0,
    lastSignInAt: signIns.find((row) => row.id === id)?.at ?? null,
    secondFactor: factors.some((row) => row.id === id),
  }));
}

/** Labs of each account by name, and whether no other active account leads it. */
async function labsOf(db: Db, ids: string[]) {
  const rows = await db
    .select({
      account: memberships.accountId,
      id: labs.id,
      name: labs.name,
      role: memberships.role,
      others: sql<number>`(select count(*) from membership m join account a on a.id = m.account_id
        where m.lab_id = ${labs.id} and m.role = 'lead' and a.state = 'active' and a.id <> ${memberships.accountId})`,
    })
    .from(memberships)
    .innerJoin(labs, eq(labs.id, memberships.labId))
    .where(inArray(memberships.accountId, ids))
    .orderBy(asc(labs.name), asc(labs.id));
  return rows.map(({ others, ...row }) => ({ ...row, onlyLead: row.role === 'lead' && others === 0 }));
}

/** How many folios each account may read today. */
const readableFolios = (db: Db, ids: string[]) =>
  db
    .select({ id: grants.accountId, n: count() })
    .from(grants)
    .innerJoin(folios, eq(folios.id, grants.folioId))
    .where(
      and(
        inArray(grants.accountId, ids),
        isNull(grants.revokedAt),
        gt(grants.expiresAt, nowIso()),
        or(isNull(folios.embargoUntil), sql`${folios.embargoUntil} <= ${nowIso()}`),
      ),
    )
    .groupBy(grants.accountId);

/** One account with what hangs on it: what a deactivation would end, and what stays behind. */
export async function accountDetail({
  asker,
  account,
}: Pick<AccountAccess, 'asker' | 'account'>): Promise<PersonDetail> {
  const { db } = await database();
  const [[record], drafts, tokens, invitations] = await Promise.all([
    accountRecords({ asker }, [account]),
    listDrafts(db, account.id),
    countTokens(db, account.id),
    countOpenInvitations(db, account.id),
  ]);
  const { lastSignInAt: _, ...facts } = record!;
  return { ...facts, drafts, tokens, invitations };
}
