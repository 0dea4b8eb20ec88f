import { describe, expect, test } from 'vitest';
import { ask, type RawAnswer, type RawRequest } from '../server.ts';
import type { Door } from './door.ts';

/** Hosts, addresses and bodies that are refused: as a problem (RFC 9457), never as HTML, never with a trace. */
export function refusals(door: Door): void {
  const send = (path: string, options?: RawRequest) => ask(door.server.port, path, options);
  const json = (body: RawRequest['body'], headers: Record<string, string> = {}): RawRequest => ({
    method: 'POST',
    headers: { authorization: `Bearer ${door.token}`, 'content-type': 'application/json', ...headers },
    ...(body === undefined ? {} : { body }),
  });
  const expectProblem = (answer: RawAnswer, status: number) => {
    expect(answer.status, answer.text.slice(0, 200)).toBe(status);
    expect(answer.headers['content-type']).toBe('application/problem+json');
    expect(answer.headers['x-content-type-options']).toBe('nosniff');
    expect(answer.headers['content-security-policy']).toContain('sandbox');
    expect(JSON.parse(answer.text)).toMatchObject({
      status,
      title: expect.stringMatching(/\w/),
      detail: expect.anything(),
    });
    expect(answer.text).not.toMatch(/<html|<!doctype|node_modules|\.m?[jt]s:\d+|at \w+ \(/i);
  };

  describe('hosts', () => {
    test.each(['evil.example', 'localhost', 'localhost:1', 'localhost.evil.example', '127.0.0.1.evil.example:80'])(
      'a request for %s is misdirected',
      async (host) => {
        expectProblem(await send('/api/health', { headers: { host } }), 421);
        expect((await send('/signin', { headers: { host } })).status).toBe(421);
      },
    );

    test('both names of this machine are served in demo mode', async () => {
      for (const name of ['localhost', '127.0.0.1'])
        expect((await send('/api/health', { headers: { host: `${name}:${door.server.port}` } })).status).toBe(200);
    });

    test('the host of a target in absolute form counts, not the header beside it (RFC 9112 §3.2.2)', async () => {
      expectProblem(await send('http://evil.example/api/health'), 421);
      const own = await send(`${door.server.origin}/api/health`, { headers: { host: 'evil.example' } });
      expect(own.status).toBe(200);
    });

    test('what only a proxy may say is not believed where there is none', async () => {
      const headers = {
        'x-forwarded-host': 'evil.example',
        'x-forwarded-proto': 'https',
        'x-forwarded-for': '203.0.113.7',
        'x-forwarded-port': '8443',
        forwarded: 'host=evil.example;proto=https',
      };
      expect((await send('/api/health', { headers })).status).toBe(200);
      const providers = await send('/api/auth/providers', { headers });
      expect(providers.text).toContain(door.server.origin);
      expect(providers.text).not.toContain('evil');
      expect(providers.text).not.toContain('https');
    });

    test('attempts are counted by the real address, whatever X-Forwarded-For says', async () => {
      const tries = async (k: number) =>
        (
          await send('/api/invitations/preview', {
            ...json(JSON.stringify({ token: `no such invitation ${k}` })),
            headers: { 'content-type': 'application/json', 'x-forwarded-for': `203.0.113.${k}` },
          })
        ).status;
      const seen: number[] = [];
      for (let k = 0; k < 61; k++) seen.push(await tries(k));
      expect(seen.at(-1)).toBe(429);
      expect(seen[0]).not.toBe(429);
    });
  });

  describe('addresses and methods', () => {
    test.each([
      ['GET', '/api'],
      ['GET', '/api/'],
      ['GET', '/api/nope'],
      ['GET', '/api/complexes/a/b/c/d'],
      ['GET', '/api/auth/nope'],
      ['GET', '/api/auth/signout'],
      ['GET', '/api/auth/verify-request'],
      ['POST', '/api/auth/session'],
    ])('%s %s is not there', async (method, path) => {
      expectProblem(await send(path, { ...json(undefined), method }), 404);
    });

    test.each([
      ['DELETE', '/api/health', 'GET'],
      ['PUT', '/api/complexes', 'GET, POST'],
      ['GET', '/api/derive/formula', 'POST'],
    ])('%s %s is not served there, and Allow tells what is', async (method, path, allow) => {
      const answer = await send(path, { ...json(undefined), method });
      expectProblem(answer, 405);
      expect(answer.headers.allow).toBe(allow);
    });

    test.each(['/%', '/api/%ff', '/api/complexes/%c3%28'])('the address %s cannot be read', async (path) => {
      expectProblem(await send(path), 400);
    });

    test('a method that HTTP knows but no program here', async () => {
      for (const method of ['TRACE', 'PROPFIND', 'PURGE']) expectProblem(await send('/api/health', { method }), 501);
      expectProblem(await send('*', { method: 'OPTIONS' }), 400);
    });

    test('a query of endless length is refused, one that is only long is read', async () => {
      const answer = await send(`/api/complexes?q=${'x'.repeat(40_000)}`);
      expect(answer.status).toBe(431);
      expect(answer.text).toBe('');
      const long = await send(`/api/complexes?q=${'x'.repeat(12_000)}`, { headers: json(undefined).headers! });
      expectProblem(long, 400);
    });

    test('a page that is not there is a page, without the program inside it', async () => {
      const answer = await send('/no/such/page');
      expect(answer.status).toBe(404);
      expect(answer.headers['content-type']).toContain('text/html');
      expect(answer.text).not.toMatch(/node_modules|\.m?js:\d+/);
    });
  });

  describe('bodies', () => {
    const formula = '/api/derive/formula';

    test('broken JSON, an empty body, and bytes that are no text', async () => {
      expectProblem(await send(formula, json('{"formula": "[Co(NH3)6]3+"')), 400);
      expectProblem(await send(formula, json('')), 400);
      expectProblem(await send(formula, json(Buffer.from([0xff, 0xfe, 0x00]))), 400);
    });

    test('JSON that fits no contract', async () => {
      for (const body of ['null', '[]', '"text"', '{"formula": 7}', '{}'])
        expectProblem(await send(formula, json(body)), 422);
    });

    test('another kind of body', async () => {
      expectProblem(await send(formula, json('formula=x', { 'content-type': 'text/plain' })), 415);
      expectProblem(await send('/api/spectra', json('{}')), 415);
    });

    test('too much by Content-Length', async () => {
      expectProblem(await send(formula, json(Buffer.alloc(300_000, 32))), 413);
    });

    test('too much in chunks that tell no length', async () => {
      async function* endless() {
        for (let sent = 0; sent < 20_000_000; sent += 65_536) yield Buffer.alloc(65_536, 32);
      }
      expectProblem(await send(formula, json(endless())), 413);
      // The server is as it was.
      expect((await send(formula, json('{"formula":"[Co(NH3)6]3+"}'))).status).toBe(200);
    });

    test('the sign-in takes a short form of known length only', async () => {
      const type = { 'content-type': 'application/x-www-form-urlencoded', origin: door.server.origin };
      const path = '/api/auth/callback/credentials';
      expectProblem(await send(path, { method: 'POST', headers: type, body: `email=${'x'.repeat(20_000)}` }), 413);
      async function* some() {
        yield Buffer.from('email=x');
      }
      expectProblem(await send(path, { method: 'POST', headers: type, body: some() }), 411);
      const broken = { method: 'POST', headers: { ...type, 'content-type': 'application/json' }, body: '{' };
      expectProblem(await send(path, broken), 400);
    });
  });
}
