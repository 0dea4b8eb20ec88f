import { randomBytes } from 'node:crypto';
import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join, resolve } from 'node:path';
import * as z from 'zod';

const flag = z
  .enum(['0', '1', 'false', 'true'])
  .default('0')
  .transform((value) => value === '1' || value === 'true');

/** The environment as it may be set; `.env.example` explains each line. */
const Environment = z.object({
  ZAFFRE_MODE: z.enum(['demo', 'production']).default('demo'),
  HOST: z.string().default('127.0.0.1'),
  PORT: z.coerce.number().int().min(0).max(65_535).default(4321),
  PUBLIC_ORIGIN: z.url().optional(),
  ZAFFRE_DATA: z.string().default('data'),
  DATABASE_URL: z.string().optional(),
  DATABASE_AUTH_TOKEN: z.string().optional(),
  AUTH_SECRET: z.string().min(32, 'AUTH_SECRET needs at least 32 characters').optional(),
  RESEND_API_KEY: z.string().optional(),
  RESEND_BASE_URL: z.url().optional(),
  MAIL_FROM: z.string().default('Zaffre <zaffre@localhost>'),
  S3_ENDPOINT: z.url().optional(),
  S3_REGION: z.string().default('auto'),
  S3_BUCKET: z.string().optional(),
  S3_ACCESS_KEY_ID: z.string().optional(),
  S3_SECRET_ACCESS_KEY: z.string().optional(),
  TRUST_PROXY: flag,
  ACCESSION_PREFIX: z
    .string()
    .regex(/^[A-Z]{1,4}$/, 'ACCESSION_PREFIX is one to four capital letters')
    .default('ZF'),
  LOG_LEVEL: z.enum(['silent', 'error', 'warn', 'info', 'debug']).default('info'),
  MAX_UPLOAD_BYTES: z.coerce.number().int().positive().default(50_000_000),
  RATE_LIMITS: z.enum(['default', 'off']).default('default'),
});

export interface Settings {
  mode: 'demo' | 'production';
  host: string;
  port: number;
  /** Scheme, host and port under which people reach the program, without a final slash. */
  publicOrigin: string;
  /** Absolute path of the folder that holds database, files and secret. */
  dataFolder: string;
  databaseUrl: string;
  databaseAuthToken: string | undefined;
  authSecret: string;
  mail: { apiKey: string | undefined; baseUrl: string | undefined; from: string };
  /** A real object store, or null for the folder in `dataFolder`. */
  s3: { endpoint: string; region: string; bucket: string; accessKeyId: string; secretAccessKey: string } | null;
  trustProxy: boolean;
  accessionPrefix: string;
  logLevel: string;
  /** Largest request body of an upload, in bytes. */
  maxUploadBytes: number;
  /** The limits of `limits/policy.ts`; off only where nobody else can ask. */
  rateLimits: 'default' | 'off';
}

/** The settings cannot be used; the message has one sentence a fault, each naming the variable. */
export class SettingsError extends Error {
  override readonly name = 'SettingsError';
}

const ORIGIN_EXAMPLE = 'https://zaffre.example';

const LOOPBACK = new Set(['localhost', '127.0.0.1', '[::1]', '::1']);

/** Whether a host name, without its port, is this machine only. */
export const isLoopback = (host: string): boolean => LOOPBACK.has(host);

/**
 * Read and judge the environment.
 *
 * @throws {SettingsError} naming every variable that is missing or wrong
 */
