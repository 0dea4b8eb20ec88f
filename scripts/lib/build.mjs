import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, readdirSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { ROOT, UsageError } from './options.mjs';

/** What the built program is made from. */
const SOURCES = [
  'src',
  'fakes',
  'public',
  'scripts/build-workers.ts',
  'package.json',
  'package-lock.json',
  'astro.config.mjs',
  'tsconfig.json',
];

/**
 * Hash over names and contents of all files below the given paths, in a fixed order.
 *
 * @param {string} root
 * @param {string[]} paths
 */
export function contentHash(root, paths = SOURCES) {
  const hash = createHash('sha256');
  /** @param {string} path */
  const add = (path) => {
    const full = join(root, path);
    if (!existsSync(full)) return;
    if (statSync(full).isDirectory()) {
      for (const name of readdirSync(full).sort()) add(`${path}/${name}`);
      return;
    }
    const bytes = readFileSync(full);
    hash.update(`${path}\0${bytes.length}\0`).update(bytes);
  };
  for (const path of paths) add(path);
  return hash.digest('hex');
}

const stampOf = (/** @type {string} */ root) => join(root, 'dist', '.zaffre-built');

/**
 * Whether `dist` was built, to its end, from the sources as they are.
 *
 * @param {string} root
 */
export function buildFits(root, hash = contentHash(root)) {
  return existsSync(stampOf(root)) && readFileSync(stampOf(root), 'utf8') === hash;
}

/**
 * Build the program unless `dist` fits the sources. A stamp is taken away first and written last, so that a
 * broken-off build is made again.
 *
 * @param {(line: string) => void} say
 * @param {{ force?: boolean, seconds?: number }} [options] - `seconds`: how long each step may take
 * @throws {UsageError} when the build fails
 */
export function ensureBuild(say, { force = false, seconds = 900 } = {}, root = ROOT) {
  const hash = contentHash(root);
  if (!force && buildFits(root, hash)) return;
  say('Building; this takes about a minute.');
  rmSync(stampOf(root), { force: true });
  const { NODE_ENV: _, ...env } = process.env;
  for (const args of [
    [join('node_modules', 'astro', 'astro.js'), 'build'],
    ['--import', 'tsx', join('scripts', 'build-workers.ts')],
  ]) {
    const { status, stdout, stderr } = spawnSync(process.execPath, args, {
      cwd: root,
      env: { ...env, ASTRO_TELEMETRY_DISABLED: '1' },
      encoding: 'utf8',
      maxBuffer: 1e9,
      timeout: seconds * 1000,
    });
    if (status !== 0) throw new UsageError(`${stdout}${stderr}\nThe build failed (${args.join(' ')}); see above.`);
  }
  writeFileSync(stampOf(root), hash);
}
