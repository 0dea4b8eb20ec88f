import { spawnSync } from 'node:child_process';
import { accessSync, constants } from 'node:fs';
import { delimiter, join } from 'node:path';
import { UsageError } from './options.mjs';

const NAMES = ['chromium', 'chromium-browser', 'google-chrome', 'google-chrome-stable'];

/** Path of the browser that the tests drive: ZAFFRE_CHROMIUM, else the first one on the PATH, else null. */
export function findChromium() {
  if (process.env.ZAFFRE_CHROMIUM) return process.env.ZAFFRE_CHROMIUM;
  const folders = (process.env.PATH ?? '').split(delimiter).filter(Boolean);
  return NAMES.flatMap((name) => folders.map((folder) => join(folder, name))).find(isExecutable) ?? null;
}

/** @param {string} path */
function isExecutable(path) {
  try {
    accessSync(path, constants.X_OK);
    return true;
  } catch {
    return false;
  }
}

/**
 * Have a browser: the one that is there, or Debian's package where it may be installed.
 *
 * @param {(line: string) => void} say
 * @throws {UsageError} where there is none to be had
 */
export function ensureChromium(say) {
  if (findChromium()) return;
  const root = process.getuid?.() === 0;
  if (root) {
    say('Installing Chromium from the Debian package.');
    const options = /** @type {const} */ ({
      stdio: 'inherit',
      env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' },
    });
    spawnSync('apt-get', ['-q', 'update'], options);
    spawnSync('apt-get', ['-q', 'install', '-y', '--no-install-recommends', 'chromium'], options);
  }
  if (!findChromium())
    throw new UsageError(
      'The browser tests need Chromium: install it, name it in ZAFFRE_CHROMIUM, or leave them out with ZAFFRE_NO_BROWSER=1.',
    );
}