export function readSettings(environment: NodeJS.ProcessEnv): Settings {
  // An empty variable means "not set": that is how most process managers write it.
  const given = Object.fromEntries(Object.entries(environment).filter(([, value]) => value !== ''));
  const parsed = Environment.safeParse(given);
  if (!parsed.success)
    throw new SettingsError(parsed.error.issues.map((i) => `${i.path.join('.')}: ${i.message}`).join('\n'));
  const env = parsed.data;
  const givenOrigin = env.PUBLIC_ORIGIN ?? `http://localhost:${env.PORT}`;
  // As a browser writes it: without the port that its scheme has anyway, its host in small letters.
  const publicOrigin = new URL(givenOrigin).origin;
  const faults = [...originFaults(givenOrigin), ...modeFaults(env, publicOrigin), ...storeFaults(env)];
  if (faults.length > 0) throw new SettingsError(faults.join('\n'));

  const dataFolder = resolve(env.ZAFFRE_DATA);
  const { S3_ENDPOINT, S3_BUCKET, S3_ACCESS_KEY_ID, S3_SECRET_ACCESS_KEY } = env;
  return {
    mode: env.ZAFFRE_MODE,
    host: env.HOST,
    port: env.PORT,
    publicOrigin,
    dataFolder,
    databaseUrl: env.DATABASE_URL ?? `file:${join(dataFolder, 'zaffre.db')}`,
    databaseAuthToken: env.DATABASE_AUTH_TOKEN,
    authSecret: env.AUTH_SECRET ?? keptSecret(dataFolder),
    mail: { apiKey: env.RESEND_API_KEY, baseUrl: env.RESEND_BASE_URL, from: env.MAIL_FROM },
    s3:
      S3_ENDPOINT && S3_BUCKET && S3_ACCESS_KEY_ID && S3_SECRET_ACCESS_KEY
        ? {
            endpoint: S3_ENDPOINT,
            region: env.S3_REGION,
            bucket: S3_BUCKET,
            accessKeyId: S3_ACCESS_KEY_ID,
            secretAccessKey: S3_SECRET_ACCESS_KEY,
          }
        : null,
    trustProxy: env.TRUST_PROXY,
    accessionPrefix: env.ACCESSION_PREFIX,
    logLevel: env.LOG_LEVEL,
    maxUploadBytes: env.MAX_UPLOAD_BYTES,
    rateLimits: env.RATE_LIMITS,
  };
}

/** Every request's origin is compared with it, so that it must be one: with a path it would fit none. */
function originFaults(given: string): string[] {
  const { protocol, pathname, search, hash, username } = new URL(given);
  if (/^https?:$/.test(protocol) && `${pathname}${search}${hash}${username}` === '/') return [];
  return [`PUBLIC_ORIGIN: give scheme, host and port alone, such as ${ORIGIN_EXAMPLE}, not "${given}"`];
}

function modeFaults(env: z.infer<typeof Environment>, publicOrigin: string): string[] {
  if (env.ZAFFRE_MODE === 'demo') {
    const faults: string[] = [];
    // Demo accounts have published passwords and the outbox is open: never beyond this machine.
    if (!isLoopback(env.HOST)) faults.push(`HOST: demo mode listens on loopback only, not on "${env.HOST}"`);
    if (!isLoopback(new URL(publicOrigin).hostname))
      faults.push(`PUBLIC_ORIGIN: demo mode serves loopback only, not "${publicOrigin}"`);
    return faults;
  }
  const needed = ['PUBLIC_ORIGIN', 'AUTH_SECRET', 'RESEND_API_KEY'] as const;
  const faults = needed.filter((name) => env[name] === undefined).map((name) => `${name}: production mode needs it`);
  const { protocol, hostname } = new URL(publicOrigin);
  if (env.PUBLIC_ORIGIN && protocol !== 'https:' && !isLoopback(hostname))
    faults.push(`PUBLIC_ORIGIN: production mode is reached by https, such as ${ORIGIN_EXAMPLE}, not "${publicOrigin}"`);
  if (env.RATE_LIMITS === 'off') faults.push('RATE_LIMITS: production mode has no switch for its limits');
  return faults;
}

function storeFaults(env: z.infer<typeof Environment>): string[] {
  const names = ['S3_ENDPOINT', 'S3_BUCKET', 'S3_ACCESS_KEY_ID', 'S3_SECRET_ACCESS_KEY'] as const;
  const missing = names.filter((name) => env[name] === undefined);
  if (missing.length === 0 || missing.length === names.length) return [];
  return missing.map((name) => `${name}: an object store needs all of ${names.join(', ')}`);
}

/** The demo's secret is made once and kept, so that a restart signs nobody out. */
function keptSecret(dataFolder: string): string {
  const file = join(dataFolder, 'secret');
  if (!existsSync(file)) {
    mkdirSync(dataFolder, { recursive: true });
    writeFileSync(file, randomBytes(32).toString('base64url'), { mode: 0o600, flag: 'wx' });
  }
  return readFileSync(file, 'utf8');
}

let current: Settings | undefined;

/** The settings of this process, read once. */
export function settings(): Settings {
  current ??= readSettings(process.env);
  return current;
}
