import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { ROOT, UsageError } from './options.mjs';

// Node built-ins only: this is what installs the packages.

const OLDEST = [20, 19];

/**
 * @param {string} [version] - as in `process.versions.node`
 * @throws {UsageError} when this Node cannot run the program
 */
export function requireNode(version = process.versions.node) {
  const [major = 0, minor = 0] = version.split('.').map(Number);
  const fits = major > OLDEST[0] ? major >= 22 : major === OLDEST[0] && minor >= OLDEST[1];
  if (!fits) throw new UsageError(`Zaffre needs Node.js 20.19 or later (not 21), and this is ${version}.`);
}

/**
 * Whether `node_modules` holds what the lock file asks for. Npm writes its own record there last, so that a broken-off
 * install has none, or an old one.
 *
 * @param {string} root
 */
export function packagesFit(root) {
  const wanted = readJson(join(root, 'package-lock.json'))?.packages;
  const there = readJson(join(root, 'node_modules', '.package-lock.json'))?.packages;
  if (!wanted || !there) return false;
  return Object.entries(wanted).every(
    ([path, { version, optional, peer, link }]) =>
      path === '' || optional || link || (peer && !there[path]) || there[path]?.version === version,
  );
}

/** @param {string} path */
function readJson(path) {
  try {
    return JSON.parse(readFileSync(path, 'utf8'));
  } catch {
    return null;
  }
}

/**
 * Install the packages unless they are there and fit. A stamp, written last, saves looking the next time.
 *
 * @param {(line: string) => void} say
 * @throws {UsageError} when npm fails
 */
export function ensurePackages(say, root = ROOT) {
  const lock = readFileSync(join(root, 'package-lock.json'));
  const stamp = join(root, 'node_modules', '.zaffre-installed');
  // A binary package built for one platform or one Node line does not serve another.
  const facts = `${process.platform} ${process.arch} ${process.versions.modules}`;
  const wanted = createHash('sha256').update(lock).update(facts).digest('hex');
  const stamped = existsSync(stamp) ? readFileSync(stamp, 'utf8') : null;
  if (stamped === wanted && existsSync(join(root, 'node_modules', '.package-lock.json'))) return;
  if (stamped !== null || !packagesFit(root)) {
    say('Installing packages; this takes a minute or two.');
    rmSync(stamp, { force: true });
    npm(['ci', '--include=dev', '--ignore-scripts', '--no-audit', '--no-fund', '--loglevel=error'], root);
  }
  writeFileSync(stamp, wanted);
}

/**
 * @param {string[]} args
 * @param {string} root
 */
function npm(args, root) {
  const { npm_execpath: cli, NODE_ENV: _, ...rest } = process.env;
  // What an outer `npm start` was configured with is handed down in these; only the registry's address must stay.
  const env = Object.fromEntries(
    Object.entries(rest).filter(([name]) => !/^npm_config_(omit|only|production|include)$/i.test(name)),
  );
  const byNode = cli && /\.c?js$/.test(cli);
  const command = byNode ? process.execPath : 'npm';
  const { status, error } = spawnSync(command, byNode ? [cli, ...args] : args, {
    cwd: root,
    env,
    stdio: ['ignore', 2, 2],
    shell: process.platform === 'win32' && !byNode,
  });
  if (error || status !== 0)
    throw new UsageError(`npm ci failed (${error?.message ?? `code ${status}`}); see above. Nothing else was done.`);
}
