import { createHash } from 'node:crypto';
import type { Readable } from 'node:stream';
import { Readable as NodeReadable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import type { ReadableStream as WebStream } from 'node:stream/web';
import { Busboy } from '@fastify/busboy';
import { HttpError, parseJson, tooLarge } from '#src/server/http.ts';
import { settings } from '#src/server/settings.ts';
import { refuse } from './refuse.ts';

/** A file as it came, with the JSON part beside it. */
export interface Upload {
  bytes: Uint8Array;
  /** Hex digest, taken while the bytes came in. */
  sha256: string;
  fileName: string;
  /** The JSON part, parsed; undefined where it was not sent. */
  told: unknown;
}

const TEXT_BYTES = 200_000;
/** What a form holds beside its file: the JSON part, boundaries and headers. */
const BESIDES_BYTES = TEXT_BYTES + 20_000;
const NAME_LENGTH = 200;

/**
 * Take a form apart as it streams in: one part `file` and one JSON part.
 *
 * @param jsonPart - name of the JSON part; it may come as a field or as a file of type application/json
 * @throws {HttpError} 400 for a broken form or bad JSON, 413 for a file above the limit, 422 for parts that do not fit
 */
export async function readUpload(request: Request, jsonPart: string): Promise<Upload> {
  const limit = settings().maxUploadBytes;
  const hash = createHash('sha256');
  const chunks: Uint8Array[] = [];
  let fileName: string | undefined;
  let text: string | undefined;
  let fault: HttpError | undefined;
  const reading: Promise<void>[] = [];

  const form = openForm(request, limit);
  form.on('file', (name, stream, given) => {
    if (name === 'file' && fileName === undefined) {
      fileName = safeName(given);
      reading.push(
        drain(stream, (chunk) => {
          hash.update(chunk);
          chunks.push(chunk);
        }).then(() => {
          if (stream.truncated) fault ??= tooLarge(limit);
        }),
      );
      return;
    }
    if (name !== jsonPart || text !== undefined) fault ??= unknownPart(name, jsonPart);
    reading.push(
      drainText(stream).then((value) => {
        if (value === null) fault ??= tooLarge(TEXT_BYTES);
        else text ??= value;
      }),
    );
  });
  form.on('field', (name, value, _nameCut, cut) => {
    if (name !== jsonPart || text !== undefined) fault ??= unknownPart(name, jsonPart);
    else if (cut) fault ??= tooLarge(TEXT_BYTES);
    else text = value;
  });
  const tooMany = () => {
    fault ??= refuse('#', `Send one file and one part "${jsonPart}"`);
  };
  form.on('partsLimit', tooMany).on('filesLimit', tooMany).on('fieldsLimit', tooMany);

  try {
    const body = NodeReadable.fromWeb((request.body ?? new ReadableStream()) as WebStream<Uint8Array>);
    await pipeline(body, (source) => upTo(source, limit + BESIDES_BYTES), form);
    await Promise.all(reading);
  } catch (error) {
    if (error instanceof HttpError) throw error;
    throw fault ?? new HttpError(400, `The form cannot be read: ${error instanceof Error ? error.message : 'broken'}`);
  }
  if (fault) throw fault;
  if (fileName === undefined) throw refuse('#/file', 'Send the spectrum as the part "file"');
  return { bytes: Buffer.concat(chunks), sha256: hash.digest('hex'), fileName, told: parsePart(text, jsonPart) };
}

function openForm(request: Request, limit: number) {
  try {
    return new Busboy({
      headers: { 'content-type': request.headers.get('content-type') ?? '' },
      limits: { fileSize: limit, files: 2, fields: 2, parts: 3, fieldSize: TEXT_BYTES, fieldNameSize: 100 },
    });
  } catch {
    throw new HttpError(400, 'The form cannot be read: its boundary is missing');
  }
}

/** Pass a body on, up to a number of bytes: its Content-Length may lie or be missing. @throws {HttpError} 413 */
async function* upTo(source: AsyncIterable<Uint8Array>, limit: number): AsyncGenerator<Uint8Array> {
  let size = 0;
  for await (const chunk of source) {
    size += chunk.byteLength;
    if (size > limit) throw tooLarge(limit);
    yield chunk;
  }
}

/** A small part as text, or null when it is not small. */
async function drainText(stream: Readable): Promise<string | null> {
  const chunks: Uint8Array[] = [];
  let size = 0;
  await drain(stream, (chunk) => {
    size += chunk.byteLength;
    if (size <= TEXT_BYTES) chunks.push(chunk);
  });
  return size > TEXT_BYTES ? null : Buffer.concat(chunks).toString('utf8');
}

async function drain(stream: Readable, take: (chunk: Uint8Array) => void): Promise<void> {
  for await (const chunk of stream) take(chunk as Uint8Array);
}

const unknownPart = (name: string, jsonPart: string) =>
  refuse(`#/${name}`, `Send one file and one part "${jsonPart}", not "${name}"`);

const parsePart = (text: string | undefined, part: string): unknown =>
  text === undefined ? undefined : parseJson(text, `The part "${part}" is not JSON`);

/** The last part of a path, without control characters. */
function safeName(given: string | undefined): string {
  const last = (given ?? '').split(/[\\/]/).at(-1) ?? '';
  // biome-ignore lint/suspicious/noControlCharactersInRegex: these are what a file name must not hold
  const clean = last.replace(/[\u0000-\u001f\u007f-\u009f\u200e\u200f\u202a-\u202e\u2066-\u2069]/g, '').trim();
  return clean.slice(0, NAME_LENGTH) || 'spectrum';
}
