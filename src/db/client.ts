import { type Client, createClient } from '@libsql/client';
import { drizzle, type LibSQLDatabase } from 'drizzle-orm/libsql';
import * as schema from './schema/index.ts';

export type Db = LibSQLDatabase<typeof schema>;
/** Inside a write: the same queries, in one transaction. */
export type Tx = Parameters<Parameters<Db['transaction']>[0]>[0];

export interface Database {
  /** For reading. Reads see the last committed state and never wait. */
  readonly db: Db;
  readonly client: Client;
  /**
   * Run `work` in one transaction. Writes queue one behind another, since SQLite lets only one through at a time and
   * the file driver would otherwise block the whole process while it waits. Never call `write` inside `work`.
   */
  write<T>(work: (tx: Tx) => Promise<T>): Promise<T>;
  close(): void;
}

/**
 * Open a database file (`file:…`) or a libSQL server (`http://…`, `libsql://…`).
 *
 * A file is put into write-ahead mode: in the default journal an open transaction plus one read on another
 * connection makes the commit fail for good.
 */
export async function openDatabase(url: string, authToken?: string): Promise<Database> {
  const file = url.startsWith('file:');
  // The timeout serves a second process (a script beside the server); within one process the queue does.
  const client = createClient({ url, ...(authToken ? { authToken } : {}), ...(file ? { timeout: 400 } : {}) });
  if (file) {
    await client.execute('PRAGMA journal_mode = WAL');
  }
  const db = drizzle(client, { schema, casing: 'snake_case' });

  let queue: Promise<unknown> = Promise.resolve();
  const write = <T>(work: (tx: Tx) => Promise<T>): Promise<T> => {
    const run = () => db.transaction(work);
    const result = queue.then(run, run);
    queue = result.catch(() => undefined);
    return result;
  };
  return { db, client, write, close: () => client.close() };
}

/** Whether an error is the database refusing a second row of one key. File and server name it differently. */
export function isUniqueViolation(error: unknown): boolean {
  for (let e: unknown = error; e instanceof Error; e = e.cause) {
    const { code } = e as { code?: unknown };
    if (
      typeof code === 'string' &&
      code.startsWith('SQLITE_CONSTRAINT') &&
      /UNIQUE|PRIMARY/i.test(`${code} ${e.message}`)
    )
      return true;
  }
  return false;
}
