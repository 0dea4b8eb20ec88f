import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { mailsTo, runJobs, TestBrowser, tokenInMail } from './account-browser.ts';
import { call, json, openRegistry } from './harness.ts';
import { person } from './people.ts';
import { giveApp, givePassword, TEST_PASSWORD } from './second-factor-people.ts';

let registry: Awaited<ReturnType<typeof openRegistry>>;
const password = TEST_PASSWORD;
const fresh = 'tundra velvet osmosis kettle';

async function server() {
  const { database } = await import('#src/server/database.ts');
  return { ...(await database()), tables: await import('#src/db/schema/index.ts') };
}
async function newcomer(name: string) {
  const made = await person(name);
  await givePassword(made.id);
  return made;
}
const ask = (email: string) => call('POST', '/api/password-resets', { json: { email } });
const complete = (token: string, chosen = fresh) =>
  call('POST', '/api/password-resets/complete', { json: { token, password: chosen } });
const preview = (token: string) => call('POST', '/api/password-resets/preview', { json: { token } });
async function linkFor(email: string): Promise<string> {
  await json(ask(email), 202);
  await runJobs();
  return tokenInMail(email, 'password-reset');
}

beforeAll(async () => {
  registry = await openRegistry();
});
afterAll(() => registry.close());
beforeEach(async () => {
  const { write, tables } = await server();
  await write((tx) => tx.delete(tables.limits));
});

describe('asking for a link', () => {
  test('answers alike and does alike for known, unknown and closed addresses; only the known one gets mail', async () => {
    const [ada, closed] = [await newcomer('Ada'), await newcomer('Closed')];
    const { db, write, tables } = await server();
    await write((tx) =>
      tx.update(tables.accounts).set({ state: 'deactivated' }).where(eq(tables.accounts.id, closed.id)),
    );
    const seen = [];
    for (const email of [ada.email, closed.email, 'nobody@test.example']) {
      const before = (await db.select().from(tables.jobs)).length;
      const answer = await ask(email);
      const { 'x-request-id': _, ratelimit: __, ...headers } = Object.fromEntries(answer.headers);
      const jobs = (await db.select().from(tables.jobs)).length - before;
      seen.push({ status: answer.status, headers, body: await answer.text(), jobs });
      // What differs is done later, apart from the request.
      expect(await mailsTo(email)).toEqual([]);
    }
    expect(seen[0]).toMatchObject({ status: 202, jobs: 1 });
    expect(seen).toEqual([seen[0], seen[0], seen[0]]);
    await runJobs();
    expect(await mailsTo(ada.email)).toHaveLength(1);
    expect(await mailsTo(closed.email)).toEqual([]);
    expect(await mailsTo('nobody@test.example')).toEqual([]);
    expect(JSON.stringify(await db.select().from(tables.jobs))).not.toContain('nobody@');
  });

  test('is limited for an address, known or not, and for a client', async () => {
    const bea = await newcomer('Bea');
    for (const email of [bea.email, 'no.account@test.example']) {
      for (let i = 0; i < 5; i++) expect((await ask(email)).status).toBe(202);
      expect((await ask(email)).status).toBe(429);
    }
    for (let i = 0; i < 8; i++) expect((await ask(`other${i}@test.example`)).status).toBe(202);
    expect((await ask('one.more@test.example')).status).toBe(429);
  });

  test('a repeated job mails once', async () => {
    const cy = await newcomer('Cy');
    const { mailPasswordReset } = await import('#src/server/accounts/reset-password.ts');
    const job = { id: 'a-job', progress: () => undefined, signal: new AbortController().signal };
    for (let i = 0; i < 2; i++) await mailPasswordReset({ accountId: cy.id }, job);
    expect(await mailsTo(cy.email)).toHaveLength(1);
  });

  test('the outbox of a demo shows the mail without its link', async () => {
    const dee = await newcomer('Dee');
    const token = await linkFor(dee.email);
    const text = await (await call('GET', '/api/outbox')).text();
    expect(text).toContain('the link is left out here');
    expect(text).toContain(dee.email);
    expect(text).not.toContain(token);
    expect(text).not.toContain('/reset#');
  });

  test('the database holds no token outside the mail', async () => {
    const eve = await newcomer('Eve');
    const token = await linkFor(eve.email);
    const { db, tables } = await server();
    const kept = [await db.select().from(tables.passwordResets), await db.select().from(tables.trail)];
    expect(JSON.stringify(kept)).not.toContain(token);
  });
});

