import { createHash, randomBytes } from 'node:crypto';

/** A UUID version 7 (RFC 9562 §5.7): sorts by the millisecond it was made in, the rest is random. */
export function newId(now = Date.now()): string {
  const bytes = randomBytes(16);
  bytes.writeUIntBE(now, 0, 6);
  bytes[6] = (bytes[6]! & 0x0f) | 0x70;
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
