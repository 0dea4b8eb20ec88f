import { createWriteStream } from 'node:fs';
import * as nodeFs from 'node:fs/promises';
import { dirname } from 'node:path';
import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';

/** The file operations that make a write last; a test may listen in. */
export type FileOperations = Pick<typeof nodeFs, 'mkdir' | 'open' | 'rename' | 'rm'>;

/**
 * Write a file so that after a crash it is there whole or not at all: to a temporary name, the bytes forced to the
 * disk, renamed, and the folder that holds the new name forced too. The temporary file must be on the same disk.
 *
 * @returns the number of bytes written
 */
export async function writeDurably(
  target: string,
  temporary: string,
  content: Readable | Uint8Array,
  fs: FileOperations = nodeFs,
): Promise<number> {
  await makeFolder(dirname(temporary), fs);
  let size = 0;
  try {
    const counted = Readable.from(
      count(content, (n) => (size += n)),
      { objectMode: false },
    );
    await pipeline(counted, createWriteStream(temporary, { flags: 'wx' }));
    await sync(temporary, fs);
    await makeFolder(dirname(target), fs);
    await fs.rename(temporary, target);
  } catch (error) {
    await fs.rm(temporary, { force: true });
    throw error;
  }
  await sync(dirname(target), fs);
  return size;
}

async function* count(content: Readable | Uint8Array, add: (bytes: number) => void): AsyncGenerator<Uint8Array> {
  const chunks = content instanceof Uint8Array ? [content] : (content as AsyncIterable<Uint8Array | string>);
  for await (const chunk of chunks) {
    const bytes = typeof chunk === 'string' ? Buffer.from(chunk) : chunk;
    add(bytes.byteLength);
    yield bytes;
  }
}

/** Make a folder and its parents; each parent that gained a name is forced to the disk. */
async function makeFolder(folder: string, fs: FileOperations): Promise<void> {
  const first = await fs.mkdir(folder, { recursive: true });
  if (!first) return;
  for (let made = folder; ; made = dirname(made)) {
    await sync(dirname(made), fs);
    if (made === first || made === dirname(made)) return;
  }
}

async function sync(path: string, fs: FileOperations): Promise<void> {
  const handle = await fs.open(path, 'r');
  try {
    await handle.sync();
  } finally {
    await handle.close();
  }
}
