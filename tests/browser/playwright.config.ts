import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { defineConfig } from '@playwright/test';
import { findChromium } from '../../scripts/lib/chromium.mjs';
import { freePort } from '../../scripts/lib/ports.mjs';

// This file is read again in every worker: what the first reading chose is handed on in the environment.
if (!process.env.ZAFFRE_TEST_PORT) {
  process.env.ZAFFRE_TEST_PORT = String(await freePort('127.0.0.1', 0));
  const folder = mkdtempSync(join(tmpdir(), 'zaffre-browser-'));
  process.env.ZAFFRE_TEST_DATA = folder;
  process.once('exit', () => rmSync(folder, { recursive: true, force: true }));
}
const { ZAFFRE_TEST_PORT: port, ZAFFRE_TEST_DATA: data, ZAFFRE_LONG } = process.env;
const chromium = findChromium();

/** The built program with the demo data on a free port and in a folder of its own, seen by the system's Chromium. */
export default defineConfig({
  testDir: '.',
  testMatch: '**/*.spec.ts',
  outputDir: '../../test-results',
  workers: 1,
  fullyParallel: false,
  retries: 0,
  timeout: 60_000,
  forbidOnly: ZAFFRE_LONG === '1',
  use: {
    baseURL: `http://localhost:${port}`,
    trace: 'retain-on-failure',
    locale: 'en-GB',
    timezoneId: 'UTC',
    launchOptions: { ...(chromium ? { executablePath: chromium } : {}), args: ['--no-sandbox'] },
  },
  webServer: {
    command: `node scripts/start.mjs --port ${port} --data ${JSON.stringify(data)}`,
    cwd: join(import.meta.dirname, '..', '..'),
    url: `http://localhost:${port}/api/health`,
    timeout: 300_000,
    reuseExistingServer: false,
    gracefulShutdown: { signal: 'SIGTERM', timeout: 15_000 },
    env: { ZAFFRE_ENV_FILE: '', LOG_LEVEL: 'error' },
  },
});
