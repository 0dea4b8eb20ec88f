import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import type { Route } from '#src/contracts/route.ts';
import { routes } from '#src/contracts/routes.ts';
import { call, json, openRegistry } from './harness.ts';
import { lab, person } from './people.ts';

type Token = { id: string; token?: string; name: string; lab: string | null };
let registry: Awaited<ReturnType<typeof openRegistry>>;
let north: string;
let south: string;
let ada: Awaited<ReturnType<typeof person>>;
const inDays = (days: number) => new Date(Date.now() + days * 24 * 3600 * 1000).toISOString();
const make = (more: object = {}) =>
  call('POST', '/api/tokens', {
    session: ada.id,
    json: { name: 'Instrument', scopes: ['read', 'write'], expires: inDays(30), ...more },
  });

beforeAll(async () => {
  registry = await openRegistry();
  [north, south] = [await lab('North'), await lab('South')];
  ada = await person('Ada', { labs: { [north]: 'lead', [south]: 'contributor' } });
});
afterAll(() => registry.close());

test('a token is shown once and opens the API until it is revoked', async () => {
  const { id, token } = await json<Token>(make(), 201);
  expect(token).toMatch(/^zft_[\w-]{43}$/);
  await json(call('GET', '/api/labs', { as: token }));
  const listed = await call('GET', '/api/tokens', { session: ada.id });
  const text = await listed.text();
  expect(text).not.toContain(token!);
  expect(JSON.parse(text)).toContainEqual(expect.objectContaining({ id, name: 'Instrument' }));
  expect((await call('DELETE', `/api/tokens/${id}`, { session: ada.id })).status).toBe(204);
  expect((await call('GET', '/api/labs', { as: token })).status).toBe(401);
  const { database } = await import('#src/server/database.ts');
  const { accessTokens } = await import('#src/db/schema/index.ts');
  expect(JSON.stringify(await (await database()).db.select().from(accessTokens))).not.toContain(token!);
});

test('a token for one lab brings the rights of that lab alone', async () => {
  const { token } = await json<Token>(make({ lab: south }), 201);
  const roles = await json<{ items: { name: string; role: string | null }[] }>(call('GET', '/api/labs', { as: token }));
  expect(roles.items.map(({ name, role }) => [name, role])).toEqual([
    ['North', null],
    ['South', 'contributor'],
  ]);
});

test('ends within a year, and only for own labs', async () => {
  for (const [more, pointer] of [
    [{ expires: inDays(400) }, '#/expires'],
    [{ expires: inDays(-1) }, '#/expires'],
    [{ lab: await lab('West') }, '#/lab'],
    [{ scopes: [] }, '#/scopes'],
  ] as const)
    expect(await json(make(more), 422)).toMatchObject({ errors: [{ pointer }] });
});

test('an answer that holds a secret is not kept for a repeat', async () => {
  const once = () =>
    call('POST', '/api/tokens', {
      session: ada.id,
      json: { name: 'Twice', scopes: ['read'], expires: inDays(1) },
      headers: { 'idempotency-key': 'same' },
    });
  const [first, second] = [await json<Token>(once(), 201), await json<Token>(once(), 201)];
  expect(first.token).not.toBe(second.token);
});

test("nobody ends another's token, and no token ends one", async () => {
  const { id, token } = await json<Token>(make(), 201);
  const other = await person('Other', { steward: true });
  expect((await call('DELETE', `/api/tokens/${id}`, { session: other.id })).status).toBe(404);
  expect((await call('DELETE', `/api/tokens/${id}`, { as: token })).status).toBe(403);
});

test('an account has at most fifty live tokens; revoking all ends them at once, and the trail tells of each', async () => {
  const eve = await person('Eve', { labs: { [north]: 'lead' } });
  const body = { name: 'One of many', scopes: ['read'], expires: inDays(30) };
  const makeOne = () => call('POST', '/api/tokens', { session: eve.id, json: body });
  // The person came with one.
  for (let i = 1; i < 50; i++) expect((await makeOne()).status).toBe(201);
  expect(await json(makeOne(), 409)).toMatchObject({ detail: expect.stringContaining('revoke one first') });
  const [last] = await json<Token[]>(call('GET', '/api/tokens', { session: eve.id }));
  expect((await call('DELETE', `/api/tokens/${last!.id}`, { session: eve.id })).status).toBe(204);
  expect((await makeOne()).status).toBe(201);

  expect(await json(call('DELETE', '/api/tokens?until=2000-01-01T00:00:00Z', { session: eve.id }))).toEqual({
    revoked: 0,
  });
  expect(await json(call('DELETE', '/api/tokens', { session: eve.id }))).toEqual({ revoked: 50 });
  expect(await json(call('GET', '/api/tokens', { session: eve.id }))).toEqual([]);
  expect((await call('GET', '/api/labs', { as: eve.token })).status).toBe(401);
  expect((await call('GET', '/api/labs', { as: ada.token })).status).toBe(200);
  const { database } = await import('#src/server/database.ts');
  const { trail } = await import('#src/db/schema/index.ts');
  const told = (await (await database()).db.select().from(trail)).filter(
    ({ action, actorId }) => action === 'revoke' && actorId === eve.id,
  );
  expect(told).toHaveLength(51);
});

