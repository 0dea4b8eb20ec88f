import { and, eq, inArray, sql } from 'drizzle-orm';
import type { LabRecord } from '#src/contracts/sharing.ts';
import { complexes, type labs, memberships, spectra } from '#src/db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import type { LabAccess } from '../access/sharing.ts';
import { complexSight, spectrumSight } from '../access/sight.ts';
import { database } from '../database.ts';

type Row = typeof labs.$inferSelect;

/** Labs as this asker gets them; complexes and spectra are counted over what the asker sees. */
export async function labRecords(asker: Asker, rows: Row[]): Promise<LabRecord[]> {
  if (rows.length === 0) return [];
  const { db } = await database();
  const ids = rows.map((lab) => lab.id);
  const count = sql<number>`count(*)`;
  const [people, made, measured] = await Promise.all([
    db
      .select({ lab: memberships.labId, count })
      .from(memberships)
      .where(inArray(memberships.labId, ids))
      .groupBy(memberships.labId),
    db
      .select({ lab: complexes.labId, count })
      .from(complexes)
      .where(and(inArray(complexes.labId, ids), complexSight(asker)))
      .groupBy(complexes.labId),
    db
      .select({ lab: spectra.labId, count })
      .from(spectra)
      .innerJoin(complexes, eq(complexes.id, spectra.complexId))
      .where(and(inArray(spectra.labId, ids), spectrumSight(asker)))
      .groupBy(spectra.labId),
  ]);
  const of = (counts: { lab: string; count: number }[], id: string) => counts.find((c) => c.lab === id)?.count ?? 0;
  return rows.map((lab) => ({
    id: lab.id,
    name: lab.name,
    place: lab.place,
    description: lab.description,
    outsideAttest: lab.outsideAttest,
    facility: lab.facility,
    members: of(people, lab.id),
    complexes: of(made, lab.id),
    spectra: of(measured, lab.id),
    role: asker.labs.get(lab.id) ?? null,
  }));
}

/** One lab as this asker gets it. */
export async function labRecord({ asker, lab }: Pick<LabAccess, 'asker' | 'lab'>): Promise<LabRecord> {
  const [record] = await labRecords(asker, [lab]);
  return record!;
}
