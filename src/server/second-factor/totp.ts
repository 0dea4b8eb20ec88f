import { Secret, TOTP } from 'otpauth';

/** What every authenticator app reads: RFC 6238 with SHA-1, six digits, steps of 30 s. */
const PARAMETERS = { algorithm: 'SHA1', digits: 6, period: 30 } as const;
/** Steps before and after the present one whose codes are taken, for clocks that differ (RFC 6238 §5.2). */
const WINDOW = 1;

/** A new shared secret of 160 bits, the length that RFC 4226 §4 recommends. */
export const newTotpSecret = (): Uint8Array => new Secret({ size: 20 }).bytes;

const asSecret = (bytes: Uint8Array): Secret => new Secret({ buffer: new Uint8Array(bytes).buffer });

/** The secret as a person types it: base32 in groups of four. */
export const groupedBase32 = (secret: Uint8Array): string => asSecret(secret).base32.replace(/(.{4})(?=.)/g, '$1 ');

/** The secret as a QR code holds it, an `otpauth:` address that names registry and account. */
export const totpUri = (secret: Uint8Array, email: string): string =>
  new TOTP({ ...PARAMETERS, issuer: 'Zaffre', label: email, secret: asSecret(secret) }).toString();

/**
 * The time step to which a code belongs, or null where it fits neither the present step nor a neighbour.
 * Codes are compared in constant time.
 *
 * @param code - six digits
 * @param now - milliseconds since 1970
 */
export function totpStep(secret: Uint8Array, code: string, now: number): number | null {
  const asked = { ...PARAMETERS, secret: asSecret(secret), timestamp: now };
  const delta = TOTP.validate({ ...asked, token: code, window: WINDOW });
  return delta === null ? null : TOTP.counter(asked) + delta;
}
