import { execFileSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { checkCommand, fileNameOf, isUnderWay, readSize } from '#src/components/bundles/bundle-state.ts';

test('sizes are read in decimal steps', () => {
  // SI prefixes (SI Brochure, 9th ed., table 7): k = 10³, M = 10⁶, G = 10⁹.
  expect([0, 999, 1000, 4_712_000, 27_000_000, 999_999, 1.5e9].map(readSize)).toEqual([
    '0 bytes',
    '999 bytes',
    '1.0 kB',
    '4.7 MB',
    '27 MB',
    '1.0 MB',
    '1.5 GB',
  ]);
});

test('a bundle is waited for until it is ready, failed or cancelled', () => {
  expect(['queued', 'running'].every((state) => isUnderWay({ state: state as 'queued' }))).toBe(true);
  expect(['ready', 'failed', 'cancelled'].some((state) => isUnderWay({ state: state as 'ready' }))).toBe(false);
});

test('the file name comes from Content-Disposition, the encoded form first (RFC 6266, 4.3)', () => {
  expect(fileNameOf('attachment; filename="a b.zip"')).toBe('a b.zip');
  expect(fileNameOf(`attachment; filename="EURO rates.zip"; filename*=UTF-8''%e2%82%ac%20rates.zip`)).toBe(
    '€ rates.zip',
  );
  expect(fileNameOf('attachment')).toBeNull();
  expect(fileNameOf(null)).toBeNull();
});

test('the command that is shown checks a file, and notices a changed one', () => {
  const folder = mkdtempSync(join(tmpdir(), 'zaffre-check-'));
  const check = () =>
    execFileSync('sh', ['-c', checkCommand(sum, 'set-1.zip')], { cwd: folder, stdio: 'pipe' }).toString();
  writeFileSync(join(folder, 'set-1.zip'), 'content');
  const sum = createHash('sha256').update('content').digest('hex');
  expect(check()).toBe('set-1.zip: OK\n');
  writeFileSync(join(folder, 'set-1.zip'), 'contenT');
  expect(check).toThrow();
  rmSync(folder, { recursive: true });
});
