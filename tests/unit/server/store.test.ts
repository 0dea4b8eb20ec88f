import * as nodeFs from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { Readable } from 'node:stream';
import { buffer } from 'node:stream/consumers';
import { afterEach, beforeEach, expect, test } from 'vitest';
import { type FileOperations, writeDurably } from '#fakes/durable-file.ts';
import { type ObjectStore, openStore, StoreError } from '#src/server/store.ts';

let folder: string;
let store: ObjectStore;

beforeEach(async () => {
  folder = await nodeFs.mkdtemp(join(tmpdir(), 'zaffre-store-'));
  store = openStore({ s3: null, dataFolder: folder });
});

afterEach(async () => {
  store.close();
  await nodeFs.rm(folder, { recursive: true, force: true });
});

const read = async (key: string, range?: { start: number; end?: number }) => {
  const object = await store.get(key, range);
  return object && { bytes: await buffer(object.body), size: object.size };
};
const keys = async (prefix?: string) => {
  const found: string[] = [];
  for await (const { key } of store.list(prefix)) found.push(key);
  return found;
};
const leftovers = () => nodeFs.readdir(join(folder, 'store', 'parts'));

test('gives back the bytes that were put', async () => {
  const bytes = Uint8Array.from({ length: 1000 }, (_, i) => i % 256);
  await store.put('originals/a.jdx', bytes, { contentType: 'chemical/x-jcamp-dx' });
  expect(await read('originals/a.jdx')).toEqual({ bytes: Buffer.from(bytes), size: 1000 });
  expect(await store.head('originals/a.jdx')).toEqual({ size: 1000 });
});

test('takes streams of Node and of the web, of known and unknown length', async () => {
  await store.put('known', Readable.from([Buffer.from('abc')]), { contentLength: 3 });
  await store.put('web', new Blob(['defg']).stream());
  expect((await read('known'))?.bytes.toString()).toBe('abc');
  expect((await read('web'))?.bytes.toString()).toBe('defg');
});

test('joins a long stream from its parts in order', async () => {
  const chunk = (i: number) => Buffer.alloc(1024 * 1024, i);
  const chunks = Array.from({ length: 12 }, (_, i) => chunk(i));
  await store.put('bundle.zip', Readable.from(chunks));
  expect((await read('bundle.zip'))?.bytes.equals(Buffer.concat(chunks))).toBe(true);
  expect(await leftovers()).toEqual([]);
});

test('reads ranges and tells the size of the whole', async () => {
  await store.put('digits', Buffer.from('0123456789'));
  const text = async (range: { start: number; end?: number }) => {
    const answer = await read('digits', range);
    return [answer?.bytes.toString(), answer?.size];
  };
  expect(await text({ start: 2, end: 4 })).toEqual(['234', 10]);
  expect(await text({ start: 7 })).toEqual(['789', 10]);
  expect(await text({ start: 8, end: 99 })).toEqual(['89', 10]);
  await expect(store.get('digits', { start: 10 })).rejects.toThrow(StoreError);
});

test('an empty object is an object', async () => {
  await store.put('empty', new Uint8Array());
  expect(await read('empty')).toEqual({ bytes: Buffer.alloc(0), size: 0 });
});

test('what is not there is null, and deleting it is no fault', async () => {
  expect(await store.get('nothing')).toBeNull();
  expect(await store.head('nothing')).toBeNull();
  await store.delete('nothing');
});

test('a key cannot leave the folder, and any text is a key', async () => {
  for (const key of ['../../escape', 'a/./b', 'a//b', 'Δ-[Co(en)3]3+/ε 1.csv', 'a', 'a/b', 'x@'])
    await store.put(key, Buffer.from(key));
  for (const key of await keys()) expect((await read(key))?.bytes.toString()).toBe(key);
  expect(await keys()).toHaveLength(7);
  expect(await nodeFs.readdir(folder)).toEqual(['store']);
});

test('lists by prefix, in the order of bytes, past one page', async () => {
  await Promise.all(Array.from({ length: 1005 }, (_, i) => store.put(`p/${i}`, new Uint8Array(1))));
  await store.put('q', new Uint8Array(1));
  const found = await keys('p/');
  expect(found).toHaveLength(1005);
  expect(found).toEqual([...found].sort());
});

test('a put that breaks off leaves the old object and no rest', async () => {
  await store.put('kept', Buffer.from('old'));
  const broken = Readable.from(
    (async function* () {
      yield Buffer.from('ne');
      throw new Error('the line broke');
    })(),
  );
  await expect(store.put('kept', broken, { contentLength: 3 })).rejects.toThrow(StoreError);
  expect((await read('kept'))?.bytes.toString()).toBe('old');
  expect(await leftovers()).toEqual([]);
});

test('bytes are on the disk before the name is, and the name before the write is told done', async () => {
  const steps: string[] = [];
  const spy: FileOperations = {
    ...nodeFs,
    open: (async (path: string, flags: string) => {
      const handle = await nodeFs.open(path, flags);
      const sync = handle.sync.bind(handle);
      handle.sync = async () => {
        steps.push(`sync ${path.slice(folder.length)}`);
        await sync();
      };
      return handle;
    }) as typeof nodeFs.open,
    rename: async (from, to) => {
      steps.push(`rename ${String(to).slice(folder.length)}`);
      await nodeFs.rename(from, to);
    },
  };
  await writeDurably(join(folder, 'new', 'object'), join(folder, 'object.new'), Buffer.from('x'), spy);
  // Common practice for durable files: data, then the folder made, then the rename, then the folder's entry.
  expect(steps).toEqual(['sync /object.new', 'sync ', 'rename /new/object', 'sync /new']);
});

test('a store that is away is told as such', async () => {
  const s3 = { endpoint: 'http://127.0.0.1:9', region: 'auto', bucket: 'b', accessKeyId: 'i', secretAccessKey: 's' };
  const away = openStore({ s3, dataFolder: folder });
  expect(await away.ready()).toBe(false);
  await expect(away.head('x')).rejects.toThrow('the object store could not look up x');
  away.close();
  expect(await store.ready()).toBe(true);
});
