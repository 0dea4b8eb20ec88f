import { join } from 'node:path';
import { pathToFileURL } from 'node:url';
import { migrate } from 'drizzle-orm/libsql/migrator';
import type { Database } from '#src/db/client.ts';
import { makeDataFolder, ROOT, readOptions, run } from './lib/command.ts';

/** Bring a database to the schema of this release. One that is there already stays as it is. */
export async function migrateDatabase({ db }: Pick<Database, 'db'>): Promise<void> {
  await migrate(db, { migrationsFolder: join(ROOT, 'src', 'db', 'migrations') });
}

if (import.meta.url === pathToFileURL(process.argv[1] ?? '').href)
  run(async () => {
    readOptions('db:migrate', {});
    makeDataFolder();
    const { database, closeDatabase } = await import('#src/server/database.ts');
    await migrateDatabase(await database());
    await closeDatabase();
    console.log('The database has the schema of this release.');
  });
