import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach } from 'vitest';
import { type Database, openDatabase } from '#src/db/client.ts';
import { migrateDatabase } from '../../../scripts/migrate.ts';

const undo: (() => Promise<void>)[] = [];

afterEach(async () => {
  for (const step of undo.splice(0)) await step();
});

/** A migrated database in a folder of its own, removed after the test. */
export async function freshDatabase(): Promise<Database> {
  const folder = await mkdtemp(join(tmpdir(), 'zaffre-db-'));
  const database = await openDatabase(`file:${join(folder, 'zaffre.db')}`);
  await migrateDatabase(database);
  undo.push(async () => {
    database.close();
    await rm(folder, { recursive: true, force: true });
  });
  return database;
}
