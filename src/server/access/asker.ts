import { and, eq, gt, isNull } from 'drizzle-orm';
import type { Db } from '../../db/client.ts';
import { accessTokens, accounts, folios, grants, memberships, sessions } from '../../db/schema/index.ts';
import { database } from '../database.ts';
import { nowIso, sha256 } from '../ids.ts';
import { factorRequired, hasFactor } from '../second-factor/rule.ts';
import { liveSession, touchSession } from '../sessions.ts';
import type { Actor } from '../trail.ts';

export type Role = 'lead' | 'contributor';
export type Level = 'view' | 'download';

export interface ActiveGrant {
  id: string;
  folioId: string;
  /** The lab whose folio it is: a guest sees what a member of it may share. */
  labId: string;
  level: Level;
  shows: 'attested' | 'proposed';
}

/** Who is asking, as the database has it now: never what a cookie remembers. */
export interface Asker extends Actor {
  readonly accountId: string;
  readonly email: string;
  readonly name: string;
  readonly steward: boolean;
  /** A steward who may not act as one here: in production that takes a second factor. */
  readonly stewardWithoutFactor: boolean;
  readonly labs: ReadonlyMap<string, Role>;
  /** Grants that hold today, of folios not under embargo. */
  readonly grants: readonly ActiveGrant[];
  readonly tokenId: string | null;
  /** The session of the cookie; null for a token, and for work apart from a request. */
  readonly sessionId: string | null;
  /** Whether a second factor was shown when the session began, or has been set up in it. */
  readonly secondFactor: boolean;
  /** What the asker's means of entry allows: a session both, a token what it was made for. */
  readonly scopes: ReadonlySet<'read' | 'write'>;
}

/** A member sees what the programme shares; a guest only what folios grant. */
export const isMember = (asker: Asker): boolean => asker.steward || asker.labs.size > 0;

/** Labs in which the asker holds a role. */
export const labsWith = (asker: Asker, role: Role): string[] =>
  [...asker.labs].filter(([, held]) => held === role).map(([labId]) => labId);

interface Entry {
  token?: typeof accessTokens.$inferSelect;
  session?: typeof sessions.$inferSelect;
}

async function load(db: Db, account: typeof accounts.$inferSelect, { token, session }: Entry = {}): Promise<Asker> {
  const now = nowIso();
  const [held, given] = await Promise.all([
    db.select().from(memberships).where(eq(memberships.accountId, account.id)),
    db
      .select({
        id: grants.id,
        folioId: grants.folioId,
        labId: folios.labId,
        level: grants.level,
        shows: folios.shows,
        embargoUntil: folios.embargoUntil,
      })
      .from(grants)
      .innerJoin(folios, eq(folios.id, grants.folioId))
      .where(and(eq(grants.accountId, account.id), isNull(grants.revokedAt), gt(grants.expiresAt, now))),
  ]);
  // A token made for one lab brings the rights of that lab alone.
  const steward = account.steward && !token?.labId;
  // A session has shown a factor or has not; a token, and work apart from a request, go by the account's having one.
  const mayAct = !factorRequired({ steward }) || (session ? session.secondFactor : await hasFactor(db, account.id));
  const labs = held.filter((m) => !token?.labId || m.labId === token.labId);
  return {
    accountId: account.id,
    email: account.email,
    name: account.name,
    steward: steward && mayAct,
    stewardWithoutFactor: steward && !mayAct,
    labs: new Map(labs.map((m) => [m.labId, m.role])),
    grants: given.filter((g) => !g.embargoUntil || g.embargoUntil <= now),
    tokenId: token?.id ?? null,
    sessionId: session?.id ?? null,
    secondFactor: session?.secondFactor ?? false,
    scopes: new Set(token?.scopes ?? ['read', 'write']),
  };
}

/** The account of a session cookie, or null when the session ended or lapsed or the account was closed since. */
export async function askerOfSession(sessionId: string): Promise<Asker | null> {
  const { db } = await database();
  const [row] = await db
    .select()
    .from(sessions)
    .innerJoin(accounts, eq(accounts.id, sessions.accountId))
    .where(and(eq(sessions.id, sessionId), liveSession()));
  if (row?.account.state !== 'active') return null;
  await touchSession(row.session);
  return load(db, row.account, { session: row.session });
}

/** The account of an access token, or null when it is unknown, lapsed or revoked. */
export async function askerOfToken(token: string): Promise<Asker | null> {
  const { db } = await database();
  const [row] = await db
    .select()
    .from(accessTokens)
    .innerJoin(accounts, eq(accounts.id, accessTokens.accountId))
    .where(
      and(eq(accessTokens.hash, sha256(token)), isNull(accessTokens.revokedAt), gt(accessTokens.expiresAt, nowIso())),
    );
  if (row?.account.state !== 'active') return null;
  return load(db, row.account, { token: row.access_token });
}

/**
 * Who ordered work that runs apart from the request, as the database has them by now; null when the account was closed
 * or the token that ordered it no longer opens anything. A token's narrower rights hold for the work, too.
 */
export async function askerAgain({ accountId, tokenId }: Actor): Promise<Asker | null> {
  const { db } = await database();
  const [account] = await db
    .select()
    .from(accounts)
    .where(eq(accounts.id, accountId ?? ''));
  if (account?.state !== 'active') return null;
  if (!tokenId) return load(db, account);
  const [token] = await db
    .select()
    .from(accessTokens)
    .where(and(eq(accessTokens.id, tokenId), isNull(accessTokens.revokedAt), gt(accessTokens.expiresAt, nowIso())));
  return token ? load(db, account, { token }) : null;
}
