import type { Readable } from 'node:stream';
import { HttpError } from '#src/server/http.ts';
import { StoreError, store } from '#src/server/store.ts';

/** Where the bytes of an original lie. */
export const originalKey = (sha256: string): string => `originals/${sha256}`;

const away = () =>
  new HttpError(503, 'The store of files is not available just now', { headers: { 'retry-after': '5' } });

async function orAway<T>(work: Promise<T>): Promise<T> {
  try {
    return await work;
  } catch (error) {
    if (error instanceof StoreError) throw away();
    throw error;
  }
}

/**
 * Put an original into the store, under its own digest.
 *
 * @throws {HttpError} 503 when the store is away
 */
export async function keepOriginal(sha256: string, bytes: Uint8Array): Promise<void> {
  const key = originalKey(sha256);
  const there = await orAway(store().head(key));
  if (there?.size === bytes.byteLength) return;
  await orAway(store().put(key, bytes, { contentType: 'application/octet-stream', contentLength: bytes.byteLength }));
}

/** @throws {HttpError} 503 when the store is away or has lost it */
export async function openOriginal(sha256: string): Promise<{ body: Readable; size: number }> {
  const found = await orAway(store().get(originalKey(sha256)));
  if (!found) throw new HttpError(503, 'The store of files does not hold this original just now');
  return found;
}
