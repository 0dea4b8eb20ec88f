import { and, eq, gt, sql } from 'drizzle-orm';
import { mails } from '#src/db/schema/index.ts';
import { database } from './database.ts';
import { store } from './store.ts';

type Part = 'ok' | 'unavailable';

const works = (check: Promise<unknown>): Promise<Part> =>
  check.then(
    (answer) => (answer === false ? 'unavailable' : 'ok'),
    () => 'unavailable',
  );

/** Whether database and store answer, and whether mail goes out (none waits after a failed attempt). */
export async function healthParts(): Promise<{ database: Part; store: Part; mail: Part }> {
  const [databaseState, storeState, mail] = await Promise.all([
    works(database().then(({ db }) => db.run(sql`select 1`))),
    works(store().ready()),
    works(mailGoesOut()),
  ]);
  return { database: databaseState, store: storeState, mail };
}

async function mailGoesOut(): Promise<boolean> {
  const { db } = await database();
  const waiting = and(eq(mails.state, 'queued'), gt(mails.tries, 0), sql`${mails.error} is not null`);
  return (await db.select({ id: mails.id }).from(mails).where(waiting).limit(1)).length === 0;
}
