import { existsSync } from 'node:fs';
import { dirname, join, resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { parseArgs } from 'node:util';

// Node built-ins only: this is read before the packages are installed.

/** The folder of the program. */
export const ROOT = resolve(dirname(fileURLToPath(import.meta.url)), '..', '..');

/** What a person has to mend; shown as it stands, without a trace. */
export class UsageError extends Error {
  name = 'UsageError';
}

/**
 * Read the command line; an option that is not known is one sentence.
 *
 * @template {import('node:util').ParseArgsConfig['options']} O
 * @param {string} command - as in `npm run <command>`, for the sentence
 * @param {O} options - as for `parseArgs`
 * @param {string[]} [args]
 * @throws {UsageError} for what is not among the options
 */
export function parseOptions(command, options, args = process.argv.slice(2)) {
  try {
    return parseArgs({ args, options: options ?? {}, allowPositionals: false, strict: true }).values;
  } catch (error) {
    const known = Object.entries(options ?? {}).map(([name, { type }]) =>
      type === 'string' ? `--${name} …` : `--${name}`,
    );
    const found = args.find((arg) => arg.startsWith('-') && !known.some((k) => k.split(' ')[0] === arg.split('=')[0]));
    const what = found
      ? `there is no option ${found.split('=')[0]}`
      : String(error instanceof Error ? error.message : error);
    throw new UsageError(`npm ${command.replace(/ --$/, '')}: ${what}. The options are ${known.join(', ')}.`);
  }
}

/**
 * Take settings from a file `.env` beside package.json, or another one named by ZAFFRE_ENV_FILE (empty for none). What
 * the environment says already stands.
 */
export function loadEnvironmentFile() {
  const name = process.env.ZAFFRE_ENV_FILE ?? '.env';
  const file = join(ROOT, name);
  if (name && existsSync(file)) process.loadEnvFile(file);
}

/**
 * A path typed on the command line is meant from where the person stands; npm runs scripts from the program's folder.
 *
 * @param {string} path
 */
export const fromCaller = (path) => resolve(process.env.INIT_CWD ?? process.cwd(), path);

/**
 * Set the data folder of this process: `--data`, else ZAFFRE_DATA, else `data` beside package.json.
 *
 * @param {string | undefined} option
 * @returns {string} its absolute path
 */
export function chooseDataFolder(option) {
  const folder = option ? fromCaller(option) : resolve(ROOT, process.env.ZAFFRE_DATA || 'data');
  process.env.ZAFFRE_DATA = folder;
  return folder;
}

/**
 * Show an error as a person can use it and end with 1.
 *
 * @param {unknown} error
 * @returns {never}
 */
export function giveUp(error) {
  const plain = error instanceof Error && ['UsageError', 'SettingsError'].includes(error.name);
  console.error(plain ? error.message : error);
  process.exit(1);
}
