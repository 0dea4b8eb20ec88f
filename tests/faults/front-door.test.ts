import { mkdtempSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { DEMO_ACCOUNTS, DEMO_PASSWORD } from '#src/server/demo-accounts.ts';
import { answers } from './front-door/answers.ts';
import type { Door } from './front-door/door.ts';
import { refusals } from './front-door/refusals.ts';
import { Browser } from './front-door/session.ts';
import { signIn } from './front-door/sign-in.ts';
import { ask, runToEnd, startServer, startToEnd } from './server.ts';

// The built program from outside, in demo mode, by requests as anybody may send them. One server serves the whole file.

const door = { folder: mkdtempSync(join(tmpdir(), 'zaffre-door-')) } as Door;
const health = (headers: Record<string, string> = {}) => ask(door.server.port, '/api/health', { headers });
const token = (...args: string[]) => runToEnd('npm', ['run', '-s', 'token', '--', '--data', door.folder, ...args]);
const complexes = (bearer: string, options = {}) =>
  ask(door.server.port, '/api/complexes', { ...options, headers: { authorization: `Bearer ${bearer}` } });

beforeAll(async () => {
  door.server = await startServer(door.folder, { args: [] });
  const made = await token('--as', 'contributor@demo.example');
  expect(made).toMatchObject({ code: 0, stderr: '', stdout: expect.stringMatching(/^zft_\S+\n$/) });
  door.token = made.stdout.trim();
});
afterAll(async () => {
  await door.server?.kill();
  rmSync(door.folder, { recursive: true, force: true });
});

test('it tells where it is and who can sign in', () => {
  expect(door.server.said()).toContain(`Zaffre is ready on ${door.server.origin}`);
  for (const { email } of DEMO_ACCOUNTS) expect(door.server.said()).toContain(email);
});

refusals(door);
signIn(door);
answers(door);

test('health is for everybody, its parts for the steward', async () => {
  const steward = new Browser(door.server);
  await steward.signIn('steward@demo.example', DEMO_PASSWORD);
  expect(JSON.parse((await health()).text)).toEqual({ status: 'ok' });
  const parts = { database: 'ok', store: 'ok', mail: 'ok' };
  expect(JSON.parse((await steward.send('/api/health')).text)).toEqual({ status: 'ok', parts });

  const store = join(door.folder, 'store');
  renameSync(store, `${store}.away`);
  writeFileSync(store, 'a file in place of the folder');
  try {
    const away = await health();
    expect(away.status).toBe(503);
    expect(Number(away.headers['retry-after'])).toBeGreaterThan(0);
    expect(JSON.parse(away.text)).toEqual({ status: 'unavailable' });
    const seen = JSON.parse((await steward.send('/api/health')).text);
    expect(seen).toEqual({ status: 'unavailable', parts: { ...parts, store: 'unavailable' } });

    // What needs no file is served meanwhile; what does says when to come again.
    expect((await complexes(door.token)).status).toBe(200);
    const { items } = JSON.parse(
      (await ask(door.server.port, '/api/spectra?limit=1', { headers: { authorization: `Bearer ${door.token}` } }))
        .text,
    ) as { items: { id: string }[] };
    const file = await ask(door.server.port, `/api/spectra/${items[0]!.id}/file`, {
      headers: { authorization: `Bearer ${door.token}` },
    });
    expect(file.status, file.text.slice(0, 200)).toBe(503);
    expect(Number(file.headers['retry-after'])).toBeGreaterThan(0);
    expect(file.text).not.toContain(door.folder);
  } finally {
    rmSync(store);
    renameSync(`${store}.away`, store);
  }
  expect((await health()).status).toBe(200);
});

test('a token reads or writes as it was made to, until it is revoked', async () => {
  const { stdout } = await token('--as', 'LEAD@demo.example', '--scope', 'read');
  const reading = stdout.trim();
  expect((await complexes(reading)).status).toBe(200);
  expect((await complexes(reading, { method: 'POST', body: '{}' })).status).toBe(403);

  const browser = new Browser(door.server);
  await browser.signIn('lead@demo.example', DEMO_PASSWORD);
  const own = JSON.parse((await browser.send('/api/tokens')).text) as { id: string; scopes: string[] }[];
  expect(own).toMatchObject([{ scopes: ['read'] }]);
  const write = (path: string, method: string, body?: unknown) =>
    browser.send(path, {
      method,
      headers: { origin: door.server.origin, 'content-type': 'application/json' },
      ...(body ? { body: JSON.stringify(body) } : {}),
    });
  expect((await write(`/api/tokens/${own[0]!.id}`, 'DELETE')).status).toBe(204);
  expect((await complexes(reading)).status).toBe(401);

  const expires = new Date(Date.now() + 3_000).toISOString();
  const made = await write('/api/tokens', 'POST', { name: 'for a moment', scopes: ['read'], expires });
  expect(made.status, made.text).toBe(201);
  const short = (JSON.parse(made.text) as { token: string }).token;
  expect((await complexes(short)).status).toBe(200);
  await expect.poll(async () => (await complexes(short)).status, { timeout: 10_000, interval: 500 }).toBe(401);
});

test('a token for nobody, or in an unknown scope, is one sentence', async () => {
  for (const args of [['--as', 'nobody@demo.example'], ['--as', 'lead@demo.example', '--scope', 'all'], []]) {
    const { code, stdout, stderr } = await token(...args);
    expect({ code, stdout }).toEqual({ code: 1, stdout: '' });
    expect(stderr.trim()).toMatch(/^[^\n]+\.$/);
  }
});

test('a second program on the same folder, or the same port, gives way in one sentence', async () => {
  const folder = await startToEnd(door.folder);
  expect(folder).toMatchObject({
    code: 1,
    stderr: expect.stringMatching(/^The data folder [^\n]+ is in use by [^\n]+\n$/),
  });
  const port = await startToEnd(`${door.folder}-other`, ['--port', String(door.server.port)]);
  expect(port).toMatchObject({ code: 1, stderr: expect.stringMatching(/^Port \d+ is in use [^\n]+\n$/) });
  expect((await health()).status).toBe(200);
});

test('the request in hand is finished, the program ends with 0, and the next start takes over what it finds', async () => {
  const before = (JSON.parse((await complexes(door.token)).text) as { total: number }).total;
  let finish = () => {};
  const held = new Promise<void>((resolve) => {
    finish = resolve;
  });
  async function* slow() {
    yield Buffer.from('{"formula":');
    await held;
    yield Buffer.from('"[Co(NH3)6]3+"}');
  }
  const inHand = ask(door.server.port, '/api/derive/formula', {
    method: 'POST',
    headers: { authorization: `Bearer ${door.token}`, 'content-type': 'application/json' },
    body: slow(),
  });
  await new Promise((resolve) => setTimeout(resolve, 500));
  const stopped = door.server.stop();
  await expect.poll(() => door.server.said()).toContain('SIGTERM');
  await expect(health()).rejects.toThrow(/ECONNREFUSED/);
  finish();
  expect((await inHand).status).toBe(200);
  expect(await stopped).toBe(0);

  // As a power cut leaves it: a lock of a process that is no more.
  writeFileSync(join(door.folder, 'lock'), JSON.stringify({ pid: 2 ** 22 + 1, host: 'elsewhere', started: null }));
  const elsewhere = await startToEnd(door.folder);
  expect(elsewhere).toMatchObject({ code: 1, stderr: expect.stringMatching(/in use/) });
  await door.server.kill();
  rmSync(join(door.folder, 'lock'));
  door.server = await startServer(door.folder, { args: [] });
  await door.server.kill();
  door.server = await startServer(door.folder, { args: [] });
  expect((JSON.parse((await complexes(door.token)).text) as { total: number }).total).toBe(before);
});
