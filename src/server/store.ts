import { Readable } from 'node:stream';
import type { ReadableStream as WebStream } from 'node:stream/web';
import {
  DeleteObjectCommand,
  GetObjectCommand,
  HeadObjectCommand,
  ListObjectsV2Command,
  PutObjectCommand,
  S3Client,
  S3ServiceException,
} from '@aws-sdk/client-s3';
import { Upload } from '@aws-sdk/lib-storage';
import { type Settings, settings } from './settings.ts';

export type StoreBody = Uint8Array | Readable | ReadableStream<Uint8Array>;

/** First and last byte, both included; without a last byte, to the end. */
export interface ByteRange {
  start: number;
  end?: number;
}

/** Where files lie: originals of spectra, crystal structures, bundles. Keys are paths such as `originals/<sha256>`. */
export interface ObjectStore {
  /**
   * Write an object; it is there whole once this returns, or not at all. A stream of unknown length is sent in parts
   * of 5 MiB, so that memory stays flat.
   */
  put(key: string, body: StoreBody, options?: { contentType?: string; contentLength?: number }): Promise<void>;
  /** Read an object or a range of it; null when there is none. `size` is that of the whole object, in bytes. */
  get(key: string, range?: ByteRange): Promise<{ body: Readable; size: number } | null>;
  /** Size in bytes, or null when there is no such object. */
  head(key: string): Promise<{ size: number } | null>;
  /** Remove an object; one that is not there is no fault. */
  delete(key: string): Promise<void>;
  /** Keys that begin with `prefix`, in the order of their bytes. */
  list(prefix?: string): AsyncIterable<{ key: string; size: number }>;
  /** Whether the store answers. */
  ready(): Promise<boolean>;
  close(): void;
}

/** The store failed or is away; the cause has the details, which are not for the asker. */
export class StoreError extends Error {
  override readonly name = 'StoreError';
}

const PART_BYTES = 5 * 1024 * 1024;

/** Open the store that the settings name: a real one by `S3_*`, otherwise the folder `objects` beside the database. */
export function openStore({ s3, dataFolder }: Pick<Settings, 's3' | 'dataFolder'>): ObjectStore {
  const Bucket = s3?.bucket ?? 'zaffre';
  const client = new S3Client({
    region: s3?.region ?? 'auto',
    endpoint: s3?.endpoint ?? 'http://127.0.0.1:9',
    credentials: { accessKeyId: s3?.accessKeyId ?? 'none', secretAccessKey: s3?.secretAccessKey ?? 'none' },
    forcePathStyle: true,
    requestHandler: { connectionTimeout: 3_000, socketTimeout: 30_000 },
    // With the SDK's default some stores keep the checksum framing inside a streamed object, without a word.
    requestChecksumCalculation: 'WHEN_REQUIRED',
    responseChecksumValidation: 'WHEN_REQUIRED',
  });
  // The stand-in is loaded only where it serves.
  const ready = s3
    ? Promise.resolve(() => undefined)
    : import('#fakes/object-store.ts').then(({ folderObjectStore }) =>
        folderObjectStore(client, `${dataFolder}/store`),
      );
  ready.catch(() => undefined); // each call below reports it
  const send = <T>(what: string, run: () => Promise<T>): Promise<T> => ready.then(run).catch((e) => fail(what, e));

  return {
    put(Key, body, { contentType, contentLength } = {}) {
      const Body = toNode(body);
      const ContentLength = Body instanceof Uint8Array ? Body.byteLength : contentLength;
      const params = { Bucket, Key, Body, ContentType: contentType };
      return send(`write ${Key}`, async () => {
        if (ContentLength === undefined)
          await new Upload({ client, params, partSize: PART_BYTES, queueSize: 2 }).done();
        else await client.send(new PutObjectCommand({ ...params, ContentLength }));
      });
    },
    get(Key, range) {
      const Range = range && `bytes=${range.start}-${range.end ?? ''}`;
      return send(`read ${Key}`, async () => {
        const answer = await orNull(client.send(new GetObjectCommand({ Bucket, Key, Range })));
        if (!answer) return null;
        const whole = /\/(\d+)$/.exec(answer.ContentRange ?? '')?.[1];
        return { body: answer.Body as Readable, size: Number(whole ?? answer.ContentLength) };
      });
    },
    head(Key) {
      return send(`look up ${Key}`, async () => {
        const answer = await orNull(client.send(new HeadObjectCommand({ Bucket, Key })));
        return answer && { size: answer.ContentLength ?? 0 };
      });
    },
    delete(Key) {
      return send(`delete ${Key}`, async () => void (await client.send(new DeleteObjectCommand({ Bucket, Key }))));
    },
    async *list(Prefix) {
      let ContinuationToken: string | undefined;
      do {
        const command = new ListObjectsV2Command({ Bucket, Prefix, ContinuationToken });
        const page = await send('list', () => client.send(command));
        for (const { Key, Size } of page.Contents ?? []) if (Key) yield { key: Key, size: Size ?? 0 };
        ContinuationToken = page.IsTruncated ? page.NextContinuationToken : undefined;
      } while (ContinuationToken);
    },
    async ready() {
      const command = new ListObjectsV2Command({ Bucket, MaxKeys: 1 });
      return send('list', () => client.send(command)).then(
        () => true,
        () => false,
      );
    },
    close() {
      void ready.then(
        (end) => end(),
        () => undefined,
      );
      client.destroy();
    },
  };
}

let current: ObjectStore | undefined;

/** The store of this process. */
export function store(): ObjectStore {
  current ??= openStore(settings());
  return current;
}

const toNode = (body: StoreBody): Uint8Array | Readable =>
  body instanceof ReadableStream ? Readable.fromWeb(body as WebStream<Uint8Array>) : body;

function fail(what: string, cause: unknown): never {
  throw new StoreError(`the object store could not ${what}`, { cause });
}

/** What is not there is an answer, not a failure. Stores differ in the name they give it. */
async function orNull<T>(answer: Promise<T>): Promise<T | null> {
  try {
    return await answer;
  } catch (error) {
    if (error instanceof S3ServiceException && ['NoSuchKey', 'NotFound'].includes(error.name)) return null;
    throw error;
  }
}
