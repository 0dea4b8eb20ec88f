import { defineMiddleware } from 'astro:middleware';
import { randomUUID } from 'node:crypto';
import { getSession } from 'auth-astro/server';
import { type Asker, askerOfSession, askerOfToken } from './server/access/asker.ts';
import { withCaller } from './server/accounts/caller.ts';
import { problem, tooLarge, toProblem } from './server/http.ts';
import { clientAddress } from './server/limits/client-address.ts';
import { log } from './server/log.ts';
import { servedMethods } from './server/served-methods.ts';
import { SESSION_COOKIE } from './server/session-cookie.ts';
import { isLoopback, settings } from './server/settings.ts';
import { startBackground } from './server/start.ts';
import { touchToken } from './server/tokens/last-used.ts';

if (process.env.ZAFFRE_SERVE === '1') startBackground();

/** Not signed in, not allowed, another host, too many: what an attack would meet. */
const REFUSED = new Set([401, 403, 421, 429]);
const UNSAFE = new Set(['POST', 'PUT', 'PATCH', 'DELETE']);

/** Origins under which this server may be asked: the public one, and in demo mode every name of this machine. */
function ownOrigin(url: URL): boolean {
  const { mode, publicOrigin } = settings();
  if (url.origin === publicOrigin) return true;
  const { protocol, port } = new URL(publicOrigin);
  return mode === 'demo' && isLoopback(url.hostname) && url.protocol === protocol && url.port === port;
}

/**
 * A write by cookie must come from our own pages: by its Origin, or by Sec-Fetch-Site where a browser leaves Origin
 * out. Neither is a refusal.
 */
function fromOwnPage(request: Request): boolean {
  const origin = request.headers.get('origin');
  if (origin !== null) return URL.canParse(origin) && ownOrigin(new URL(origin));
  return request.headers.get('sec-fetch-site') === 'same-origin';
}

async function askerOf(request: Request) {
  const authorization = request.headers.get('authorization');
  // Where cookie and bearer both come, the bearer counts, also when it is wrong.
  if (authorization !== null) {
    const token = /^Bearer\s+(\S+)$/i.exec(authorization)?.[1];
    const asker = token ? await askerOfToken(token) : null;
    if (asker?.tokenId) await touchToken(asker.tokenId);
    return asker;
  }
  if (!SESSION_COOKIE.test(request.headers.get('cookie') ?? '')) return null;
  const session = await getSession(request);
  return session?.sessionId ? askerOfSession(session.sessionId) : null;
}

const SECURITY_HEADERS = {
  'x-robots-tag': 'noindex, nofollow',
  'x-content-type-options': 'nosniff',
  'referrer-policy': 'same-origin',
  'cross-origin-opener-policy': 'same-origin',
  'permissions-policy': 'camera=(), geolocation=(), microphone=()',
};

/** What `default-src 'none'` keeps from ever running: an answer of the API opened as a page. */
const API_POLICY = "default-src 'none'; frame-ancestors 'none'; sandbox";

function withHeaders(answer: Response, isApi: boolean, requestId: string): Response {
  const response = new Response(answer.body, answer); // the headers of a redirect are immutable: copy first
  for (const [name, value] of Object.entries(SECURITY_HEADERS)) response.headers.set(name, value);
  response.headers.set('x-request-id', requestId);
  if (settings().publicOrigin.startsWith('https:'))
    response.headers.set('strict-transport-security', 'max-age=31536000; includeSubDomains');
  const policy = response.headers.get('content-security-policy');
  // A rewrite to the not-found page passes here twice.
  if (policy?.includes('frame-ancestors')) return response;
  if (policy)
    response.headers.set('content-security-policy', `${policy} style-src-attr 'unsafe-inline'; frame-ancestors 'none'`);
  else if (isApi) response.headers.set('content-security-policy', API_POLICY);
  else response.headers.set('x-frame-options', 'DENY');
  if (!response.headers.has('cache-control')) response.headers.set('cache-control', 'private, no-store');
  return response;
}

