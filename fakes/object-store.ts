import { createHash, randomUUID } from 'node:crypto';
import { createReadStream } from 'node:fs';
import { readdir, rm, stat } from 'node:fs/promises';
import { join } from 'node:path';
import { Readable } from 'node:stream';
import {
  AbortMultipartUploadCommand,
  type CompletedPart,
  CompleteMultipartUploadCommand,
  CreateMultipartUploadCommand,
  DeleteObjectCommand,
  GetObjectCommand,
  HeadBucketCommand,
  HeadObjectCommand,
  ListObjectsV2Command,
  NoSuchKey,
  NotFound,
  PutObjectCommand,
  type S3Client,
  S3ServiceException,
  UploadPartCommand,
} from '@aws-sdk/client-s3';
import { sdkStreamMixin } from '@smithy/util-stream';
import { mockClient } from 'aws-sdk-client-mock';
import { writeDurably } from './durable-file.ts';

/** How long an unfinished upload may lie before it counts as left behind by a crash, in milliseconds. */
const ABANDONED_AFTER = 24 * 3600 * 1000;
/** The mock remembers every call; forget them this often, in milliseconds. */
const FORGET_EVERY = 60_000;
/** Marks a file as an object: folders never hold it, so that the keys `a` and `a/b` can both exist. */
const OBJECT = '@';

/**
 * Answer one S3 client from a folder: put, get (with ranges), head, delete, list and multipart upload. A command that
 * is not among them is refused. Objects are written durably (see `writeDurably`).
 *
 * @returns a function that ends the fake
 */
export function folderObjectStore(client: S3Client, folder: string): () => void {
  const objects = join(folder, 'objects');
  const parts = join(folder, 'parts');
  const pathOf = (key: string | undefined) => `${join(objects, ...segments(key))}${OBJECT}`;
  const temporary = () => join(parts, `${randomUUID()}.new`);
  const partPath = (uploadId: string, part: number) => join(parts, uploadId, `${part}${OBJECT}`);
  void removeAbandoned(parts);

  const mock = mockClient(client);
  const forget = setInterval(() => mock.resetHistory(), FORGET_EVERY);
  forget.unref();

  // Every answer must be a promise: lib-storage fails on a plain return.
  mock.rejects(new Error('the folder object store does not serve this command'));
  mock.on(HeadBucketCommand).callsFake(async () => ({}));
  mock.on(PutObjectCommand).callsFake(async (input) => {
    await writeDurably(pathOf(input.Key), temporary(), toContent(input.Body));
    return {};
  });
  mock.on(GetObjectCommand).callsFake(async (input) => {
    const path = pathOf(input.Key);
    const size = await sizeOf(path, () => new NoSuchKey(missing(input.Key)));
    const range = readRange(input.Range, size);
    const stream = size === 0 ? Readable.from([]) : createReadStream(path, range ?? {});
    return {
      Body: sdkStreamMixin(stream),
      ContentLength: range ? range.end - range.start + 1 : size,
      ...(range ? { ContentRange: `bytes ${range.start}-${range.end}/${size}` } : {}),
    };
  });
  mock.on(HeadObjectCommand).callsFake(async (input) => ({
    ContentLength: await sizeOf(pathOf(input.Key), () => new NotFound(missing(input.Key))),
  }));
  mock.on(DeleteObjectCommand).callsFake(async (input) => {
    await rm(pathOf(input.Key), { force: true });
    return {};
  });
  mock.on(ListObjectsV2Command).callsFake(async (input) => {
    const prefix = input.Prefix ?? '';
    const after = input.ContinuationToken ?? input.StartAfter ?? '';
    const keys = (await keysUnder(objects)).filter((key) => key.startsWith(prefix) && byBytes(key, after) > 0);
    const page = keys.sort(byBytes).slice(0, input.MaxKeys ?? 1000);
    const truncated = page.length < keys.length;
    return {
      Contents: await Promise.all(
        page.map(async (key) => ({ Key: key, Size: await sizeOf(pathOf(key), () => new NoSuchKey(missing(key))) })),
      ),
      KeyCount: page.length,
      IsTruncated: truncated,
      ...(truncated ? { NextContinuationToken: page.at(-1)! } : {}),
    };
  });
  mock.on(CreateMultipartUploadCommand).callsFake(async () => ({ UploadId: randomUUID() }));
  mock.on(UploadPartCommand).callsFake(async (input) => {
    const path = partPath(input.UploadId ?? '', input.PartNumber ?? 0);
    await writeDurably(path, temporary(), toContent(input.Body));
    return { ETag: etag(path) };
  });
  mock.on(CompleteMultipartUploadCommand).callsFake(async (input) => {
    const numbers: CompletedPart[] = input.MultipartUpload?.Parts ?? [];
    const paths = numbers.map(({ PartNumber }) => partPath(input.UploadId ?? '', PartNumber ?? 0));
    await writeDurably(pathOf(input.Key), temporary(), Readable.from(joined(paths)));
    await rm(join(parts, input.UploadId ?? ''), { recursive: true, force: true });
    return { Key: input.Key };
  });
  mock.on(AbortMultipartUploadCommand).callsFake(async (input) => {
    await rm(join(parts, input.UploadId ?? ''), { recursive: true, force: true });
    return {};
  });

  return () => {
    clearInterval(forget);
    mock.restore();
  };
}

