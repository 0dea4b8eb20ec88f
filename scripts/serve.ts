import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { DEMO_ACCOUNTS, DEMO_PASSWORD } from '#src/server/demo-accounts.ts';
import { readSettings, type Settings } from '#src/server/settings.ts';
import { lockDataFolder } from './lib/data-lock.ts';
import { prepareDatabase } from './lib/demo-data.ts';
import { closeServer, createAppServer, type Handler, listen } from './lib/http-server.ts';
import { ROOT } from './lib/options.mjs';

/** How long requests in hand may take once the program was told to stop, in milliseconds. */
const GRACE_MS = 10_000;

/**
 * Serve the built program until a signal ends it. `HOST`, `PORT` and `ZAFFRE_DATA` are set by the caller.
 *
 * @throws {UsageError | SettingsError} for what a person has to mend
 */
export async function serve({ data, demo }: { data: string; demo: boolean }): Promise<void> {
  Object.assign(process.env, {
    NODE_ENV: 'production',
    ASTRO_NODE_AUTOSTART: 'disabled',
    AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED: 'true',
    ZAFFRE_SERVE: '1',
    ZAFFRE_WORKERS: join(ROOT, 'dist', 'workers'),
  });
  const unlock = lockDataFolder(data);
  process.once('exit', unlock);
  const settings = readSettings(process.env);
  const hasDemo = await prepareDatabase(settings, demo && settings.mode === 'demo');

  const entry = (await import(pathToFileURL(join(ROOT, 'dist', 'server', 'entry.mjs')).href)) as { handler: Handler };
  const server = createAppServer(entry.handler, {
    trustProxy: settings.trustProxy,
    https: settings.publicOrigin.startsWith('https:'),
  });
  // Before it listens: whoever sees it answer may end it.
  let stopping = false;
  const stop = (signal: string) => {
    if (stopping) process.exit(1);
    stopping = true;
    console.log(`${signal}: stopping.`);
    void shutDown(server).then((code) => process.exit(code));
  };
  process.on('SIGTERM', stop).on('SIGINT', stop);
  if (process.env.npm_lifecycle_event) followParent(stop);
  await listen(server, settings.host, settings.port);
  // The program loads with its first request; asking here starts its job loop and spares the first visitor the wait.
  await fetch(`http://${hostInUrl(settings.host)}:${settings.port}/api/health`).catch(() => undefined);
  greet(settings, hasDemo);
}

/**
 * End when `npm start` ends. npm hands a signal to the shell that it started us from, and that shell dies of it without
 * handing it on: the program would serve on, with nobody left who could stop it.
 */
function followParent(stop: (reason: string) => void): void {
  const parent = process.ppid;
  const watch = setInterval(() => {
    if (process.ppid === parent) return;
    clearInterval(watch);
    stop('npm start ended');
  }, 500);
  watch.unref();
}

/** An address that means every interface is reached at this machine's own. */
function hostInUrl(host: string): string {
  if (host === '0.0.0.0') return '127.0.0.1';
  if (host === '::') return '[::1]';
  return host.includes(':') ? `[${host}]` : host;
}

async function shutDown(server: ReturnType<typeof createAppServer>): Promise<number> {
  try {
    await closeServer(server, GRACE_MS);
    // Job loop and mail queue live inside the built program and are reached by a name that both sides know.
    const background = (globalThis as Record<symbol, { stop(): Promise<void> } | undefined>)[
      Symbol.for('zaffre.background')
    ];
    await background?.stop();
    return 0;
  } catch (error) {
    console.error(error);
    return 1;
  }
}

function greet({ publicOrigin, mode }: Settings, hasDemo: boolean): void {
  console.log(`Zaffre is ready on ${publicOrigin}`);
  if (mode === 'demo' && hasDemo) {
    console.log(`Demo accounts, password ${DEMO_PASSWORD}:`);
    for (const { email, part } of DEMO_ACCOUNTS) console.log(`  ${email.padEnd(26)} ${part}`);
  }
}
