import { spawnSync } from 'node:child_process';
import { existsSync, mkdirSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { hostname, tmpdir } from 'node:os';
import { join } from 'node:path';
import { sql } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { openDatabase } from '#src/db/client.ts';
import { DEMO_ACCOUNTS, DEMO_PASSWORD } from '#src/server/demo-accounts.ts';
import { cobaltToZinc } from '../../scripts/demo/cobalt-to-zinc.ts';
import { heavierMetals } from '../../scripts/demo/heavier-metals.ts';
import { titaniumToIron } from '../../scripts/demo/titanium-to-iron.ts';
import { Browser } from './front-door/session.ts';
import { ask, type RunningServer, runToEnd, startServer, startToEnd } from './server.ts';

// How the program starts, in both modes: what it refuses, and what it mends.

const root = mkdtempSync(join(tmpdir(), 'zaffre-start-'));
const running: RunningServer[] = [];
afterAll(async () => {
  for (const server of running) await server.kill();
  rmSync(root, { recursive: true, force: true });
});

const ORIGIN = 'https://zaffre.example';
const PRODUCTION = {
  ZAFFRE_MODE: 'production',
  PUBLIC_ORIGIN: ORIGIN,
  AUTH_SECRET: 'a secret for the tests alone, long enough',
  RESEND_API_KEY: 're_none',
  RESEND_BASE_URL: 'http://127.0.0.1:9',
};

describe('a start that is refused', () => {
  test.each<[what: string, args: string[], env: Record<string, string>, sentences: RegExp[]]>([
    ['demo beyond this machine', [], { HOST: '0.0.0.0' }, [/^HOST: .*loopback only/]],
    ['demo by option beyond this machine', ['--host', '::'], {}, [/^HOST: .*loopback only/]],
    ['demo under a public name', [], { PUBLIC_ORIGIN: 'http://zaffre.example' }, [/^PUBLIC_ORIGIN: .*loopback only/]],
    [
      'production without anything',
      [],
      { ZAFFRE_MODE: 'production', RESEND_API_KEY: '' },
      [/^PUBLIC_ORIGIN: /, /^AUTH_SECRET: /, /^RESEND_API_KEY: /],
    ],
    ['production without mail', [], { ...PRODUCTION, RESEND_API_KEY: '' }, [/^RESEND_API_KEY: /]],
    ['a short secret', [], { ...PRODUCTION, AUTH_SECRET: 'short' }, [/^AUTH_SECRET: .*32 characters/]],
    ['an origin with a path', [], { ...PRODUCTION, PUBLIC_ORIGIN: `${ORIGIN}/zaffre` }, [/^PUBLIC_ORIGIN: /]],
    ['an unknown mode', [], { ZAFFRE_MODE: 'staging' }, [/^ZAFFRE_MODE: /]],
    ['an unknown option', ['--prot', '80'], {}, [/there is no option --prot\. The options are --port/]],
    ['no port', ['--port', 'http'], {}, [/^"http" is no port/]],
  ])('%s', async (_what, args, env, sentences) => {
    const folder = join(root, 'refused');
    const { code, stdout, stderr } = await startToEnd(folder, args, env);
    expect({ code, stdout }).toEqual({ code: 1, stdout: '' });
    const lines = stderr.trimEnd().split('\n');
    expect(lines).toEqual(sentences.map((sentence) => expect.stringMatching(sentence)));
    expect(existsSync(join(folder, 'lock'))).toBe(false);
    expect(existsSync(join(folder, 'zaffre.db'))).toBe(false);
  });

  test('on a folder that another process holds; not on one whose process is no more', async () => {
    const folder = join(root, 'held');
    mkdirSync(folder);
    const hold = (pid: number) =>
      writeFileSync(join(folder, 'lock'), JSON.stringify({ pid, host: hostname(), started: null }));
    hold(process.pid);
    const held = await startToEnd(folder, ['--no-demo']);
    expect(held).toMatchObject({ code: 1, stdout: '' });
    expect(held.stderr).toMatch(new RegExp(`^[^\\n]+ in use by process ${process.pid}; [^\\n]+\\n$`));

    const { pid } = spawnSync(process.execPath, ['--version']);
    hold(pid);
    const server = await startServer(folder);
    expect(await server.stop()).toBe(0);
    expect(existsSync(join(folder, 'lock'))).toBe(false);
  });
});

describe('production', () => {
  const folder = join(root, 'production');
  const proxy = { host: 'zaffre.example', 'x-forwarded-proto': 'https', 'x-forwarded-for': '203.0.113.7' };
  const get = (path: string) => ask(server.port, path, { headers: proxy });
  let server: RunningServer;

  beforeAll(async () => {
    const args = ['run', '-s', 'steward', '--', '--data', folder, '--email', 'first@lab.example', '--password-stdin'];
    const short = await runToEnd('npm', args, { env: PRODUCTION, input: 'short\n' });
    expect(short).toMatchObject({ code: 1, stdout: '', stderr: expect.stringMatching(/^[^\n]+15 characters\.\n$/) });
    const made = await runToEnd('npm', args, { env: PRODUCTION, input: 'a long enough pass phrase\n' });
    expect(made).toMatchObject({ code: 0, stderr: '', stdout: expect.stringContaining('first@lab.example') });
    server = await startServer(folder, { env: { ...PRODUCTION, TRUST_PROXY: '1' }, headers: proxy });
    running.push(server);
  });

  test('has no outbox and no demo accounts', async () => {
    const page = await get('/outbox');
    expect(page.status).toBe(404);
    const outbox = await get('/api/outbox');
    expect(outbox.status).toBe(404);
    expect(outbox.headers['content-type']).toBe('application/problem+json');
    const signIn = await get('/signin');
    expect(signIn.status).toBe(200);
    for (const word of [...DEMO_ACCOUNTS.map(({ email }) => email), DEMO_PASSWORD, 'Demo accounts'])
      expect(signIn.text).not.toContain(word);
    expect(server.said()).toContain(`Zaffre is ready on ${ORIGIN}`);
    expect(server.said()).not.toContain('Demo');
    const browser = new Browser(server, proxy);
    await browser.signIn(DEMO_ACCOUNTS[0].email, DEMO_PASSWORD, '/', ORIGIN);
    expect(browser.signedIn).toBe(false);
  });

  test('is served under its own origin alone, as the proxy tells it', async () => {
    expect((await get('/api/health')).status).toBe(200);
    const other: Record<string, string>[] = [
      { host: 'zaffre.example' },
      { host: `localhost:${server.port}` },
      { ...proxy, 'x-forwarded-host': 'evil.example' },
      { ...proxy, host: 'evil.example' },
      { ...proxy, 'x-forwarded-proto': 'http' },
    ];
    for (const headers of other)
      expect((await ask(server.port, '/api/health', { headers })).status, JSON.stringify(headers)).toBe(421);
    const named = { ...proxy, host: `127.0.0.1:${server.port}`, 'x-forwarded-host': 'zaffre.example' };
    expect((await ask(server.port, '/api/health', { headers: named })).status).toBe(200);
  });

  test('asks for https from then on, in pages, the API and files', async () => {
    const page = await get('/signin');
    const file = /\/_astro\/[\w.-]+\.css/.exec(page.text)![0];
    for (const path of ['/signin', '/api/health', file])
      expect((await get(path)).headers['strict-transport-security'], path).toMatch(/^max-age=31536000/);
  });

  test('lets its first steward in, by cookies that go over https alone', async () => {
    const browser = new Browser(server, proxy);
    const answer = await browser.signIn('first@lab.example', 'a long enough pass phrase', '/complexes', ORIGIN);
    expect(answer.headers.location).toBe(`${ORIGIN}/complexes`);
    const session = answer.headers['set-cookie']!.find((line) => line.startsWith('__Host-authjs.session-token='));
    expect(session).toMatch(/; Secure/);
    expect(session).toMatch(/; HttpOnly/);
    expect([...browser.cookies.keys()].every((name) => name.startsWith('__Host-'))).toBe(true);
    const write = (origin: string, method: string, path: string, body: unknown) =>
      browser.send(path, {
        method,
        headers: { origin, 'content-type': 'application/json', 'if-match': '*' },
        body: JSON.stringify(body),
      });
    const rename = (origin: string) => write(origin, 'PATCH', '/api/account', { name: 'First Steward' });
    expect((await rename('http://zaffre.example')).status).toBe(403);
    expect((await rename(ORIGIN)).status).toBe(200);
    // As a steward they act once they have a second factor.
    expect((await write(ORIGIN, 'POST', '/api/labs', { name: 'First Lab' })).status).toBe(403);
    expect(JSON.parse((await browser.send('/api/health')).text)).toEqual({ status: 'ok' });
  });
});

test('a load of the demo data that was broken off is made again from the start', async () => {
  const folder = join(root, 'demo');
  const total = titaniumToIron.length + cobaltToZinc.length + heavierMetals.length + 1; // and the draft
  const starting = startServer(folder, { args: [] });
  // The program is named by its lock, long before it answers.
  const lock = join(folder, 'lock');
  await expect.poll(() => existsSync(lock), { timeout: 30_000 }).toBe(true);
  const { pid } = JSON.parse(readFileSync(lock, 'utf8')) as { pid: number };
  const count = async () => {
    if (!existsSync(join(folder, 'zaffre.db'))) return 0;
    const { db, close } = await openDatabase(`file:${join(folder, 'zaffre.db')}`);
    const [row] = await db.all<{ n: number }>(sql`select count(*) as n from complex`).catch(() => [{ n: 0 }]);
    close();
    return row!.n;
  };
  await expect.poll(count, { timeout: 60_000, interval: 50 }).toBeGreaterThan(3);
  process.kill(pid, 'SIGKILL');
  await expect(starting).rejects.toThrow(/ended/);
  const left = await count();
  expect(left).toBeGreaterThan(3);
  expect(left).toBeLessThan(total);

  const steward = ['run', '-s', 'steward', '--', '--data', folder, '--email', 'a@b.example', '--password-stdin'];
  const early = await runToEnd('npm', steward, { input: 'a long enough pass phrase\n' });
  expect(early).toMatchObject({ code: 1, stderr: expect.stringMatching(/^[^\n]+broken off[^\n]+\n$/) });

  const server = await startServer(folder, { args: [] });
  running.push(server);
  expect(await count()).toBe(total);
  const browser = new Browser(server);
  await browser.signIn(DEMO_ACCOUNTS[0].email, DEMO_PASSWORD);
  expect(JSON.parse((await browser.send('/api/complexes')).text)).toHaveProperty('total', total);
});
