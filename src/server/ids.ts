import { createHash, randomBytes } from 'node:crypto';

/** The last id's millisecond and its count within it, so that ids of one process sort in the order they were made. */
let last = { at: 0, count: 0 };

/**
 * A UUID version 7 (RFC 9562 §5.7): sorts by the millisecond it was made in, and within one by a counter of 12 bits
 * (§6.2, method 1) that begins at random in its lower half; the rest is random.
 */
export function newId(now = Date.now()): string {
  const bytes = randomBytes(16);
  const begin = bytes.readUInt16BE(6) & 0x07ff;
  if (now > last.at) last = { at: now, count: begin };
  else if (last.count < 0x0fff) last = { at: last.at, count: last.count + 1 };
  else last = { at: last.at + 1, count: begin };
  bytes.writeUIntBE(last.at, 0, 6);
  bytes.writeUInt16BE(0x7000 | last.count, 6);
  bytes[8] = (bytes[8]! & 0x3f) | 0x80;
  const hex = bytes.toString('hex');
  return `${hex.slice(0, 8)}-${hex.slice(8, 12)}-${hex.slice(12, 16)}-${hex.slice(16, 20)}-${hex.slice(20)}`;
}

/** The present instant as it is stored: ISO 8601 in UTC with milliseconds. */
export const nowIso = (): string => new Date().toISOString();

/** SHA-256 in hex. */
export const sha256 = (data: string | Uint8Array): string => createHash('sha256').update(data).digest('hex');

/** A secret for a link or a token: 256 random bits, 43 characters. */
export const newSecret = (): string => randomBytes(32).toString('base64url');
