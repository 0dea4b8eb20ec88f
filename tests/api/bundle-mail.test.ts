import { afterAll, beforeAll, expect, test } from 'vitest';
import { call, json, openRegistry } from './harness.ts';
import { lab, person } from './people.ts';
import { complex, grant } from './shared-content.ts';

// When a mail tells that a bundle is ready. What is in the bundle is tested in bundles.test.ts.

let registry: Awaited<ReturnType<typeof openRegistry>>;
let lead: Awaited<ReturnType<typeof person>>;
let guest: Awaited<ReturnType<typeof person>>;
let folio: string;

beforeAll(async () => {
  registry = await openRegistry();
  const north = await lab('North');
  lead = await person('Lead', { labs: { [north]: 'lead' } });
  guest = await person('Guest');
  const { accession } = await complex({ lab: north, maker: lead.id }, 1);
  const body = { name: 'Aqua ions', lab: north, licence: 'CC-BY-4.0', items: [{ accession, spectra: 'all' }] };
  folio = (await json<{ id: string }>(call('POST', '/api/folios', { as: lead.token, json: body }), 201)).id;
  await grant(folio, guest.id, 'download', lead.id);
});
afterAll(() => registry.close());

async function tables() {
  const { database } = await import('#src/server/database.ts');
  return { ...(await database()), ...(await import('#src/db/schema/index.ts')), ...(await import('drizzle-orm')) };
}

/** Order a bundle, perhaps a while ago, and build it twice over, as after a crash. */
async function build(more: { notify?: boolean }, orderedAt?: string) {
  const order = { folio, ...more };
  const { id } = await json<{ id: string }>(call('POST', '/api/bundles', { as: guest.token, json: order }), 202);
  const { db, write, bundles, jobs, mails, eq } = await tables();
  if (orderedAt) await write((tx) => tx.update(bundles).set({ createdAt: orderedAt }).where(eq(bundles.id, id)));
  const job = (await db.select().from(jobs)).find(({ payload }) => payload.bundle === id)!;
  const { buildBundle } = await import('#src/server/bundles/build.ts');
  const context = { id: job.id, progress: () => undefined, signal: new AbortController().signal };
  for (let i = 0; i < 2; i++) await buildBundle(job.payload, context);
  expect(await json(call('GET', `/api/bundles/${id}`, { as: guest.token }))).toMatchObject({ state: 'ready' });
  const told = await db
    .select()
    .from(mails)
    .where(eq(mails.key, `bundle:${id}`));
  return { id, told };
}

test('none for who watched it being made', async () => {
  expect((await build({})).told).toEqual([]);
  expect((await build({ notify: false })).told).toEqual([]);
});

test('one where it was asked for, with the way to it', async () => {
  const { id, told } = await build({ notify: true });
  expect(told).toMatchObject([{ to: guest.email, subject: 'Your bundle of "Aqua ions" is ready' }]);
  expect(told[0]!.text).toContain(`http://localhost:4321/bundles/${id}`);
});

test('one where it took longer than a minute', async () => {
  expect((await build({}, new Date(Date.now() - 61_000).toISOString())).told).toHaveLength(1);
});
