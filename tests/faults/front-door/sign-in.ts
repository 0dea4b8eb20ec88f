import { describe, expect, test } from 'vitest';
import { DEMO_PASSWORD } from '#src/server/demo-accounts.ts';
import { ask } from '../server.ts';
import type { Door } from './door.ts';
import { Browser } from './session.ts';

/** Sessions by the real sign-in, and what a foreign page can do with one: nothing. */
export function signIn(door: Door): void {
  const signedIn = async (email = 'contributor@demo.example') => {
    const browser = new Browser(door.server);
    await browser.signIn(email, DEMO_PASSWORD);
    expect(browser.signedIn).toBe(true);
    return browser;
  };
  const write = (browser: Browser, headers: Record<string, string>) =>
    browser.send('/api/derive/formula', {
      method: 'POST',
      headers: { 'content-type': 'application/json', ...headers },
      body: JSON.stringify({ formula: '[Co(NH3)6]3+' }),
    });

  describe('signing in and out', () => {
    test('a session opens what was closed, and signing out closes it', async () => {
      const browser = new Browser(door.server);
      expect((await browser.send('/api/complexes')).status).toBe(401);
      expect((await browser.send('/complexes')).headers.location).toContain('/signin?');
      const answer = await browser.signIn('Contributor@Demo.example ', DEMO_PASSWORD);
      expect(answer.status).toBe(302);
      const session = answer.headers['set-cookie']!.find((line) => line.startsWith('authjs.session-token='));
      expect(session).toMatch(/; HttpOnly/);
      expect(session).toMatch(/; SameSite=Lax/);
      expect((await browser.send('/api/complexes')).status).toBe(200);
      expect((await browser.send('/complexes')).status).toBe(200);

      const foreign = await browser.form('/api/auth/signout', { callbackUrl: '/' }, 'http://evil.example');
      expect(foreign.status).toBe(403);
      expect((await browser.send('/api/complexes')).status).toBe(200);
      await browser.form('/api/auth/signout', { callbackUrl: '/signin' });
      expect(browser.signedIn).toBe(false);
      expect((await browser.send('/api/complexes')).status).toBe(401);
    });

    test('a wrong password and an unknown address answer alike', async () => {
      const tell = async (email: string, password: string) => {
        const browser = new Browser(door.server);
        const { status, headers, text } = await browser.signIn(email, password);
        expect(browser.signedIn).toBe(false);
        const { date: _d, 'x-request-id': _i, ...rest } = headers;
        return { status, text, rest };
      };
      const wrong = await tell('lead@demo.example', 'not the password');
      expect(wrong.rest.location).toContain('error=CredentialsSignin');
      expect(await tell('nobody@demo.example', 'not the password')).toEqual(wrong);
    });

    test('without the token of the form there is no session', async () => {
      const browser = new Browser(door.server);
      await browser.send('/api/auth/csrf');
      await browser.send('/api/auth/callback/credentials', {
        method: 'POST',
        headers: { 'content-type': 'application/x-www-form-urlencoded', origin: door.server.origin },
        body: new URLSearchParams({ email: 'lead@demo.example', password: DEMO_PASSWORD }).toString(),
      });
      expect(browser.signedIn).toBe(false);
    });

    test('a cookie that was tampered with is nobody', async () => {
      const browser = await signedIn();
      for (const [name, value] of browser.cookies)
        if (name.includes('session-token')) browser.cookies.set(name, `${value.slice(0, -4)}AAAA`);
      expect((await browser.send('/api/complexes')).status).toBe(401);
    });
  });

  describe('redirects stay here', () => {
    test.each(['https://evil.example/', '//evil.example/', '/\\evil.example/', 'javascript:alert(1)'])(
      'not to %s',
      async (wanted) => {
        const browser = new Browser(door.server);
        const { headers } = await browser.signIn('guest@demo.example', DEMO_PASSWORD, wanted);
        expect(new URL(headers.location!, door.server.origin).origin).toBe(door.server.origin);
        const next = await browser.send(`/signin?${new URLSearchParams({ next: wanted })}`);
        expect(next.status).toBe(302);
        expect(next.headers.location).toBe('/');
        const page = await ask(door.server.port, `/signin?${new URLSearchParams({ next: wanted })}`);
        expect(page.text).toMatch(/name="callbackUrl" value="\/"/);
        const out = await browser.form('/api/auth/signout', { callbackUrl: wanted });
        expect(new URL(out.headers.location!, door.server.origin).origin).toBe(door.server.origin);
      },
    );
  });

  describe('writes by cookie', () => {
    test('come from our own pages', async () => {
      const browser = await signedIn();
      expect((await write(browser, {})).status).toBe(403);
      for (const origin of ['http://evil.example', 'null', `https://localhost:${door.server.port}`, 'not an origin'])
        expect((await write(browser, { origin })).status, origin).toBe(403);
      expect((await write(browser, { 'sec-fetch-site': 'same-site' })).status).toBe(403);
      expect((await write(browser, { 'sec-fetch-site': 'cross-site' })).status).toBe(403);
      expect((await write(browser, { origin: 'http://evil.example', 'sec-fetch-site': 'same-origin' })).status).toBe(
        403,
      );
      expect((await write(browser, { 'sec-fetch-site': 'same-origin' })).status).toBe(200);
      expect((await write(browser, { origin: door.server.origin })).status).toBe(200);
    });

    test('a bearer needs no origin, and counts before the cookie, also when it is wrong', async () => {
      const browser = await signedIn('steward@demo.example');
      const good = { authorization: `Bearer ${door.token}` };
      expect((await write(browser, good)).status).toBe(200);
      expect((await write(browser, { ...good, origin: 'http://evil.example' })).status).toBe(200);
      // The steward's cookie does not lend its rights to the contributor's token.
      expect(JSON.parse((await browser.send('/api/health')).text)).toHaveProperty('parts');
      expect(JSON.parse((await browser.send('/api/health', { headers: good })).text)).not.toHaveProperty('parts');
      for (const authorization of ['Bearer zft_wrong', 'Bearer', 'Basic Zm9vOmJhcg=='])
        expect((await write(browser, { authorization, origin: door.server.origin })).status).toBe(401);
    });
  });
}
