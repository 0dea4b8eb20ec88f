import { createHash } from 'node:crypto';
import { Readable, Transform } from 'node:stream';
import { ZipFile } from 'yazl';

interface Sums {
  sha256: string;
  sha512: string;
  size: number;
}
/** What a file holds: ready bytes, or a way to get them when their turn comes. */
export type Source = string | Buffer | (() => Promise<Readable | string | Buffer>);

/**
 * A BagIt 1.0 bag (RFC 8493) as a ZIP stream. Files are read one after another while the archive is written, so that
 * memory holds one of them at most. Times, modes and order are fixed: the same files give the same bytes.
 */
export class BagStream {
  readonly #zip = new ZipFile();
  readonly #payload = new Map<string, Sums>();
  readonly #tags = new Map<string, Sums>();
  readonly #top: string;
  readonly #mtime: Date;
  /** The file that is being read, closed when the archive is given up. */
  #current: Readable | undefined;

  /** @param top - name of the one folder in the archive; @param date - ISO 8601, stamped on every file */
  constructor(top: string, date: string) {
    this.#top = top;
    this.#mtime = dosDate(date);
    this.#zip.on('error', (error: Error) => this.#output.destroy(error));
    this.#output.on('close', () => this.#current?.destroy());
  }

  get #output(): Readable {
    return this.#zip.outputStream as Readable;
  }

  /** The archive. Destroy it to give up. */
  get stream(): Readable {
    return this.#output;
  }

  /** Sums of the payload files written so far, by path below `data/`. */
  get written(): ReadonlyMap<string, Sums> {
    return this.#payload;
  }

  /** Add a payload file. @param path - below `data/` */
  add(path: string, source: Source): void {
    this.#addFile(`data/${path}`, source, this.#payload, path);
  }

  /** Close the bag: manifests, `bag-info.txt` with these lines and Payload-Oxum, tag manifests. */
  finish(info: readonly [label: string, value: string][]): void {
    const tag = (path: string, source: Source) => this.#addFile(path, source, this.#tags, path);
    tag('bagit.txt', 'BagIt-Version: 1.0\nTag-File-Character-Encoding: UTF-8\n');
    tag('bag-info.txt', async () => this.#bagInfo(info));
    for (const algorithm of ['sha256', 'sha512'] as const)
      tag(`manifest-${algorithm}.txt`, async () => manifest(this.#payload, algorithm, 'data/'));
    // Tag manifests list every tag file but themselves.
    for (const algorithm of ['sha256', 'sha512'] as const)
      this.#addFile(`tagmanifest-${algorithm}.txt`, async () => manifest(this.#tags, algorithm, ''), new Map(), '');
    this.#zip.end();
  }

  #bagInfo(info: readonly [string, string][]): string {
    const octets = [...this.#payload.values()].reduce((sum, { size }) => sum + size, 0);
    const lines = [...info, ['Payload-Oxum', `${octets}.${this.#payload.size}`] as const];
    return lines.map(([label, value]) => `${label}: ${value.replace(/\s+/g, ' ').trim()}\n`).join('');
  }

  #addFile(path: string, source: Source, sums: Map<string, Sums>, key: string): void {
    const options = { mtime: this.#mtime, mode: 0o100644, forceDosTimestamp: true };
    this.#zip.addReadStreamLazy(`${this.#top}/${path}`, options, (give) => {
      open(source).then(
        (content) => {
          this.#current = content;
          const tap = summing((found) => sums.set(key, found));
          content.on('error', (error) => tap.destroy(error));
          tap.on('error', (error) => this.#output.destroy(error));
          give(null, content.pipe(tap));
        },
        (error: Error) => this.#output.destroy(error),
      );
    });
  }
}

async function open(source: Source): Promise<Readable> {
  const content = typeof source === 'function' ? await source() : source;
  return content instanceof Readable ? content : Readable.from([Buffer.from(content)]);
}

/** Passes bytes on and tells their sums at the end. */
function summing(done: (sums: Sums) => void): Transform {
  const [sha256, sha512] = [createHash('sha256'), createHash('sha512')];
  let size = 0;
  return new Transform({
    transform(chunk: Buffer, _, pass) {
      sha256.update(chunk);
      sha512.update(chunk);
      size += chunk.length;
      pass(null, chunk);
    },
    flush(end) {
      done({ sha256: sha256.digest('hex'), sha512: sha512.digest('hex'), size });
      end();
    },
  });
}

/** RFC 8493 §2.1.3: sum, blanks, path; line ends and percent signs in a path are percent-encoded. */
function manifest(files: ReadonlyMap<string, Sums>, algorithm: 'sha256' | 'sha512', prefix: string): string {
  const encoded = (path: string) => path.replace(/%/g, '%25').replace(/\r/g, '%0D').replace(/\n/g, '%0A');
  return [...files].map(([path, sums]) => `${sums[algorithm]}  ${prefix}${encoded(path)}\n`).join('');
}

/** ZIP times are local times without a zone: take the UTC clock, so that the bytes do not hang on where this runs. */
function dosDate(iso: string): Date {
  const d = new Date(iso);
  return new Date(
    Math.max(1980, d.getUTCFullYear()),
    d.getUTCMonth(),
    d.getUTCDate(),
    d.getUTCHours(),
    d.getUTCMinutes(),
    d.getUTCSeconds(),
  );
}