const AUTH = '/api/auth/';
const NO_ENDPOINT = 'There is no such endpoint or method; /api/openapi.json lists what is served';

/**
 * What the framework or the sign-in library itself refuses under /api (an unknown path, a method that is not served, a
 * form that cannot be read) is a problem, too.
 */
function asProblem(response: Response, path: string): Response {
  const { status, headers } = response;
  // JSON of our own stays: health that is bad is no problem but an answer.
  const ours = path.startsWith(AUTH) ? /^application\/problem\+json/ : /^application\/(?:problem\+)?json/;
  if (status < 400 || ours.test(headers.get('content-type') ?? '')) return response;
  const methods = servedMethods(path);
  if (methods.length > 0 && (status === 404 || status === 405))
    return problem(405, `Served here: ${methods.join(', ')}`, { headers: { allow: methods.join(', ') } });
  return problem(status, status === 404 || status === 405 ? NO_ENDPOINT : 'The request could not be served');
}

/** Of the sign-in library, what our pages use: it has pages of its own, too. */
const AUTH_ENDPOINT = /^(?:GET csrf|GET session|GET providers|GET signin|POST callback\/credentials|POST signout)$/;
/** A sign-in form is short; the library reads it whole, however long it is. */
const AUTH_LIMIT = 10_000;

/** Why a request to the sign-in library does not reach it, or null. */
function refuseAuth({ method, headers }: Request, path: string): Response | null {
  if (!AUTH_ENDPOINT.test(`${method === 'HEAD' ? 'GET' : method} ${path}`)) return problem(404, NO_ENDPOINT);
  if (method !== 'POST') return null;
  const length = headers.get('content-length');
  if (length === null) return problem(411, 'Send the length of the form', { title: 'Length required' });
  return Number(length) > AUTH_LIMIT ? toProblem(tooLarge(AUTH_LIMIT), '') : null;
}

/** What a sign-in is told of the request. */
function callerOf(address: string, asker: Asker | null) {
  return { address, session: asker?.sessionId ? { id: asker.sessionId, accountId: asker.accountId } : null };
}

export const onRequest = defineMiddleware(async (context, next) => {
  const { request, url, locals, cookies } = context;
  const started = performance.now();
  const requestId = randomUUID();
  const isApi = /^\/api(?:\/|$)/.test(url.pathname);
  locals.requestId = requestId;
  locals.asker = null as Asker | null;
  locals.theme = cookies.get('zaffre-theme')?.value === 'dark' ? 'dark' : 'light';

  const answer = async (): Promise<Response> => {
    if (!ownOrigin(url)) return problem(421, 'This host is not the one this registry is served under');
    try {
      locals.asker = await askerOf(request);
    } catch (error) {
      return toProblem(error, requestId);
    }
    const byCookie = !request.headers.has('authorization') && SESSION_COOKIE.test(request.headers.get('cookie') ?? '');
    if (UNSAFE.has(request.method) && byCookie && (locals.asker || !isApi) && !fromOwnPage(request))
      return problem(403, 'A write by cookie must come from a page of this registry');
    if (!isApi) return next();
    const isAuth = url.pathname.startsWith(AUTH);
    const refused = isAuth ? refuseAuth(request, url.pathname.slice(AUTH.length)) : null;
    const serve = () => (isAuth ? withCaller(callerOf(context.clientAddress, locals.asker), next) : next());
    try {
      return refused ?? asProblem(await serve(), url.pathname);
    } catch (error) {
      return toProblem(error, requestId);
    }
  };

  const response = withHeaders(await answer(), isApi, requestId);
  const { status } = response;
  const entry = {
    requestId,
    method: request.method,
    path: url.pathname,
    status,
    ms: Math.round(performance.now() - started),
    account: locals.asker?.accountId,
    tokenId: locals.asker?.tokenId ?? undefined,
  };
  // Of what was refused the place is told, too, since that may be an attack.
  if (REFUSED.has(status)) log.warn({ ...entry, address: clientAddress(context) }, 'request refused');
  else log.info(entry);
  return response;
});
