import { once } from 'node:events';
import { availableParallelism } from 'node:os';
import { join } from 'node:path';
import { Worker } from 'node:worker_threads';
import { DomainError } from '#src/chem/errors.ts';
import { HttpError } from './http.ts';
import type { Answer, Question } from './workers/derive.ts';
import type { Tasks } from './workers/tasks.ts';

export interface WorkerOptions {
  /** How long the derivation may take once it has begun, in milliseconds. */
  timeoutMs?: number;
  /** Ends the derivation when whoever asked has gone. */
  signal?: AbortSignal;
  /** The input named in a refusal, such as `formula`. */
  field?: string;
}

interface Waiting {
  question: Question;
  options: WorkerOptions;
  resolve(value: unknown): void;
  reject(error: unknown): void;
}

const SIZE = Math.max(2, Math.min(4, availableParallelism() - 1));
/** Questions that may wait for a free worker; more are turned away. */
const QUEUE = 50;
const MEMORY_MB = 256;
const START_TIMEOUT_MS = 60_000;

const idle: Worker[] = [];
const alive = new Set<Worker>();
const queue: Waiting[] = [];
let busy = 0;
let lastId = 0;

/**
 * Run one derivation in a worker thread, so that a long one holds up nobody else.
 *
 * @param name - of the table in `workers/tasks.ts`
 * @throws {DomainError} what the derivation refused; `too-large` when it took too long or too much memory
 * @throws {HttpError} 503 when too many are waiting
 */
export function runInWorker<N extends keyof Tasks>(
  name: N,
  input: Parameters<Tasks[N]>[0],
  options: WorkerOptions = {},
): Promise<Awaited<ReturnType<Tasks[N]>>> {
  if (queue.length >= QUEUE)
    throw new HttpError(503, 'Too many derivations are waiting just now', { headers: { 'retry-after': '2' } });
  return new Promise((resolve, reject) => {
    queue.push({
      question: { id: ++lastId, name, input },
      options,
      resolve: resolve as (value: unknown) => void,
      reject,
    });
    next();
  });
}

/** End all workers. The next question starts new ones. */
export async function closeWorkers(): Promise<void> {
  for (const { reject } of queue.splice(0)) reject(new Error('the program stops'));
  idle.length = 0;
  const ending = [...alive];
  alive.clear();
  await Promise.all(ending.map((worker) => worker.terminate()));
}

function next(): void {
  if (busy >= SIZE) return;
  const waiting = queue.shift();
  if (!waiting) return;
  if (waiting.options.signal?.aborted) {
    waiting.reject(waiting.options.signal.reason);
    next();
    return;
  }
  busy++;
  void serve(waiting).finally(() => {
    busy--;
    next();
  });
}

async function serve(waiting: Waiting): Promise<void> {
  try {
    const worker = idle.pop() ?? (await startWorker());
    if (await ask(worker, waiting)) idle.push(worker);
    else alive.delete(worker);
  } catch (error) {
    waiting.reject(error);
  }
}

/** Put one question to a worker. Returns whether it can be asked again. */
function ask(worker: Worker, { question, options, resolve, reject }: Waiting): Promise<boolean> {
  const { timeoutMs = 10_000, signal, field = question.name } = options;
  // Whoever asked may have gone while the worker started: an abort that is past tells nobody.
  if (signal?.aborted) {
    reject(signal.reason);
    return Promise.resolve(true);
  }
  return new Promise((done) => {
    const end = (usable: boolean) => {
      clearTimeout(timer);
      signal?.removeEventListener('abort', onAbort);
      worker.off('message', onAnswer).off('error', onError).off('exit', onExit);
      worker.unref();
      if (usable) return done(true);
      // A thread that computes hears nothing: only ending it stops it.
      worker.on('error', () => undefined);
      void worker.terminate().then(() => done(false));
    };
    const refuse = (error: unknown) => {
      reject(error);
      end(false);
    };
    const tooLarge = (message: string) => refuse(new DomainError('too-large', message, field));
    const onAbort = () => refuse(signal?.reason);
    const onExit = () => refuse(new Error('a worker ended before it answered'));
    const onError = (error: NodeJS.ErrnoException) => {
      if (error.code === 'ERR_WORKER_OUT_OF_MEMORY') tooLarge('this takes more memory than a derivation may have');
      else refuse(error);
    };
    const onAnswer = (answer: Answer) => {
      if ('value' in answer) resolve(answer.value);
      else reject('domain' in answer ? domainError(answer.domain) : new Error(answer.failure));
      end(true);
    };
    const timer = setTimeout(() => tooLarge(`this gave no result within ${timeoutMs / 1000} s`), timeoutMs);
    signal?.addEventListener('abort', onAbort, { once: true });
    worker.on('message', onAnswer).on('error', onError).on('exit', onExit);
    worker.ref();
    worker.postMessage(question);
  });
}

const domainError = ({
  code,
  message,
  field,
  position,
}: Pick<DomainError, 'code' | 'message' | 'field' | 'position'>) => new DomainError(code, message, field, position);

/**
 * Start a worker and wait until it listens, so that its loading counts against nobody's time. `ZAFFRE_WORKERS` names
 * the folder of the built workers; without it the source is bundled on the spot.
 */
async function startWorker(): Promise<Worker> {
  const options = { resourceLimits: { maxOldGenerationSizeMb: MEMORY_MB }, execArgv: [] };
  const built = process.env.ZAFFRE_WORKERS;
  const worker = built
    ? new Worker(join(built, 'derive.mjs'), options)
    : new Worker(await bundleSource(), { ...options, eval: true });
  alive.add(worker);
  try {
    await once(worker, 'message', { signal: AbortSignal.timeout(START_TIMEOUT_MS) });
  } catch (error) {
    alive.delete(worker);
    void worker.terminate();
    throw error;
  }
  return worker;
}

async function bundleSource(): Promise<string> {
  const { build } = await import('esbuild');
  const { outputFiles } = await build({
    entryPoints: [join(process.cwd(), 'src/server/workers/derive.ts')],
    bundle: true,
    platform: 'node',
    format: 'cjs',
    write: false,
  });
  return outputFiles[0]!.text;
}
