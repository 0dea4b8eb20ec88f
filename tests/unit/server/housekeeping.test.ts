import { afterEach, beforeEach, expect, test, vi } from 'vitest';
import type { Database } from '#src/db/client.ts';
import { registrySettings } from '#src/db/schema/index.ts';
import { takeTurn } from '#src/server/housekeeping/lease.ts';
import { startHousekeeping } from '#src/server/housekeeping/loop.ts';
import { freshDatabase } from './fresh-database.ts';

// The loop itself; what is done in a turn is tested through the whole program in tests/api/housekeeping.test.ts.

let database: Database;

beforeEach(async () => {
  database = await freshDatabase();
});
afterEach(() => vi.restoreAllMocks());

const turns = async () =>
  (await database.db.select().from(registrySettings)).filter(({ key }) => key === 'housekeeping');

test('a process that starts takes the turn if nobody has it, and stops after what is in hand', async () => {
  const work = vi.fn(async () => undefined);
  const loop = startHousekeeping(database, work);
  await expect.poll(() => work.mock.calls.length).toBe(1);
  await loop.stop();
  expect(await turns()).toHaveLength(1);
});

test('while another has the turn nothing is done', async () => {
  await takeTurn(database, 3600 * 1000);
  const work = vi.fn(async () => undefined);
  const looked = vi.spyOn(database, 'write');
  const loop = startHousekeeping(database, work);
  await expect.poll(() => looked.mock.calls.length).toBe(1);
  await loop.stop();
  expect(work).not.toHaveBeenCalled();
});
