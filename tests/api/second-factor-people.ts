import { eq } from 'drizzle-orm';
import { Secret, TOTP } from 'otpauth';
import { sessionHeaders, sessionOf } from './harness.ts';

export const TEST_PASSWORD = 'a password for the tests alone';
let hash: Promise<string> | undefined;

/** Give an account the password of the tests. */
export async function givePassword(accountId: string): Promise<void> {
  const { database } = await import('#src/server/database.ts');
  const { hashPassword } = await import('#src/server/passwords.ts');
  const { accounts } = await import('#src/db/schema/index.ts');
  hash ??= hashPassword(TEST_PASSWORD);
  const passwordHash = await hash;
  await (await database()).write((tx) => tx.update(accounts).set({ passwordHash }).where(eq(accounts.id, accountId)));
}

/** A session of an account and the headers that carry it. */
export async function signedIn(accountId: string, { secondFactor = false } = {}) {
  const session = await sessionOf(accountId, { secondFactor });
  return { session, headers: await sessionHeaders(accountId, session) };
}

/** The code that an app shows which holds this base32 secret, `steps` of 30 s from now. */
export const appCode = (base32: string, steps = 0): string =>
  TOTP.generate({
    secret: Secret.fromBase32(base32.replaceAll(' ', '')),
    timestamp: Date.now() + steps * 30_000,
  });

/** An authenticator app of an account, made straight in the database. */
export async function giveApp(accountId: string, { confirmed = true } = {}): Promise<{ id: string; secret: string }> {
  const { database } = await import('#src/server/database.ts');
  const { newId, nowIso } = await import('#src/server/ids.ts');
  const { secondFactors } = await import('#src/db/schema/index.ts');
  const { encipher } = await import('#src/server/second-factor/cipher.ts');
  const [id, secret] = [newId(), new Secret({ size: 20 })];
  const confirmedAt = confirmed ? nowIso() : null;
  const row = { id, accountId, kind: 'totp' as const, name: 'App', createdAt: nowIso(), confirmedAt };
  const kept = encipher(secret.bytes, id);
  await (await database()).write((tx) => tx.insert(secondFactors).values({ ...row, secret: kept }));
  return { id, secret: secret.base32 };
}
