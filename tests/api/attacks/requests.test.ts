import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import type { Route } from '#src/contracts/route.ts';
import { routes } from '#src/contracts/routes.ts';
import { TestBrowser } from '../account-browser.ts';
import { call, json, openRegistry, sessionHeaders } from '../harness.ts';
import { buildFixture, type Fixture } from '../matrix/fixture.ts';
import { person } from '../people.ts';
import { givePassword, TEST_PASSWORD } from '../second-factor-people.ts';

// Requests that no page of ours would send.

let registry: Awaited<ReturnType<typeof openRegistry>>;
let f: Fixture;
beforeAll(async () => {
  registry = await openRegistry();
  f = await buildFixture();
}, 60_000);
afterAll(() => registry.close());

const table = Object.values(routes as unknown as Record<string, Route>);
const NOTHING = '00000000-0000-7000-8000-000000000000';
const pathOf = ({ path }: Route) =>
  path
    .replace('{accession}', f.open)
    .replace('{symbol}', 'Oh')
    .replace('{seq}', '1')
    .replace(/\{\w+\}/g, NOTHING);
const unsafe = table.filter(({ method }) => method !== 'GET');
const named = (some: Route[]) => some.map((route): [string, Route] => [`${route.method} ${route.path}`, route]);
const bodyOf = (route: Route) => (route.body ? { json: {} } : {});

describe('a write by cookie', () => {
  test.each(named(unsafe))('%s is refused from another site, and from nowhere', async (_, route) => {
    const { cookie } = await sessionHeaders(f.people.steward.id);
    const origins: Record<string, string>[] = [
      {},
      { origin: 'https://evil.example' },
      { origin: 'null' },
      { origin: 'http://localhost:4321.evil.example' },
      { origin: 'http://localhost:4322' },
      { 'sec-fetch-site': 'cross-site' },
      { 'sec-fetch-site': 'same-site' },
      { 'sec-fetch-site': 'none' },
      // The Origin decides where both come.
      { origin: 'https://evil.example', 'sec-fetch-site': 'same-origin' },
    ];
    for (const origin of origins) {
      const headers = { cookie: cookie!, 'if-match': '*', ...origin };
      const response = await call(route.method, pathOf(route), { headers, ...bodyOf(route) });
      expect(response.status, JSON.stringify(origin)).toBe(403);
      expect(((await response.json()) as { detail: string }).detail).toMatch(/must come from a page of this registry/);
    }
  });
});

describe('an access token', () => {
  const closed = named(table.filter(({ sessionOnly }) => sessionOnly));
  test.each(closed)('of a steward with every scope is refused by %s', async (_, route) => {
    const headers = { 'if-match': '*' };
    const response = await call(route.method, pathOf(route), { as: f.people.steward.token, headers, ...bodyOf(route) });
    expect(response.status).toBe(403);
    expect(((await response.json()) as { detail: string }).detail).toMatch(/access token/);
  });

  test('does not read the outbox', async () => {
    expect((await call('GET', '/api/outbox', { as: f.people.steward.token })).status).toBe(403);
  });

  test('that is wrong is not made good by a cookie beside it', async () => {
    const headers = { ...(await sessionHeaders(f.people.steward.id)), authorization: 'Bearer zft_guessed' };
    expect((await call('GET', '/api/complexes', { headers })).status).toBe(401);
    for (const authorization of ['Basic c3Rld2FyZDpwYXNz', 'Bearer', 'Bearer ', 'bearer\tzft_x', 'Negotiate x'])
      expect((await call('GET', '/api/complexes', { headers: { ...headers, authorization } })).status).toBe(401);
  });
});

