import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { sessionOf } from './harness.ts';
import { lab, person } from './people.ts';
import { giveApp, givePassword, TEST_PASSWORD } from './second-factor-people.ts';

// Production mode, whose rule for stewards the demo does not have: services are called directly, as they are after the
// middleware has found out who asks.

const folder = mkdtempSync(join(tmpdir(), 'zaffre-production-'));
beforeAll(async () => {
  Object.assign(process.env, {
    ZAFFRE_MODE: 'production',
    ZAFFRE_DATA: folder,
    PUBLIC_ORIGIN: 'https://zaffre.example',
    AUTH_SECRET: 'a secret for the tests alone, long enough',
    RESEND_API_KEY: 'none',
    LOG_LEVEL: 'silent',
  });
  const { database } = await import('#src/server/database.ts');
  const { migrateDatabase } = await import('../../scripts/migrate.ts');
  await migrateDatabase(await database());
});
afterAll(async () => {
  const { closeDatabase } = await import('#src/server/database.ts');
  await closeDatabase();
  rmSync(folder, { recursive: true, force: true });
});

const access = () => import('#src/server/access/asker.ts');
async function bySession(accountId: string, secondFactor: boolean) {
  const { askerOfSession } = await access();
  return (await askerOfSession(await sessionOf(accountId, { secondFactor })))!;
}

test("a steward's session acts as steward only when it began with a second factor", async () => {
  const { id } = await person('Session Steward', { steward: true });
  await giveApp(id);
  expect(await bySession(id, false)).toMatchObject({ steward: false, stewardWithoutFactor: true });
  expect(await bySession(id, true)).toMatchObject({ steward: true, stewardWithoutFactor: false });
});

test("a steward's access token, and work ordered before, act as steward only when the account has a factor", async () => {
  const { askerAgain, askerOfToken } = await access();
  const { id, token } = await person('Token Steward', { steward: true });
  const askers = async () => [await askerOfToken(token), await askerAgain({ accountId: id })];
  await giveApp(id, { confirmed: false });
  for (const asker of await askers()) expect(asker).toMatchObject({ steward: false, stewardWithoutFactor: true });
  await giveApp(id);
  for (const asker of await askers()) expect(asker).toMatchObject({ steward: true, stewardWithoutFactor: false });
});

test('what a steward may do as member of a lab stays; others need no factor', async () => {
  const north = await lab('North');
  const { id } = await person('Lead and Steward', { steward: true, labs: { [north]: 'lead' } });
  const asker = await bySession(id, false);
  expect([...asker.labs]).toEqual([[north, 'lead']]);
  const lead = await person('Lead', { labs: { [north]: 'lead' } });
  expect(await bySession(lead.id, false)).toMatchObject({ steward: false, stewardWithoutFactor: false });
});

test('a steward is told that a factor is required, and keeps the last one', async () => {
  const { listFactors, removeFactor } = await import('#src/server/second-factor/factors.ts');
  const { mayChangeFactor } = await import('#src/server/access/second-factor.ts');
  const { id } = await person('Last Factor', { steward: true });
  await givePassword(id);
  const [phone, tablet] = [await giveApp(id), await giveApp(id)];
  const asker = await bySession(id, true);
  expect(await listFactors(asker)).toMatchObject({ required: true });
  const remove = async (factor: string) =>
    removeFactor(await mayChangeFactor(asker, factor), { password: TEST_PASSWORD });
  await remove(phone.id);
  await expect(remove(tablet.id)).rejects.toMatchObject({ status: 409, message: expect.stringContaining('steward') });
  expect((await listFactors(asker)).factors).toMatchObject([{ id: tablet.id }]);
});

test('somebody who is no steward removes the last one', async () => {
  const { listFactors, removeFactor } = await import('#src/server/second-factor/factors.ts');
  const { mayChangeFactor } = await import('#src/server/access/second-factor.ts');
  const { id } = await person('No Steward');
  await givePassword(id);
  const app = await giveApp(id);
  const asker = await bySession(id, true);
  await removeFactor(await mayChangeFactor(asker, app.id), { password: TEST_PASSWORD });
  expect(await listFactors(asker)).toMatchObject({ required: false, factors: [] });
});

test('passkeys belong to the public host, and are taken from its pages alone', async () => {
  const { relyingParty } = await import('#src/server/second-factor/relying-party.ts');
  expect(relyingParty()).toEqual({ id: 'zaffre.example', name: 'Zaffre', origins: ['https://zaffre.example'] });
});

test('the operator removes every factor of a person, who is signed out and told', async () => {
  const { resetFactors } = await import('#src/server/second-factor/reset.ts');
  const { database } = await import('#src/server/database.ts');
  const { mails, trail } = await import('#src/db/schema/index.ts');
  const { factorKinds } = await import('#src/server/second-factor/verify.ts');
  const { id, email } = await person('Lost Phone', { steward: true });
  await giveApp(id);
  const { askerOfSession } = await access();
  const session = await sessionOf(id, { secondFactor: true });
  expect(await resetFactors({ id, email })).toBe(1);
  expect(await factorKinds(id)).toEqual([]);
  expect(await askerOfSession(session)).toBeNull();
  const { db } = await database();
  const rows = await db.select().from(trail).where(eq(trail.subjectId, id));
  expect(rows).toMatchObject([{ actorId: null, action: 'second-factor.reset', detail: { factors: 1, by: 'script' } }]);
  const told = await db.select().from(mails).where(eq(mails.to, email));
  expect(told.map(({ subject }) => subject)).toEqual(['The second factors of your account were removed']);
  expect(await resetFactors({ id, email })).toBe(0);
  expect(await db.select().from(mails).where(eq(mails.to, email))).toHaveLength(1);
});
