import { readdir } from 'node:fs/promises';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { ROOT, readOptions, run } from './lib/command.ts';

/** One line of the table: each file of `scripts/bench/` exports its own, or a list of them, as default. */
export interface BenchRow {
  name: string;
  /** Time of ours and of what it is held against, in milliseconds; ratio = baseline / ours, above 1 where ours is faster. */
  run(): Promise<BenchResult> | BenchResult;
}

export interface BenchResult {
  ours: number;
  baseline: number;
  ratio: number;
}

run(async () => {
  readOptions('bench --', {});
  const folder = join(ROOT, 'scripts', 'bench');
  const files = (await readdir(folder).catch(() => [])).filter((file) => file.endsWith('.ts')).sort();
  console.log('| what | ours / ms | baseline / ms | baseline ÷ ours |\n| --- | ---: | ---: | ---: |');
  for (const file of files) {
    const { default: own } = (await import(pathToFileURL(join(folder, file)).href)) as {
      default: BenchRow | BenchRow[];
    };
    for (const row of [own].flat()) {
      const { ours, baseline, ratio } = await row.run();
      console.log(`| ${row.name} | ${ours.toFixed(2)} | ${baseline.toFixed(2)} | ${ratio.toFixed(2)} |`);
    }
  }
});
