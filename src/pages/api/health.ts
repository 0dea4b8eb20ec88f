import { sql } from 'drizzle-orm';
import { routes } from '#src/contracts/routes.ts';
import { database } from '#src/server/database.ts';
import { Answer, endpoint } from '#src/server/endpoint.ts';
import { store } from '#src/server/store.ts';

const works = (check: Promise<unknown>) =>
  check.then(
    () => 'ok',
    () => 'unavailable',
  );

export const GET = endpoint(routes.health, {
  act: async ({ asker }) => {
    const [databaseState, storeState] = await Promise.all([
      works(database().then(({ db }) => db.run(sql`select 1`))),
      works(
        store()
          .head('health')
          .catch((error: unknown) => {
            // An absent key is an answer; only a store that cannot be asked is a fault.
            if ((error as { name?: string }).name !== 'NoSuchKey' && (error as { name?: string }).name !== 'NotFound')
              throw error;
          }),
      ),
    ]);
    const ok = databaseState === 'ok' && storeState === 'ok';
    const parts = asker?.steward ? { database: databaseState, store: storeState } : undefined;
    return new Answer({ status: ok ? 'ok' : 'unavailable', ...(parts ? { parts } : {}) }, { status: ok ? 200 : 503 });
  },
});
