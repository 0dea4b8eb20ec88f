import { afterEach, beforeEach, expect, test } from 'vitest';
import type { Database } from '#src/db/client.ts';
import { jobs } from '#src/db/schema/index.ts';
import {
  cancelJob,
  enqueue,
  findJob,
  JOB_TRIES,
  type JobHandler,
  type JobLoop,
  type JobLoopOptions,
  startJobLoop,
} from '#src/server/jobs.ts';
import { freshDatabase } from './fresh-database.ts';

let database: Database;
const loops: JobLoop[] = [];

beforeEach(async () => {
  database = await freshDatabase();
});

// Registered after the hook of freshDatabase, so that it runs before it: the loops end first.
afterEach(async () => {
  await Promise.all(loops.splice(0).map((loop) => loop.stop()));
});

const start = (handlers: Record<string, JobHandler>, options: Partial<JobLoopOptions> = {}) => {
  const loop = startJobLoop(database, { handlers, pollMs: 20, pause: () => 0, ...options });
  loops.push(loop);
  return loop;
};
const add = (kind = 'work', payload = {}, runAt?: number) =>
  database.write((tx) => enqueue(tx, kind, payload, runAt === undefined ? {} : { runAt }));
const state = async (id: string) => (await findJob(database, id))?.state;
const untilAborted = (signal: AbortSignal) =>
  new Promise<never>((_, reject) => signal.addEventListener('abort', () => reject(signal.reason)));

test('runs what is queued, with its payload, oldest first', async () => {
  const seen: unknown[] = [];
  const ids = [await add('work', { n: 1 }), await add('work', { n: 2 }), await add('work', { n: 3 })];
  start({ work: async (payload) => void seen.push(payload.n) }, { concurrency: 1 });
  await expect.poll(() => state(ids[2]!)).toBe('done');
  expect(seen).toEqual([1, 2, 3]);
  expect(await findJob(database, ids[0]!)).toMatchObject({ progress: 1, tries: 1, error: null, leaseUntil: null });
});

test('several loops on one database take each job once', async () => {
  const seen: unknown[] = [];
  for (let n = 0; n < 30; n++) await add('work', { n });
  const work: JobHandler = async ({ n }) => void seen.push(n);
  for (let i = 0; i < 3; i++) start({ work });
  await expect
    .poll(async () => (await database.db.select().from(jobs)).every((job) => job.state === 'done'))
    .toBe(true);
  expect(seen).toHaveLength(30);
  expect(new Set(seen).size).toBe(30);
});

test('a job for later waits', async () => {
  const later = await add('work', {}, Date.now() + 60_000);
  const now = await add();
  start({ work: async () => undefined });
  await expect.poll(() => state(now)).toBe('done');
  expect(await state(later)).toBe('queued');
});

test('what fails is tried again, then given up with its reason', async () => {
  let runs = 0;
  const id = await add();
  const unknown = await add('nothing-does-this');
  start({
    work: async () => {
      runs++;
      throw new Error('no luck');
    },
  });
  await expect.poll(() => state(id)).toBe('failed');
  expect(runs).toBe(JOB_TRIES);
  expect(await findJob(database, id)).toMatchObject({ error: 'no luck', tries: JOB_TRIES });
  await expect.poll(() => state(unknown)).toBe('failed');
});

test('progress is written seldom, whatever the work tells', async () => {
  const id = await add();
  const seen = new Set<number>();
  start({
    work: async (_, { progress }) => {
      for (let i = 0; i < 60; i++) {
        progress(i / 100);
        await new Promise((resolve) => setTimeout(resolve, 20));
      }
    },
  });
  await expect
    .poll(
      async () => {
        const job = await findJob(database, id);
        seen.add(job!.progress);
        return job!.state;
      },
      { interval: 20, timeout: 10_000 },
    )
    .toBe('done');
  const between = [...seen].filter((p) => p > 0 && p < 1);
  expect(between.length).toBeGreaterThan(0);
  expect(between.length).toBeLessThan(5);
});

test('a running job hears of its cancelling and stays cancelled', async () => {
  let heard = false;
  const id = await add();
  start({
    work: async (_, { signal }) => {
      signal.addEventListener('abort', () => (heard = true));
      await untilAborted(signal);
    },
  });
  await expect.poll(() => state(id)).toBe('running');
  expect(await database.write((tx) => cancelJob(tx, id))).toBe(true);
  await expect.poll(() => heard, { timeout: 5_000 }).toBe(true);
  expect(await state(id)).toBe('cancelled');
  expect(await database.write((tx) => cancelJob(tx, id))).toBe(false);
});

test('the job of a process that died is taken up, but not for ever', async () => {
  const left = { state: 'running' as const, leaseUntil: Date.now() - 1 };
  const [first, last] = [await add(), await add()];
  await database.write(async (tx) => {
    await tx.update(jobs).set({ ...left, tries: 1 });
  });
  await database.client.execute({ sql: 'update job set tries = ? where id = ?', args: [JOB_TRIES, last] });
  start({ work: async () => undefined });
  await expect.poll(() => state(first)).toBe('done');
  await expect.poll(() => state(last)).toBe('failed');
});

test('a lease is renewed while the work runs, so that no second loop takes it', async () => {
  let runs = 0;
  const id = await add();
  const work: JobHandler = async () => {
    runs++;
    await new Promise((resolve) => setTimeout(resolve, 900));
  };
  start({ work }, { leaseMs: 300 });
  start({ work }, { leaseMs: 300 });
  await expect.poll(() => state(id), { timeout: 5_000 }).toBe('done');
  expect(runs).toBe(1);
});

test('stopping waits for the work and puts back what did not finish', async () => {
  const id = await add();
  const loop = start({ work: (_, { signal }) => untilAborted(signal) });
  await expect.poll(() => state(id)).toBe('running');
  await loop.stop();
  expect(await findJob(database, id)).toMatchObject({ state: 'queued', tries: 0, leaseUntil: null });
});
