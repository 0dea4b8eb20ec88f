import type { IncomingMessage, OutgoingHttpHeader, ServerResponse } from 'node:http';
import { type BrotliCompress, constants, createBrotliCompress, createGzip, type Gzip } from 'node:zlib';

const COMPRESSIBLE =
  /^(?:text\/|application\/(?:[\w.-]+\+)?(?:json|xml)\b|application\/javascript\b|image\/svg\+xml\b|chemical\/x-(?:jcamp-dx|cif)\b)/i;
/** Below this a compressed answer is hardly shorter, in bytes. */
const LEAST = 1_000;

type Coding = 'br' | 'gzip';

/**
 * The best coding that a request accepts (RFC 9110 §12.5.3): Brotli before gzip where both are equally welcome, null
 * for none.
 */
export function acceptedCoding(header: string | undefined): Coding | null {
  const weights = new Map<string, number>();
  for (const item of (header ?? '').toLowerCase().split(',')) {
    const [name = '', ...parameters] = item.split(';').map((part) => part.trim());
    const q = parameters.find((parameter) => parameter.startsWith('q='));
    weights.set(name, q ? Number(q.slice(2)) || 0 : 1);
  }
  const weight = (coding: Coding) => weights.get(coding) ?? weights.get('*') ?? 0;
  const [br, gzip] = [weight('br'), weight('gzip')];
  if (br === 0 && gzip === 0) return null;
  return br >= gzip ? 'br' : 'gzip';
}

/**
 * Mark a strong entity tag with the coding, since the compressed answer is another sequence of bytes (RFC 9110
 * §8.8.3.3), and take the mark off again when the tag comes back in a condition.
 */
export const markTag = (tag: string, coding: Coding) => tag.replace(/^"(.*)"$/, `"$1;${coding}"`);
export const unmarkTags = (tags: string) => tags.replace(/;(?:br|gzip)"/g, '"');

/**
 * Compress what this response will carry where it pays and the client takes it: text of some length, whole (no range)
 * and not compressed already. Streams stay streams: what was written goes out at the end of the turn.
 */
export function compressResponse(request: IncomingMessage, response: ServerResponse): void {
  for (const name of ['if-match', 'if-none-match'] as const) {
    const value = request.headers[name];
    if (value) request.headers[name] = unmarkTags(value);
  }
  const coding = acceptedCoding(request.headers['accept-encoding'] as string | undefined);
  const { writeHead, write, end } = response;
  let stream: BrotliCompress | Gzip | null = null;
  let decided = false;

  const decide = (endsWith?: number) => {
    if (decided) return;
    decided = true;
    if (!isCompressible(response)) return;
    response.appendHeader('vary', 'Accept-Encoding');
    const length = endsWith ?? Number(response.getHeader('content-length') ?? Number.POSITIVE_INFINITY);
    if (!coding || length < LEAST || request.method === 'HEAD') return;
    response.removeHeader('content-length');
    response.removeHeader('accept-ranges');
    response.setHeader('content-encoding', coding);
    const tag = response.getHeader('etag');
    if (typeof tag === 'string') response.setHeader('etag', markTag(tag, coding));
    stream = compressor(coding);
    stream.on('data', (chunk) => {
      if (!write.call(response, chunk, 'utf8')) stream?.pause();
    });
    stream.on('end', () => end.call(response, undefined, 'utf8'));
    // Two buffers stand one behind the other: the compressor goes on when the socket has room, and whoever writes to
    // the response when the compressor has.
    response.on('drain', () => stream?.resume());
    stream.on('drain', () => response.emit('drain'));
    response.on('close', () => stream?.destroy());
  };

  response.writeHead = (status: number, ...rest: unknown[]) => {
    const headers = rest.find((part) => typeof part === 'object' && part !== null);
    const reason = typeof rest[0] === 'string' ? rest[0] : undefined;
    response.statusCode = status;
    setHeaders(response, headers as Record<string, OutgoingHttpHeader> | OutgoingHttpHeader[] | undefined);
    decide();
    if (reason) response.statusMessage = reason;
    return writeHead.call(response, status);
  };
  let flushing = false;
  const flushSoon = () => {
    if (flushing) return;
    flushing = true;
    setImmediate(() => {
      flushing = false;
      if (stream && !stream.writableEnded && !stream.destroyed) stream.flush();
    });
  };
  response.write = ((chunk: unknown, encoding?: unknown, done?: unknown) => {
    decide();
    if (!stream) return write.call(response, chunk, encoding as BufferEncoding, done as () => void);
    const more = stream.write(chunk as Buffer, encoding as BufferEncoding, done as () => void);
    flushSoon();
    return more;
  }) as ServerResponse['write'];
  response.end = ((chunk?: unknown, encoding?: unknown, done?: unknown) => {
    const callback = [chunk, encoding, done].find((part) => typeof part === 'function') as (() => void) | undefined;
    const last = typeof chunk === 'function' ? undefined : (chunk as Buffer | string | undefined);
    if (!response.headersSent) decide(last === undefined || last === null ? 0 : Buffer.byteLength(last));
    if (!stream)
      return end.call(response, last, (typeof encoding === 'string' ? encoding : 'utf8') as BufferEncoding, callback);
    if (callback) response.once('finish', callback);
    if (last) stream.end(last);
    else stream.end();
    return response;
  }) as ServerResponse['end'];
}

function isCompressible(response: ServerResponse): boolean {
  const has = (name: string) => response.hasHeader(name);
  return (
    response.statusCode >= 200 &&
    ![204, 206, 304].includes(response.statusCode) &&
    !has('content-encoding') &&
    !has('content-range') &&
    !/\bno-transform\b/i.test(String(response.getHeader('cache-control') ?? '')) &&
    COMPRESSIBLE.test(String(response.getHeader('content-type') ?? ''))
  );
}

function setHeaders(
  response: ServerResponse,
  headers: Record<string, OutgoingHttpHeader> | OutgoingHttpHeader[] | undefined,
) {
  if (Array.isArray(headers))
    for (let i = 0; i + 1 < headers.length; i += 2) response.setHeader(String(headers[i]), headers[i + 1] as string);
  else for (const [name, value] of Object.entries(headers ?? {})) response.setHeader(name, value as string);
}

const compressor = (coding: Coding) =>
  coding === 'br'
    ? createBrotliCompress({ params: { [constants.BROTLI_PARAM_QUALITY]: 4 } })
    : createGzip({ level: 6 });
