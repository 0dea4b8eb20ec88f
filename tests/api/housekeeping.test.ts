import { afterAll, beforeAll, beforeEach, expect, test } from 'vitest';
import type { Database } from '#src/db/client.ts';
import { call, json, openRegistry } from './harness.ts';
import { lab, person } from './people.ts';
import { grant } from './shared-content.ts';

// What is done every hour, with the clock moved instead of waited for.

let registry: Awaited<ReturnType<typeof openRegistry>>;
type Person = Awaited<ReturnType<typeof person>>;
let north: string;
let lead: Person;
let folio: string;
/** This process, and a second one on the same database. */
let here: Database;
let there: Database;

const DAY = 24 * 3600 * 1000;
const inDays = (days: number) => new Date(Date.now() + days * DAY).toISOString();
const schema = () => import('#src/db/schema/index.ts');

beforeAll(async () => {
  registry = await openRegistry();
  north = await lab('North');
  lead = await person('Ada Lead', { labs: { [north]: 'lead' } });
  const body = { name: 'Aqua ions', lab: north, licence: 'CC-BY-4.0' };
  folio = (await json<{ id: string }>(call('POST', '/api/folios', { as: lead.token, json: body }), 201)).id;
  const { database } = await import('#src/server/database.ts');
  const { openDatabase } = await import('#src/db/client.ts');
  const { settings } = await import('#src/server/settings.ts');
  here = await database();
  there = await openDatabase(settings().databaseUrl);
});
afterAll(async () => {
  there.close();
  await registry.close();
});
beforeEach(async () => {
  const { grants, mails } = await schema();
  await here.write(async (tx) => {
    await tx.delete(grants);
    await tx.delete(mails);
  });
});

/** A grant that was given long enough ago. */
async function oldGrant(who: Person, expiresAt: string): Promise<string> {
  const { grants } = await schema();
  const { eq } = await import('drizzle-orm');
  const id = await grant(folio, who.id, 'view', lead.id, expiresAt);
  await here.write((tx) => tx.update(grants).set({ createdAt: '2026-01-01T00:00:00.000Z' }).where(eq(grants.id, id)));
  return id;
}

async function mailed(): Promise<{ kind: string; to: string; text: string }[]> {
  const { mails } = await schema();
  return (await here.db.select().from(mails)).map(({ kind, to, text }) => ({ kind, to, text }));
}

async function inBoth(work: (database: Database) => Promise<unknown>) {
  await Promise.all([work(here), work(here)]);
  await work(there);
  await work(here);
}

test('a week before the end guest and lead are told, once in two processes, and again for another end', async () => {
  const { tellEndsSoon } = await import('#src/server/housekeeping/ends.ts');
  const { grants } = await schema();
  const { eq } = await import('drizzle-orm');
  const guest = await person('Guest Soon');
  const id = await oldGrant(guest, inDays(8));
  await inBoth((database) => tellEndsSoon(database));
  expect(await mailed()).toEqual([]);
  await here.write((tx) =>
    tx
      .update(grants)
      .set({ expiresAt: inDays(6) })
      .where(eq(grants.id, id)),
  );
  await inBoth((database) => tellEndsSoon(database));
  const first = await mailed();
  expect(first.map(({ to }) => to).sort()).toEqual([lead.email, guest.email].sort());
  expect(first.find(({ to }) => to === guest.email)!.text).toContain('Ada Lead (ada.lead@test.example), North');
  expect(first.find(({ to }) => to === lead.email)!.text).toContain('Guest Soon');
  await here.write((tx) =>
    tx
      .update(grants)
      .set({ expiresAt: inDays(5) })
      .where(eq(grants.id, id)),
  );
  await inBoth((database) => tellEndsSoon(database));
  expect(await mailed()).toHaveLength(4);
});

test('those invited together are one mail to the lead; an access given for a few days needs no notice', async () => {
  const { tellEndsSoon } = await import('#src/server/housekeeping/ends.ts');
  const end = inDays(3);
  const [one, two, short] = [await person('Guest A'), await person('Guest B'), await person('Guest Short')];
  await oldGrant(one, end);
  await oldGrant(two, end);
  await grant(folio, short.id, 'view', lead.id, inDays(3));
  await inBoth((database) => tellEndsSoon(database));
  const mails = await mailed();
  expect(mails.map(({ to }) => to).sort()).toEqual([lead.email, one.email, two.email].sort());
  expect(mails.find(({ to }) => to === lead.email)!.text).toContain('Guest A, Guest B');
});

test('at the end the guest is told once; of an end long ago nobody is', async () => {
  const { tellEnded } = await import('#src/server/housekeeping/ends.ts');
  const [now, old] = [await person('Guest Ended'), await person('Guest Old')];
  await oldGrant(now, inDays(-1));
  await oldGrant(old, inDays(-30));
  await inBoth((database) => tellEnded(database));
  expect(await mailed()).toEqual([
    { kind: 'access-ended', to: now.email, text: expect.stringContaining('can renew it') },
  ]);
});

test('a closed account is told nothing', async () => {
  const { tellEnded, tellEndsSoon } = await import('#src/server/housekeeping/ends.ts');
  const { accounts } = await schema();
  const { eq } = await import('drizzle-orm');
  const guest = await person('Guest Closed');
  await oldGrant(guest, inDays(-1));
  await oldGrant(guest, inDays(1));
  await here.write((tx) => tx.update(accounts).set({ state: 'deactivated' }).where(eq(accounts.id, guest.id)));
  await tellEnded(here);
  await tellEndsSoon(here);
  expect(await mailed()).toEqual([]);
});

