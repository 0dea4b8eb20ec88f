import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, afterEach, beforeAll, describe, expect, test } from 'vitest';
import { DomainError } from '#src/chem/errors.ts';
import { closeWorkers, runInWorker } from '#src/server/worker-pool.ts';

afterEach(closeWorkers);

// [MA4B2], octahedral: cis and trans, the textbook case.
const request = {
  geometry: 'OC-6',
  ligands: [
    { label: 'A', donors: 1, count: 4 },
    { label: 'B', donors: 1, count: 2 },
  ],
};

describe('the derivations, from source', () => {
  test('an answer and a refusal come back as if there were no thread', async () => {
    const { count } = await runInWorker('isomers', request);
    expect(count).toBe(2);
    const refused = runInWorker('isomers', { ...request, geometry: 'nonsense' });
    await expect(refused).rejects.toThrow(DomainError);
    await expect(refused).rejects.toMatchObject({ field: 'geometry' });
    const { entity } = await runInWorker('formula', { text: '[Co(NH3)6]Cl3' });
    expect(entity).toBe('[Co(NH3)6]3+');
    await expect(runInWorker('formula', { text: '[Co(NH3)6' })).rejects.toMatchObject({
      field: 'formula',
      position: 0,
    });
  });
});

describe('a worker that misbehaves', () => {
  let folder: string;

  beforeAll(async () => {
    folder = await mkdtemp(join(tmpdir(), 'zaffre-workers-'));
    const code = `import { parentPort } from 'node:worker_threads';
      parentPort.on('message', ({ id, input }) => {
        if (input.spin) for (;;);
        if (input.die) process.exit(3);
        if (input.eat) { const all = []; for (;;) all.push(Array.from({ length: 1e5 }, (_, i) => ({ i }))); }
        parentPort.postMessage({ id, value: input.echo });
      });
      parentPort.postMessage('ready');`;
    await writeFile(join(folder, 'derive.mjs'), code);
    process.env.ZAFFRE_WORKERS = folder;
  });

  afterAll(async () => {
    delete process.env.ZAFFRE_WORKERS;
    await rm(folder, { recursive: true, force: true });
  });

  const ask = (input: object, options = {}) => runInWorker('isomers', input as never, options) as Promise<unknown>;

  test('one that takes too long is ended and the next question answered', async () => {
    const late = ask({ spin: true }, { timeoutMs: 200, field: 'ligands' });
    await expect(late).rejects.toMatchObject({
      code: 'too-large',
      field: 'ligands',
      message: 'this gave no result within 0.2 s',
    });
    expect(await ask({ echo: 1 })).toBe(1);
  });

  test('one whose asker has gone is ended', async () => {
    const controller = new AbortController();
    const gone = ask({ spin: true }, { signal: controller.signal });
    setTimeout(() => controller.abort(new Error('left')), 100);
    await expect(gone).rejects.toThrow('left');
  });

  test('one that dies or eats all memory fails alone', async () => {
    await expect(ask({ die: true })).rejects.toThrow('ended before it answered');
    await expect(ask({ eat: true }, { timeoutMs: 30_000 })).rejects.toMatchObject({ code: 'too-large' });
    expect(await ask({ echo: 2 })).toBe(2);
  }, 40_000);

  test('many questions wait their turn; too many are turned away', async () => {
    const answers = Array.from({ length: 40 }, (_, echo) => ask({ echo }));
    expect(await Promise.all(answers)).toEqual(Array.from({ length: 40 }, (_, echo) => echo));
    const flood = Array.from({ length: 80 }, (_, echo) => Promise.resolve().then(() => ask({ echo })));
    const settled = await Promise.allSettled(flood);
    const refused = settled.filter((s) => s.status === 'rejected');
    expect(refused.length).toBeGreaterThan(0);
    expect(refused[0]!.reason).toMatchObject({ status: 503 });
  });
});
