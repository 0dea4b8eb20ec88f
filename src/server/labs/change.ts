import { and, eq, sql } from 'drizzle-orm';
import type { LabInput, LabPatch, LabRecord } from '#src/contracts/sharing.ts';
import { isUniqueViolation } from '#src/db/client.ts';
import { labs } from '#src/db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import type { LabChange } from '../access/sharing.ts';
import { database } from '../database.ts';
import { HttpError } from '../http.ts';
import { newId, nowIso } from '../ids.ts';
import { record } from '../trail.ts';
import { labRecord } from './record.ts';

function nameTaken(error: unknown): never {
  if (!isUniqueViolation(error)) throw error;
  throw new HttpError(409, 'Another lab has this name', {
    errors: [{ pointer: '#/name', detail: 'Choose a name that tells the labs apart' }],
  });
}

/** Add a lab without people; a steward invites its first lead. @throws {HttpError} 409 when the name is taken */
export async function createLab(asker: Asker, { name, place, description }: LabInput): Promise<LabRecord> {
  const { write } = await database();
  const row = { id: newId(), name, place: place || null, description: description || null, createdAt: nowIso() };
  const lab = await write(async (tx) => {
    const [made] = await tx.insert(labs).values(row).returning();
    await record(tx, asker, { action: 'create', subjectType: 'lab', subjectId: row.id, detail: { name } });
    return made!;
  }).catch(nameTaken);
  return labRecord({ asker, lab });
}

/** Change what is told in `patch`. @throws {HttpError} 412 when it changed meanwhile, 409 when the name is taken */
export async function changeLab({ asker, lab }: LabChange, patch: LabPatch): Promise<LabRecord> {
  const { write } = await database();
  const changed = await write(async (tx) => {
    const [row] = await tx
      .update(labs)
      .set({ ...patch, version: sql`${labs.version} + 1` })
      .where(and(eq(labs.id, lab.id), eq(labs.version, lab.version)))
      .returning();
    if (!row) throw new HttpError(412, 'Somebody changed this lab meanwhile: read it again and repeat');
    await record(tx, asker, { action: 'change', subjectType: 'lab', subjectId: lab.id, detail: { ...patch } });
    return row;
  }).catch(nameTaken);
  return labRecord({ asker, lab: changed });
}
