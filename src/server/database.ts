import { type Database, openDatabase } from '../db/client.ts';
import { settings } from './settings.ts';

let opened: Promise<Database> | undefined;

/** The database of this process, opened at first use. A failed opening is tried again at the next call. */
export function database(): Promise<Database> {
  const { databaseUrl, databaseAuthToken } = settings();
  opened ??= openDatabase(databaseUrl, databaseAuthToken).catch((error: unknown) => {
    opened = undefined;
    throw error;
  });
  return opened;
}

/** Close it, at the end of a process or of a test file. */
export async function closeDatabase(): Promise<void> {
  const last = opened;
  opened = undefined;
  (await last)?.close();
}
