import { ensureBuild } from './lib/build.mjs';
import { chooseDataFolder, giveUp, loadEnvironmentFile, parseOptions, ROOT, UsageError } from './lib/options.mjs';
import { ensurePackages, requireNode } from './lib/packages.mjs';
import { freePort } from './lib/ports.mjs';
import { aloneInCheckout } from './lib/work-lock.mjs';

// `npm start`. Node built-ins only up to the hand-over, since a fresh clone has no packages yet.

const say = (/** @type {string} */ line) => console.log(line);

try {
  requireNode();
  const options = parseOptions('start --', {
    port: { type: 'string' },
    host: { type: 'string' },
    data: { type: 'string' },
    'no-demo': { type: 'boolean' },
  });
  loadEnvironmentFile();
  const data = chooseDataFolder(options.data);
  const host = options.host || process.env.HOST || '127.0.0.1';
  const port = readPort(options.port || process.env.PORT || '4321');
  process.env.HOST = host;
  process.env.PORT = String(await freePort(host, port));

  process.chdir(ROOT);
  aloneInCheckout(say, () => {
    ensurePackages(say);
    ensureBuild(say);
  });

  const { register } = await import('tsx/esm/api');
  register();
  const { serve } = await import('./serve.ts');
  await serve({ data, demo: !options['no-demo'] });
} catch (error) {
  giveUp(error);
}

function readPort(/** @type {string} */ text) {
  const port = Number(text);
  if (/^\d+$/.test(text) && port <= 65_535) return port;
  throw new UsageError(`"${text}" is no port; give a number from 0 to 65535.`);
}
