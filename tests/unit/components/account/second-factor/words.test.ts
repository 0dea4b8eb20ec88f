import { describe, expect, test } from 'vitest';
import { passkeyFault } from '#src/components/account/second-factor/passkey-fault.ts';
import { recoveryCodesFile } from '#src/components/account/second-factor/recovery-codes-file.ts';

describe('what a browser refused', () => {
  test.each([
    [{ name: 'InvalidStateError', code: 'ERROR_AUTHENTICATOR_PREVIOUSLY_REGISTERED' }, /already/],
    [{ name: 'SecurityError', code: 'ERROR_INVALID_DOMAIN' }, /localhost/],
    [{ name: 'NotAllowedError', code: 'ERROR_PASSTHROUGH_SEE_CAUSE_PROPERTY' }, /told no/],
    [new Error('something of its own'), /could not make/],
    [undefined, /could not make/],
  ])('%o is told in words', (error, words) => {
    const { title, detail } = passkeyFault(error);
    expect(title).toBe('No passkey was set up');
    expect(detail).toMatch(words);
    expect(detail).not.toContain('something of its own');
  });
});

test('the file of recovery codes tells of which registry they are, from when, and has one a line', () => {
  const text = recoveryCodesFile(
    ['AAAA-BBBB', 'CCCC-DDDD'],
    'https://zaffre.example',
    new Date('2026-12-01T23:00:00Z'),
  );
  const lines = text.split('\r\n');
  expect(lines).toEqual(expect.arrayContaining(['AAAA-BBBB', 'CCCC-DDDD']));
  expect(lines[0]).toContain('https://zaffre.example');
  expect(lines[1]).toContain('2026-12-01');
});
