import { afterAll, beforeAll, expect, test } from 'vitest';
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
