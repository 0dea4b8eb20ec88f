import { eq } from 'drizzle-orm';
import { appCode, giveApp, givePassword, signedIn, TEST_PASSWORD } from '../second-factor-people.ts';
import { SoftwareAuthenticator } from '../software-authenticator.ts';
import { type AskerKind, type Fixture, type MatrixRow, statuses } from './fixture.ts';

const base = '/api/account/second-factor';
const password = TEST_PASSWORD;

/** The asker, with the password of the tests, no factor but one app, and a session that began with it. */
async function prepared(f: Fixture, kind: AskerKind) {
  const { database } = await import('#src/server/database.ts');
  const { secondFactors } = await import('#src/db/schema/index.ts');
  const { id, email } = f.people[kind === 'nobody' ? 'lead' : kind];
  await (await database()).write((tx) => tx.delete(secondFactors).where(eq(secondFactors.accountId, id)));
  await givePassword(id);
  const app = await giveApp(id);
  const bySession = kind !== 'nobody' && kind !== 'readToken' && kind !== 'revokedToken';
  const headers = bySession ? (await signedIn(id, { secondFactor: true })).headers : {};
  return { id, email, app, headers };
}

async function challengeFor(accountId: string, purpose: 'register' | 'sign-in'): Promise<string> {
  const { keepChallenge } = await import('#src/server/second-factor/challenges.ts');
  const challenge = Buffer.from(crypto.randomUUID()).toString('base64url');
  await keepChallenge(accountId, purpose, challenge);
  return challenge;
}

/** Everybody who is signed in has second factors; a token never changes them. */
const own = (done: number) => statuses({ readToken: 403, others: done });

export const rows: Record<string, MatrixRow> = {
  readSecondFactors: { send: () => ({ path: base }), expect: own(200) },
  startTotp: {
    send: async (f, kind) => ({
      path: `${base}/totp`,
      json: { password, name: 'Phone' },
      headers: (await prepared(f, kind)).headers,
    }),
    expect: own(201),
  },
  'startTotp, by a session without the factor': {
    send: async (f, kind) => {
      await prepared(f, kind);
      return { path: `${base}/totp`, json: { password, name: 'Phone' } };
    },
    expect: own(403),
  },
  confirmTotp: {
    send: async (f, kind) => {
      const { id, headers } = await prepared(f, kind);
      const begun = await giveApp(id, { confirmed: false });
      return { path: `${base}/totp/${begun.id}/confirm`, json: { code: appCode(begun.secret) }, headers };
    },
    expect: own(200),
  },
  "confirmTotp, another's": {
    send: async (f, kind) => {
      const { headers } = await prepared(f, kind);
      const { id, secret } = await giveApp(f.people[kind === 'lead' ? 'otherLead' : 'lead'].id, { confirmed: false });
      return { path: `${base}/totp/${id}/confirm`, json: { code: appCode(secret) }, headers };
    },
    expect: own(404),
  },
  startPasskey: {
    send: async (f, kind) => ({
      path: `${base}/passkeys/options`,
      json: { password },
      headers: (await prepared(f, kind)).headers,
    }),
    expect: own(200),
  },
  addPasskey: {
    send: async (f, kind) => {
      const { id, headers } = await prepared(f, kind);
      const response = new SoftwareAuthenticator().register(await challengeFor(id, 'register'));
      return { path: `${base}/passkeys`, json: { name: 'Key', response }, headers };
    },
    expect: own(201),
  },
  removeFactor: {
    send: async (f, kind) => {
      const { app, headers } = await prepared(f, kind);
      return { path: `${base}/${app.id}/remove`, json: { password }, headers };
    },
    expect: own(204),
  },
  "removeFactor, another's": {
    send: async (f, kind) => {
      const { headers } = await prepared(f, kind);
      const { id } = await giveApp(f.people[kind === 'lead' ? 'otherLead' : 'lead'].id);
      return { path: `${base}/${id}/remove`, json: { password }, headers };
    },
    expect: own(404),
  },
  renewRecoveryCodes: {
    send: async (f, kind) => ({
      path: `${base}/recovery-codes`,
      json: { password },
      headers: (await prepared(f, kind)).headers,
    }),
    expect: own(200),
  },
  startPasskeySignIn: {
    send: async (f, kind) => {
      const { id, email } = await prepared(f, kind);
      const { database } = await import('#src/server/database.ts');
      const { newId, nowIso } = await import('#src/server/ids.ts');
      const { secondFactors } = await import('#src/db/schema/index.ts');
      const now = nowIso();
      const key = { id: newId(), accountId: id, kind: 'passkey' as const, name: 'Key', credentialId: newId() };
      await (await database()).write((tx) =>
        tx.insert(secondFactors).values({ ...key, createdAt: now, confirmedAt: now }),
      );
      return { path: '/api/sign-in/passkey-options', json: { email, password } };
    },
    expect: { ...statuses({ others: 200 }), nobody: 200, revokedToken: 200 },
  },
};
