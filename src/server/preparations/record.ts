import { and, eq, inArray } from 'drizzle-orm';
import type { PreparationRecord } from '../../contracts/complexes.ts';
import { complexes, labs, preparationComponents, type preparations } from '../../db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import { complexSight } from '../access/sight.ts';
import { formulaCautions } from '../complexes/formula-cautions.ts';
import { database } from '../database.ts';

type Row = typeof preparations.$inferSelect;

/** Preparations as the wire has them, in the order given; of a double salt, the complexes in the asker's sight. */
export async function preparationRecords(asker: Asker, rows: readonly Row[]): Promise<PreparationRecord[]> {
  if (rows.length === 0) return [];
  const { db } = await database();
  const [labRows, parts, owners] = await Promise.all([
    db.select({ id: labs.id, name: labs.name }).from(labs),
    db
      .select({
        preparationId: preparationComponents.preparationId,
        accession: complexes.accession,
        perFormulaUnit: preparationComponents.perFormulaUnit,
      })
      .from(preparationComponents)
      .innerJoin(complexes, eq(complexes.id, preparationComponents.complexId))
      .where(
        and(
          inArray(
            preparationComponents.preparationId,
            rows.map((row) => row.id),
          ),
          complexSight(asker),
        ),
      ),
    db
      .select({ id: complexes.id, accession: complexes.accession })
      .from(complexes)
      .where(
        inArray(
          complexes.id,
          rows.map((row) => row.complexId),
        ),
      ),
  ]);
  const labName = new Map(labRows.map((lab) => [lab.id, lab.name]));
  const accession = new Map(owners.map((owner) => [owner.id, owner.accession]));
  return rows.map((row) => ({
    id: row.id,
    complex: accession.get(row.complexId) ?? '',
    lab: { id: row.labId, name: labName.get(row.labId) ?? '' },
    label: row.label,
    formula: row.formula,
    components: parts
      .filter((part) => part.preparationId === row.id)
      .map(({ accession: part, perFormulaUnit }) => ({ accession: part, perFormulaUnit })),
    counterIons: row.counterIons,
    solvates: row.solvates,
    molarMass: row.molarMass,
    form: row.form,
    host: row.host,
    isotopicLabel: row.isotopicLabel,
    enantiomericExcess: row.enantiomericExcess,
    purity: row.purity,
    storage: row.storage,
    atmosphere: row.atmosphere,
    preparedOn: row.preparedOn,
    notes: row.notes,
    visibility: row.visibility,
    state: row.state,
    cautions: row.formula ? formulaCautions(row.formula) : [],
  }));
}
