import { existsSync, mkdirSync } from 'node:fs';
import { join } from 'node:path';
import { eq } from 'drizzle-orm';
import type { Database } from '#src/db/client.ts';
import { accounts } from '#src/db/schema/index.ts';
import { chooseDataFolder, giveUp, loadEnvironmentFile, parseOptions, UsageError } from './options.mjs';

export { ROOT, UsageError } from './options.mjs';

type Options = Record<string, { type: 'string' | 'boolean'; default?: string | boolean }>;
type Values<O extends Options> = { [K in keyof O]?: O[K]['type'] extends 'boolean' ? boolean : string };

/**
 * Read a script's options. Every script takes `--data DIR`, which is settled here, as is a file `.env`.
 *
 * @throws {UsageError} for what is not among the options
 */
export function readOptions<O extends Options>(command: string, options: O): Values<O> {
  const values = parseOptions(`run ${command}`, { ...options, data: { type: 'string' } }) as Values<O> & {
    data?: string;
  };
  loadEnvironmentFile();
  chooseDataFolder(values.data);
  return values;
}

/** Run a script's work; what fails is told on standard error and ends it with 1. */
export function run(work: () => Promise<void>): void {
  process.env.LOG_LEVEL ??= 'error';
  work().catch(giveUp);
}

/**
 * Refuse to make an empty database where a person meant one that is there. To be asked before the settings are read,
 * which would make the folder.
 *
 * @throws {UsageError} naming the folder
 */
export function requireDatabase(): void {
  const folder = process.env.ZAFFRE_DATA ?? '';
  if (!process.env.DATABASE_URL && !existsSync(join(folder, 'zaffre.db')))
    throw new UsageError(`There is no database in ${folder}; start the program once, or name its folder with --data.`);
}

/** Make the data folder where a script may be the first to use it. */
export function makeDataFolder(): void {
  mkdirSync(process.env.ZAFFRE_DATA ?? '', { recursive: true });
}

/** The account of an address, however it is capitalised. */
export async function accountOf({ db }: Pick<Database, 'db'>, email: string) {
  const [account] = await db.select().from(accounts).where(eq(accounts.email, email.trim().toLowerCase()));
  return account;
}
