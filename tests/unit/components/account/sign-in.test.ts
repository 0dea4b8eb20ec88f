import { afterEach, expect, test, vi } from 'vitest';
import { refusalInAnswer, signIn } from '#src/components/account/sign-in.ts';

const BASE = 'http://localhost:4321';
afterEach(() => vi.unstubAllGlobals());

const refused = (query: string) => refusalInAnswer(`${BASE}/signin?error=${query}`, BASE);

test('a landing page without error is a success', () => {
  expect(refusalInAnswer(`${BASE}/`, BASE)).toBeNull();
  expect(refusalInAnswer('/folios/1', BASE)).toBeNull();
});

test('an unknown address and a wrong password are told in one sentence; too many attempts in another', () => {
  expect(refused('CredentialsSignin&code=credentials')).toEqual({
    fault: 'Address and password do not belong together.',
    asksFactor: false,
  });
  expect(refused('CredentialsSignin&code=too-many')?.fault).toMatch(/too many attempts/i);
  expect(refused('Configuration')?.fault).toMatch(/did not work/);
});

test('a second factor is asked for without a complaint, and with one once it was wrong', () => {
  expect(refused('CredentialsSignin&code=second-factor')).toEqual({ fault: null, asksFactor: true });
  expect(refused('CredentialsSignin&code=second-factor-wrong')).toEqual({
    fault: expect.stringMatching(/did not fit/),
    asksFactor: true,
  });
});

/** A server that gives a token and answers the sign-in with an address. */
function serverAnswering(url: string) {
  const asked = vi.fn(async (path: string, _init: RequestInit) =>
    Response.json(path === '/api/auth/csrf' ? { csrfToken: 'c' } : { url }),
  );
  vi.stubGlobal('fetch', asked);
  vi.stubGlobal('location', { origin: BASE });
  return asked;
}

test('sign-in posts a form with the token of the page, and reads the refusal although the status is 200', async () => {
  const asked = serverAnswering(`${BASE}/signin?error=CredentialsSignin&code=credentials`);
  expect(await signIn('a@b.example', 'p&q')).toMatchObject({ fault: expect.stringMatching(/do not belong together/) });
  const [path, init] = asked.mock.calls[1]!;
  expect(path).toBe('/api/auth/callback/credentials');
  expect(String(init.body)).toBe('email=a%40b.example&password=p%26q&callbackUrl=%2F&csrfToken=c');
});

test('a server that cannot be reached is a problem, not a refusal', async () => {
  vi.stubGlobal('fetch', () => Promise.reject(new TypeError('failed to fetch')));
  await expect(signIn('a@b.example', 'x')).rejects.toMatchObject({ name: 'ProblemError', status: 0 });
});

test('the second factor goes in the same form as the password', async () => {
  const asked = serverAnswering(`${BASE}/`);
  expect(await signIn('a@b.example', 'p', { code: '123456' })).toBeNull();
  expect(await signIn('a@b.example', 'p', { passkey: '{}' })).toBeNull();
  const bodies = asked.mock.calls.map(([, init]) => String(init.body)).filter((_, i) => i % 2 === 1);
  expect(bodies).toEqual([
    'email=a%40b.example&password=p&code=123456&callbackUrl=%2F&csrfToken=c',
    'email=a%40b.example&password=p&passkey=%7B%7D&callbackUrl=%2F&csrfToken=c',
  ]);
});