test('who invited hears of links that lapsed, one mail for those sent together', async () => {
  const { tellLapsed } = await import('#src/server/housekeeping/lapses.ts');
  const { mails } = await schema();
  const emails = ['l1@test.example', 'l2@test.example'];
  await json(call('POST', `/api/folios/${folio}/invitations`, { session: lead.id, json: { emails } }), 201);
  await here.write((tx) => tx.delete(mails));
  await inBoth((database) => tellLapsed(database, Date.now() + 13 * DAY));
  expect(await mailed()).toEqual([]);
  await inBoth((database) => tellLapsed(database, Date.now() + 15 * DAY));
  expect(await mailed()).toEqual([
    { kind: 'invitation-lapsed', to: lead.email, text: expect.stringContaining('l1@test.example, l2@test.example') },
  ]);
});

test('of several processes one gets the turn, and the next an hour later', async () => {
  const { takeTurn } = await import('#src/server/housekeeping/lease.ts');
  const hour = 3600 * 1000;
  const now = Date.now();
  expect(await takeTurn(here, hour, now)).toBe(true);
  expect(await takeTurn(there, hour, now + 1000)).toBe(false);
  expect(await takeTurn(here, hour, now + hour - 1)).toBe(false);
  expect(await takeTurn(there, hour, now + hour)).toBe(true);
  expect(await takeTurn(here, hour, now + hour)).toBe(false);
});

test('what nobody needs goes, and what is in use stays', async () => {
  const { cleanUp } = await import('#src/server/housekeeping/clean-up.ts');
  const { bundles, idempotency, jobs, limits, mails } = await schema();
  const { newId } = await import('#src/server/ids.ts');
  const [old, lately] = [inDays(-91), inDays(-1)];
  const job = (state: 'done' | 'queued', finishedAt: string | null) => ({
    id: `${state} ${finishedAt}`,
    kind: 'bundle',
    payload: {},
    state,
    runAt: 0,
    createdAt: old,
    finishedAt,
  });
  const mail = (key: string, createdAt: string, state: 'sent' | 'queued') => ({
    ...{ id: newId(), key, kind: 'test', to: 'a@test.example', subject: 's', text: 'words', html: '<p>words</p>' },
    ...{ state, nextAt: Date.now(), createdAt },
  });
  const stale = { id: newId(), requestedBy: lead.id, folioId: folio, state: 'queued' as const, createdAt: old };
  await here.write(async (tx) => {
    await tx.insert(jobs).values([job('done', old), job('done', lately), job('queued', null)]);
    await tx.insert(limits).values([
      { key: 'over', count: 1, until: Date.now() - 1000 },
      { key: 'holds', count: 1, until: Date.now() + DAY },
    ]);
    await tx.insert(idempotency).values([
      { key: 'old', bodyHash: '', createdAt: inDays(-2) },
      { key: 'new', bodyHash: '' },
    ]);
    await tx.insert(mails).values([mail('m1', old, 'sent'), mail('m2', old, 'queued'), mail('m3', inDays(-1), 'sent')]);
    await tx.insert(bundles).values(stale);
  });
  await cleanUp(here);
  const keys = async (rows: Promise<{ key: string }[]>) => (await rows).map(({ key }) => key);
  expect((await here.db.select().from(jobs)).map(({ id }) => id)).toEqual([`done ${lately}`, 'queued null']);
  const held = await keys(here.db.select().from(limits));
  expect(held).toContain('holds');
  expect(held).not.toContain('over');
  expect(await keys(here.db.select().from(idempotency))).toEqual(['new']);
  const texts = Object.fromEntries((await here.db.select().from(mails)).map(({ key, text }) => [key, text]));
  expect(texts).toEqual({ m1: '', m2: 'words', m3: 'words' });
  expect(await json(call('GET', `/api/bundles/${stale.id}`, { as: lead.token }))).toMatchObject({ state: 'failed' });
});

test('the file of a bundle is kept for a week, and then the bundle can be ordered again', async () => {
  const { forgetOldFiles } = await import('#src/server/bundles/forget.ts');
  const { store } = await import('#src/server/store.ts');
  const { bundles } = await schema();
  const { newId } = await import('#src/server/ids.ts');
  const make = async (finishedAt: string) => {
    const id = newId();
    const storeKey = `bundles/${id}/try`;
    await store().put(`${storeKey}.zip`, Buffer.from('zip'));
    await store().put(`${storeKey}.json`, Buffer.from('{}'));
    const facts = { id, requestedBy: lead.id, folioId: folio, state: 'ready' as const, createdAt: finishedAt };
    await here.write((tx) => tx.insert(bundles).values({ ...facts, finishedAt, size: 3, sha256: 'ab', storeKey }));
    return id;
  };
  const [old, fresh] = [await make(inDays(-8)), await make(inDays(-6))];
  expect(await forgetOldFiles()).toBe(1);
  expect(await forgetOldFiles()).toBe(0);
  const keys: string[] = [];
  for await (const { key } of store().list('bundles/')) keys.push(key);
  expect(keys.map((key) => key.split('/')[1])).toEqual([fresh, fresh]);
  expect((await call('GET', `/api/bundles/${old}/file`, { as: lead.token })).status).toBe(410);
  expect(await json(call('GET', `/api/bundles/${old}`, { as: lead.token }))).toMatchObject({
    state: 'ready',
    fileUntil: null,
  });
  expect(await json(call('GET', `/api/bundles/${fresh}`, { as: lead.token }))).toMatchObject({
    fileUntil: expect.any(String),
  });
});

test('a turn in each of two processes tells once', async () => {
  const { housekeep } = await import('#src/server/housekeeping/loop.ts');
  const guest = await person('Guest Turn');
  await oldGrant(guest, inDays(-1));
  await housekeep(here);
  await housekeep(there);
  expect((await mailed()).filter(({ to }) => to === guest.email)).toHaveLength(1);
});
