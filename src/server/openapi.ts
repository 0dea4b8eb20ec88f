import * as z from 'zod';
import { Problem } from '../contracts/problem.ts';
import type { Route } from '../contracts/route.ts';
import { routes } from '../contracts/routes.ts';
import { type Json, SchemaCollector } from './openapi-schemas.ts';
import { VERSION } from './version.ts';

const REFUSALS: Record<number, string> = {
  400: 'Not JSON, or a query string or cursor that does not fit',
  401: 'Nobody is signed in, or the access token does not work',
  403: 'This role or scope can never do this, or the record is in sight but not to be touched',
  404: 'Not in your sight; the same answer as for what is not there',
  409: 'It conflicts with what is there',
  410: 'No longer here',
  412: 'The record changed since it was read: If-Match is stale',
  413: 'The body is too large',
  415: 'This kind of body is not served here',
  416: 'No such range of the file',
  421: 'The host is not the one this registry is served under',
  422: 'A contract or the chemistry refuses it; `errors` tells where',
  428: 'If-Match is needed',
  429: 'Too many requests: see Retry-After',
  500: 'Unexpected error; no detail leaves the server',
  503: 'Database or store cannot be reached just now: see Retry-After',
};

const HEADERS: Record<string, Json> = {
  ETag: { description: 'Strong entity tag of the representation that the asker gets', schema: { type: 'string' } },
  Link: { description: 'The next page, rel="next" (RFC 8288); absent on the last', schema: { type: 'string' } },
  Location: { description: 'Where the new record is', schema: { type: 'string', format: 'uri-reference' } },
  RetryAfter: { description: 'Seconds to wait', schema: { type: 'integer', minimum: 1 } },
  RateLimitPolicy: {
    description: 'The limit that this request counted against: "name";q=requests;w=seconds of its window',
    schema: { type: 'string', examples: ['"api";q=6000;w=60'] },
  },
  RateLimit: {
    description: 'How this request stands against it: "name";r=requests left;t=seconds until the next window',
    schema: { type: 'string', examples: ['"api";r=5990;t=42'] },
  },
  WWWAuthenticate: { description: 'Bearer', schema: { type: 'string' } },
  ContentRange: { description: 'Which bytes of how many', schema: { type: 'string' } },
  ContentDisposition: { description: 'The file name to save it under', schema: { type: 'string' } },
};
const header = (name: string): Json => ({ $ref: `#/components/headers/${name}` });

const PARAMETERS: Record<string, Json> = {
  IfMatch: {
    name: 'If-Match',
    in: 'header',
    required: true,
    description: 'The ETag of the record as you read it',
    schema: { type: 'string' },
  },
  IfNoneMatch: {
    name: 'If-None-Match',
    in: 'header',
    description: 'An ETag that you hold: 304 when it still stands',
    schema: { type: 'string' },
  },
  IdempotencyKey: {
    name: 'Idempotency-Key',
    in: 'header',
    description:
      'The same account, token, route, key and body gives the same answer and acts once, for a day. Answers that hold a secret are never kept.',
    schema: { type: 'string', maxLength: 200 },
  },
  Range: {
    name: 'Range',
    in: 'header',
    description: 'One range of bytes, such as bytes=0-999',
    schema: { type: 'string', pattern: '^bytes=\\d*-\\d*$' },
  },
  IfRange: {
    name: 'If-Range',
    in: 'header',
    description: 'Serve the range of this ETag only',
    schema: { type: 'string' },
  },
};
const parameter = (name: string): Json => ({ $ref: `#/components/parameters/${name}` });

/** The OpenAPI 3.1.1 document, made from the route table by which requests are checked. */
export function openApiDocument(): Json {
  const collector = new SchemaCollector();
  const table = Object.entries(routes) as unknown as [string, Route][];
  const problem = collector.output(Problem);
  // What leaves goes first: see SchemaCollector.
  const answers = new Map(table.map(([name, route]) => [name, successOf(route, collector)]));
  const paths: Record<string, Json> = {};
  for (const [name, route] of table) {
    const operation = {
      operationId: name,
      summary: route.summary,
      description: whoText(route),
      tags: [route.tag],
      security: securityOf(route),
      ...parametersOf(route, collector),
      ...bodyOf(route, collector),
      responses: { ...answers.get(name), ...refusalsOf(route) },
    };
    paths[route.path] = { ...paths[route.path], [route.method.toLowerCase()]: operation };
  }
  const responses = Object.entries(REFUSALS).map(([status, description]) => [
    `Problem${status}`,
    { description, ...problemHeaders(Number(status)), content: { 'application/problem+json': { schema: problem } } },
  ]);
  return {
    openapi: '3.1.1',
    info: {
      title: 'Zaffre',
      version: VERSION,
      description:
        'A registry of transition-metal complexes and their electronic spectra, shared by several laboratories. All a screen does goes through these endpoints.',
    },
    servers: [{ url: '/' }],
    tags: [...new Set(table.map(([, route]) => route.tag))].map((name) => ({ name })),
    paths,
    components: {
      schemas: collector.components,
      responses: Object.fromEntries(responses),
      parameters: PARAMETERS,
      headers: HEADERS,
      securitySchemes: {
        session: {
          type: 'apiKey',
          in: 'cookie',
          name: 'authjs.session-token',
          description:
            'Set by sign-in; over https its name begins with __Host-. Requests that write need an Origin or Sec-Fetch-Site that is our own.',
        },
        token: {
          type: 'http',
          scheme: 'bearer',
          description: 'An access token. Where cookie and token both come, the token counts.',
        },
      },
    },
  };
}

