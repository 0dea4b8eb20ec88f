import type { Database } from '#src/db/client.ts';
import { forgetOldFiles } from '../bundles/forget.ts';
import { log } from '../log.ts';
import { tokenExpiryMails } from '../oversight/token-expiry.ts';
import { cleanUp } from './clean-up.ts';
import { tellEnded, tellEndsSoon } from './ends.ts';
import { tellLapsed } from './lapses.ts';
import { takeTurn } from './lease.ts';

/** How often there is a turn, in milliseconds. */
const EVERY_MS = 3600 * 1000;
/** How often a process looks whether it may take the turn, in milliseconds; the first time it does so at once. */
const LOOK_MS = 5 * 60 * 1000;

/** What is done every hour. One step that fails does not keep the others from being done. */
const STEPS: Record<string, (database: Database) => Promise<unknown>> = {
  ended: (database) => tellEnded(database),
  'ends soon': (database) => tellEndsSoon(database),
  lapsed: (database) => tellLapsed(database),
  'tokens end': () => tokenExpiryMails(),
  'clean-up': (database) => cleanUp(database),
  'bundle files': () => forgetOldFiles(),
};

/** One turn at all of it. Doing it twice, or in two processes at once, comes to the same. */
export async function housekeep(database: Database): Promise<void> {
  for (const [step, work] of Object.entries(STEPS))
    await work(database).catch((error: unknown) =>
      log.error({ step, error: String(error) }, 'a step of the housekeeping failed'),
    );
}

/** Keep house in this process until stopped, in turns with the other processes on the same database. */
export function startHousekeeping(database: Database, work = housekeep): { stop(): Promise<void> } {
  let stopped = false;
  let timer: NodeJS.Timeout | undefined;
  let working: Promise<unknown> = Promise.resolve();
  const turn = async () => {
    if (await takeTurn(database, EVERY_MS)) await work(database);
  };
  const next = (delay: number) => {
    if (stopped) return;
    timer = setTimeout(() => {
      working = turn()
        .catch((error: unknown) => log.error({ error: String(error) }, 'the housekeeping could not begin'))
        .finally(() => next(LOOK_MS));
    }, delay);
  };
  next(0);
  return {
    async stop() {
      stopped = true;
      clearTimeout(timer);
      await working;
    },
  };
}
