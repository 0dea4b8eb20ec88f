import { eq, inArray, sql } from 'drizzle-orm';
import type { FolioRecord } from '#src/contracts/sharing.ts';
import { folios, grants } from '#src/db/schema/index.ts';
import type { OwnGrants } from '../access/grants.ts';
import { database } from '../database.ts';
import { folioRecord } from '../folios/record.ts';
import { HttpError } from '../http.ts';
import { nowIso } from '../ids.ts';
import { record } from '../trail.ts';

/**
 * Note that a guest accepts the present licence of a folio.
 *
 * @throws {HttpError} 409 when another licence was shown than the folio's present one
 */
export async function acceptTerms({ asker, folio, grants: held }: OwnGrants, licence: string): Promise<FolioRecord> {
  const { write } = await database();
  await write(async (tx) => {
    const [present] = await tx.select({ licence: folios.licence }).from(folios).where(eq(folios.id, folio.id));
    if (present?.licence !== licence)
      throw new HttpError(409, `The licence of the folio is ${present?.licence} by now: read it and accept that one`);
    const ids = held.map((grant) => grant.id);
    await tx
      .update(grants)
      .set({ termsAcceptedAt: nowIso(), termsLicence: licence, version: sql`${grants.version} + 1` })
      .where(inArray(grants.id, ids));
    const detail = { licence, grants: ids };
    await record(tx, asker, { action: 'accept-terms', subjectType: 'folio', subjectId: folio.id, detail });
  });
  return folioRecord({ asker, folio });
}
