import { readdir } from 'node:fs/promises';
import { join } from 'node:path';
import { build } from 'esbuild';
import { ROOT, readOptions, run } from './lib/command.ts';

// A worker is started by a path, which the site's own bundler does not follow: each is bundled to a file of its own.
// Run after `astro build`, which empties dist.
run(async () => {
  readOptions('build', {});
  const folder = join(ROOT, 'src', 'server', 'workers');
  const names = (await readdir(folder)).filter((name) => name.endsWith('.ts') && name !== 'tasks.ts');
  await build({
    entryPoints: names.map((name) => join(folder, name)),
    outdir: join(ROOT, 'dist', 'workers'),
    outExtension: { '.js': '.mjs' },
    bundle: true,
    platform: 'node',
    target: 'node20',
    format: 'esm',
    logLevel: 'warning',
    absWorkingDir: ROOT,
  });
});
