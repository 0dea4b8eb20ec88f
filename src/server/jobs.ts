import { and, asc, eq, gte, lt, lte, or, sql } from 'drizzle-orm';
import type { Database, Tx } from '#src/db/client.ts';
import { jobs } from '#src/db/schema/index.ts';
import { newId, nowIso } from './ids.ts';
import { log } from './log.ts';

export type Job = typeof jobs.$inferSelect;

export interface JobContext {
  readonly id: string;
  /** Tell how far the work is, 0 … 1. Call it as often as you like: it is written at most every half second. */
  progress(fraction: number): void;
  /** Fires when the job is cancelled, when its lease is lost and when the program stops: give up soon after. */
  readonly signal: AbortSignal;
}

/** Work of one kind. It may run again after a crash, so that doing it twice must come to the same. */
export type JobHandler = (payload: Record<string, unknown>, context: JobContext) => Promise<void>;

export interface JobLoopOptions {
  handlers: Readonly<Record<string, JobHandler>>;
  /** Jobs that run at one time in this process. */
  concurrency?: number;
  /** How often to look for work, in milliseconds. */
  pollMs?: number;
  /** How long a silent process keeps its job before another one may take it, in milliseconds. */
  leaseMs?: number;
  /** Pause after the n-th failure, in milliseconds. */
  pause?: (tries: number) => number;
}

export interface JobLoop {
  /** Take no further job, tell those that run, wait for them; what did not finish goes back into the queue. */
  stop(): Promise<void>;
}

/** Attempts before a job is given up. */
export const JOB_TRIES = 3;
const PROGRESS_MS = 500;

/**
 * Put a job in the queue, in the transaction of what it belongs to.
 *
 * @param options.runAt - not before this, milliseconds since 1970; now by default
 * @returns the job's id
 */
export async function enqueue(
  tx: Tx,
  kind: string,
  payload: Record<string, unknown>,
  options: { runAt?: number } = {},
): Promise<string> {
  const id = newId();
  await tx
    .insert(jobs)
    .values({ id, kind, payload, state: 'queued', runAt: options.runAt ?? Date.now(), createdAt: nowIso() });
  return id;
}

/** The job of this id as it stands, or null. */
export async function findJob({ db }: Pick<Database, 'db'>, id: string): Promise<Job | null> {
  const [job] = await db.select().from(jobs).where(eq(jobs.id, id));
  return job ?? null;
}

/** Cancel a job that has not ended; one that runs is told, in whichever process it runs. Whether there was one. */
export async function cancelJob(tx: Tx, id: string): Promise<boolean> {
  const cancelled = await tx
    .update(jobs)
    .set({ state: 'cancelled', finishedAt: nowIso(), leaseUntil: null })
    .where(and(eq(jobs.id, id), or(eq(jobs.state, 'queued'), eq(jobs.state, 'running'))))
    .returning({ id: jobs.id });
  return cancelled.length > 0;
}

/**
 * Run queued jobs in this process until stopped. Several processes may loop on one database: a job is taken under a
 * lease, which is renewed while it runs, and `tries` tells a late loop that its job is no longer its own.
 */
export function startJobLoop(database: Database, options: JobLoopOptions): JobLoop {
  const {
    handlers,
    concurrency = 2,
    pollMs = 500,
    leaseMs = 30_000,
    pause = (tries) => 5_000 * 4 ** (tries - 1),
  } = options;
  const running = new Map<AbortController, Promise<void>>();
  let stopped = false;
  let timer: NodeJS.Timeout | undefined;

  const look = async (): Promise<void> => {
    while (!stopped && running.size < concurrency) {
      const job = await claimJob(database, leaseMs);
      if (!job) return;
      const controller = new AbortController();
      if (stopped) controller.abort();
      const work = runJob(database, job, handlers[job.kind], controller, { leaseMs, pause, stopping: () => stopped });
      running.set(controller, work);
      void work.finally(() => {
        running.delete(controller);
        next(0);
      });
    }
  };
  let looking: Promise<void> = Promise.resolve();
  const next = (delay: number): void => {
    if (stopped) return;
    clearTimeout(timer);
    timer = setTimeout(() => {
      looking = look()
        .catch((error: unknown) => log.error({ error: String(error) }, 'the job loop could not reach the database'))
        .finally(() => next(pollMs));
    }, delay);
  };
  next(0);

  return {
    async stop() {
      stopped = true;
      clearTimeout(timer);
      await looking;
      for (const controller of running.keys()) controller.abort(new Error('the program stops'));
      await Promise.allSettled(running.values());
    },
  };
}

