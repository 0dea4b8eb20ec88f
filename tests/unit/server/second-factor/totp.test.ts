import { describe, expect, test } from 'vitest';
import { groupedBase32, newTotpSecret, totpStep, totpUri } from '#src/server/second-factor/totp.ts';

// RFC 6238, appendix B: the SHA-1 rows, with the secret "12345678901234567890" in ASCII. The table has eight digits;
// a code of six is its last six, since both are one number modulo a power of ten (RFC 4226 §5.3).
const SECRET = new TextEncoder().encode('12345678901234567890');
const APPENDIX_B = [
  { seconds: 59, step: 0x1, totp: '94287082' },
  { seconds: 1_111_111_109, step: 0x23523ec, totp: '07081804' },
  { seconds: 1_111_111_111, step: 0x23523ed, totp: '14050471' },
  { seconds: 1_234_567_890, step: 0x273ef07, totp: '89005924' },
  { seconds: 2_000_000_000, step: 0x3f940aa, totp: '69279037' },
  { seconds: 20_000_000_000, step: 0x27bc86aa, totp: '65353130' },
];

describe.each(APPENDIX_B)('at $seconds s', ({ seconds, step, totp }) => {
  const code = totp.slice(-6);

  test('the code of the table belongs to its step', () => {
    expect(totpStep(SECRET, code, seconds * 1000)).toBe(step);
  });

  test('it is taken one step early and one step late, and no further', () => {
    const at = (steps: number) => totpStep(SECRET, code, (seconds + 30 * steps) * 1000);
    expect([at(-1), at(1)]).toEqual([step, step]);
    expect([at(-2), at(2)]).toEqual([null, null]);
  });
});

test.each(['', '28708', '2870820', '000000', 'abcdef'])('"%s" is no code of that moment', (code) => {
  expect(totpStep(SECRET, code, 59_000)).toBeNull();
});

test('the secret is told in base32, in groups of four, and in the address of the QR code', () => {
  // RFC 4648 §10: base32 of "foobar" is MZXW6YTBOI======
  expect(groupedBase32(new TextEncoder().encode('foobar'))).toBe('MZXW 6YTB OI');
  const uri = new URL(totpUri(SECRET, 'ada@test.example'));
  expect(uri.protocol).toBe('otpauth:');
  expect(decodeURIComponent(uri.pathname)).toContain('Zaffre:ada@test.example');
  expect(Object.fromEntries(uri.searchParams)).toEqual({
    issuer: 'Zaffre',
    secret: 'GEZDGNBVGY3TQOJQGEZDGNBVGY3TQOJQ',
    algorithm: 'SHA1',
    digits: '6',
    period: '30',
  });
});

test('a new secret has 160 bits, and is another one each time', () => {
  const [one, other] = [newTotpSecret(), newTotpSecret()];
  expect(one.length).toBe(20);
  expect(Buffer.from(one).equals(Buffer.from(other))).toBe(false);
});
