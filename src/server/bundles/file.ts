import { Readable } from 'node:stream';
import { text } from 'node:stream/consumers';
import type { ReadableStream as WebStream } from 'node:stream/web';
import type { BundleAccess } from '../access/sharing.ts';
import { HttpError, notInSight } from '../http.ts';
import { attachment } from '../spectra/download.ts';
import { type ByteRange, StoreError, store } from '../store.ts';
import { type Held, stillOpen } from './content.ts';
import { archiveKey, heldKey } from './paths.ts';

/**
 * The ZIP file, or the range of it that is asked for. Whether the asker may still take all that is in it is judged
 * now, not when it was ordered.
 *
 * @throws {HttpError} 409 while it is not ready, 410 once its file was cleared away, 404 when access to any of its content ended, 503 without the store
 */
export async function bundleFile({ asker, bundle }: BundleAccess, request: Request): Promise<Response> {
  if (bundle.state === 'ready' && !bundle.storeKey)
    throw new HttpError(410, 'The file of this bundle was kept for a week: order it again, and it is made anew');
  if (bundle.state !== 'ready' || bundle.size === null || !bundle.sha256 || !bundle.storeKey)
    throw new HttpError(409, 'The bundle is not ready');
  const { size, sha256, storeKey } = bundle;
  const held = await orAway(readHeld(storeKey));
  if (!(await stillOpen(asker, bundle, held))) throw notInSight();

  const etag = `"${sha256}"`;
  const headers: Record<string, string> = {
    'content-type': 'application/zip',
    'content-disposition': attachment(`${held.name}.zip`),
    'accept-ranges': 'bytes',
    'cache-control': 'private, no-store',
    etag,
    'repr-digest': `sha-256=:${Buffer.from(sha256, 'hex').toString('base64')}:`,
  };
  if (request.headers.get('if-none-match') === etag) return new Response(null, { status: 304, headers });
  const asked = readRange(request.headers, size, etag);
  if (asked === 'unsatisfiable')
    throw new HttpError(416, `The file has ${size} bytes`, {
      title: 'No such range',
      headers: { 'content-range': `bytes */${size}` },
    });
  const found = await orAway(store().get(archiveKey(storeKey), asked ?? undefined));
  if (!found) throw away();
  const length = asked ? asked.end - asked.start + 1 : size;
  if (asked) headers['content-range'] = `bytes ${asked.start}-${asked.end}/${size}`;
  return new Response(Readable.toWeb(found.body) as WebStream<Uint8Array> as ReadableStream<Uint8Array>, {
    status: asked ? 206 : 200,
    headers: { ...headers, 'content-length': String(length) },
  });
}

async function readHeld(storeKey: string): Promise<Held> {
  const found = await store().get(heldKey(storeKey));
  if (!found) throw away();
  return JSON.parse(await text(found.body)) as Held;
}

const away = () =>
  new HttpError(503, 'The store of files is not available just now', { headers: { 'retry-after': '5' } });

async function orAway<T>(work: Promise<T>): Promise<T> {
  return work.catch((error: unknown) => {
    throw error instanceof StoreError ? away() : error;
  });
}

/**
 * The one range that is asked for (RFC 9110 §14.2): null for none, for several, for one that cannot be read and for
 * one of another state of the file (If-Range); these get the whole file, as the standard allows.
 */
export function readRange(headers: Headers, size: number, etag: string): Required<ByteRange> | 'unsatisfiable' | null {
  const ifRange = headers.get('if-range');
  if (ifRange !== null && ifRange !== etag) return null;
  const match = /^bytes=(\d*)-(\d*)$/.exec(headers.get('range') ?? '');
  if (!match || (match[1] === '' && match[2] === '')) return null;
  const [first, last] = [match[1], match[2]].map((digits) => (digits === '' ? null : Number(digits)));
  if (first === null) return last === 0 ? 'unsatisfiable' : { start: Math.max(0, size - last!), end: size - 1 };
  if (last !== null && last! < first!) return null;
  if (first! >= size) return 'unsatisfiable';
  return { start: first!, end: Math.min(last ?? size - 1, size - 1) };
}
