import { get, type IncomingHttpHeaders, type RequestListener, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { Readable } from 'node:stream';
import { buffer } from 'node:stream/consumers';
import { brotliDecompressSync, gunzipSync } from 'node:zlib';
import { afterEach, expect, test } from 'vitest';
import { acceptedCoding, markTag, unmarkTags } from '../../../scripts/lib/compression.ts';
import { closeServer, createAppServer, listen } from '../../../scripts/lib/http-server.ts';

let server: Server | undefined;

afterEach(async () => {
  if (server?.listening) await closeServer(server, 0);
});

async function serve(handler: RequestListener, trustProxy = false): Promise<number> {
  server = createAppServer(handler, { trustProxy });
  await listen(server, '127.0.0.1', 0);
  return (server.address() as AddressInfo).port;
}

const ask = (port: number, headers: Record<string, string> = {}, method = 'GET') =>
  new Promise<{ status: number; headers: IncomingHttpHeaders; body: Buffer }>((resolve, reject) => {
    get({ host: '127.0.0.1', port, headers, method, agent: false }, async (response) =>
      resolve({ status: response.statusCode ?? 0, headers: response.headers, body: await buffer(response) }),
    ).on('error', reject);
  });

const text = 'zaffre '.repeat(1000);
const json: RequestListener = (_, response) => {
  response.writeHead(200, { 'content-type': 'application/json', 'content-length': text.length, etag: '"abc"' });
  response.end(text);
};

// RFC 9110 §12.5.3
test.each([
  [undefined, null],
  ['', null],
  ['identity', null],
  ['gzip, deflate, br', 'br'],
  ['gzip', 'gzip'],
  ['br;q=0, gzip', 'gzip'],
  ['br;q=0.2, gzip;q=0.8', 'gzip'],
  ['*', 'br'],
  ['*;q=0', null],
  ['GZIP;Q=1', 'gzip'],
])('of "%s" takes %s', (header, coding) => expect(acceptedCoding(header)).toBe(coding));

test('text of some length is compressed as the client likes, and says so', async () => {
  const port = await serve(json);
  const br = await ask(port, { 'accept-encoding': 'br, gzip' });
  expect(br.headers).toMatchObject({ 'content-encoding': 'br', vary: 'Accept-Encoding', etag: '"abc;br"' });
  expect(br.headers['content-length']).toBeUndefined();
  expect(brotliDecompressSync(br.body).toString()).toBe(text);
  const gzip = await ask(port, { 'accept-encoding': 'gzip' });
  expect(gunzipSync(gzip.body).toString()).toBe(text);
  const plain = await ask(port);
  expect(plain.headers).toMatchObject({
    'content-length': String(text.length),
    vary: 'Accept-Encoding',
    etag: '"abc"',
  });
  expect(plain.body.toString()).toBe(text);
});

test('a tag of a compressed answer comes back as the tag it was', async () => {
  expect(unmarkTags('"a;br", W/"b;gzip", "c"')).toBe('"a", W/"b", "c"');
  expect(markTag('W/"weak"', 'br')).toBe('W/"weak"');
  const port = await serve((request, response) => response.end(String(request.headers['if-match'])));
  expect((await ask(port, { 'if-match': '"abc;br"' })).body.toString()).toBe('"abc"');
});

test.each<[string, RequestListener]>([
  ['an archive', (_, r) => r.writeHead(200, { 'content-type': 'application/zip' }).end(text)],
  [
    'a range',
    (_, r) => r.writeHead(206, { 'content-type': 'text/plain', 'content-range': 'bytes 0-6999/9000' }).end(text),
  ],
  [
    'what is compressed already',
    (_, r) => r.writeHead(200, { 'content-type': 'text/plain', 'content-encoding': 'x' }).end(text),
  ],
  [
    'what must not be changed',
    (_, r) => r.writeHead(200, { 'content-type': 'text/plain', 'cache-control': 'no-transform' }).end(text),
  ],
])('%s stays as it is', async (_, handler) => {
  const { body } = await ask(await serve(handler), { 'accept-encoding': 'br' });
  expect(body.toString()).toBe(text);
});

test('a short answer, an empty one and HEAD stay as they are', async () => {
  const port = await serve((request, response) => {
    response.setHeader('content-type', 'text/plain');
    if (request.url === '/none') response.writeHead(204);
    response.end(request.url === '/none' ? undefined : 'short');
  });
  const accept = { 'accept-encoding': 'br' };
  expect((await ask(port, accept)).body.toString()).toBe('short');
  expect((await ask(port, accept, 'HEAD')).headers['content-encoding']).toBeUndefined();
});

test('what a stream has written goes out before it ends', async () => {
  let finish: () => void = () => undefined;
  const port = await serve((_, response) => {
    response.writeHead(200, { 'content-type': 'text/html' });
    response.write('first');
    finish = () => response.end('last');
  });
  // The answer ends only once more has come than the ten bytes of the gzip header (RFC 1952 §2.3).
  const body = await new Promise<Buffer>((resolve, reject) => {
    get({ host: '127.0.0.1', port, headers: { 'accept-encoding': 'gzip' }, agent: false }, (response) => {
      let received = Buffer.alloc(0);
      response.on('data', (chunk: Buffer) => {
        received = Buffer.concat([received, chunk]);
        if (received.length > 10) finish();
      });
      response.on('end', () => resolve(received));
    }).on('error', reject);
  });
  expect(gunzipSync(body).toString()).toBe('firstlast');
});

test('a large answer arrives whole', async () => {
  const large = Buffer.from(Array.from({ length: 3_000_000 }, (_, i) => 32 + ((i * 7919) % 90)));
  const port = await serve((_, response) => {
    response.writeHead(200, { 'content-type': 'text/csv' });
    for (let i = 0; i < large.length; i += 50_000) response.write(large.subarray(i, i + 50_000));
    response.end();
  });
  const { body } = await ask(port, { 'accept-encoding': 'gzip' });
  expect(gunzipSync(body).equals(large)).toBe(true);
});

test.each(['br', 'gzip'])('a file that is piped, as static files are, arrives whole by %s', async (coding) => {
  // Text that does not compress well, in pieces larger than every buffer on the way.
  const pieces = Array.from({ length: 40 }, (_, k) =>
    Array.from({ length: 16_384 }, (_, i) => ((i * 7919 + k * 104_729) % 9973).toString(36)).join(''),
  );
  const port = await serve((_, response) => {
    response.writeHead(200, { 'content-type': 'text/css' });
    Readable.from(pieces).pipe(response);
  });
  const { body } = await ask(port, { 'accept-encoding': coding });
  const unpacked = coding === 'br' ? brotliDecompressSync(body) : gunzipSync(body);
  expect(unpacked.toString() === pieces.join('')).toBe(true);
});

test('what only a proxy may say is taken away unless there is one', async () => {
  const echo: RequestListener = (request, response) => response.end(JSON.stringify(request.headers));
  const sent = { 'x-forwarded-for': '192.0.2.1', 'x-forwarded-host': 'evil.example', forwarded: 'for=192.0.2.1' };
  const bare = JSON.parse((await ask(await serve(echo), sent)).body.toString());
  expect(Object.keys(bare)).not.toEqual(expect.arrayContaining(['x-forwarded-for']));
  expect(bare).not.toHaveProperty('forwarded');
  await closeServer(server!, 0);
  const trusted = JSON.parse((await ask(await serve(echo, true), sent)).body.toString());
  expect(trusted).toMatchObject(sent);
});

test('closing lets a request in hand finish and takes no other', async () => {
  const port = await serve((_, response) => void setTimeout(() => response.end('done'), 300));
  const answer = ask(port);
  await new Promise((resolve) => setTimeout(resolve, 100));
  const closed = closeServer(server!, 5_000);
  await expect(ask(port)).rejects.toThrow('ECONNREFUSED');
  expect((await answer).body.toString()).toBe('done');
  await closed;
});

test('closing cuts off what does not end', async () => {
  const port = await serve(() => undefined);
  const answer = ask(port).catch((error: NodeJS.ErrnoException) => error.code);
  await new Promise((resolve) => setTimeout(resolve, 100));
  await closeServer(server!, 200);
  expect(await answer).toBe('ECONNRESET');
});

test('a port in use is one sentence', async () => {
  const port = await serve(json);
  const second = createAppServer(json, { trustProxy: false });
  await expect(listen(second, '127.0.0.1', port)).rejects.toThrow(`Port ${port} is in use by another program`);
});
