import { aliasedTable, asc, eq, inArray, type SQL } from 'drizzle-orm';
import type { GrantRecord } from '#src/contracts/grants.ts';
import { accounts, grants } from '#src/db/schema/index.ts';
import type { GrantAccess } from '../access/grants.ts';
import type { FolioInvite } from '../access/sharing.ts';
import { database } from '../database.ts';

async function rowsWhere(where: SQL): Promise<(GrantRecord & { folioId: string })[]> {
  const { db } = await database();
  const givers = aliasedTable(accounts, 'giver');
  const rows = await db
    .select({ grant: grants, email: accounts.email, name: accounts.name, grantedBy: givers.name })
    .from(grants)
    .innerJoin(accounts, eq(accounts.id, grants.accountId))
    .innerJoin(givers, eq(givers.id, grants.grantedBy))
    .where(where)
    .orderBy(asc(accounts.email), asc(grants.id));
  return rows.map(({ grant, email, name, grantedBy }) => ({
    folioId: grant.folioId,
    id: grant.id,
    email,
    name,
    level: grant.level,
    expires: grant.expiresAt,
    termsAcceptedAt: grant.termsAcceptedAt,
    termsLicence: grant.termsLicence,
    revoked: grant.revokedAt !== null,
    revokedAt: grant.revokedAt,
    grantedBy,
    createdAt: grant.createdAt,
  }));
}

const withoutFolio = ({ folioId: _, ...grant }: GrantRecord & { folioId: string }): GrantRecord => grant;

/** Grants of folios, those that ended among them, by address. */
export const grantRows = async (folioIds: string[]) =>
  folioIds.length === 0 ? [] : rowsWhere(inArray(grants.folioId, folioIds));

/** Who may read a folio and who might once, by address. */
export async function listGrants({ folio }: FolioInvite): Promise<GrantRecord[]> {
  return (await grantRows([folio.id])).map(withoutFolio);
}

/** One grant as those see it who give it. */
export async function grantRecord({ grant }: Pick<GrantAccess, 'grant'>): Promise<GrantRecord> {
  const [row] = await rowsWhere(eq(grants.id, grant.id));
  return withoutFolio(row!);
}
