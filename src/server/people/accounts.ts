import { and, asc, eq, ne, or, type SQL, sql } from 'drizzle-orm';
import type { Page } from '#src/contracts/common.ts';
import type { PersonDetail, PersonPatch, PersonQuery, PersonRecord } from '#src/contracts/people.ts';
import type { Tx } from '#src/db/client.ts';
import { accounts } from '#src/db/schema/index.ts';
import type { AccountAccess, StewardAccess } from '../access/people.ts';
import { sendReset } from '../accounts/reset-password.ts';
import { database } from '../database.ts';
import { HttpError } from '../http.ts';
import { nowIso } from '../ids.ts';
import { behind, cursorScope, cutPage, readCursor } from '../paging.ts';
import { endSessions } from '../sessions.ts';
import { record } from '../trail.ts';
import { accountDetail, accountRecords } from './account-record.ts';
import { revokeTokens, revokeUnbackedInvitations } from './revoke.ts';

/** Everybody who has an account, by name. */
export async function listAccounts({ asker }: StewardAccess, query: PersonQuery): Promise<Page<PersonRecord>> {
  const { db } = await database();
  const { q, state, limit, cursor } = query;
  const where = and(q ? named(q) : undefined, state ? eq(accounts.state, state) : undefined);
  const scope = cursorScope(asker.accountId, 'accounts', query);
  const [name, id] = [sql`${accounts.name}`, sql`${accounts.id}`];
  const [found, total] = await Promise.all([
    db
      .select()
      .from(accounts)
      .where(and(where, behind(readCursor(cursor, scope), name, id, false)))
      .orderBy(asc(accounts.name), asc(accounts.id))
      .limit(limit + 1),
    db.$count(accounts, where),
  ]);
  const { rows, next } = cutPage(found, limit, scope, (row) => ({ value: row.name, id: row.id }));
  return { items: await accountRecords({ asker }, rows), total, next };
}

function named(q: string): SQL | undefined {
  const pattern = `%${q.replace(/[\\%_]/g, (sign) => `\\${sign}`)}%`;
  return or(sql`${accounts.name} like ${pattern} escape '\\'`, sql`${accounts.email} like ${pattern} escape '\\'`);
}

/** Somebody must be left who can undo it. @throws {HttpError} 409 */
async function requireAnotherSteward(tx: Tx, accountId: string): Promise<void> {
  const others = and(eq(accounts.steward, true), eq(accounts.state, 'active'), ne(accounts.id, accountId));
  if ((await tx.$count(accounts, others)) === 0)
    throw new HttpError(409, 'This is the only active steward: make another account steward first');
}

/**
 * Deactivate or reactivate an account, make a steward or end that, correct a name. Deactivating ends what the person
 * has open: sessions, access tokens, invitations sent. Memberships, drafts and what was registered stay as they are.
 *
 * @throws {HttpError} 409 for deactivating oneself, for the only steward, for making a deactivated account steward; 412
 */
export async function changeAccount({ asker, account }: AccountAccess, patch: PersonPatch): Promise<PersonDetail> {
  const next = {
    state: patch.state ?? account.state,
    steward: patch.steward ?? account.steward,
    name: patch.name ?? account.name,
  };
  const closes = account.state === 'active' && next.state === 'deactivated';
  if (closes && account.id === asker.accountId)
    throw new HttpError(409, 'You cannot deactivate your own account: ask another steward');
  if (patch.steward && !account.steward && next.state === 'deactivated')
    throw new HttpError(409, 'This account is deactivated: reactivate it before it becomes steward');
  const { write } = await database();
  const changed = await write(async (tx) => {
    if (account.steward && account.state === 'active' && (closes || !next.steward))
      await requireAnotherSteward(tx, account.id);
    const [row] = await tx
      .update(accounts)
      .set({
        ...next,
        deactivatedAt: closes ? nowIso() : next.state === 'active' ? null : account.deactivatedAt,
        version: account.version + 1,
      })
      .where(and(eq(accounts.id, account.id), eq(accounts.version, account.version)))
      .returning();
    if (!row) throw new HttpError(412, 'Somebody changed this account meanwhile: read it again and repeat');
    const ended = closes
      ? { sessions: await endSessions(tx, account.id), tokensRevoked: await revokeTokens(tx, account.id) }
      : {};
    const invitationsRevoked = await revokeUnbackedInvitations(tx, account.id);
    await record(tx, asker, {
      action: actionOf(account.state, next.state),
      subjectType: 'account',
      subjectId: account.id,
      detail: { ...patch, ...ended, ...(invitationsRevoked.length > 0 ? { invitationsRevoked } : {}) },
    });
    return row;
  });
  return accountDetail({ asker, account: changed });
}

const actionOf = (before: string, now: string): string => {
  if (before === now) return 'change';
  return now === 'deactivated' ? 'deactivate' : 'reactivate';
};

/** Sign a person out everywhere; access tokens stay. @returns how many sessions were live */
export async function endAccountSessions({ asker, account }: AccountAccess): Promise<{ ended: number }> {
  const { write } = await database();
  return write(async (tx) => {
    // A steward who does this to the own account keeps the session that asks.
    const ended = await endSessions(tx, account.id, asker.sessionId);
    await record(tx, asker, {
      action: 'end-sessions',
      subjectType: 'account',
      subjectId: account.id,
      detail: { ended },
    });
    return { ended };
  });
}

/** Mail a person a link to choose a new password: nobody else ever sets one. @throws {HttpError} 409 when deactivated */
export async function sendPasswordReset({ asker, account }: AccountAccess): Promise<void> {
  if (account.state !== 'active') throw new HttpError(409, 'This account is deactivated: reactivate it first');
  const { write } = await database();
  await write((tx) => sendReset(tx, asker, account));
}
