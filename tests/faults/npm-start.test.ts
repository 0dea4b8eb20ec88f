import { spawn } from 'node:child_process';
import { existsSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';
import { afterAll, expect, test } from 'vitest';
import { freePort } from '../../scripts/lib/ports.mjs';

const folder = mkdtempSync(join(tmpdir(), 'zaffre-npm-'));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

async function until(condition: () => Promise<boolean> | boolean, what: string): Promise<void> {
  for (let tries = 0; tries < 300; tries++) {
    if (await condition()) return;
    await wait(200);
  }
  throw new Error(`not within a minute: ${what}`);
}

test('SIGTERM to npm ends the program that it started, cleanly', async () => {
  const port = await freePort('127.0.0.1', 0);
  const health = `http://localhost:${port}/api/health`;
  const answers = () =>
    fetch(health).then(
      ({ ok }) => ok,
      () => false,
    );
  const npm = spawn('npm', ['start', '--', '--port', String(port), '--data', folder, '--no-demo'], {
    cwd: join(import.meta.dirname, '..', '..'),
    env: { ...process.env, PUBLIC_ORIGIN: '', ZAFFRE_DATA: '', ZAFFRE_ENV_FILE: '', LOG_LEVEL: 'error', NODE_ENV: '' },
    stdio: 'ignore',
  });
  await until(answers, 'the program answers');
  expect(existsSync(join(folder, 'lock'))).toBe(true);
  npm.kill('SIGTERM');
  await until(() => !existsSync(join(folder, 'lock')), 'the lock is gone');
  await until(async () => !(await answers()), 'nothing answers any more');
});
