import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { InStatement } from '@libsql/client';
import type { APIContext } from 'astro';
import type { BenchRow } from '../bench.ts';

const COMPLEXES = 20_000;
const ROUNDS = 15;
const QUERY = '/api/complexes?metal=Co,Ru&geometry=OC-6&bandFrom=400&bandTo=700&minEpsilon=20&sort=formula&facets=1';

const median = (times: number[]) => times.sort((a, b) => a - b)[Math.floor(times.length / 2)]!;

async function timed(work: () => Promise<unknown>): Promise<number> {
  const start = performance.now();
  await work();
  return performance.now() - start;
}

/**
 * The table's request (filters, facets, sort, one page) through its endpoint, over 20 000 complexes, beside the SQL
 * statements that it sends, run bare on the same connection in the same process.
 */
const row: BenchRow = {
  name: `list of ${COMPLEXES.toLocaleString('en').replace(',', ' ')} complexes with filters and facets, beside its SQL alone`,
  async run() {
    const folder = mkdtempSync(join(tmpdir(), 'zaffre-bench-'));
    Object.assign(process.env, { ZAFFRE_DATA: folder, AUTH_SECRET: 'a secret for the benchmark alone, long enough' });
    const { closeDatabase, database } = await import('#src/server/database.ts');
    const { migrateDatabase } = await import('../migrate.ts');
    const { fillForMeasuring } = await import('../lib/synthetic-registry.ts');
    const { askerAgain } = await import('#src/server/access/asker.ts');
    const { GET } = await import('#src/pages/api/complexes/index.ts');
    try {
      const opened = await database();
      await migrateDatabase(opened);
      const { accountId } = await fillForMeasuring(opened, COMPLEXES);
      await opened.client.execute('ANALYZE');
      const asker = await askerAgain({ accountId });

      const url = new URL(QUERY, 'http://localhost');
      const ask = async () => {
        const context = {
          request: new Request(url),
          url,
          params: {},
          locals: { asker, requestId: 'bench' },
        } as unknown as APIContext;
        const response = await GET(context);
        const text = await response.text();
        if (response.status !== 200) throw new Error(text);
        return text;
      };

      const statements: InStatement[] = [];
      const { client } = opened;
      const execute = client.execute.bind(client);
      client.execute = (statement: InStatement) => {
        statements.push(statement);
        return execute(statement);
      };
      await ask();
      client.execute = execute;

      // In turns, so that a slow moment of the machine falls on both.
      const ours: number[] = [];
      const baseline: number[] = [];
      for (let round = 0; round < ROUNDS; round++) {
        ours.push(await timed(ask));
        baseline.push(
          await timed(async () => {
            for (const statement of statements) await execute(statement);
          }),
        );
      }
      return { ours: median(ours), baseline: median(baseline), ratio: median(baseline) / median(ours) };
    } finally {
      await closeDatabase();
      rmSync(folder, { recursive: true, force: true });
    }
  },
};

export default row;
