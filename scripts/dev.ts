import { spawn } from 'node:child_process';
import { join } from 'node:path';
import { readSettings } from '#src/server/settings.ts';
import { ROOT, readOptions, run, UsageError } from './lib/command.ts';
import { lockDataFolder } from './lib/data-lock.ts';
import { prepareDatabase } from './lib/demo-data.ts';
import { freePort } from './lib/ports.mjs';

// The program from its sources, with reloading, on this machine only, with the local stand-ins for mail and files.
run(async () => {
  const { port = process.env.PORT || '4321' } = readOptions('dev --', { port: { type: 'string' } });
  if (!/^\d+$/.test(port)) throw new UsageError(`"${port}" is no port; give a number from 0 to 65535.`);
  const host = '127.0.0.1';
  const free = String(await freePort(host, Number(port)));
  Object.assign(process.env, { HOST: host, PORT: free, ZAFFRE_MODE: 'demo', ZAFFRE_SERVE: '1' });
  const settings = readSettings(process.env);
  process.once('exit', lockDataFolder(settings.dataFolder));
  await prepareDatabase(settings, true);
  const astro = join(ROOT, 'node_modules', 'astro', 'astro.js');
  const child = spawn(process.execPath, [astro, 'dev', '--host', host, '--port', free], {
    cwd: ROOT,
    stdio: 'inherit',
  });
  for (const signal of ['SIGINT', 'SIGTERM'] as const) process.on(signal, () => child.kill(signal));
  child.on('exit', (code) => process.exit(code ?? 0));
});
