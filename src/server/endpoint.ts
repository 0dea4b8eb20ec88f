import type { APIContext, APIRoute } from 'astro';
import type * as z from 'zod';
import type { Route } from '../contracts/route.ts';
import { type Asker, isMember } from './access/asker.ts';
import {
  contractErrors,
  entityTag,
  HttpError,
  nullCharacter,
  problem,
  readJsonBody,
  tooLarge,
  toProblem,
} from './http.ts';
import { replayOrRun } from './idempotency.ts';
import { type Admitted, admitWithin } from './limits/admit.ts';
import { noteRead } from './oversight/reads.ts';

/** What an endpoint's steps are given. */
export interface Step<Query, Body> {
  asker: Asker;
  params: Record<string, string>;
  query: Query;
  body: Body;
  context: APIContext;
}

/** What the act answers, where it is more than the JSON body. */
export class Answer {
  constructor(
    readonly body: unknown,
    readonly options: { status?: number; headers?: Record<string, string> } = {},
  ) {}
}

interface Handler<Query, Body, Access> {
  /**
   * The record that hangs on the path, judged for this asker: throws 404 for what is not in sight, 403 for what is
   * but may not be touched. Its result is the proof without which the act's service cannot be called.
   */
  sight?: (step: Omit<Step<never, never>, 'query' | 'body'>) => Access | Promise<Access>;
  /** The record as this asker gets it, for the entity tag that If-Match is compared with. */
  represent?: (access: Access, asker: Asker) => unknown;
  /**
   * What hangs on the body and may have ended since, such as a lab or a folio that it names. It is asked before a
   * kept answer is given again, too.
   */
  judge?: (step: Step<Query, Body> & { access: Access }) => unknown;
  /** The service call. */
  act: (step: Step<Query, Body> & { access: Access }) => unknown;
}

const JSON_LIMIT = 200_000;

/**
 * An endpoint from its row of the route table. The order of checks is one for all (design §8):
 * 401 who, 403 role and scope, 429 limits, 413 and 415 body, 404 sight, 428 and 412 condition, 400 and 422 content.
 */
export function endpoint<Q extends z.ZodType, B extends z.ZodType, Access = null>(
  route: Route<Q, B>,
  handler: Handler<z.output<Q>, z.output<B>, Access>,
): APIRoute {
  return async (context) => {
    const { request, locals } = context;
    let within: Admitted | undefined;
    const answer = async (): Promise<Response> => {
      const asker = admit(route, locals.asker);
      within = await admitWithin(route, asker, context);
      const params = Object.fromEntries(Object.entries(context.params).map(([name, value]) => [name, value ?? '']));
      checkBodyKind(route, request);
      const access = (await handler.sight?.({ asker, params, context })) as Access;
      const stale = route.conditional
        ? await requireMatch(request, () => handler.represent?.(access, asker)).then(() => null, asIs)
        : null;
      // A repeat of what was done meets the version that it made: its key is looked up before it is refused.
      const mayRepeat = route.method === 'POST' && request.headers.has('idempotency-key');
      if (stale && !mayRepeat) throw stale;
      const query = readQuery(route, context.url);
      const body = route.body ? await readBody(route.body, request, route.limit ?? JSON_LIMIT) : undefined;
      const step = { asker, params, query, body: body as z.output<B>, context, access };
      await handler.judge?.(step);
      const run = async () => {
        if (stale) throw stale;
        const result = await handler.act(step);
        if (request.method === 'GET') noteRead(route, step, result);
        return respond(route, request, result);
      };
      return route.method === 'POST' && route.body ? await replayOrRun(route, request, asker, body, run) : await run();
    };
    const response = await answer().catch((error: unknown) =>
      request.signal.aborted
        ? problem(499, 'Whoever asked has gone', { title: 'Gone meanwhile' })
        : toProblem(error, locals.requestId),
    );
    within?.leave();
    for (const [name, value] of Object.entries(within?.headers ?? {})) response.headers.set(name, value);
    return response;
  };
}