describe('a session', () => {
  test('is new with every sign-in: a cookie set before it is no session afterwards', async () => {
    const ada = await person('Ada of the fixation');
    await givePassword(ada.id);
    const browser = new TestBrowser('198.51.100.7');
    const planted = 'planted-by-somebody-else';
    browser.cookies.set('authjs.session-token', planted);
    expect(await browser.signIn({ email: ada.email, password: TEST_PASSWORD })).toBeNull();
    const first = browser.session!;
    expect(first).not.toBe(planted);
    expect((await browser.call('GET', '/api/complexes')).status).toBe(200);
    const cookie = (value: string) => ({ headers: { cookie: `authjs.session-token=${value}` } });
    expect((await call('GET', '/api/complexes', cookie(planted))).status).toBe(401);

    const other = new TestBrowser('198.51.100.8');
    other.cookies.set('authjs.session-token', first);
    expect(await other.signIn({ email: ada.email, password: TEST_PASSWORD })).toBeNull();
    expect(other.session).not.toBe(first);
  });

  test('cookie that was cut, swapped or signed by another secret is nobody’s', async () => {
    const { encode } = await import('@auth/core/jwt');
    const forged = await encode({
      token: { sub: f.people.steward.id, sid: 'guessed' },
      secret: 'another secret of another program, long enough',
      salt: 'authjs.session-token',
    });
    const own = (await sessionHeaders(f.people.lead.id)).cookie!.split('=')[1]!;
    const unknown = (await sessionHeaders(f.people.lead.id, 'no-such-session')).cookie!.split('=')[1]!;
    for (const value of [forged, own.slice(0, -4), `${own}x`, unknown, '', 'eyJhbGciOiJub25lIn0.e30.'])
      expect(
        (await call('GET', '/api/complexes', { headers: { cookie: `authjs.session-token=${value}` } })).status,
      ).toBe(401);
  });
});

test('a host that is not ours is misdirected before anybody is asked who they are', async () => {
  for (const host of [
    'http://evil.example',
    'http://localhost',
    'https://localhost:4321',
    'http://localhost.evil.example:4321',
  ])
    expect((await call('GET', `${host}/api/complexes`, { as: f.people.steward.token })).status).toBe(421);
});

describe('bodies', () => {
  const post = (path: string, raw: string) => call('POST', path, { as: f.people.lead.token, raw });

  test('reach no prototype, by whatever name', async () => {
    for (const key of ['__proto__', 'constructor', 'prototype']) {
      const inner = `"${key}": { "polluted": true, "steward": true, "prototype": { "polluted": true } }`;
      const complex = `{ "formula": "[Co(NH3)5(OH2)]3+", "lab": "${f.north}", "answers": { ${inner} }, ${inner} }`;
      const answer = await post('/api/complexes', complex);
      expect([201, 409, 422], key).toContain(answer.status);
      await post('/api/derive/formula', `{ "formula": "[Co(NH3)6]3+", "answers": { ${inner} } }`);
      expect(({} as Record<string, unknown>).polluted).toBeUndefined();
      expect(Object.prototype).not.toHaveProperty('steward');
    }
  });

  test('nested a hundred thousand deep, cut short or of another kind are refused and do no harm', async () => {
    const deep = 90_000;
    const bodies = [
      '['.repeat(deep) + ']'.repeat(deep),
      `${'{"a":'.repeat(deep / 5)}1${'}'.repeat(deep / 5)}`,
      '['.repeat(deep),
      '',
      'null',
      'true',
      '"text"',
      '[]',
      '{"formula": NaN}',
      `{"formula": 1e999, "lab": "${f.north}"}`,
      '\u0000',
    ];
    for (const raw of bodies)
      for (const path of [
        '/api/complexes',
        '/api/folios',
        '/api/bundles',
        '/api/derive/formula',
        '/api/derive/isomers',
      ]) {
        const { status } = await post(path, raw);
        expect([400, 413, 422], `${path} ${raw.slice(0, 40)}`).toContain(status);
      }
  });

  test('longer than what is taken are cut off, whatever their length says', async () => {
    const long = JSON.stringify({ formula: 'x'.repeat(300_000), lab: f.north });
    expect((await post('/api/complexes', long)).status).toBe(413);
    const lying = { as: f.people.lead.token, raw: long, headers: { 'content-length': '10' } };
    expect((await call('POST', '/api/complexes', lying)).status).toBe(413);
  });
});