describe('a link', () => {
  test('sets the password, once; every session ends and nobody is signed in', async () => {
    const fay = await newcomer('Fay');
    const browser = new TestBrowser();
    await browser.signIn({ email: fay.email, password });
    const token = await linkFor(fay.email);
    expect(await json(preview(token))).toEqual({ email: fay.email, expiresAt: expect.any(String) });
    const done = await complete(token);
    expect(done.status).toBe(204);
    expect(done.headers.getSetCookie()).toEqual([]);
    expect((await browser.call('GET', '/api/account')).status).toBe(401);
    expect(await new TestBrowser().signIn({ email: fay.email, password })).toBe('credentials');
    expect(await new TestBrowser().signIn({ email: fay.email, password: fresh })).toBeNull();
    expect((await complete(token, 'another four words here')).status).toBe(404);
    expect((await preview(token)).status).toBe(404);
    const [mail] = await mailsTo(fay.email);
    expect(mail).toMatchObject({ kind: 'password-changed', text: expect.stringContaining('by a link') });
  });

  test('of two requests at once, one counts', async () => {
    const gil = await newcomer('Gil');
    const token = await linkFor(gil.email);
    const both = await Promise.all([complete(token), complete(token, 'another four words here')]);
    expect(both.map(({ status }) => status).sort()).toEqual([204, 404]);
  });

  test('a newer one ends it', async () => {
    const hal = await newcomer('Hal');
    const [older, newer] = [await linkFor(hal.email), await linkFor(hal.email)];
    expect(older).not.toBe(newer);
    expect((await complete(older)).status).toBe(404);
    expect((await complete(newer)).status).toBe(204);
  });

  test('works for an hour', async () => {
    const ivo = await newcomer('Ivo');
    const token = await linkFor(ivo.email);
    const { db, write, tables } = await server();
    const [row] = await db.select().from(tables.passwordResets).where(eq(tables.passwordResets.accountId, ivo.id));
    expect(Date.parse(row!.expiresAt) - Date.parse(row!.createdAt)).toBeGreaterThan(59 * 60 * 1000);
    expect(Date.parse(row!.expiresAt) - Date.parse(row!.createdAt)).toBeLessThan(61 * 60 * 1000);
    const past = new Date(Date.now() - 1).toISOString();
    await write((tx) => tx.update(tables.passwordResets).set({ expiresAt: past }));
    expect((await complete(token)).status).toBe(404);
  });

  test('a weak password is refused with the reason and leaves the link good', async () => {
    const jo = await newcomer('Jo');
    const token = await linkFor(jo.email);
    for (const weak of ['too short', 'qwertyuiopasdfghjkl', 'jo jo jo jo jo jo'])
      expect(await json(complete(token, weak), 422)).toMatchObject({ errors: [{ pointer: '#/password' }] });
    expect((await complete(token)).status).toBe(204);
  });

  test('leaves the second factor as it is', async () => {
    const kim = await newcomer('Kim');
    await giveApp(kim.id);
    expect((await complete(await linkFor(kim.email))).status).toBe(204);
    expect(await new TestBrowser().signIn({ email: kim.email, password: fresh })).toBe('second-factor');
  });

  test('opens nothing after the account was closed, or its password changed', async () => {
    const [lee, mia] = [await newcomer('Lee'), await newcomer('Mia')];
    const [closed, changed] = [await linkFor(lee.email), await linkFor(mia.email)];
    const { write, tables } = await server();
    await write((tx) => tx.update(tables.accounts).set({ state: 'deactivated' }).where(eq(tables.accounts.id, lee.id)));
    expect((await complete(closed)).status).toBe(404);
    const browser = new TestBrowser();
    await browser.signIn({ email: mia.email, password });
    await json(browser.call('POST', '/api/account/password', { current: password, password: fresh }));
    expect((await complete(changed)).status).toBe(404);
  });

  test('tries at tokens are limited', async () => {
    for (let i = 0; i < 60; i++) expect((await preview('guess')).status).toBe(404);
    expect((await preview('guess')).status).toBe(429);
    expect((await complete('guess')).status).toBe(429);
  });
});
