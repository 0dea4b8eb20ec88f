import { flushAccessLog } from './access-log.ts';
import { closeDatabase, database } from './database.ts';
import { startHousekeeping } from './housekeeping/loop.ts';
import { jobHandlers } from './job-handlers.ts';
import { type JobLoop, startJobLoop } from './jobs.ts';
import { log } from './log.ts';
import { type MailTransport, openTransport, sendDueMail } from './mail.ts';
import { settings } from './settings.ts';
import { closeWorkers } from './worker-pool.ts';

/** Where the serving script, which lies outside the built program, finds what it must stop. */
const RUNNING = Symbol.for('zaffre.background');
const MAIL_POLL_MS = 1_000;

interface Background {
  stop(): Promise<void>;
}
type Holder = { [RUNNING]?: Background };

/** Start what runs beside the requests, the job loop, the sending of mail and the housekeeping, once a process. */
export function startBackground(): void {
  const holder = globalThis as Holder;
  if (holder[RUNNING]) return;
  const started = open();
  started.catch((error: unknown) => log.error({ error: String(error) }, 'the background work did not start'));
  holder[RUNNING] = { stop: async () => (await started.catch(() => undefined))?.stop() };
}

/** End it: no new job or mail is taken, those in hand finish or go back into their queue. */
export async function stopBackground(): Promise<void> {
  await (globalThis as Holder)[RUNNING]?.stop();
  delete (globalThis as Holder)[RUNNING];
}

async function open(): Promise<Background> {
  const transport = await openTransport(settings());
  const jobs: JobLoop = startJobLoop(await database(), { handlers: jobHandlers });
  const mail = startMailLoop(transport.send);
  const housekeeping = startHousekeeping(await database());
  return {
    async stop() {
      await Promise.all([jobs.stop(), mail.stop(), housekeeping.stop()]);
      await Promise.all([transport.close(), closeWorkers(), flushAccessLog()]);
      await closeDatabase();
    },
  };
}

function startMailLoop(send: MailTransport): Background {
  let stopped = false;
  let timer: NodeJS.Timeout;
  let sending: Promise<unknown> = Promise.resolve();
  const next = () => {
    if (stopped) return;
    timer = setTimeout(() => {
      sending = database()
        .then((db) => sendDueMail(db, send))
        .catch((error: unknown) => log.error({ error: String(error) }, 'the mail queue could not be read'))
        .finally(next);
    }, MAIL_POLL_MS);
  };
  next();
  return {
    async stop() {
      stopped = true;
      clearTimeout(timer);
      await sending;
    },
  };
}
