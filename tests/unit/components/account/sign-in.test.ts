import { afterEach, expect, test, vi } from 'vitest';
import { faultInAnswer, signIn } from '#src/components/account/sign-in.ts';

const BASE = 'http://localhost:4321';
afterEach(() => vi.unstubAllGlobals());

test('a landing page without error is a success', () => {
  expect(faultInAnswer(`${BASE}/`, BASE)).toBeNull();
  expect(faultInAnswer('/folios/1', BASE)).toBeNull();
});

test('an unknown address and a wrong password are told in one sentence; too many attempts in another', () => {
  const wrong = faultInAnswer(`${BASE}/signin?error=CredentialsSignin&code=credentials`, BASE);
  const many = faultInAnswer(`${BASE}/signin?error=CredentialsSignin&code=too-many`, BASE);
  expect(wrong).toMatch(/address and password/i);
  expect(many).toMatch(/too many attempts/i);
  expect(faultInAnswer(`${BASE}/signin?error=Configuration`, BASE)).toMatch(/did not work/);
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
  expect(await signIn('a@b.example', 'p&q')).toMatch(/do not belong together/);
  const [path, init] = asked.mock.calls[1]!;
  expect(path).toBe('/api/auth/callback/credentials');
  expect(String(init.body)).toBe('email=a%40b.example&password=p%26q&callbackUrl=%2F&csrfToken=c');
});

test('a server that cannot be reached is a problem, not a refusal', async () => {
  vi.stubGlobal('fetch', () => Promise.reject(new TypeError('failed to fetch')));
  await expect(signIn('a@b.example', 'x')).rejects.toMatchObject({ name: 'ProblemError', status: 0 });
});
