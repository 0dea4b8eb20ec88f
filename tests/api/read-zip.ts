import { inflateRawSync } from 'node:zlib';

export interface Entry {
  path: string;
  bytes: Buffer;
  /** DOS date and time, and the Unix mode, as stamped. */
  stamp: string;
  mode: number;
}

/**
 * Files of a ZIP archive by its central directory (PKWARE APPNOTE 4.3.12: stored and deflated files, no ZIP64). A
 * reader apart from the writer under test.
 */
export function readZip(archive: Buffer): Entry[] {
  const end = archive.lastIndexOf(Buffer.from([0x50, 0x4b, 0x05, 0x06]));
  if (end < 0) throw new Error('no end of central directory');
  const entries: Entry[] = [];
  let at = archive.readUInt32LE(end + 16);
  for (let n = archive.readUInt16LE(end + 10); n > 0; n--) {
    if (archive.readUInt32LE(at) !== 0x02014b50) throw new Error(`no central record at ${at}`);
    const method = archive.readUInt16LE(at + 10);
    const [compressed, size] = [archive.readUInt32LE(at + 20), archive.readUInt32LE(at + 24)];
    const [name, extra, comment] = [28, 30, 32].map((offset) => archive.readUInt16LE(at + offset)) as [
      number,
      number,
      number,
    ];
    const local = archive.readUInt32LE(at + 42);
    const start = local + 30 + archive.readUInt16LE(local + 26) + archive.readUInt16LE(local + 28);
    const raw = archive.subarray(start, start + compressed);
    const bytes = method === 0 ? raw : inflateRawSync(raw);
    if (bytes.length !== size) throw new Error('a file has another length than told');
    entries.push({
      path: archive.toString('utf8', at + 46, at + 46 + name),
      bytes,
      stamp: archive.toString('hex', at + 12, at + 16),
      mode: archive.readUInt32LE(at + 38) >>> 16,
    });
    at += 46 + name + extra + comment;
  }
  return entries;
}