test('tells when a token was last used', async () => {
  const { id, token } = await json<Token>(make({ name: 'Used' }), 201);
  const used = async () =>
    (await json<(Token & { lastUsedAt: string | null })[]>(call('GET', '/api/tokens', { session: ada.id }))).find(
      (one) => one.id === id,
    )?.lastUsedAt;
  expect(await used()).toBeNull();
  const before = new Date().toISOString();
  await json(call('GET', '/api/labs', { as: token }));
  const first = await used();
  expect(first! >= before).toBe(true);
  // Told every few minutes at most.
  await json(call('GET', '/api/labs', { as: token }));
  expect(await used()).toBe(first);
  const { touchToken } = await import('#src/server/tokens/last-used.ts');
  await touchToken(id, Date.now() + 6 * 60 * 1000);
  expect((await used())! > first!).toBe(true);
});

describe("what tokens never do, though the account may: a steward's token that writes", () => {
  const table = Object.entries(routes) as unknown as [string, Route][];
  const kept =
    /^\/api\/(?:tokens|trail|access-log|labs\/\{\w+\}\/invitations|folios\/\{\w+\}\/invitations|invitations\/\{)/;
  const changesPeople = ({ method, path }: Route) => method !== 'GET' && /\/(?:members|people|accounts)\b/.test(path);
  const forbidden = table.filter(([, route]) => kept.test(route.path) || changesPeople(route));

  test('covers tokens, invitations, trail and access log', () => {
    expect(forbidden.map(([name]) => name)).toEqual(
      expect.arrayContaining([
        ...['listTokens', 'createToken', 'revokeToken', 'revokeAllTokens', 'inviteMember', 'inviteGuest'],
        ...['revokeInvitation', 'listTrail', 'readTrailRow', 'verifyTrail', 'exportTrailCsv', 'exportTrailLines'],
        ...['listAccessLog', 'listFolioReaders'],
      ]),
    );
  });

  test.each([...forbidden, ['listOutbox', routes.listOutbox as Route] as const])('%s', async (_, route) => {
    const steward = await person(`Steward ${route.method} ${route.path}`.replace(/\W+/g, ' '), { steward: true });
    const answer = await call(route.method, route.path.replace(/\{\w+\}/g, 'anything'), {
      as: steward.token,
      ...(route.body ? { json: {} } : {}),
    });
    expect(answer.status).toBe(403);
  });
});

test('a mail goes out once to the owner of a token that ends within a week', async () => {
  const { tokenExpiryMails } = await import('#src/server/oversight/token-expiry.ts');
  const { database } = await import('#src/server/database.ts');
  const { mails } = await import('#src/db/schema/index.ts');
  const gus = await person('Gus', { labs: { [south]: 'contributor' } });
  const makeFor = (name: string, days: number) =>
    json<Token>(
      call('POST', '/api/tokens', { session: gus.id, json: { name, scopes: ['read'], expires: inDays(days) } }),
      201,
    );
  const long = await makeFor('Reader\r\nBcc: x@y.example', 30);
  await makeFor('Short', 3);
  const revoked = await makeFor('Gone', 30);
  await call('DELETE', `/api/tokens/${revoked.id}`, { session: gus.id });
  const mailsTo = async () => (await (await database()).db.select().from(mails)).filter(({ to }) => to === gus.email);
  const inThe = (days: number) => Date.now() + days * 24 * 3600 * 1000;
  await tokenExpiryMails();
  expect(await mailsTo()).toEqual([]);
  await tokenExpiryMails(inThe(24));
  await tokenExpiryMails(inThe(25));
  const sent = await mailsTo();
  expect(sent).toHaveLength(1);
  expect(sent[0]).toMatchObject({ key: `token-expiry:${long.id}`, kind: 'token-expiry' });
  expect(sent[0]!.subject).toMatch(/^The access token "Reader Bcc: x@y\.example" ends on /);
  expect(sent[0]!.text).toContain('/tokens');
  await tokenExpiryMails(inThe(31));
  expect(await mailsTo()).toHaveLength(1);
});
