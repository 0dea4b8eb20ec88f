import { DomainError } from '../errors.ts';
import { limits } from './types.ts';

const SIGNATURES: readonly { bytes: readonly number[]; what: string }[] = [
  { bytes: [0x50, 0x4b, 0x03, 0x04], what: 'a workbook or a ZIP archive' },
  { bytes: [0xd0, 0xcf, 0x11, 0xe0], what: 'a workbook or a compound binary file' },
  { bytes: [0x25, 0x50, 0x44, 0x46], what: 'a PDF document' },
  { bytes: [0x1f, 0x8b], what: 'a gzip archive' },
  { bytes: [0x89, 0x50, 0x4e, 0x47], what: 'a PNG picture' },
];

/**
 * Text of a file: UTF-8 where it is valid, else Latin-1; UTF-16 by its byte order mark. The mark itself goes.
 *
 * @throws {DomainError} `empty`, `too-large` (over 50 MB) or `unreadable` (binary content)
 */
export function decodeText(bytes: Uint8Array): string {
  if (bytes.length > limits.bytes) {
    throw new DomainError('too-large', `the file has ${bytes.length} bytes; up to ${limits.bytes} are read`, 'file');
  }
  for (const { bytes: start, what } of SIGNATURES) {
    if (start.every((byte, i) => bytes[i] === byte)) {
      throw unreadable(`this is ${what}, not text; export the spectrum as JCAMP-DX or CSV and send that`);
    }
  }
  const text = decode(bytes);
  if (text.trim() === '') throw new DomainError('empty', 'the file holds no text', 'file');
  if (looksBinary(text)) {
    throw unreadable('the file holds binary data, not text; export the spectrum as JCAMP-DX or CSV and send that');
  }
  return text;
}

function unreadable(message: string): DomainError {
  return new DomainError('unreadable', message, 'file', 1);
}

function decode(bytes: Uint8Array): string {
  if (bytes[0] === 0xff && bytes[1] === 0xfe) return new TextDecoder('utf-16le').decode(bytes);
  if (bytes[0] === 0xfe && bytes[1] === 0xff) return new TextDecoder('utf-16be').decode(bytes);
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch {
    return new TextDecoder('iso-8859-1').decode(bytes);
  }
}

/** A NUL, or more than one control character in fifty, within the first part of a text. */
function looksBinary(text: string): boolean {
  const head = text.slice(0, 65_536);
  let odd = 0;
  for (let i = 0; i < head.length; i++) {
    const code = head.charCodeAt(i);
    if (code === 0) return true;
    if (code < 32 && !(code >= 9 && code <= 13) && code !== 26) odd++;
  }
  return odd * 50 > head.length;
}

/**
 * Lines of a text, whatever ends them.
 *
 * @throws {DomainError} `too-large` above two million lines, or for a line above 10 000 characters
 */
export function splitLines(text: string): string[] {
  refuseManyLines(text);
  const lines = text.split(/\r\n|\n|\r/);
  const long = lines.findIndex((line) => line.length > limits.lineLength);
  if (long >= 0) {
    const message = `the line has ${lines[long]!.length} characters; up to ${limits.lineLength} are read`;
    throw new DomainError('too-large', message, 'file', long + 1);
  }
  return lines;
}

function refuseManyLines(text: string): void {
  const sign = text.includes('\n') ? '\n' : '\r';
  let count = 0;
  for (let at = text.indexOf(sign); at >= 0; at = text.indexOf(sign, at + 1)) {
    if (++count > limits.lines) throw new DomainError('too-large', `more than ${limits.lines} lines`, 'file');
  }
}