const WHO: Record<Route['who'], string> = {
  anyone: 'For anyone.',
  'signed-in': 'For anybody signed in; what is answered depends on what the asker sees.',
  member: 'For members of a lab and stewards.',
  steward: 'For stewards.',
};
const whoText = ({ who, scope, sessionOnly }: Route): string => {
  if (sessionOnly) return `${WHO[who]} Not for access tokens.`;
  return who === 'anyone' ? WHO[who] : `${WHO[who]} An access token needs the ${scope} scope.`;
};

function securityOf({ who, sessionOnly }: Route): Json[] {
  const means = sessionOnly ? [{ session: [] }] : [{ session: [] }, { token: [] }];
  return who === 'anyone' ? [{}, ...means] : means;
}

const pathNames = (path: string) => [...path.matchAll(/\{(\w+)\}/g)].map((match) => match[1]!);
const isReplayable = (route: Route) => route.method === 'POST' && route.body !== undefined && route.who !== 'anyone';

function parametersOf(route: Route, collector: SchemaCollector): Json {
  const inPath = pathNames(route.path).map((name) => ({
    name,
    in: 'path',
    required: true,
    schema: { type: 'string' },
  }));
  const query = route.query ? collector.input(route.query) : {};
  const required = new Set((query.required ?? []) as string[]);
  const inQuery = Object.entries((query.properties ?? {}) as Record<string, Json>).map(
    ([name, { description, ...schema }]) => ({
      name,
      in: 'query',
      required: required.has(name),
      ...(description ? { description } : {}),
      // Repeated, or one value with commas: both are read.
      ...(schema.type === 'array' ? { style: 'form', explode: true } : {}),
      schema,
    }),
  );
  const headers = [
    ...(route.conditional ? ['IfMatch'] : []),
    ...(route.method === 'GET' ? ['IfNoneMatch'] : []),
    ...(isReplayable(route) ? ['IdempotencyKey'] : []),
    ...(route.ranges ? ['Range', 'IfRange'] : []),
  ].map(parameter);
  const parameters = [...inPath, ...inQuery, ...headers];
  return parameters.length > 0 ? { parameters } : {};
}

function bodyOf(route: Route, collector: SchemaCollector): Json {
  if (route.body)
    return {
      requestBody: { required: true, content: { 'application/json': { schema: collector.input(route.body) } } },
    };
  if (!route.multipart) return {};
  const parts = Object.entries(route.multipart.parts);
  // A part that is plain text in the contract is the file itself.
  const isFile = (schema: z.ZodType) => schema instanceof z.ZodString;
  const schema = {
    type: 'object',
    properties: Object.fromEntries(
      parts.map(([name, part]) => [
        name,
        isFile(part) ? { contentMediaType: 'application/octet-stream' } : collector.input(part),
      ]),
    ),
    required: parts.filter(([, part]) => isFile(part)).map(([name]) => name),
  };
  const encoding = Object.fromEntries(
    parts.filter(([, part]) => !isFile(part)).map(([name]) => [name, { contentType: 'application/json' }]),
  );
  return { requestBody: { required: true, content: { 'multipart/form-data': { schema, encoding } } } };
}

function successOf(route: Route, collector: SchemaCollector): Json {
  const { status, answers, query, method } = route;
  if (answers === null) return { [status]: { description: 'Done' } };
  if (typeof answers === 'string') {
    const headers = { ETag: header('ETag'), 'Content-Disposition': header('ContentDisposition') };
    const content = { [answers]: { schema: {} } };
    const part = {
      description: 'The range asked for',
      headers: { ...headers, 'Content-Range': header('ContentRange') },
      content,
    };
    return { [status]: { description: route.summary, headers, content }, ...(route.ranges ? { 206: part } : {}) };
  }
  const paged = query instanceof z.ZodObject && 'cursor' in query.shape;
  const headers = {
    ETag: header('ETag'),
    ...(paged ? { Link: header('Link') } : {}),
    ...(status === 201 || status === 202 ? { Location: header('Location') } : {}),
  };
  const ok = {
    description: route.summary,
    headers,
    content: { 'application/json': { schema: collector.output(answers) } },
  };
  return { [status]: ok, ...(method === 'GET' ? { 304: { description: 'What you hold still stands' } } : {}) };
}

function refusalsOf(route: Route): Json {
  const takesBody = route.body !== undefined || route.multipart !== undefined;
  const statuses = [
    ...(route.query || takesBody ? [400] : []),
    ...(route.who === 'anyone' ? [] : [401, 403]),
    ...(pathNames(route.path).length > 0 ? [404] : []),
    ...(isReplayable(route) ? [409] : []),
    ...(route.conditional ? [412, 428] : []),
    ...(takesBody ? [413, 415, 422] : []),
    ...(route.ranges ? [416] : []),
    ...[421, 429, 500, 503],
    ...Object.keys(route.refusals ?? {}).map(Number),
  ];
  const responses = [...new Set(statuses)].sort().map((status) => {
    const own = route.refusals?.[status];
    const shared = { $ref: `#/components/responses/Problem${status}` };
    return [status, own ? { ...shared, description: own } : shared];
  });
  return Object.fromEntries(responses);
}

function problemHeaders(status: number): Json {
  if (status === 401) return { headers: { 'WWW-Authenticate': header('WWWAuthenticate') } };
  if (status === 412) return { headers: { ETag: header('ETag') } };
  if (status === 416) return { headers: { 'Content-Range': header('ContentRange') } };
  if (status === 429)
    return {
      headers: {
        'Retry-After': header('RetryAfter'),
        'RateLimit-Policy': header('RateLimitPolicy'),
        RateLimit: header('RateLimit'),
      },
    };
  return status === 503 ? { headers: { 'Retry-After': header('RetryAfter') } } : {};
}
