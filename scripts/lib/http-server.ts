import { createServer, type IncomingMessage, type Server, type ServerResponse, STATUS_CODES } from 'node:http';
import { compressResponse } from './compression.ts';
import { portError } from './ports.mjs';

export type Handler = (request: IncomingMessage, response: ServerResponse) => void;

/** Longest time a client may take for its headers and for a whole request, an upload on a slow line among them, in milliseconds. */
const HEADERS_TIMEOUT_MS = 20_000;
const REQUEST_TIMEOUT_MS = 600_000;
/** How long a client that was answered already may take to see it and to stop sending, in milliseconds. */
const LINGER_MS = 1_000;
const HEADER_BYTES = 16_384;
/** What a program behind the standard request object can be asked with (it refuses TRACE and CONNECT). */
const METHODS = new Set(['GET', 'HEAD', 'POST', 'PUT', 'PATCH', 'DELETE', 'OPTIONS']);

/**
 * The server around the built program. It compresses, bounds headers and times, and takes away what only a proxy in
 * front may say.
 *
 * @param trustProxy - whether there is a proxy, whose `X-Forwarded-…` headers are believed
 * @param https - whether people reach it by https, and shall from then on
 */
export function createAppServer(
  handler: Handler,
  { trustProxy, https = false }: { trustProxy: boolean; https?: boolean },
): Server {
  const server = createServer({
    maxHeaderSize: HEADER_BYTES,
    headersTimeout: HEADERS_TIMEOUT_MS,
    requestTimeout: REQUEST_TIMEOUT_MS,
  });
  server.maxHeadersCount = 100;
  server.on('request', (request, response) => {
    if (trustProxy) keepLastForwarded(request);
    else
      for (const name of Object.keys(request.headers))
        if (name === 'forwarded' || name.startsWith('x-forwarded-')) delete request.headers[name];
    const { socket } = request;
    // Here, since the files of the build do not pass the program's own middleware.
    response.setHeader('x-content-type-options', 'nosniff');
    if (https) response.setHeader('strict-transport-security', 'max-age=31536000; includeSubDomains');
    // An answer that came before the end of the body, a refusal, would be lost if the connection were cut under a client
    // that still sends: our side is closed first, the other one after a while.
    response.prependOnceListener('finish', () => {
      if (request.complete) return;
      socket.destroySoon = () => socket.end();
      setTimeout(() => socket.destroy(), LINGER_MS).unref();
    });
    if (!normaliseTarget(request)) return refuse(response, 400, 'The address of the request cannot be read');
    if (!METHODS.has(request.method ?? '')) return refuse(response, 501, 'This method is served nowhere');
    compressResponse(request, response);
    handler(request, response);
  });
  return server;
}

/**
 * Of X-Forwarded-For only the last entry is the proxy's word; those before it came with the request and may be invented
 * by a client that wants to be counted as somebody else. The framework takes the first.
 */
function keepLastForwarded({ headers }: IncomingMessage): void {
  const told = headers['x-forwarded-for'];
  const last = (Array.isArray(told) ? told.join(',') : told)?.split(',').at(-1)?.trim();
  if (last) headers['x-forwarded-for'] = last;
}

/**
 * Bring the absolute form of a request target (RFC 9112 §3.2.2), whose host goes before the Host header, to the usual
 * one.
 *
 * @returns whether the target can be read
 */
function normaliseTarget(request: IncomingMessage): boolean {
  const target = request.url ?? '';
  if (/^https?:\/\//i.test(target)) {
    if (!URL.canParse(target)) return false;
    const { host, pathname, search } = new URL(target);
    request.url = `${pathname}${search}`;
    request.headers.host = host;
  }
  try {
    decodeURI(request.url?.split('?')[0] ?? '');
    return request.url?.startsWith('/') ?? false;
  } catch {
    return false;
  }
}

/** What does not get as far as the program is refused in its form (RFC 9457). */
function refuse(response: ServerResponse, status: number, detail: string): void {
  const title = STATUS_CODES[status];
  response
    .writeHead(status, {
      'content-type': 'application/problem+json',
      'cache-control': 'private, no-store',
      'content-security-policy': "default-src 'none'; frame-ancestors 'none'; sandbox",
      'x-content-type-options': 'nosniff',
    })
    .end(JSON.stringify({ type: 'about:blank', title, status, detail }));
}

/** @throws {UsageError} when the port cannot be had */
export async function listen(server: Server, host: string, port: number): Promise<void> {
  await new Promise<void>((resolve, reject) => {
    server.once('error', (error) => reject(portError(error, host, port)));
    server.listen({ host, port }, resolve);
  });
}

/** Take no more requests and wait for those in hand; what is not done after `graceMs` milliseconds is cut off. */
export async function closeServer(server: Server, graceMs: number): Promise<void> {
  const closed = new Promise<void>((resolve) => server.close(() => resolve()));
  server.closeIdleConnections();
  // A connection that was busy until now would otherwise be kept for the client's next request.
  const idle = setInterval(() => server.closeIdleConnections(), 100);
  const cut = setTimeout(() => server.closeAllConnections(), graceMs);
  await closed;
  clearInterval(idle);
  clearTimeout(cut);
}
