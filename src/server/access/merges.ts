import { eq } from 'drizzle-orm';
import { mergeTasks } from '../../db/schema/index.ts';
import { database } from '../database.ts';
import { HttpError, notInSight } from '../http.ts';
import type { Asker } from './asker.ts';
import { type Access, type ComplexAccess, leads, type SpectrumAccess, seeComplex, seeSpectrum } from './records.ts';

// Proofs of access to the merging of records. As in records.ts: services ask for one, and only this folder makes them.

export interface MergeTaskAccess extends Access<'change'> {
  readonly task: typeof mergeTasks.$inferSelect;
}
/** The record that is to be merged away. */
export interface MergeAccess extends Access<'change'>, Pick<ComplexAccess, 'complex' | 'alias'> {}
export interface SpectrumMoveAccess extends Access<'change'>, Pick<SpectrumAccess, 'complex' | 'spectrum'> {}

const prove = <A extends object>(facts: object): A => facts as A;

function requireSteward(asker: Asker): void {
  if (!asker.steward) throw new HttpError(403, 'Only a steward merges records');
}

/** @throws {HttpError} 403, 404 */
export async function seeMergeTask(asker: Asker, id: string): Promise<MergeTaskAccess> {
  requireSteward(asker);
  const { db } = await database();
  const [task] = await db.select().from(mergeTasks).where(eq(mergeTasks.id, id));
  if (!task) throw notInSight();
  return prove({ asker, task });
}

/** @throws {HttpError} 403, 404 */
export async function mayMergeComplex(asker: Asker, accession: string): Promise<MergeAccess> {
  requireSteward(asker);
  return prove(await seeComplex(asker, accession));
}

/** A lead of the lab that measured it, or a steward. @throws {HttpError} 404, 403 */
export async function mayMoveSpectrum(asker: Asker, id: string): Promise<SpectrumMoveAccess> {
  const seen = await seeSpectrum(asker, id);
  if (!asker.scopes.has('write') || !leads(asker, seen.spectrum.labId))
    throw new HttpError(403, 'A lead of the measuring lab or a steward may move a spectrum');
  return prove(seen);
}
