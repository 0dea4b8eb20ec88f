import { type ChildProcess, spawn } from 'node:child_process';
import { once } from 'node:events';
import { type IncomingHttpHeaders, request } from 'node:http';
import { join } from 'node:path';
import { setTimeout as wait } from 'node:timers/promises';
import { freePort } from '../../scripts/lib/ports.mjs';

const ROOT = join(import.meta.dirname, '..', '..');

export interface RunningServer {
  origin: string;
  port: number;
  pid: number;
  /** What it wrote so far, to standard output and standard error. */
  said(): string;
  /** End it as a power cut would: nothing is told, nothing is tidied. */
  kill(): Promise<void>;
  /** Ask it to end by SIGTERM. @returns its exit code, null when a signal ended it */
  stop(): Promise<number | null>;
}

export interface StartOptions {
  /** Arguments beside the port and the folder. */
  args?: string[];
  env?: Record<string, string>;
  /** Headers of the question whether it answers; where it is served under another name, that name. */
  headers?: Record<string, string>;
}

/** The environment of a start as a person has it: nothing of the test runner, nothing of an installation here. */
const environment = (env: Record<string, string> = {}) => ({
  ...process.env,
  PUBLIC_ORIGIN: '',
  ZAFFRE_MODE: '',
  ZAFFRE_DATA: '',
  ZAFFRE_ENV_FILE: '',
  AUTH_SECRET: '',
  HOST: '',
  LOG_LEVEL: 'error',
  NODE_ENV: '',
  ...env,
});

/** Start the built program on a folder, and wait until it answers. */
export async function startServer(
  folder: string,
  { args = ['--no-demo'], env, headers = {} }: StartOptions = {},
): Promise<RunningServer> {
  const port = await freePort('127.0.0.1', 0);
  const child: ChildProcess = spawn(
    process.execPath,
    ['scripts/start.mjs', '--port', String(port), '--data', folder, ...args],
    { cwd: ROOT, env: environment(env), stdio: ['ignore', 'pipe', 'pipe'], detached: true },
  );
  let said = '';
  for (const stream of [child.stdout, child.stderr])
    stream?.on('data', (chunk) => {
      said += chunk;
    });
  for (let tries = 0; ; tries++) {
    const over = child.exitCode ?? child.signalCode;
    if (over !== null) throw new Error(`the server ended with ${over}: ${said}`);
    const answer = await ask(port, '/api/health', { headers }).catch(() => null);
    if (answer?.status === 200) break;
    if (tries === 600) throw new Error(`the server does not answer: ${said}`);
    await wait(100);
  }
  const end = async (signal: NodeJS.Signals, target: number) => {
    if (child.exitCode !== null || child.signalCode !== null) return;
    const ended = once(child, 'exit');
    process.kill(target, signal);
    await ended;
  };
  return {
    origin: `http://localhost:${port}`,
    port,
    pid: child.pid!,
    said: () => said,
    kill: () => end('SIGKILL', -child.pid!),
    stop: async () => {
      await end('SIGTERM', child.pid!);
      return child.exitCode;
    },
  };
}

export interface Ended {
  code: number | null;
  stdout: string;
  stderr: string;
}

/** Run one command of the program to its end. */
export async function runToEnd(
  command: string,
  args: string[],
  { env, input = '' }: { env?: Record<string, string>; input?: string } = {},
): Promise<Ended> {
  const child = spawn(command, args, { cwd: ROOT, env: environment(env), stdio: 'pipe' });
  const ended: Ended = { code: null, stdout: '', stderr: '' };
  child.stdout.on('data', (chunk) => {
    ended.stdout += chunk;
  });
  child.stderr.on('data', (chunk) => {
    ended.stderr += chunk;
  });
  child.stdin.on('error', () => undefined).end(input);
  const tooLong = setTimeout(() => child.kill('SIGKILL'), 60_000);
  [ended.code] = (await once(child, 'close')) as [number | null];
  clearTimeout(tooLong);
  return ended;
}

/** A start that is expected to be refused. */
export const startToEnd = (folder: string, args: string[] = [], env: Record<string, string> = {}) =>
  runToEnd(process.execPath, ['scripts/start.mjs', '--data', folder, ...args], { env: { PORT: '0', ...env } });

export interface RawAnswer {
  status: number;
  headers: IncomingHttpHeaders;
  bytes: Buffer;
  text: string;
}

export interface RawRequest {
  method?: string;
  headers?: Record<string, string>;
  /** Sent whole with its length, or in chunks without one. */
  body?: string | Buffer | AsyncIterable<Buffer>;
}

/**
 * One request as it stands: any Host, any path, nothing followed, nothing decoded. A server that answers before it has
 * read all of the body is heard.
 */
export function ask(
  port: number,
  path: string,
  { method = 'GET', headers = {}, body }: RawRequest = {},
): Promise<RawAnswer> {
  return new Promise((resolve, reject) => {
    const whole = typeof body === 'string' || Buffer.isBuffer(body);
    const sent = request(
      {
        host: '127.0.0.1',
        port,
        path,
        method,
        agent: false,
        headers: {
          host: `localhost:${port}`,
          ...(whole ? { 'content-length': String(Buffer.byteLength(body)) } : {}),
          ...headers,
        },
      },
      async (response) => {
        // What fails from here on is the sending of a body that was refused.
        sent.off('error', reject).on('error', () => undefined);
        const chunks: Buffer[] = [];
        try {
          for await (const chunk of response) chunks.push(chunk as Buffer);
        } catch (error) {
          return reject(error);
        }
        const bytes = Buffer.concat(chunks);
        resolve({ status: response.statusCode!, headers: response.headers, bytes, text: bytes.toString() });
      },
    );
    sent.on('error', reject);
    if (whole || body === undefined) sent.end(body);
    else void sendSlowly(sent, body).catch(() => undefined);
  });
}

async function sendSlowly(sent: ReturnType<typeof request>, body: AsyncIterable<Buffer>): Promise<void> {
  let over = false;
  const ended = new Promise<void>((resolve) => {
    const end = () => {
      over = true;
      resolve();
    };
    sent.once('response', end).once('close', end);
  });
  for await (const chunk of body) {
    if (over) return;
    if (!sent.write(chunk)) await Promise.race([ended, new Promise((resolve) => sent.once('drain', resolve))]);
  }
  sent.end();
}
