import { afterEach, beforeEach, expect, test, vi } from 'vitest';

const SECRET = Uint8Array.from({ length: 20 }, (_, i) => i * 7);
const ROW = '01234567-89ab-7def-8123-456789abcdef';

/** The cipher of a process that was started with this secret. */
async function cipherUnder(authSecret: string) {
  vi.resetModules();
  vi.stubEnv('ZAFFRE_MODE', 'demo');
  vi.stubEnv('AUTH_SECRET', authSecret);
  return import('#src/server/second-factor/cipher.ts');
}

let cipher: Awaited<ReturnType<typeof cipherUnder>>;
beforeEach(async () => {
  cipher = await cipherUnder('a secret for the tests alone, long enough');
});
afterEach(() => vi.unstubAllEnvs());

test('what was enciphered comes back, and does not show', () => {
  const kept = cipher.encipher(SECRET, ROW);
  expect([...cipher.decipher(kept, ROW)]).toEqual([...SECRET]);
  expect(Buffer.from(kept, 'base64url').includes(Buffer.from(SECRET))).toBe(false);
});

test('the same secret is never kept the same way twice', () => {
  expect(cipher.encipher(SECRET, ROW)).not.toBe(cipher.encipher(SECRET, ROW));
});

test('every byte counts: version, IV, tag and text', () => {
  const kept = Buffer.from(cipher.encipher(SECRET, ROW), 'base64url');
  expect(kept.length).toBe(1 + 12 + 16 + SECRET.length);
  for (let i = 0; i < kept.length; i++) {
    const altered = Buffer.from(kept);
    altered[i]! ^= 1;
    expect(() => cipher.decipher(altered.toString('base64url'), ROW), `byte ${i}`).toThrow();
  }
});

test('nothing, too little and another row are refused', () => {
  const kept = cipher.encipher(SECRET, ROW);
  expect(() => cipher.decipher('', ROW)).toThrow();
  expect(() => cipher.decipher(kept.slice(0, 20), ROW)).toThrow();
  expect(() => cipher.decipher(kept, ROW.replace('0', '1'))).toThrow();
});

test('another secret of the registry does not open it', async () => {
  const kept = cipher.encipher(SECRET, ROW);
  const other = await cipherUnder('another secret for the tests, long enough');
  expect(() => other.decipher(kept, ROW)).toThrow();
});
