import { afterAll, beforeAll, expect, test } from 'vitest';
import { openRegistry } from '../../../api/harness.ts';
import { person } from '../../../api/people.ts';
import { appCode, giveApp } from '../../../api/second-factor-people.ts';

let registry: Awaited<ReturnType<typeof openRegistry>>;
beforeAll(async () => {
  registry = await openRegistry();
});
afterAll(() => registry.close());

const verify = () => import('#src/server/second-factor/verify.ts');
async function codes(accountId: string): Promise<string[]> {
  const { database } = await import('#src/server/database.ts');
  const { replaceRecoveryCodes } = await import('#src/server/second-factor/recovery-codes.ts');
  return (await database()).write((tx) => replaceRecoveryCodes(tx, accountId));
}

test('a code of an app passes once; neither it nor an older one passes after it', async () => {
  const { factorKinds, passesSecondFactor } = await verify();
  const { id } = await person('Ada');
  const { secret } = await giveApp(id);
  expect(await factorKinds(id)).toEqual(['totp']);
  const [older, present] = [appCode(secret, -1), appCode(secret)];
  expect(await passesSecondFactor(id, { code: `${present.slice(0, 3)} ${present.slice(3)}` })).toBe(true);
  expect(await passesSecondFactor(id, { code: present })).toBe(false);
  expect(await passesSecondFactor(id, { code: older })).toBe(false);
  expect(await passesSecondFactor(id, { code: appCode(secret, 1) })).toBe(true);
});

test('of two that come with one code at once, one passes', async () => {
  const { passesSecondFactor } = await verify();
  const { id } = await person('Twice');
  const { secret } = await giveApp(id);
  const given = { code: appCode(secret) };
  const both = await Promise.all([passesSecondFactor(id, given), passesSecondFactor(id, given)]);
  expect(both.sort()).toEqual([false, true]);
});

test('an app that is not confirmed counts for nothing', async () => {
  const { factorKinds, passesSecondFactor } = await verify();
  const { id } = await person('Halfway');
  const { secret } = await giveApp(id, { confirmed: false });
  expect(await factorKinds(id)).toEqual([]);
  expect(await passesSecondFactor(id, { code: appCode(secret) })).toBe(false);
});

test("nothing given, and another's code, do not pass", async () => {
  const { passesSecondFactor } = await verify();
  const [one, other] = [await person('One'), await person('Other')];
  const { secret } = await giveApp(one.id);
  await giveApp(other.id);
  for (const given of [{}, { code: '' }, { code: 'x'.repeat(200) }, { passkey: '{}' }, { passkey: 'not JSON' }])
    expect(await passesSecondFactor(one.id, given)).toBe(false);
  expect(await passesSecondFactor(other.id, { code: appCode(secret) })).toBe(false);
});

test('a recovery code passes once, however it is typed, and its owner is told by mail', async () => {
  const { passesSecondFactor } = await verify();
  const { id, email } = await person('Rescued');
  const [first, second] = await codes(id);
  expect(first).toMatch(/^([A-Z2-7]{4}-){6}[A-Z2-7]{4}$/);
  expect(await passesSecondFactor(id, { code: first!.toLowerCase().replaceAll('-', ' ') })).toBe(true);
  expect(await passesSecondFactor(id, { code: first! })).toBe(false);
  expect(await passesSecondFactor(id, { code: second!.replaceAll('O', '0').replaceAll('B', '8') })).toBe(true);
  const { database } = await import('#src/server/database.ts');
  const { mails, recoveryCodes } = await import('#src/db/schema/index.ts');
  const { eq } = await import('drizzle-orm');
  const { db } = await database();
  const told = await db.select().from(mails).where(eq(mails.to, email));
  expect(told.map(({ subject }) => subject)).toEqual(Array(2).fill('A recovery code was used to sign in'));
  expect(told[1]!.text).toContain('8 codes are left');
  const kept = JSON.stringify(await db.select().from(recoveryCodes));
  expect(kept).not.toContain(first!.replaceAll('-', ''));
});

test('new recovery codes void the ones before', async () => {
  const { passesSecondFactor } = await verify();
  const { id } = await person('Renewed');
  const [old] = await codes(id);
  const [fresh] = await codes(id);
  expect(await passesSecondFactor(id, { code: old! })).toBe(false);
  expect(await passesSecondFactor(id, { code: fresh! })).toBe(true);
});

test('after ten codes the account has to wait, and even a right one is not looked at', async () => {
  const { passesSecondFactor } = await verify();
  const { id } = await person('Guessed');
  const [right] = await codes(id);
  for (let i = 0; i < 10; i++) await passesSecondFactor(id, { code: '000000' });
  await expect(passesSecondFactor(id, { code: right! })).rejects.toMatchObject({ status: 429 });
});