describe('queries', () => {
  test.each([
    'limit=1&limit=2',
    'cursor=a&cursor=b',
    'sort=accession&sort=-accession',
    'q=a&q=b',
    'bandFrom=1&bandFrom=2',
    'limit=-1',
    'limit=1e9',
    'bandFrom=Infinity',
    'minEpsilon=-5',
    'state=attested',
    `q=${'a'.repeat(201)}`,
    `cursor=${'a'.repeat(2001)}`,
    'cursor=e30.e30',
    'q=%00',
    'metal=Co%00',
  ])('?%s is refused as a bad query', async (query) => {
    expect((await call('GET', `/api/complexes?${query}`, { as: f.people.lead.token })).status).toBe(400);
  });

  test.each([
    "q=' or 1=1 --",
    'q=%25',
    'q=_',
    'q=\\',
    "lab=' or '1'='1",
    'ligand="); drop table complex; --',
    'metal=%F0%9F%92%A9',
    'folio=%27',
    'unknown=1',
  ])('?%s finds nothing that it should not', async (query) => {
    const page = await json<{ items: { accession: string }[]; total: number }>(
      call('GET', `/api/complexes?${query}`, { as: f.people.otherContributor.token }),
    );
    const hidden = [f.labOnly, f.draft];
    expect(page.items.map(({ accession }) => accession).filter((accession) => hidden.includes(accession))).toEqual([]);
    if (query !== 'unknown=1') expect(page.total).toBe(0);
  });

  test('ids and accessions of any spelling are not found and not answered by an error', async () => {
    const odd = ['%00', '%2e%2e%2f', "'", '%22', 'a'.repeat(5000), '%F0%9F%92%A9', '%25', '-1', 'null', 'constructor'];
    for (const text of odd)
      for (const path of [
        `/api/complexes/${text}`,
        `/api/spectra/${text}`,
        `/api/folios/${text}`,
        `/api/bundles/${text}`,
      ])
        expect((await call('GET', path, { as: f.people.lead.token })).status, path.slice(0, 60)).toBe(404);
  });
});

describe('long and twisted texts', () => {
  const formulae = [
    '('.repeat(10_000),
    '['.repeat(500),
    `${'('.repeat(240)}${')'.repeat(240)}`,
    `[Co(NH3)6]${'·H2O'.repeat(120)}`,
    `[Co${'(en)'.repeat(120)}]`,
    `[Co${'('.repeat(100)}N${')2'.repeat(100)}]`,
    `${'μ-'.repeat(240)}Co`,
    `[Co(NH3)${'9'.repeat(400)}]3+`,
    `K${'1'.repeat(490)}`,
    ' '.repeat(10_000),
    'a'.repeat(10_000),
    `[Co(${'N'.repeat(480)})]`,
    'Co'.repeat(250),
    `[Co(NH3)6]${'+'.repeat(480)}`,
    '[Co(NH3)6]\u0000',
    '\ud800',
  ];
  test.each(formulae)('a formula like %s is answered, not pondered', async (formula) => {
    const { status } = await call('POST', '/api/derive/formula', { as: f.people.lead.token, json: { formula } });
    expect([200, 422]).toContain(status);
  });

  test('are refused in every field that has a length', async () => {
    const long = 'x'.repeat(20_000);
    const cases: [method: string, path: string, body: object][] = [
      ['POST', '/api/complexes', { formula: long, lab: f.north }],
      ['POST', '/api/complexes', { formula: '[Co(NH3)6]3+', lab: f.north, notes: long }],
      ['PATCH', `/api/complexes/${f.open}`, { notes: long }],
      ['POST', `/api/complexes/${f.open}/preparations`, { label: long, lab: f.north }],
      ['POST', '/api/folios', { name: long, lab: f.north, licence: 'CC0-1.0' }],
      ['PATCH', `/api/folios/${f.folio}`, { description: long }],
      ['PATCH', `/api/labs/${f.north}`, { name: long }],
    ];
    for (const [method, path, body] of cases) {
      const sent = { as: f.people.lead.token, headers: { 'if-match': '*' }, json: body };
      expect((await call(method, path, sent)).status, `${method} ${path}`).toBe(422);
    }
  });
});
