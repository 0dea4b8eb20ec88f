import { createHash, generateKeyPairSync, type KeyObject, randomBytes, sign } from 'node:crypto';

/** What the page and the authenticator add to an answer; a test may lie about each. */
export interface Circumstances {
  origin?: string;
  rpId?: string;
  /** The signature counter of the answer. */
  counter?: number;
  type?: string;
}

const USER_PRESENT = 0x01;
const ATTESTED = 0x40; // the credential's public key comes along

const base64url = (bytes: Uint8Array | string) => Buffer.from(bytes).toString('base64url');

/**
 * An authenticator in a few lines: one P-256 key that answers registrations (attestation "none") and sign-ins, as
 * WebAuthn §6.1 and §6.5 lay the bytes out. Its answers are those of `PublicKeyCredential.toJSON()`.
 */
export class SoftwareAuthenticator {
  readonly credentialId = randomBytes(32);
  readonly #privateKey: KeyObject;
  readonly #x: Buffer;
  readonly #y: Buffer;

  constructor(readonly origin = 'http://localhost:4321') {
    const { privateKey, publicKey } = generateKeyPairSync('ec', { namedCurve: 'P-256' });
    this.#privateKey = privateKey;
    const { x, y } = publicKey.export({ format: 'jwk' });
    [this.#x, this.#y] = [Buffer.from(x!, 'base64url'), Buffer.from(y!, 'base64url')];
  }

  get id(): string {
    return base64url(this.credentialId);
  }

  register(challenge: string, { origin, rpId, counter = 0, type = 'webauthn.create' }: Circumstances = {}) {
    const length = Buffer.of(this.credentialId.length >> 8, this.credentialId.length & 0xff);
    const attested = Buffer.concat([Buffer.alloc(16), length, this.credentialId, this.#coseKey()]);
    const authData = Buffer.concat([this.#head(rpId, USER_PRESENT | ATTESTED, counter), attested]);
    // CBOR (RFC 8949): { "fmt": "none", "attStmt": {}, "authData": bytes }
    const attestationObject = Buffer.concat([
      Buffer.from('a363666d74646e6f6e656761747453746d74a068617574684461746159', 'hex'),
      Buffer.of(authData.length >> 8, authData.length & 0xff),
      authData,
    ]);
    const clientDataJSON = this.#clientData(type, challenge, origin);
    return this.#answer({
      clientDataJSON: base64url(clientDataJSON),
      attestationObject: base64url(attestationObject),
      transports: ['usb'],
    });
  }

  assert(challenge: string, { origin, rpId, counter = 1, type = 'webauthn.get' }: Circumstances = {}) {
    const authenticatorData = this.#head(rpId, USER_PRESENT, counter);
    const clientDataJSON = this.#clientData(type, challenge, origin);
    const signed = Buffer.concat([authenticatorData, createHash('sha256').update(clientDataJSON).digest()]);
    return this.#answer({
      clientDataJSON: base64url(clientDataJSON),
      authenticatorData: base64url(authenticatorData),
      signature: base64url(sign('sha256', signed, this.#privateKey)),
    });
  }

  /** The public key as a COSE key (RFC 9053 §7.1): kty EC2, alg ES256, curve P-256, x, y. */
  #coseKey(): Buffer {
    const hex = (text: string) => Buffer.from(text, 'hex');
    return Buffer.concat([hex('a5010203262001215820'), this.#x, hex('225820'), this.#y]);
  }

  #head(rpId = 'localhost', flags: number, counter: number): Buffer {
    const head = Buffer.alloc(5);
    head.writeUInt8(flags, 0);
    head.writeUInt32BE(counter, 1);
    return Buffer.concat([createHash('sha256').update(rpId).digest(), head]);
  }

  #clientData(type: string, challenge: string, origin = this.origin): string {
    return JSON.stringify({ type, challenge, origin, crossOrigin: false });
  }

  #answer<R>(response: R) {
    return { id: this.id, rawId: this.id, type: 'public-key' as const, response, clientExtensionResults: {} };
  }
}
