import { and, eq, inArray, sql } from 'drizzle-orm';
import type { BundleInput, BundleRecord } from '#src/contracts/sharing.ts';
import type { Tx } from '#src/db/client.ts';
import { bundles, complexes, jobs } from '#src/db/schema/index.ts';
import { type Asker, isMember } from '../access/asker.ts';
import { type BundleAccess, guestLevel, seeFolio } from '../access/sharing.ts';
import { complexDownload, complexSight } from '../access/sight.ts';
import { livingAccessions } from '../complexes/alias.ts';
import { database } from '../database.ts';
import { HttpError } from '../http.ts';
import { newId, nowIso } from '../ids.ts';
import { cancelJob, enqueue } from '../jobs.ts';
import { record } from '../trail.ts';
import type { BundleJob } from './build.ts';
import { fileUntil } from './forget.ts';

/** Bundles that one account may have in the making. */
const AT_ONCE = 5;

const readOnly = () => new HttpError(403, 'Your access to this folio is for reading: ask its lab for downloads');

/** Guests at view level never get a bundle, so that it is told before any record is looked at. @throws {HttpError} 403 */
export function requireDownload(asker: Asker): void {
  if (!isMember(asker) && !asker.grants.some((grant) => grant.level === 'download')) throw readOnly();
}

/**
 * What a bundle is ordered of.
 *
 * @throws {HttpError} 404 for a folio out of sight, 403 where the asker may only look, 422 for a complex out of sight
 */
export async function requireContent(asker: Asker, input: BundleInput): Promise<void> {
  if (!('folio' in input)) return requireComplexes(asker, input.complexes);
  const { folio } = await seeFolio(asker, input.folio);
  if (guestLevel(asker, folio) === 'view') throw readOnly();
}

/**
 * Order a bundle of what `requireContent` let pass. What it will hold is judged when it is built, and again when it is
 * fetched.
 *
 * @throws {HttpError} 429 when too many are in the making
 */
export async function orderBundle(asker: Asker, input: BundleInput): Promise<BundleRecord> {
  const row = {
    id: newId(),
    requestedBy: asker.accountId,
    folioId: 'folio' in input ? input.folio : null,
    complexes: 'complexes' in input ? [...new Set(input.complexes)] : null,
    state: 'queued' as const,
    createdAt: nowIso(),
  };
  const { accountId, tokenId } = asker;
  const job: BundleJob = { bundle: row.id, accountId, tokenId, notify: input.notify ?? false };
  const { write } = await database();
  const made = await write(async (tx) => {
    await requireRoom(tx, asker);
    const [bundle] = await tx.insert(bundles).values(row).returning();
    await enqueue(tx, 'bundle', { ...job });
    const detail = { folio: row.folioId, complexes: row.complexes };
    await record(tx, asker, { action: 'order', subjectType: 'bundle', subjectId: row.id, detail });
    return bundle!;
  });
  return describe(made, undefined);
}

async function requireComplexes(asker: Asker, accessions: string[]): Promise<void> {
  const { db } = await database();
  const livesAs = await livingAccessions(db, accessions);
  const among = sql`${complexes.accession} in (select value from json_each(${JSON.stringify(accessions.map(livesAs))}))`;
  const find = async (sight: typeof complexSight) =>
    new Set(
      (
        await db
          .select({ a: complexes.accession })
          .from(complexes)
          .where(and(among, sight(asker)))
      ).map(({ a }) => a),
    );
  const [seen, taken] = await Promise.all([find(complexSight), find(complexDownload)]);
  const errors = accessions.flatMap((accession, i) =>
    seen.has(livesAs(accession)) ? [] : [{ pointer: `#/complexes/${i}`, detail: `${accession} is not in your sight` }],
  );
  if (errors.length > 0) throw new HttpError(422, 'Some complexes are not in your sight', { errors });
  if (accessions.some((accession) => !taken.has(livesAs(accession)))) throw readOnly();
}

const jobOf = (id: string) => and(eq(jobs.kind, 'bundle'), sql`json_extract(${jobs.payload}, '$.bundle') = ${id}`);

async function requireRoom(tx: Tx, asker: Asker): Promise<void> {
  const [row] = await tx
    .select({ count: sql<number>`count(*)` })
    .from(jobs)
    .where(
      and(
        eq(jobs.kind, 'bundle'),
        inArray(jobs.state, ['queued', 'running']),
        sql`json_extract(${jobs.payload}, '$.accountId') = ${asker.accountId}`,
      ),
    );
  if ((row?.count ?? 0) >= AT_ONCE)
    throw new HttpError(429, `${AT_ONCE} of your bundles are in the making: wait for one of them`, {
      headers: { 'retry-after': '30' },
    });
}

/** How far it is. Until it is ready the job knows. */
export async function readBundle({ bundle }: BundleAccess): Promise<BundleRecord> {
  const { db } = await database();
  const [job] = await db.select().from(jobs).where(jobOf(bundle.id));
  return describe(bundle, job);
}

function describe(
  bundle: typeof bundles.$inferSelect,
  job: Pick<typeof jobs.$inferSelect, 'state' | 'progress'> | undefined,
): BundleRecord {
  const settled = bundle.state === 'ready' || bundle.state === 'cancelled' || bundle.state === 'failed';
  const working = job?.state === 'done' ? 'running' : (job?.state ?? 'queued');
  const state = settled ? bundle.state : working;
  return {
    id: bundle.id,
    state,
    progress: state === 'ready' ? 1 : (job?.progress ?? 0),
    size: bundle.size,
    sha256: bundle.sha256,
    folio: bundle.folioId,
    error: bundle.error ?? (state === 'failed' ? 'The bundle could not be built: order it again' : null),
    createdAt: bundle.createdAt,
    fileUntil: fileUntil(bundle),
  };
}

/** Give up a bundle that is not ready. @throws {HttpError} 409 when it is ready or failed */
export async function cancelBundle({ asker, bundle }: BundleAccess): Promise<void> {
  const { write } = await database();
  await write(async (tx) => {
    const open = and(eq(bundles.id, bundle.id), inArray(bundles.state, ['queued', 'running', 'cancelled']));
    const ended = { state: 'cancelled' as const, finishedAt: nowIso() };
    const [row] = await tx.update(bundles).set(ended).where(open).returning();
    if (!row) throw new HttpError(409, 'There is nothing left to cancel');
    const [job] = await tx.select({ id: jobs.id }).from(jobs).where(jobOf(bundle.id));
    if (job) await cancelJob(tx, job.id);
    await record(tx, asker, { action: 'cancel', subjectType: 'bundle', subjectId: bundle.id });
  });
}
