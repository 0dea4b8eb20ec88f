import { createCipheriv, createDecipheriv, hkdfSync, randomBytes } from 'node:crypto';
import { settings } from '../settings.ts';

const VERSION = 1;
const IV_BYTES = 12; // as NIST SP 800-38D §8.2.2 wants it for random ones
const TAG_BYTES = 16;

/** A key for this purpose alone, derived from the registry's secret (RFC 5869). */
const key = (): Buffer =>
  Buffer.from(hkdfSync('sha256', settings().authSecret, '', `zaffre second factor v${VERSION}`, 32));

/** What is authenticated beside the text: a secret moved into another row does not open there. */
const bound = (rowId: string): Buffer => Buffer.from(`${VERSION}:${rowId}`);

/**
 * Encipher a secret for keeping, by AES-256-GCM.
 *
 * @param rowId - id of the row that keeps it; the same is needed to read it
 * @returns base64url of version (1 byte), IV (12), tag (16), enciphered bytes
 */
export function encipher(secret: Uint8Array, rowId: string): string {
  const iv = randomBytes(IV_BYTES);
  const cipher = createCipheriv('aes-256-gcm', key(), iv).setAAD(bound(rowId));
  const body = Buffer.concat([cipher.update(secret), cipher.final()]);
  return Buffer.concat([Buffer.of(VERSION), iv, cipher.getAuthTag(), body]).toString('base64url');
}

/**
 * The secret that `encipher` kept.
 *
 * @throws {Error} when it was altered, belongs to another row, or was kept under another secret or version
 */
export function decipher(kept: string, rowId: string): Uint8Array {
  const bytes = Buffer.from(kept, 'base64url');
  if (bytes[0] !== VERSION) throw new Error(`a kept secret of version ${bytes[0]} cannot be read`);
  const [iv, tag, body] = [
    bytes.subarray(1, 1 + IV_BYTES),
    bytes.subarray(1 + IV_BYTES, 1 + IV_BYTES + TAG_BYTES),
    bytes.subarray(1 + IV_BYTES + TAG_BYTES),
  ];
  const cipher = createDecipheriv('aes-256-gcm', key(), iv, { authTagLength: TAG_BYTES });
  cipher.setAAD(bound(rowId)).setAuthTag(tag);
  return new Uint8Array(Buffer.concat([cipher.update(body), cipher.final()]));
}
