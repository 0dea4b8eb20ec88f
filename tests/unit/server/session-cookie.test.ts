import { Auth } from '@auth/core';
import { expect, test } from 'vitest';
import { SESSION_COOKIE, signInCookies } from '#src/server/session-cookie.ts';

/** What the library sets when its form is asked for and sent. */
async function cookiesSet(origin: string): Promise<string[]> {
  const config = {
    ...signInCookies(origin),
    secret: 'a secret for the tests alone, long enough',
    trustHost: true,
    basePath: '/api/auth',
    session: { strategy: 'jwt' as const },
    providers: [
      {
        id: 'credentials',
        name: 'credentials',
        type: 'credentials' as const,
        credentials: {},
        authorize: () => ({ id: 'ada' }),
      },
    ],
  };
  const form = await Auth(new Request(`${origin}/api/auth/csrf`), config);
  const { csrfToken } = (await form.json()) as { csrfToken: string };
  const cookie = form.headers.getSetCookie().map((line) => line.split(';')[0]);
  const answer = await Auth(
    new Request(`${origin}/api/auth/callback/credentials`, {
      method: 'POST',
      headers: { cookie: cookie.join('; '), 'x-auth-return-redirect': '1' },
      body: new URLSearchParams({ csrfToken, callbackUrl: '/' }),
    }),
    config,
  );
  return [...form.headers.getSetCookie(), ...answer.headers.getSetCookie()];
}

test('over https every cookie is bound to the host, secure, and out of reach of scripts and other sites', async () => {
  const set = await cookiesSet('https://zaffre.example');
  expect(set.some((line) => line.startsWith('__Host-authjs.session-token='))).toBe(true);
  for (const line of set) {
    expect(line).toMatch(/^__Host-/);
    for (const attribute of [/; Secure/, /; HttpOnly/, /; SameSite=Lax/i, /; Path=\/(?:;|$)/])
      expect(line).toMatch(attribute);
    expect(line).not.toMatch(/; Domain/i);
  }
});

test('over http, on this machine alone, they have names that a browser takes', async () => {
  const set = await cookiesSet('http://localhost:4321');
  expect(set.some((line) => line.startsWith('authjs.session-token='))).toBe(true);
  for (const line of set) {
    expect(line).not.toMatch(/^__|; Secure/);
    expect(line).toMatch(/; HttpOnly/);
  }
});

test('the session is found in a header under either name, whole or in pieces, and under no other', () => {
  for (const name of ['authjs.session-token', '__Host-authjs.session-token', 'authjs.session-token.0'])
    expect(SESSION_COOKIE.test(`zaffre-theme=dark; ${name}=x`), name).toBe(true);
  for (const name of ['xauthjs.session-token', 'authjs.csrf-token', '__Secure-authjs.session-token'])
    expect(SESSION_COOKIE.test(`zaffre-theme=dark; ${name}=x`), name).toBe(false);
});
