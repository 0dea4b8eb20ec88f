import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { mailsTo, TestBrowser } from './account-browser.ts';
import { call, json, openRegistry } from './harness.ts';
import { lab, person } from './people.ts';
import { giveApp, givePassword, TEST_PASSWORD } from './second-factor-people.ts';

let registry: Awaited<ReturnType<typeof openRegistry>>;
type Person = Awaited<ReturnType<typeof person>>;
let north: string;
const password = TEST_PASSWORD;
const fresh = 'tundra velvet osmosis kettle';

async function server() {
  const { database } = await import('#src/server/database.ts');
  return { ...(await database()), tables: await import('#src/db/schema/index.ts') };
}
async function newcomer(name: string, labs = {}): Promise<Person> {
  const made = await person(name, { labs });
  await givePassword(made.id);
  return made;
}
async function signedIn({ email }: Person, more: { address?: string; secret?: string } = {}) {
  const browser = new TestBrowser(more.address);
  expect(await browser.signIn({ email, password })).toBeNull();
  return browser;
}
const isIn = async (browser: TestBrowser) => (await browser.call('GET', '/api/account')).status === 200;
const trailOf = async (accountId: string, action: string) => {
  const { db, tables } = await server();
  const rows = await db.select().from(tables.trail).where(eq(tables.trail.action, action));
  return rows.filter(({ subjectId }) => subjectId === accountId);
};

beforeAll(async () => {
  registry = await openRegistry();
  north = await lab('North');
});
afterAll(() => registry.close());
beforeEach(async () => {
  const { write, tables } = await server();
  await write((tx) => tx.delete(tables.limits));
});

describe('one’s own account', () => {
  test('tells who one is', async () => {
    const ada = await newcomer('Ada', { [north]: 'lead' });
    const browser = await signedIn(ada);
    await giveApp(ada.id);
    expect(await json(browser.call('GET', '/api/account'))).toEqual({
      id: ada.id,
      name: 'Ada',
      email: 'ada@test.example',
      steward: false,
      labs: [{ id: north, name: 'North', role: 'lead' }],
      factors: ['totp'],
      secondFactorRequired: false,
      addressChange: null,
      createdAt: expect.stringMatching(/Z$/),
    });
  });

  test('changes the name under the version that was read', async () => {
    const bea = await newcomer('Bea');
    const browser = await signedIn(bea);
    const etag = (await browser.call('GET', '/api/account')).headers.get('etag')!;
    const rename = (name: string, match: Record<string, string>) =>
      browser.call('PATCH', '/api/account', { name }, match);
    expect((await rename('Beate', {})).status).toBe(428);
    expect(await json(rename('  Beate Nord ', { 'if-match': etag }))).toMatchObject({ name: 'Beate Nord' });
    expect((await rename('Other', { 'if-match': etag })).status).toBe(412);
    expect((await rename(' ', { 'if-match': '*' })).status).toBe(422);
    expect((await browser.call('PATCH', '/api/account', { steward: true }, { 'if-match': '*' })).status).toBe(422);
    expect(await trailOf(bea.id, 'change')).toMatchObject([
      { actorId: bea.id, detail: { name: { from: 'Bea', to: 'Beate Nord' } } },
    ]);
  });

  test('is no business of access tokens', async () => {
    const cy = await newcomer('Cy');
    for (const [method, path] of [
      ['GET', '/api/account'],
      ['GET', '/api/account/sessions'],
      ['DELETE', '/api/account/sessions'],
    ] as const)
      expect((await call(method, path, { as: cy.token })).status).toBe(403);
  });
});

describe('sessions', () => {
  type Listed = { id: string; current: boolean; address: string; browser: string };
  const list = (browser: TestBrowser) => json<Listed[]>(browser.call('GET', '/api/account/sessions'));

  test('lists what is live, the present one first and marked', async () => {
    const dee = await newcomer('Dee');
    const [one, two] = [await signedIn(dee, { address: '192.0.2.1' }), await signedIn(dee, { address: '192.0.2.2' })];
    await (await signedIn(dee)).signOut();
    expect((await list(one)).map(({ address, current }) => [address, current])).toEqual([
      ['192.0.2.1', true],
      ['192.0.2.2', false],
    ]);
    expect((await list(two))[0]).toMatchObject({ address: '192.0.2.2', current: true, browser: 'Firefox on Linux' });
  });

  test('ends one of one’s own, and nobody else’s', async () => {
    const [eve, fay] = [await newcomer('Eve'), await newcomer('Fay')];
    const [here, there] = [await signedIn(eve), await signedIn(eve)];
    const other = (await list(here)).find(({ current }) => !current)!;
    const stranger = await signedIn(fay);
    expect((await stranger.call('DELETE', `/api/account/sessions/${other.id}`)).status).toBe(404);
    expect(await isIn(there)).toBe(true);
    expect((await here.call('DELETE', `/api/account/sessions/${other.id}`)).status).toBe(204);
    expect(await isIn(there)).toBe(false);
    expect(await isIn(here)).toBe(true);
    expect((await here.call('DELETE', `/api/account/sessions/${other.id}`)).status).toBe(404);
    expect(await trailOf(eve.id, 'end-session')).toMatchObject([{ actorId: eve.id, detail: { session: other.id } }]);
  });

  test('ends the others, or all', async () => {
    const gil = await newcomer('Gil');
    const [one, two, three] = [await signedIn(gil), await signedIn(gil), await signedIn(gil)];
    expect((await one.call('DELETE', '/api/account/sessions?others=1')).status).toBe(204);
    expect([await isIn(one), await isIn(two), await isIn(three)]).toEqual([true, false, false]);
    expect((await one.call('DELETE', '/api/account/sessions?others=yes')).status).toBe(400);
    const again = await signedIn(gil);
    expect((await one.call('DELETE', '/api/account/sessions')).status).toBe(204);
    expect([await isIn(one), await isIn(again)]).toEqual([false, false]);
  });

  test('not from a page of another site', async () => {
    const browser = await signedIn(await newcomer('Hal'));
    const foreign = { origin: 'https://elsewhere.example' };
    expect((await browser.call('DELETE', '/api/account/sessions', undefined, foreign)).status).toBe(403);
    expect(await isIn(browser)).toBe(true);
  });
});

