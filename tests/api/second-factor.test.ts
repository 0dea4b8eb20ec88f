import { eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import type { FactorOverview, RecoveryCodes, TotpStarted } from '#src/contracts/second-factor.ts';
import { call, json, openRegistry } from './harness.ts';
import { person } from './people.ts';
import { appCode, giveApp, givePassword, signedIn, TEST_PASSWORD } from './second-factor-people.ts';
import { type Circumstances, SoftwareAuthenticator } from './software-authenticator.ts';

const base = '/api/account/second-factor';
const password = TEST_PASSWORD;
let registry: Awaited<ReturnType<typeof openRegistry>>;
let number = 0;

beforeAll(async () => {
  registry = await openRegistry();
});
afterAll(() => registry.close());

/** Somebody with a password, in one session that stays the same. */
async function somebody() {
  const made = await person(`person ${++number}`);
  await givePassword(made.id);
  const { session, headers } = await signedIn(made.id);
  const post = (path: string, body: object, more: Record<string, string> = {}) =>
    call('POST', path, { json: body, headers: { ...headers, ...more } });
  const overview = () => json<FactorOverview>(call('GET', base, { headers }));
  return { ...made, session, headers, post, overview };
}
type Somebody = Awaited<ReturnType<typeof somebody>>;

async function addApp({ post }: Somebody, name = 'Phone') {
  const started = await json<TotpStarted>(post(`${base}/totp`, { password, name }), 201);
  const confirmed = await json<RecoveryCodes>(
    post(`${base}/totp/${started.id}/confirm`, { code: appCode(started.secret) }),
  );
  return { ...started, ...confirmed };
}

const creation = async ({ post }: Somebody) =>
  json<{ challenge: string; rp: object; user: object }>(post(`${base}/passkeys/options`, { password }));

async function addKey(who: Somebody, key = new SoftwareAuthenticator()) {
  const { challenge } = await creation(who);
  const body = { name: 'Key', response: key.register(challenge) };
  return { key, ...(await json<RecoveryCodes>(who.post(`${base}/passkeys`, body), 201)) };
}

async function rowsOf(accountId: string) {
  const { database } = await import('#src/server/database.ts');
  const { mails, secondFactors, sessions, trail, accounts } = await import('#src/db/schema/index.ts');
  const { db } = await database();
  const [account] = await db.select().from(accounts).where(eq(accounts.id, accountId));
  return {
    factors: await db.select().from(secondFactors).where(eq(secondFactors.accountId, accountId)),
    sessions: await db.select().from(sessions).where(eq(sessions.accountId, accountId)),
    trail: await db.select().from(trail).where(eq(trail.subjectId, accountId)),
    mails: await db.select().from(mails).where(eq(mails.to, account!.email)),
  };
}

describe('an authenticator app', () => {
  test('counts from its first code on, which brings ten recovery codes', async () => {
    const who = await somebody();
    const started = await json<TotpStarted>(who.post(`${base}/totp`, { password, name: 'Phone' }), 201);
    expect(started.uri).toContain(`secret=${started.secret.replaceAll(' ', '')}`);
    expect(started.qr).toMatch(/^<svg[\s\S]*<\/svg>\s*$/);
    expect((await who.overview()).factors).toEqual([]);
    const confirm = () => who.post(`${base}/totp/${started.id}/confirm`, { code: appCode(started.secret) });
    const { recoveryCodes } = await json<RecoveryCodes>(confirm());
    expect(new Set(recoveryCodes).size).toBe(10);
    expect(await who.overview()).toMatchObject({
      required: false,
      factors: [{ id: started.id, kind: 'totp', name: 'Phone' }],
      recoveryCodesLeft: 10,
    });
    expect(await json(confirm(), 409)).toMatchObject({ status: 409 });
    const second = await addApp(who, 'Tablet');
    expect(second.recoveryCodes).toEqual([]);
  });

  test('needs the password and a code of the moment', async () => {
    const who = await somebody();
    const wrong = await json(who.post(`${base}/totp`, { password: 'not it', name: 'Phone' }), 422);
    expect(wrong).toMatchObject({ errors: [{ pointer: '#/password' }] });
    const started = await json<TotpStarted>(who.post(`${base}/totp`, { password, name: 'Phone' }), 201);
    const late = appCode(started.secret, -10);
    const refused = await json(who.post(`${base}/totp/${started.id}/confirm`, { code: late }), 422);
    expect(refused).toMatchObject({ errors: [{ pointer: '#/code' }] });
    expect((await who.overview()).factors).toEqual([]);
  });

  test('begun anew, the one begun before is forgotten', async () => {
    const who = await somebody();
    const first = await json<TotpStarted>(who.post(`${base}/totp`, { password, name: 'Phone' }), 201);
    await addApp(who);
    const code = appCode(first.secret);
    await json(who.post(`${base}/totp/${first.id}/confirm`, { code }), 404);
  });

  test('the code that confirmed it signs nobody in', async () => {
    const { passesSecondFactor } = await import('#src/server/second-factor/verify.ts');
    const who = await somebody();
    const started = await json<TotpStarted>(who.post(`${base}/totp`, { password, name: 'Phone' }), 201);
    const code = appCode(started.secret);
    await json(who.post(`${base}/totp/${started.id}/confirm`, { code }));
    expect(await passesSecondFactor(who.id, { code })).toBe(false);
    expect(await passesSecondFactor(who.id, { code: appCode(started.secret, 1) })).toBe(true);
  });

  test('no secret stands in the database, the trail or a mail, and no answer is kept for a repeat', async () => {
    const who = await somebody();
    const once = () =>
      json<TotpStarted>(who.post(`${base}/totp`, { password, name: 'Phone' }, { 'idempotency-key': 'same' }), 201);
    const [one, other] = [await once(), await once()];
    expect(one.secret).not.toBe(other.secret);
    const code = appCode(other.secret);
    const { recoveryCodes } = await json<RecoveryCodes>(who.post(`${base}/totp/${other.id}/confirm`, { code }));
    const kept = JSON.stringify(await rowsOf(who.id));
    for (const secret of [other.secret.replaceAll(' ', ''), ...recoveryCodes, code]) expect(kept).not.toContain(secret);
  });
});

describe('the first factor', () => {
  test('ends the other sessions and is told in trail and mail; the session that set it up has it', async () => {
    const who = await somebody();
    const other = await signedIn(who.id);
    await addApp(who);
    expect((await call('GET', base, { headers: other.headers })).status).toBe(401);
    const { sessions, trail, mails } = await rowsOf(who.id);
    expect(sessions.find(({ id }) => id === who.session)).toMatchObject({ secondFactor: true, endedAt: null });
    expect(trail.map(({ action, detail }) => [action, detail])).toEqual([
      ['second-factor.added', expect.objectContaining({ kind: 'totp', name: 'Phone', sessionsEnded: 1 })],
    ]);
    expect(mails.map(({ subject }) => subject)).toEqual(['A second factor was added to your account']);
  });

  test('leaves the other sessions where that is asked, but these change no factor', async () => {
    const who = await somebody();
    const other = await signedIn(who.id);
    const started = await json<TotpStarted>(who.post(`${base}/totp`, { password, name: 'Phone' }), 201);
    const code = appCode(started.secret);
    await json(who.post(`${base}/totp/${started.id}/confirm`, { code, endOthers: false }));
    expect((await call('GET', base, { headers: other.headers })).status).toBe(200);
    for (const path of [`${base}/totp`, `${base}/${started.id}/remove`, `${base}/recovery-codes`])
      expect((await call('POST', path, { headers: other.headers, json: { password, name: 'X' } })).status).toBe(403);
  });
});

describe('a passkey', () => {
  const signInOptions = (email: string, given = password) =>
    call('POST', '/api/sign-in/passkey-options', { json: { email, password: given } });
  const passes = async (accountId: string, answer: object) => {
    const { passesSecondFactor } = await import('#src/server/second-factor/verify.ts');
    return passesSecondFactor(accountId, { passkey: JSON.stringify(answer) });
  };
  const asked = async (email: string) => (await json<{ challenge: string }>(signInOptions(email))).challenge;

  test('is set up and signs in', async () => {
    const who = await somebody();
    expect(await creation(who)).toMatchObject({
      rp: { id: 'localhost', name: 'Zaffre' },
      user: { name: who.email },
      attestation: 'none',
      authenticatorSelection: { userVerification: 'preferred' },
    });
    const { key, recoveryCodes } = await addKey(who);
    expect(recoveryCodes).toHaveLength(10);
    expect((await who.overview()).factors).toMatchObject([{ kind: 'passkey', name: 'Key', lastUsedAt: null }]);
    const options = await json<{ challenge: string }>(signInOptions(who.email));
    expect(options).toMatchObject({
      rpId: 'localhost',
      allowCredentials: [{ id: key.id, transports: ['usb'] }],
      userVerification: 'preferred',
    });
    expect(await passes(who.id, key.assert(options.challenge))).toBe(true);
    expect((await who.overview()).factors[0]!.lastUsedAt).not.toBeNull();
    expect(await creation(who)).toMatchObject({ excludeCredentials: [{ id: key.id }] });
  });

  test('its answer passes once', async () => {
    const who = await somebody();
    const { key } = await addKey(who);
    const answer = key.assert(await asked(who.email));
    expect(await passes(who.id, answer)).toBe(true);
    expect(await passes(who.id, answer)).toBe(false);
  });

  test.each<[string, Circumstances]>([
    ['another origin', { origin: 'http://localhost.attacker.example:4321' }],
    ['another port', { origin: 'http://localhost:4322' }],
    ['another relying party', { rpId: 'attacker.example' }],
    ['a registration in place of a sign-in', { type: 'webauthn.create' }],
  ])('an answer from %s does not pass, and uses the challenge up', async (_, circumstances) => {
    const who = await somebody();
    const { key } = await addKey(who);
    const challenge = await asked(who.email);
    expect(await passes(who.id, key.assert(challenge, circumstances))).toBe(false);
    expect(await passes(who.id, key.assert(challenge))).toBe(false);
    expect(await passes(who.id, key.assert(await asked(who.email)))).toBe(true);
  });

  test('a challenge that was not asked of this account for this does not pass', async () => {
    const [who, other] = [await somebody(), await somebody()];
    const { key } = await addKey(who);
    await addKey(other);
    const invented = Buffer.from('a challenge of my own').toString('base64url');
    expect(await passes(who.id, key.assert(invented))).toBe(false);
    expect(await passes(who.id, key.assert(await asked(other.email)))).toBe(false);
    expect(await passes(who.id, key.assert((await creation(who)).challenge))).toBe(false);
  });

  test('a challenge older than five minutes does not pass', async () => {
    const who = await somebody();
    const { key } = await addKey(who);
    const challenge = await asked(who.email);
    const { database } = await import('#src/server/database.ts');
    const { challenges } = await import('#src/db/schema/index.ts');
    const [row] = await (await database()).db.select().from(challenges).where(eq(challenges.challenge, challenge));
    expect(Date.parse(row!.expiresAt) - Date.parse(row!.createdAt)).toBe(300_000);
    const expiresAt = new Date(Date.now() - 1).toISOString();
    await (await database()).write((tx) =>
      tx.update(challenges).set({ expiresAt }).where(eq(challenges.challenge, challenge)),
    );
    expect(await passes(who.id, key.assert(challenge))).toBe(false);
  });

  test('a counter that does not rise does not pass: the key may have been copied', async () => {
    const who = await somebody();
    const { key } = await addKey(who);
    expect(await passes(who.id, key.assert(await asked(who.email), { counter: 7 }))).toBe(true);
    expect(await passes(who.id, key.assert(await asked(who.email), { counter: 7 }))).toBe(false);
    expect(await passes(who.id, key.assert(await asked(who.email), { counter: 3 }))).toBe(false);
    expect(await passes(who.id, key.assert(await asked(who.email), { counter: 8 }))).toBe(true);
  });

  test('a key that keeps no counter passes each time', async () => {
    const who = await somebody();
    const { key } = await addKey(who);
    for (let i = 0; i < 2; i++)
      expect(await passes(who.id, key.assert(await asked(who.email), { counter: 0 }))).toBe(true);
  });

  test("another's key, and a signature by another key, do not pass", async () => {
    const [who, other] = [await somebody(), await somebody()];
    const [mine, theirs] = [(await addKey(who)).key, (await addKey(other)).key];
    expect(await passes(who.id, theirs.assert(await asked(who.email)))).toBe(false);
    const forged = theirs.assert(await asked(who.email));
    expect(await passes(who.id, { ...forged, id: mine.id, rawId: mine.id })).toBe(false);
  });

  test.each<[string, Circumstances]>([
    ['another origin', { origin: 'https://attacker.example' }],
    ['another relying party', { rpId: 'attacker.example' }],
    ['a sign-in in place of a registration', { type: 'webauthn.get' }],
  ])('is not set up by an answer from %s', async (_, circumstances) => {
    const who = await somebody();
    const { challenge } = await creation(who);
    const key = new SoftwareAuthenticator();
    const send = (more?: Circumstances) =>
      who.post(`${base}/passkeys`, { name: 'Key', response: key.register(challenge, more) });
    expect(await json(send(circumstances), 422)).toMatchObject({ errors: [{ pointer: '#/response' }] });
    await json(send(), 422); // the challenge is used up
    expect((await who.overview()).factors).toEqual([]);
  });

  test('is set up once, by one account', async () => {
    const [who, other] = [await somebody(), await somebody()];
    const { key } = await addKey(who);
    const response = key.register((await creation(other)).challenge);
    await json(other.post(`${base}/passkeys`, { name: 'Key', response }), 409);
    expect(await other.overview()).toMatchObject({ factors: [], recoveryCodesLeft: 0 });
  });

  test('is asked for only when the password is right; unknown addresses are answered alike', async () => {
    const who = await somebody();
    await addKey(who);
    const wrong = await json(signInOptions(who.email, 'not it'), 401);
    const unknown = await json(signInOptions('nobody.there@test.example'), 401);
    expect(unknown).toEqual(wrong);
    const without = await somebody();
    await json(signInOptions(without.email), 409);
  });

  test('guessing the password by it is throttled like signing in', async () => {
    const who = await somebody();
    await addKey(who);
    for (let i = 0; i < 10; i++) await signInOptions(who.email, 'not it');
    const refused = await signInOptions(who.email);
    expect(refused.status).toBe(429);
    expect(Number(refused.headers.get('retry-after'))).toBeGreaterThan(0);
  });
});

describe('removing and renewing', () => {
  test('a factor is removed with the password; the last one takes the recovery codes along', async () => {
    const who = await somebody();
    const { id, recoveryCodes } = await addApp(who);
    await addKey(who);
    await json(who.post(`${base}/${id}/remove`, { password: 'not it' }), 422);
    expect((await who.post(`${base}/${id}/remove`, { password })).status).toBe(204);
    const left = await who.overview();
    expect(left).toMatchObject({ factors: [{ kind: 'passkey' }], recoveryCodesLeft: 10 });
    expect((await who.post(`${base}/${left.factors[0]!.id}/remove`, { password })).status).toBe(204);
    expect(await who.overview()).toMatchObject({ factors: [], recoveryCodesLeft: 0 });
    const { passesSecondFactor } = await import('#src/server/second-factor/verify.ts');
    expect(await passesSecondFactor(who.id, { code: recoveryCodes[0]! })).toBe(false);
    const { mails, trail, sessions } = await rowsOf(who.id);
    expect(trail.map(({ action }) => action).filter((action) => action.endsWith('removed'))).toHaveLength(2);
    expect(mails.map(({ subject }) => subject)).toContain('A second factor was removed from your account');
    expect(sessions.some(({ secondFactor }) => secondFactor)).toBe(false);
  });

  test('recovery codes are made anew, and only where there is a factor', async () => {
    const who = await somebody();
    await json(who.post(`${base}/recovery-codes`, { password }), 409);
    const { recoveryCodes: old } = await addApp(who);
    const { recoveryCodes } = await json<RecoveryCodes>(who.post(`${base}/recovery-codes`, { password }));
    expect(recoveryCodes.filter((code) => old.includes(code))).toEqual([]);
    const { passesSecondFactor } = await import('#src/server/second-factor/verify.ts');
    expect(await passesSecondFactor(who.id, { code: old[0]! })).toBe(false);
    expect(await passesSecondFactor(who.id, { code: recoveryCodes[0]! })).toBe(true);
    expect((await who.overview()).recoveryCodesLeft).toBe(9);
  });

  test('an account has twenty factors at most', async () => {
    const who = await somebody();
    await addApp(who);
    for (let i = 0; i < 19; i++) await giveApp(who.id);
    await json(who.post(`${base}/totp`, { password, name: 'One more' }), 409);
  });
});
