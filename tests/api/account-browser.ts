import type { APIContext, MiddlewareHandler } from 'astro';
import { call } from './harness.ts';

const ORIGIN = 'http://localhost:4321';
const SESSION = 'authjs.session-token';

/** What a sign-in form may carry. */
interface Form {
  email: string;
  password: string;
  code?: string;
  passkey?: string;
}

/** A browser with its cookies, seen from one network address. */
export class TestBrowser {
  readonly cookies = new Map<string, string>();

  constructor(
    readonly address = '192.0.2.1',
    readonly userAgent = 'Mozilla/5.0 (X11; Linux x86_64; rv:140.0) Gecko/20100101 Firefox/140.0',
  ) {}

  get headers(): Record<string, string> {
    const cookie = [...this.cookies].map(([name, value]) => `${name}=${value}`).join('; ');
    return { origin: ORIGIN, 'user-agent': this.userAgent, ...(cookie ? { cookie } : {}) };
  }

  /** The encrypted cookie that holds the session, to be copied. */
  get session(): string | undefined {
    return this.cookies.get(SESSION);
  }

  /** A request to our API, from this browser. */
  call(method: string, path: string, json?: unknown, headers: Record<string, string> = {}): Promise<Response> {
    return call(method, path, { ...(json === undefined ? {} : { json }), headers: { ...this.headers, ...headers } });
  }

  /** The code with which the page is told of a refusal; null when signed in. */
  async signIn(form: Form, headers: Record<string, string> = {}): Promise<string | null> {
    const { url } = await this.#post('callback/credentials', { ...form, callbackUrl: '/' }, headers);
    const { searchParams } = new URL(url, ORIGIN);
    return searchParams.has('error') ? (searchParams.get('code') ?? searchParams.get('error')) : null;
  }

  async signOut(): Promise<void> {
    await this.#post('signout', { callbackUrl: '/' }, {});
  }

  async #post(action: string, fields: Record<string, string>, headers: Record<string, string>) {
    const { csrfToken } = (await (await this.#auth('GET', 'csrf')).json()) as { csrfToken: string };
    const body = new URLSearchParams({ ...fields, csrfToken }).toString();
    const sent = {
      'content-type': 'application/x-www-form-urlencoded',
      'content-length': String(body.length),
      'x-auth-return-redirect': '1',
      ...headers,
    };
    return (await this.#auth('POST', action, body, sent)).json() as Promise<{ url: string }>;
  }

  /** A request to the sign-in library, through the middleware. */
  async #auth(method: 'GET' | 'POST', action: string, body?: string, headers: Record<string, string> = {}) {
    const url = new URL(`/api/auth/${action}`, ORIGIN);
    const request = new Request(url, { method, headers: { ...this.headers, ...headers }, body: body ?? null });
    const set = (name: string, value: string) => (value ? this.cookies.set(name, value) : this.cookies.delete(name));
    const context = {
      request,
      url,
      params: {},
      locals: {},
      clientAddress: this.address,
      cookies: { get: () => undefined, set },
    } as unknown as APIContext;
    const { AstroAuth } = await import('auth-astro/server');
    const { onRequest } = (await import('#src/middleware.ts')) as { onRequest: MiddlewareHandler };
    const answer = (await onRequest(context, async () => {
      const library = AstroAuth() as Record<string, (context: APIContext) => Promise<Response>>;
      return library[method]!(context);
    })) as Response;
    for (const cookie of answer.headers.getSetCookie()) {
      const [, name, value] = /^([^=]+)=([^;]*)/.exec(cookie)!;
      set(name!, value!);
    }
    return answer;
  }
}

/** The token of the latest mail of a kind to an address, from its link. */
export async function tokenInMail(to: string, kind: string): Promise<string> {
  const [mail] = await mailsTo(to, kind);
  const token = /#(\S+)/.exec(mail?.text ?? '')?.[1];
  if (!token) throw new Error(`no link of kind ${kind} was mailed to ${to}`);
  return token;
}

/** Mails to an address, the latest first. */
export async function mailsTo(to: string, kind?: string) {
  const { database } = await import('#src/server/database.ts');
  const { mails } = await import('#src/db/schema/index.ts');
  const { and, desc, eq } = await import('drizzle-orm');
  const { db } = await database();
  const wanted = and(eq(mails.to, to), kind ? eq(mails.kind, kind) : undefined);
  return db.select().from(mails).where(wanted).orderBy(desc(mails.id));
}

/** Do the jobs that wait, as the loop of the served program would. */
export async function runJobs(): Promise<void> {
  const { database } = await import('#src/server/database.ts');
  const { jobHandlers } = await import('#src/server/job-handlers.ts');
  const { jobs } = await import('#src/db/schema/index.ts');
  const { eq } = await import('drizzle-orm');
  const { db, write } = await database();
  for (const job of await db.select().from(jobs).where(eq(jobs.state, 'queued'))) {
    const context = { id: job.id, progress: () => undefined, signal: new AbortController().signal };
    await jobHandlers[job.kind]!(job.payload, context);
    await write((tx) => tx.update(jobs).set({ state: 'done' }).where(eq(jobs.id, job.id)));
  }
}
