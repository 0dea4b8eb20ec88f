import { and, eq, isNull, sql } from 'drizzle-orm';
import type { GrantPatch, GrantRecord } from '#src/contracts/grants.ts';
import { grants } from '#src/db/schema/index.ts';
import type { GrantAccess } from '../access/grants.ts';
import { database } from '../database.ts';
import { HttpError } from '../http.ts';
import { nowIso } from '../ids.ts';
import { endWithin, LONGEST_GRANT_DAYS } from '../invitations/grant-end.ts';
import { record } from '../trail.ts';
import { mailEnded } from './ended-mail.ts';
import { grantRecord } from './record.ts';

/**
 * Change the level or the end of a guest's access, also of one whose time is over; it holds from the next request on.
 *
 * @throws {HttpError} 409 when it was revoked, 412 when it changed meanwhile, 422 for an end that is past or too far
 */
export async function changeGrant({ asker, folio, grant }: GrantAccess, patch: GrantPatch): Promise<GrantRecord> {
  if (grant.revokedAt) throw new HttpError(409, 'This access was ended by hand: invite the guest again');
  const change = {
    ...(patch.level ? { level: patch.level } : {}),
    ...(patch.expires ? { expiresAt: endWithin(patch.expires, LONGEST_GRANT_DAYS) } : {}),
  };
  const { write } = await database();
  await write(async (tx) => {
    const [row] = await tx
      .update(grants)
      .set({ ...change, version: sql`${grants.version} + 1` })
      .where(and(eq(grants.id, grant.id), eq(grants.version, grant.version), isNull(grants.revokedAt)))
      .returning();
    if (!row) throw new HttpError(412, 'Somebody changed this access meanwhile: read it again and repeat');
    const detail = { grant: grant.id, account: grant.accountId, ...change };
    await record(tx, asker, { action: 'change-grant', subjectType: 'folio', subjectId: folio.id, detail });
  });
  return grantRecord({ grant });
}

/** End a guest's access: it is gone at the next request, and the guest is told by mail. */
export async function revokeGrant({ asker, folio, grant }: GrantAccess): Promise<void> {
  const { write } = await database();
  await write(async (tx) => {
    const [revoked] = await tx
      .update(grants)
      .set({ revokedAt: nowIso(), version: sql`${grants.version} + 1` })
      .where(and(eq(grants.id, grant.id), isNull(grants.revokedAt)))
      .returning();
    if (!revoked) return;
    await mailEnded(tx, revoked, folio);
    const detail = { grant: grant.id, account: grant.accountId };
    await record(tx, asker, { action: 'revoke-grant', subjectType: 'folio', subjectId: folio.id, detail });
  });
}
