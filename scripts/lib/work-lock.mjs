import { linkSync, mkdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { ROOT } from './options.mjs';

const PAUSE_MS = 500;

/**
 * Do what changes `node_modules` or `dist` while no other process of this checkout does; wait for one that does.
 *
 * @param {(line: string) => void} say
 * @param {() => void} work
 */
export function aloneInCheckout(say, work, root = ROOT) {
  const lock = join(root, '.zaffre', 'preparing');
  mkdirSync(join(root, '.zaffre'), { recursive: true });
  let told = false;
  while (!take(lock)) {
    if (!told) say('Another process installs or builds here; waiting for it.');
    told = true;
    Atomics.wait(new Int32Array(new SharedArrayBuffer(4)), 0, 0, PAUSE_MS);
  }
  try {
    work();
  } finally {
    rmSync(lock, { force: true });
  }
}

/** @param {string} lock */
function take(lock) {
  const draft = `${lock}.${process.pid}`;
  writeFileSync(draft, String(process.pid));
  try {
    // A link appears whole or not at all, and only one process can make it.
    linkSync(draft, lock);
    return true;
  } catch (error) {
    if (!hasCode(error, 'EEXIST')) throw error;
  } finally {
    rmSync(draft, { force: true });
  }
  try {
    // Signal 0 only asks whether the process is there.
    process.kill(Number(readFileSync(lock, 'utf8')), 0);
  } catch (error) {
    if (!hasCode(error, 'EPERM')) rmSync(lock, { force: true });
  }
  return false;
}

/**
 * @param {unknown} error
 * @param {string} code
 */
const hasCode = (error, code) => error instanceof Error && 'code' in error && error.code === code;
