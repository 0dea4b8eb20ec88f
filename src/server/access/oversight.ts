import { HttpError } from '../http.ts';
import { type Asker, labsWith } from './asker.ts';
import type { Access } from './records.ts';

// Proofs of who may look over the registry and over a lab's own records.

export interface TrailReading extends Access<'see'> {
  readonly oversees: 'registry';
}
export interface AccessLogReading extends Access<'see'> {
  /** Labs whose records are told of; null for all. */
  readonly ofLabs: readonly string[] | null;
}

const prove = <A extends object>(facts: object): A => facts as A;

/** The trail is read by stewards who signed in. @throws {HttpError} 403 */
export function mayReadTrail(asker: Asker): TrailReading {
  if (!asker.steward || asker.tokenId !== null) throw new HttpError(403, 'Stewards who signed in read the trail');
  return prove({ asker, oversees: 'registry' });
}

/** Who looked is told to stewards, and to leads for what is their labs'. @throws {HttpError} 403 */
export function mayReadAccessLog(asker: Asker): AccessLogReading {
  const led = labsWith(asker, 'lead');
  if (asker.tokenId !== null || (!asker.steward && led.length === 0))
    throw new HttpError(403, 'Stewards and leads of a lab, signed in, see who looked');
  return prove({ asker, ofLabs: asker.steward ? null : led });
}
