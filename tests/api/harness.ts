import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { APIContext, APIRoute, MiddlewareHandler } from 'astro';

const ORIGIN = 'http://localhost:4321';
type Endpoint = Partial<Record<string, APIRoute>>;

/** Files of src/pages/api by the pattern they serve. */
const files = import.meta.glob<Endpoint>('/src/pages/api/**/*.ts');
const served = Object.entries(files)
  .map(([file, load]) => {
    const path = file
      .replace('/src/pages', '')
      .replace(/\.ts$/, '')
      .replace(/\/index$/, '');
    const names = [...path.matchAll(/\[(\w+)\]/g)].map((match) => match[1]!);
    const pattern = new RegExp(`^${path.replaceAll('.', '\\.').replace(/\[\w+\]/g, '([^/]+)')}$`);
    return { file, path, load, names, pattern };
  })
  // A fixed name wins over a parameter, as in the router.
  .sort((a, b) => a.names.length - b.names.length);

export const servedFiles = served.map(({ file, path }) => ({ file, path: path.replace(/\[(\w+)\]/g, '{$1}') }));

/** A folder of its own with a migrated, empty database; call before anything of the server is imported. */
export async function openRegistry(
  folder = mkdtempSync(join(tmpdir(), 'zaffre-api-')),
): Promise<{ folder: string; close: (options?: { keep: boolean }) => Promise<void> }> {
  Object.assign(process.env, {
    ZAFFRE_MODE: 'demo',
    ZAFFRE_DATA: folder,
    PUBLIC_ORIGIN: ORIGIN,
    AUTH_SECRET: 'a secret for the tests alone, long enough',
    LOG_LEVEL: 'silent',
  });
  const { closeDatabase, database } = await import('#src/server/database.ts');
  const { migrateDatabase } = await import('../../scripts/migrate.ts');
  await migrateDatabase(await database());
  return {
    folder,
    close: async ({ keep } = { keep: false }) => {
      await closeDatabase();
      if (!keep) rmSync(folder, { recursive: true, force: true });
    },
  };
}

export interface Call {
  /** An access token. */
  as?: string | undefined;
  /** An account's id: sends the cookie of a session of it, from one of our own pages. */
  session?: string | undefined;
  json?: unknown;
  /** A body as it stands, sent as JSON though it may be none. */
  raw?: string;
  form?: FormData;
  headers?: Record<string, string>;
}

const SESSION_COOKIE = 'authjs.session-token';

/** A session of an account, as a sign-in begins one. */
export async function sessionOf(accountId: string, { secondFactor = false } = {}): Promise<string> {
  const { database } = await import('#src/server/database.ts');
  const { beginSession } = await import('#src/server/sessions.ts');
  const facts = { accountId, secondFactor, userAgent: 'tests', address: null };
  return (await database()).write((tx) => beginSession(tx, facts));
}

/** What a browser sends that is signed in: the encrypted cookie that sign-in gives, and the origin of our pages. */
export async function sessionHeaders(accountId: string, sessionId?: string): Promise<Record<string, string>> {
  const { encode } = await import('@auth/core/jwt');
  const token = { sub: accountId, sid: sessionId ?? (await sessionOf(accountId)) };
  const cookie = await encode({ token, secret: process.env.AUTH_SECRET!, salt: SESSION_COOKIE, maxAge: 3600 });
  return { cookie: `${SESSION_COOKIE}=${cookie}`, origin: ORIGIN };
}

/** Send one request through the middleware to its endpoint, as the server would, and get the real answer. */
export async function call(
  method: string,
  path: string,
  { as, session, json, raw, form, headers = {} }: Call = {},
): Promise<Response> {
  const url = new URL(path, ORIGIN);
  const request = new Request(url, {
    method,
    headers: {
      ...(json === undefined && raw === undefined ? {} : { 'content-type': 'application/json' }),
      ...(as ? { authorization: `Bearer ${as}` } : {}),
      ...(session ? await sessionHeaders(session) : {}),
      ...headers,
    },
    body: form ?? raw ?? (json === undefined ? null : JSON.stringify(json)),
  });
  const context = {
    request,
    url,
    params: {},
    locals: {},
    clientAddress: '127.0.0.1',
    cookies: { get: () => undefined, set: () => {}, delete: () => {}, has: () => false },
  } as unknown as APIContext;
  const { onRequest } = (await import('#src/middleware.ts')) as { onRequest: MiddlewareHandler };
  const answer = await onRequest(context, async () => {
    const found = served.find(({ pattern }) => pattern.test(url.pathname));
    const handler = found && (await found.load())[method];
    if (!found || !handler) return new Response(null, { status: 404 });
    const values = found.pattern.exec(url.pathname)!.slice(1).map(decodeURIComponent);
    context.params = Object.fromEntries(found.names.map((name, i) => [name, values[i]]));
    return handler(context);
  });
  return answer as Response;
}

/** The JSON of an answer; fails with what the server said when the status is another one. */
export async function json<T = Record<string, unknown>>(
  response: Response | Promise<Response>,
  status = 200,
): Promise<T> {
  const answer = await response;
  const text = await answer.text();
  if (answer.status !== status) throw new Error(`expected ${status}, got ${answer.status}: ${text}`);
  return JSON.parse(text) as T;
}