/** Take the job that has waited longest, or one whose process has gone silent. */
async function claimJob({ db, write }: Database, leaseMs: number): Promise<Job | undefined> {
  const now = Date.now();
  const due = or(
    and(eq(jobs.state, 'queued'), lte(jobs.runAt, now)),
    and(eq(jobs.state, 'running'), lt(jobs.leaseUntil, now)),
  );
  // Looking first keeps an idle loop from taking the write lock.
  const [waiting] = await db.select({ id: jobs.id }).from(jobs).where(due).limit(1);
  if (!waiting) return undefined;
  return write(async (tx) => {
    await tx
      .update(jobs)
      .set({ state: 'failed', error: 'the process ended while it ran', finishedAt: nowIso(), leaseUntil: null })
      .where(and(eq(jobs.state, 'running'), lt(jobs.leaseUntil, now), gte(jobs.tries, JOB_TRIES)));
    const first = tx.select({ id: jobs.id }).from(jobs).where(due).orderBy(asc(jobs.runAt), asc(jobs.id)).limit(1);
    const [job] = await tx
      .update(jobs)
      .set({ state: 'running', tries: sql`${jobs.tries} + 1`, leaseUntil: now + leaseMs })
      .where(eq(jobs.id, sql`${first}`))
      .returning();
    return job;
  });
}

async function runJob(
  database: Database,
  job: Job,
  handler: JobHandler | undefined,
  controller: AbortController,
  { leaseMs, pause, stopping }: { leaseMs: number; pause: (tries: number) => number; stopping: () => boolean },
): Promise<void> {
  const mine = and(eq(jobs.id, job.id), eq(jobs.tries, job.tries), eq(jobs.state, 'running'));
  const set = async (values: Partial<Job>): Promise<void> => {
    const rows = await database.write((tx) => tx.update(jobs).set(values).where(mine).returning({ id: jobs.id }));
    if (rows.length === 0) controller.abort(new Error('the job was cancelled or taken by another process'));
  };
  const reporter = reportProgress((progress) => set({ progress, leaseUntil: Date.now() + leaseMs }));
  const lease = setInterval(() => void set({ leaseUntil: Date.now() + leaseMs }).catch(() => undefined), leaseMs / 3);
  const watch = setInterval(
    () =>
      void cancelled(database, job).then(
        (gone) => gone && controller.abort(),
        () => undefined,
      ),
    1_000,
  );
  let ending: Partial<Job>;
  try {
    if (!handler) throw new Error(`nothing here does a job of kind ${job.kind}`);
    await handler(job.payload, { id: job.id, progress: reporter.report, signal: controller.signal });
    ending = { state: 'done', progress: 1, error: null, finishedAt: nowIso(), leaseUntil: null };
  } catch (error) {
    ending = afterFailure(job, error, stopping(), pause);
  }
  clearInterval(lease);
  clearInterval(watch);
  await reporter.end();
  await set(ending).catch((error: unknown) =>
    log.error({ job: job.id, error: String(error) }, 'a job could not be closed'),
  );
}

function afterFailure(job: Job, error: unknown, stopping: boolean, pause: (tries: number) => number): Partial<Job> {
  // Work that was stopped with the program did not fail: the next start takes it up at once.
  if (stopping) return { state: 'queued', tries: job.tries - 1, runAt: Date.now(), leaseUntil: null, progress: 0 };
  const message = error instanceof Error ? error.message : String(error);
  log.warn({ job: job.id, kind: job.kind, tries: job.tries, error: message }, 'job failed');
  if (job.tries >= JOB_TRIES) return { state: 'failed', error: message, finishedAt: nowIso(), leaseUntil: null };
  return { state: 'queued', error: message, runAt: Date.now() + pause(job.tries), leaseUntil: null, progress: 0 };
}

async function cancelled({ db }: Database, job: Job): Promise<boolean> {
  const [row] = await db.select({ state: jobs.state, tries: jobs.tries }).from(jobs).where(eq(jobs.id, job.id));
  return row?.state !== 'running' || row.tries !== job.tries;
}

/** Write the last told progress at most every half second, one write at a time. */
function reportProgress(write: (progress: number) => Promise<void>) {
  let told: number | null = null;
  let writing: Promise<void> = Promise.resolve();
  let timer: NodeJS.Timeout | undefined;
  const flush = () => {
    timer = undefined;
    if (told === null) return;
    const progress = told;
    told = null;
    writing = write(progress).catch(() => undefined);
  };
  return {
    report(fraction: number) {
      told = Math.min(1, Math.max(0, fraction));
      timer ??= setTimeout(flush, PROGRESS_MS);
    },
    async end() {
      clearTimeout(timer);
      await writing;
    },
  };
}
