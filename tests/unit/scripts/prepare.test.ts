import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { createServer } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, test } from 'vitest';
import { buildFits, contentHash } from '../../../scripts/lib/build.mjs';
import { parseOptions } from '../../../scripts/lib/options.mjs';
import { packagesFit, requireNode } from '../../../scripts/lib/packages.mjs';
import { freePort } from '../../../scripts/lib/ports.mjs';
import { settle, single } from '../../../scripts/lib/suites.mjs';

let root: string;

beforeEach(() => {
  root = mkdtempSync(join(tmpdir(), 'zaffre-root-'));
});
afterEach(() => rmSync(root, { recursive: true, force: true }));

const put = (path: string, content: unknown) => {
  mkdirSync(join(root, path, '..'), { recursive: true });
  writeFileSync(join(root, path), typeof content === 'string' ? content : JSON.stringify(content));
};

test.each(['20.19.0', '20.20.2', '22.0.0', '24.1.0'])('Node %s will do', (version) => requireNode(version));
test.each(['18.20.0', '20.18.3', '21.7.0'])('Node %s is refused in one sentence', (version) =>
  expect(() => requireNode(version)).toThrow(new RegExp(`^Zaffre needs Node.js 20.19 .*${version}\\.$`)),
);

describe('installed packages', () => {
  const lock = {
    packages: {
      '': { version: '0.1.0' },
      'node_modules/a': { version: '1.0.0' },
      'node_modules/b-linux': { version: '2.0.0', optional: true },
      'node_modules/c': { version: '3.0.0', dev: true },
    },
  };
  const { 'node_modules/a': a, 'node_modules/c': c } = lock.packages;

  test.each([
    ['all of them', { 'node_modules/a': a, 'node_modules/c': c }, true],
    ['another version', { 'node_modules/a': { version: '1.0.1' }, 'node_modules/c': c }, false],
    ['no development packages', { 'node_modules/a': a }, false],
  ])('with %s', (_, packages, fits) => {
    put('package-lock.json', lock);
    put('node_modules/.package-lock.json', { packages });
    expect(packagesFit(root)).toBe(fits);
  });

  test('with a half-done install, which has no record', () => {
    put('package-lock.json', lock);
    put('node_modules/a/package.json', { version: '1.0.0' });
    expect(packagesFit(root)).toBe(false);
  });
});

test('the build fits until a source is changed, added or renamed, or its stamp is gone', () => {
  put('src/a.ts', 'one');
  put('docs/readme.md', 'not built');
  const hash = contentHash(root);
  expect(buildFits(root)).toBe(false);
  put('dist/.zaffre-built', hash);
  expect(buildFits(root)).toBe(true);
  put('docs/readme.md', 'changed');
  expect(buildFits(root)).toBe(true);
  put('src/b.ts', '');
  expect(buildFits(root)).toBe(false);
  rmSync(join(root, 'src/b.ts'));
  expect(contentHash(root)).toBe(hash);
  put('src/a.ts', 'two');
  expect(contentHash(root)).not.toBe(hash);
});

test('an unknown option is one sentence that names it and the others', () => {
  const options = { port: { type: 'string' as const }, 'no-demo': { type: 'boolean' as const } };
  expect(parseOptions('start --', options, ['--port', '80', '--no-demo'])).toMatchObject({
    port: '80',
    'no-demo': true,
  });
  expect(() => parseOptions('start --', options, ['--prot=80'])).toThrow(
    'npm start: there is no option --prot. The options are --port …, --no-demo.',
  );
  expect(() => parseOptions('start --', options, ['--port'])).toThrow(/^npm start: /);
});

test('a busy port is one sentence; 0 finds one that is free', async () => {
  const busy = createServer();
  await new Promise<void>((resolve) => busy.listen(0, '127.0.0.1', resolve));
  const { port } = busy.address() as { port: number };
  await expect(freePort('127.0.0.1', port)).rejects.toThrow(`Port ${port} is in use by another program`);
  expect(await freePort('127.0.0.1', 0)).toBeGreaterThan(0);
  await new Promise((resolve) => busy.close(resolve));
});

test('a runner that fails without a failed test counts as one failure', () => {
  const clean = { passed: 3, failed: 0, skipped: 1 };
  expect(settle(clean, true)).toEqual(clean);
  expect(settle(clean, false)).toEqual({ ...clean, failed: 1 });
  expect(settle({ ...clean, failed: 2 }, false)).toEqual({ ...clean, failed: 2 });
  expect(settle(null, false)).toEqual(single(false));
});
