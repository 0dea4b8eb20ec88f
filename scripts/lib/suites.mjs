import { spawn } from 'node:child_process';
import { existsSync, mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { ROOT } from './options.mjs';

/** @typedef {{ passed: number, failed: number, skipped: number }} Totals */

/** Settings of a person's own installation, which must not reach the tests. */
const PRIVATE =
  /^(?:NODE_ENV|HOST|PORT|PUBLIC_ORIGIN|TRUST_PROXY|AUTH_SECRET|MAIL_FROM|LOG_LEVEL|ACCESSION_PREFIX|MAX_UPLOAD_BYTES|ZAFFRE_(?:MODE|DATA|SERVE|WORKERS|TEST_\w+)|(?:DATABASE|RESEND|S3)_\w+)$/;

/** The environment in which the suites run. */
export function testEnvironment() {
  const kept = Object.entries(process.env).filter(([name]) => !PRIVATE.test(name));
  return {
    ...Object.fromEntries(kept),
    ZAFFRE_ENV_FILE: '',
    ASTRO_TELEMETRY_DISABLED: '1',
    AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED: 'true',
  };
}

/**
 * Run a program of `node_modules` to its end; after `seconds` it and all it started are ended.
 *
 * @param {string} script - path below the program's folder
 * @param {string[]} args
 * @param {number} seconds
 * @param {Record<string, string>} [extra] - environment beside the usual
 * @returns {Promise<boolean>} whether it ended well and in time
 */
export function runNode(script, args, seconds, extra = {}) {
  const child = spawn(process.execPath, [join(ROOT, script), ...args], {
    cwd: ROOT,
    env: { ...testEnvironment(), ...extra },
    stdio: ['ignore', 'inherit', 'inherit'],
    detached: true,
  });
  const end = (/** @type {NodeJS.Signals} */ signal) => {
    try {
      if (child.pid) process.kill(-child.pid, signal);
    } catch {
      // it has ended already
    }
  };
  const onSignal = () => {
    end('SIGTERM');
    process.exit(1);
  };
  process.once('SIGINT', onSignal).once('SIGTERM', onSignal);
  return new Promise((resolve) => {
    const late = setTimeout(() => {
      console.error(`Not done within its budget of ${seconds} s; ended.`);
      end('SIGTERM');
      setTimeout(() => end('SIGKILL'), 5_000).unref();
    }, seconds * 1000);
    child.on('exit', (code) => {
      clearTimeout(late);
      process.off('SIGINT', onSignal).off('SIGTERM', onSignal);
      resolve(code === 0);
    });
  });
}

/**
 * One test: it holds or it does not.
 *
 * @param {boolean} held
 * @returns {Totals}
 */
export const single = (held) => ({ passed: held ? 1 : 0, failed: held ? 0 : 1, skipped: 0 });

/**
 * What a runner reported. A runner that failed without a failed test (a file that does not load, a budget overrun)
 * counts as one.
 *
 * @param {Totals | null} totals
 * @param {boolean} held
 * @returns {Totals}
 */
export function settle(totals, held) {
  if (!totals) return single(held);
  return held || totals.failed > 0 ? totals : { ...totals, failed: 1 };
}

/**
 * Run tests under vitest.
 *
 * @param {string[]} args
 * @param {number} seconds
 */
export function vitest(args, seconds) {
  return withReport(async (file) => {
    const reporters = ['--reporter=dot', '--reporter=json', `--outputFile.json=${file}`];
    const held = await runNode('node_modules/vitest/vitest.mjs', ['run', ...args, ...reporters], seconds);
    const report = readReport(file);
    return settle(
      report && {
        passed: report.numPassedTests,
        failed: report.numFailedTests,
        skipped: report.numPendingTests + report.numTodoTests,
      },
      held,
    );
  });
}

/**
 * Run the browser tests under Playwright.
 *
 * @param {number} seconds
 */
export function playwright(seconds) {
  return withReport(async (file) => {
    const args = [
      'test',
      '--config',
      'tests/browser/playwright.config.ts',
      '--reporter',
      'list,json',
      '--pass-with-no-tests',
    ];
    const held = await runNode('node_modules/@playwright/test/cli.js', args, seconds, {
      PLAYWRIGHT_JSON_OUTPUT_NAME: file,
    });
    const stats = readReport(file)?.stats;
    return settle(
      stats && { passed: stats.expected + stats.flaky, failed: stats.unexpected, skipped: stats.skipped },
      held,
    );
  });
}

/** @param {(file: string) => Promise<Totals>} work */
async function withReport(work) {
  const folder = mkdtempSync(join(tmpdir(), 'zaffre-report-'));
  try {
    return await work(join(folder, 'report.json'));
  } finally {
    rmSync(folder, { recursive: true, force: true });
  }
}

/** @param {string} file */
const readReport = (file) => (existsSync(file) ? JSON.parse(readFileSync(file, 'utf8')) : null);