describe('the password', () => {
  const change = (browser: TestBrowser, body: object) =>
    browser.call('POST', '/api/account/password', { current: password, password: fresh, ...body });

  test('changes with the present one; the other sessions end and the owner is told', async () => {
    const ivo = await newcomer('Ivo');
    const [here, there] = [await signedIn(ivo), await signedIn(ivo)];
    expect(await json(change(here, {}))).toEqual({ sessionsEnded: 1, tokensRevoked: 0 });
    expect([await isIn(here), await isIn(there)]).toEqual([true, false]);
    expect(await new TestBrowser().signIn({ email: ivo.email, password })).toBe('credentials');
    expect(await new TestBrowser().signIn({ email: ivo.email, password: fresh })).toBeNull();
    const [mail] = await mailsTo(ivo.email);
    expect(mail).toMatchObject({ kind: 'password-changed', subject: 'Your password was changed' });
    expect(`${mail!.text}${JSON.stringify(await trailOf(ivo.id, 'change-password'))}`).not.toContain(fresh);
    expect((await call('GET', '/api/labs', { as: ivo.token })).status).toBe(403);
  });

  test('may keep the sessions and end the tokens', async () => {
    const jo = await newcomer('Jo');
    const [here, there] = [await signedIn(jo), await signedIn(jo)];
    expect(await json(change(here, { endOthers: false, revokeTokens: true }))).toEqual({
      sessionsEnded: 0,
      tokensRevoked: 1,
    });
    expect(await isIn(there)).toBe(true);
    expect((await call('GET', '/api/labs', { as: jo.token })).status).toBe(401);
  });

  test('needs the present one, which cannot be guessed at leisure', async () => {
    const kim = await newcomer('Kim');
    const browser = await signedIn(kim);
    for (let i = 0; i < 10; i++)
      expect(await json(change(browser, { current: 'a wrong one' }), 422)).toMatchObject({
        errors: [{ pointer: '#/current' }],
      });
    const stopped = await change(browser, {});
    expect(stopped.status).toBe(429);
    expect(Number(stopped.headers.get('retry-after'))).toBeGreaterThan(0);
    expect(await new TestBrowser().signIn({ email: kim.email, password })).toBeNull();
  });

  test.each([
    ['fourteen chars', /at least 15 characters/],
    ['password password password', /repeats/],
    ['Lee-Lee-Lee-2026', /own name or address/],
    ['zaffre cobalt spectra', /guessed first/],
    ['1qaz2wsx3edc4rfv', /most used/],
    ['é'.repeat(501), /at most 1000 bytes/],
  ])('refuses %j and says why', async (weak, reason) => {
    const lee = await person(`Lee ${Math.random()}`);
    await givePassword(lee.id);
    const browser = await signedIn(lee);
    const refused = await json<{ errors: { pointer: string; detail: string }[] }>(
      change(browser, { password: weak }),
      422,
    );
    expect(refused.errors[0]).toMatchObject({ pointer: '#/password', detail: expect.stringMatching(reason) });
  });

  test('is kept as typed: spaces count, and two ways to write an accent are one', async () => {
    const mia = await newcomer('Mia');
    const browser = await signedIn(mia);
    const spaced = '  crème brûlée at the tarn  ';
    await json(change(browser, { password: spaced }));
    const tryWith = (typed: string) => new TestBrowser().signIn({ email: mia.email, password: typed });
    expect(await tryWith(spaced.trim())).toBe('credentials');
    expect(await tryWith(spaced.toUpperCase())).toBe('credentials');
    expect(await tryWith(spaced.normalize('NFD'))).toBeNull();
  });

  test('leaves nothing of a password behind for a repeated request', async () => {
    const nan = await newcomer('Nan');
    const browser = await signedIn(nan);
    const body = { current: password, password: fresh };
    await json(browser.call('POST', '/api/account/password', body, { 'idempotency-key': 'once' }));
    const { db, tables } = await server();
    expect(await db.select().from(tables.idempotency)).toEqual([]);
  });
});
