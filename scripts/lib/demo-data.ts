import { rm } from 'node:fs/promises';
import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { eq, sql } from 'drizzle-orm';
import { type Database, openDatabase } from '#src/db/client.ts';
import { accounts, complexes, registrySettings } from '#src/db/schema/index.ts';
import type { Settings } from '#src/server/settings.ts';
import { type ObjectStore, openStore } from '#src/server/store.ts';
import { migrateDatabase } from '../migrate.ts';
import { ROOT, UsageError } from './options.mjs';

/** Where the registry notes how far the demo data got: `loading`, then `loaded`. */
const MARK = 'demo';

/** Fills an empty registry. Lies in scripts/demo.ts. */
export type LoadDemo = (database: Database, store: ObjectStore) => Promise<void>;

/**
 * Bring the database to this release and, where asked for, put the demo data into a registry that is empty. A load
 * that was broken off is cleared away first: nothing else can be in a registry that never came up.
 *
 * @returns whether the registry holds the demo data
 * @throws {UsageError} when a broken-off load lies in a database that is not a file of ours
 */
export async function prepareDatabase(
  settings: Settings,
  demo: boolean,
  loadDemo: LoadDemo = loadDemoScript,
): Promise<boolean> {
  let database = await openDatabase(settings.databaseUrl, settings.databaseAuthToken);
  try {
    await migrateDatabase(database);
    if ((await readMark(database)) === 'loading') {
      database.close();
      await clearAway(settings);
      database = await openDatabase(settings.databaseUrl, settings.databaseAuthToken);
      await migrateDatabase(database);
    }
    if (demo && (await isEmpty(database))) await load(database, settings, loadDemo);
    return (await readMark(database)) === 'loaded';
  } finally {
    database.close();
  }
}

/** Whether a load of the demo data was broken off here. */
export const isHalfLoaded = async (database: Pick<Database, 'db'>) => (await readMark(database)) === 'loading';

async function load(database: Database, settings: Settings, loadDemo: LoadDemo): Promise<void> {
  await writeMark(database, 'loading');
  const store = openStore(settings);
  try {
    await loadDemo(database, store);
  } finally {
    store.close();
  }
  await writeMark(database, 'loaded');
}

const loadDemoScript: LoadDemo = async (database, store) => {
  const script = pathToFileURL(join(ROOT, 'scripts', 'demo.ts')).href;
  const { loadDemo } = (await import(script)) as { loadDemo: LoadDemo };
  await loadDemo(database, store);
};

async function isEmpty({ db }: Database): Promise<boolean> {
  const count = sql<number>`count(*)`;
  const [people] = await db.select({ count }).from(accounts);
  const [records] = await db.select({ count }).from(complexes);
  return people?.count === 0 && records?.count === 0;
}

async function readMark({ db }: Pick<Database, 'db'>): Promise<string | undefined> {
  const [row] = await db.select().from(registrySettings).where(eq(registrySettings.key, MARK));
  return row?.value;
}

const writeMark = ({ write }: Database, value: string) =>
  write((tx) =>
    tx
      .insert(registrySettings)
      .values({ key: MARK, value })
      .onConflictDoUpdate({ target: registrySettings.key, set: { value } }),
  );

async function clearAway({ databaseUrl, dataFolder, s3 }: Settings): Promise<void> {
  const file = join(dataFolder, 'zaffre.db');
  if (databaseUrl !== `file:${file}` || s3)
    throw new UsageError(
      'Loading the demo data was broken off; empty the database and the object store, then start again.',
    );
  for (const suffix of ['', '-wal', '-shm']) await rm(`${file}${suffix}`, { force: true });
  await rm(join(dataFolder, 'store'), { recursive: true, force: true });
}
