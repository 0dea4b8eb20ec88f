import { expect, test } from 'vitest';
import { hashPassword, passwordFits } from '#src/server/passwords.ts';

test('a password is hashed by Argon2id at the cost that OWASP names, with a salt of its own', async () => {
  const [one, other] = await Promise.all([
    hashPassword('one and the same text'),
    hashPassword('one and the same text'),
  ]);
  // OWASP Password Storage Cheat Sheet (from memory): m=19456 KiB, t=2, p=1.
  const [, salt] = /^\$argon2id\$v=19\$m=19456,t=2,p=1\$([\w+/]+)\$[\w+/]+$/.exec(one)!;
  expect(Buffer.from(salt!, 'base64').byteLength).toBeGreaterThanOrEqual(16);
  expect(other).not.toBe(one);
  expect(await passwordFits(one, 'one and the same text')).toBe(true);
});

test('the whole of it is compared, in its own case and with its spaces', async () => {
  const long = `${'a long text '.repeat(20)}x`;
  const kept = await hashPassword(long);
  for (const other of [
    long.slice(0, -1),
    `${long.slice(0, -1)}y`,
    long.toUpperCase(),
    `${long} `,
    `${long.trimEnd()}\n`,
  ])
    expect(await passwordFits(kept, other)).toBe(false);
  expect(await passwordFits(kept, long)).toBe(true);
});

test('where there is no account nothing fits', async () => {
  expect(await passwordFits(null, '')).toBe(false);
  expect(await passwordFits(null, 'one and the same text')).toBe(false);
});
