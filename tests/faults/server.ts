import { type ChildProcess, spawn } from 'node:child_process';
import { once } from 'node:events';
import { join } from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';
import { freePort } from '../../scripts/lib/ports.mjs';

const ROOT = join(import.meta.dirname, '..', '..');

export interface RunningServer {
  origin: string;
  /** End it as a power cut would: nothing is told, nothing is tidied. */
  kill(): Promise<void>;
}

/** Start the built program on a folder, and wait until it answers. */
export async function startServer(folder: string): Promise<RunningServer> {
  const port = await freePort('127.0.0.1', 0);
  const child: ChildProcess = spawn(
    process.execPath,
    ['scripts/start.mjs', '--port', String(port), '--data', folder, '--no-demo'],
    {
      cwd: ROOT,
      env: {
        ...process.env,
        PUBLIC_ORIGIN: '',
        ZAFFRE_DATA: '',
        ZAFFRE_ENV_FILE: '',
        LOG_LEVEL: 'error',
        NODE_ENV: '',
      },
      stdio: ['ignore', 'ignore', 'pipe'],
      detached: true,
    },
  );
  let said = '';
  child.stderr?.on('data', (chunk) => {
    said += chunk;
  });
  const origin = `http://localhost:${port}`;
  for (let tries = 0; tries < 600; tries++) {
    if (child.exitCode !== null) throw new Error(`the server ended with ${child.exitCode}: ${said}`);
    const answer = await fetch(`${origin}/api/health`).catch(() => null);
    if (answer?.status === 200) break;
    await wait(100);
  }
  return {
    origin,
    kill: async () => {
      const ended = once(child, 'exit');
      process.kill(-child.pid!, 'SIGKILL');
      await ended;
    },
  };
}