const asIs = (refusal: unknown) => refusal;

/** 401 and 403: who asks, and whether that role or scope can ever do this. */
function admit(route: Route, asker: Asker | null): Asker {
  if (route.who === 'anyone') return asker as Asker;
  if (!asker)
    throw new HttpError(401, 'Sign in, or send an access token', {
      headers: { 'www-authenticate': 'Bearer realm="zaffre"' },
    });
  if (!asker.scopes.has(route.scope))
    throw new HttpError(403, `This access token has no ${route.scope} scope`, {
      headers: { 'www-authenticate': 'Bearer realm="zaffre", error="insufficient_scope"' },
    });
  if (route.sessionOnly && asker.tokenId) throw new HttpError(403, 'Not for access tokens: sign in to do this');
  if (route.who === 'steward' && !asker.steward) throw new HttpError(403, 'Only a steward may do this');
  if (route.who === 'member' && !isMember(asker))
    throw new HttpError(403, 'Guests read only: members of a lab may do this');
  return asker;
}

/** 415 and, as far as the headers tell, 413. */
function checkBodyKind(route: Route, request: Request): void {
  const kind = request.headers.get('content-type')?.split(';')[0]?.trim().toLowerCase() ?? '';
  if (route.body && kind !== 'application/json') throw new HttpError(415, 'Send the body as application/json');
  if (route.multipart && kind !== 'multipart/form-data')
    throw new HttpError(415, 'Send the body as multipart/form-data');
  const limit = route.multipart ? route.multipart.limit : (route.limit ?? JSON_LIMIT);
  if (limit && Number(request.headers.get('content-length') ?? 0) > limit) throw tooLarge(limit);
}

/** 428 and 412. */
async function requireMatch(request: Request, represent: () => unknown): Promise<void> {
  const condition = request.headers.get('if-match');
  if (condition === null) throw new HttpError(428, 'Send If-Match with the ETag of the record as you read it');
  const current = entityTag(JSON.stringify(await represent()));
  const offered = condition.split(',').map((tag) => tag.trim());
  if (condition.trim() !== '*' && !offered.includes(current))
    throw new HttpError(412, 'The record changed since you read it: read it again and repeat', {
      headers: { etag: current },
    });
}

function readQuery<Q extends z.ZodType>(route: Route<Q, z.ZodType>, url: URL): z.output<Q> {
  if (!route.query) return {} as z.output<Q>;
  const given: Record<string, string | string[]> = {};
  for (const name of new Set(url.searchParams.keys())) {
    const values = url.searchParams.getAll(name);
    if (values.some((value) => value.includes('\0'))) throw nullCharacter(400);
    given[name] = values.length > 1 ? values : values[0]!;
  }
  const parsed = route.query.safeParse(given);
  if (!parsed.success)
    throw new HttpError(400, 'The query string does not fit', { errors: contractErrors(parsed.error) });
  return parsed.data;
}

async function readBody<B extends z.ZodType>(schema: B, request: Request, limit: number): Promise<z.output<B>> {
  return schema.parse(await readJsonBody(request, limit));
}

/** The answer of a route from what its act gave; for acts that must build it themselves, such as a replayed upload. */
export function respond(route: Route, request: Request, result: unknown): Response {
  if (result instanceof Response) return result;
  const { body, options } = result instanceof Answer ? result : { body: result, options: {} as Answer['options'] };
  const status = options.status ?? route.status;
  if (status === 204)
    return new Response(null, { status, headers: { 'cache-control': 'private, no-store', ...options.headers } });
  const text = JSON.stringify(body);
  const tag = entityTag(text);
  const headers = {
    'content-type': 'application/json',
    'cache-control': 'private, no-store',
    etag: tag,
    ...options.headers,
  };
  if (route.method === 'GET' && request.headers.get('if-none-match') === tag)
    return new Response(null, { status: 304, headers });
  return new Response(text, { status, headers });
}