/** Folder and file names of a key. `.` and `..` would leave the folder and are written out instead. */
function segments(key: string | undefined): string[] {
  if (!key) throw new Error('an object needs a key');
  return key.split('/').map((part) => {
    const name = encodeURIComponent(part);
    if (name === '') return '%';
    return /^\.+$/.test(name) ? name.replaceAll('.', '%2E') : name;
  });
}

const keyPart = (name: string) => (name === '%' ? '' : decodeURIComponent(name));

async function keysUnder(folder: string): Promise<string[]> {
  const entries = await readdir(folder, { withFileTypes: true }).catch((error: NodeJS.ErrnoException) => {
    if (error.code === 'ENOENT') return [];
    throw error;
  });
  const lists = entries.map(async (entry) => {
    if (entry.isFile()) return entry.name.endsWith(OBJECT) ? [keyPart(entry.name.slice(0, -OBJECT.length))] : [];
    const below = await keysUnder(join(folder, entry.name));
    return below.map((key) => `${keyPart(entry.name)}/${key}`);
  });
  return (await Promise.all(lists)).flat();
}

/** S3 lists keys in the order of their UTF-8 bytes. */
const byBytes = (a: string, b: string) => Buffer.compare(Buffer.from(a), Buffer.from(b));

function toContent(body: unknown): Readable | Uint8Array {
  if (body instanceof Readable || body instanceof Uint8Array) return body;
  if (typeof body === 'string') return Buffer.from(body);
  throw new Error('the folder object store takes bytes, text or a Node stream');
}

async function sizeOf(path: string, absent: () => Error): Promise<number> {
  try {
    return (await stat(path)).size;
  } catch (error) {
    throw (error as NodeJS.ErrnoException).code === 'ENOENT' ? absent() : error;
  }
}

const missing = (key: string | undefined) => ({
  message: `there is no object ${key}`,
  $metadata: { httpStatusCode: 404 },
});

/** `bytes=a-b`, `bytes=a-` or `bytes=-n` within an object of `size` bytes. */
function readRange(range: string | undefined, size: number): { start: number; end: number } | null {
  const [, first, last] = /^bytes=(\d*)-(\d*)$/.exec(range ?? '') ?? [];
  if (!first && !last) return null;
  const start = first ? Number(first) : Math.max(0, size - Number(last));
  const end = first && last ? Math.min(Number(last), size - 1) : size - 1;
  if (start > end)
    throw new S3ServiceException({
      name: 'InvalidRange',
      message: `the object has ${size} bytes`,
      $fault: 'client',
      $metadata: { httpStatusCode: 416 },
    });
  return { start, end };
}

const etag = (text: string) => `"${createHash('sha256').update(text).digest('hex')}"`;

async function* joined(paths: string[]): AsyncGenerator<Uint8Array> {
  for (const path of paths) yield* createReadStream(path) as AsyncIterable<Uint8Array>;
}

async function removeAbandoned(parts: string): Promise<void> {
  const names = await readdir(parts).catch(() => []);
  for (const name of names) {
    const path = join(parts, name);
    const changed = await stat(path).catch(() => null);
    if (changed && Date.now() - changed.mtimeMs > ABANDONED_AFTER) await rm(path, { recursive: true, force: true });
  }
}
