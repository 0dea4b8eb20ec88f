import { createServer, type IncomingMessage, type Server, type ServerResponse } from 'node:http';
import { compressResponse } from './compression.ts';
import { portError } from './ports.mjs';

export type Handler = (request: IncomingMessage, response: ServerResponse) => void;

/** Longest time a client may take for its headers and for a whole request, an upload on a slow line among them, in milliseconds. */
const HEADERS_TIMEOUT_MS = 20_000;
const REQUEST_TIMEOUT_MS = 600_000;
const HEADER_BYTES = 16_384;

/**
 * The server around the built program. It compresses, bounds headers and times, and takes away what only a proxy in
 * front may say.
 *
 * @param trustProxy - whether there is a proxy, whose `X-Forwarded-…` headers are believed
 */
export function createAppServer(handler: Handler, { trustProxy }: { trustProxy: boolean }): Server {
  const server = createServer({
    maxHeaderSize: HEADER_BYTES,
    headersTimeout: HEADERS_TIMEOUT_MS,
    requestTimeout: REQUEST_TIMEOUT_MS,
  });
  server.maxHeadersCount = 100;
  server.on('request', (request, response) => {
    if (!trustProxy)
      for (const name of Object.keys(request.headers))
        if (name === 'forwarded' || name.startsWith('x-forwarded-')) delete request.headers[name];
    compressResponse(request, response);
    handler(request, response);
  });
  return server;
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
