import { and, eq, sql } from 'drizzle-orm';
import type { BandRecord, Judgement } from '#src/contracts/spectra.ts';
import { bands, spectra } from '#src/db/schema/index.ts';
import type { BandJudge } from '#src/server/access/records.ts';
import { database } from '#src/server/database.ts';
import { HttpError } from '#src/server/http.ts';
import { nowIso } from '#src/server/ids.ts';
import { notifyDispute, notifyMentions } from '#src/server/mentions/notify.ts';
import { record } from '#src/server/trail.ts';
import { describeJudged } from './band-record.ts';
import { refuse } from './refuse.ts';

/**
 * Attest or dispute the assignment that another person proposed.
 *
 * @throws {HttpError} 422 for a dispute without reason, or an attestation of a band that has no assignment; 409 for a
 *   band of a withdrawn spectrum; 412 when the band changed since it was read
 */
export async function judgeBand(
  access: BandJudge,
  verdict: 'attested' | 'disputed',
  { reason }: Judgement,
): Promise<BandRecord> {
  const { asker, spectrum, band } = access;
  if (spectrum.state === 'withdrawn')
    throw new HttpError(409, 'This spectrum is withdrawn: its bands stay as they are');
  if (verdict === 'disputed' && !reason) throw refuse('#/reason', 'Say what speaks against the assignment');
  if (verdict === 'attested' && band.class === 'unassigned')
    throw refuse('#', 'This band has no assignment that could be attested');
  const { write } = await database();
  await write(async (tx) => {
    const judged = await tx
      .update(bands)
      .set({
        state: verdict,
        judgedBy: asker.accountId,
        judgedAt: nowIso(),
        judgement: reason || null,
        version: band.version + 1,
      })
      .where(and(eq(bands.id, band.id), eq(bands.version, band.version)))
      .returning({ id: bands.id });
    if (judged.length === 0) throw new HttpError(412, 'Somebody changed this band meanwhile: read it again');
    // Its version rises, since its record changed; judging two bands at once is no conflict.
    await tx
      .update(spectra)
      .set({ version: sql`${spectra.version} + 1`, updatedAt: nowIso() })
      .where(eq(spectra.id, spectrum.id));
    await record(tx, asker, {
      action: verdict === 'attested' ? 'attest' : 'dispute',
      subjectType: 'band',
      subjectId: band.id,
      detail: { spectrum: spectrum.id, class: band.class, ...(reason ? { reason } : {}) },
    });
    const except = verdict === 'disputed' ? band.proposedBy : undefined;
    if (except && reason) await notifyDispute(tx, asker, { band, reason });
    await notifyMentions(tx, asker, { text: reason, subject: { type: 'band', id: band.id, judgement: true }, except });
  });
  return describeJudged(access);
}
