import { and, eq, sql } from 'drizzle-orm';
import { readFormula } from '../../chem/formula/index.ts';
import type { PreparationInput, PreparationPatch } from '../../contracts/complexes.ts';
import type { Tx } from '../../db/client.ts';
import { complexes, preparationComponents, preparations, spectra } from '../../db/schema/index.ts';
import type { Asker } from '../access/asker.ts';
import { type ComplexAccess, type PreparationChange, requireLab, requireMemberSight } from '../access/records.ts';
import { complexSight } from '../access/sight.ts';
import { connectivityOf } from '../complexes/derive-identity.ts';
import { database } from '../database.ts';
import { HttpError } from '../http.ts';
import { newId, nowIso } from '../ids.ts';
import { notifyMentions, textBefore } from '../mentions/notify.ts';
import { record } from '../trail.ts';

interface FormulaUnit {
  formula: string | null;
  counterIons: { formula: string; count: number }[];
  solvates: { formula: string; count: number }[];
  molarMass: number | null;
  components: { complexId: string; perFormulaUnit: number }[];
}

/**
 * What a formula unit holds: the complex itself, perhaps a second complex (a double salt), counter-ions and solvates.
 *
 * @throws {HttpError} 422 when the formula does not hold the complex it is filed under
 */
async function formulaUnit(
  tx: Tx,
  asker: Asker,
  complex: typeof complexes.$inferSelect,
  formula: string | undefined,
  answers: Record<string, string>,
): Promise<FormulaUnit> {
  if (formula === undefined)
    return {
      formula: null,
      counterIons: [],
      solvates: [],
      molarMass: null,
      components: [{ complexId: complex.id, perFormulaUnit: 1 }],
    };
  const reading = readFormula(formula, { ...complex.answers, ...answers });
  const own = reading.entities.find((entity) => entity.identity === connectivityOf(complex.identityKey));
  if (!own) {
    const detail = `This formula holds ${reading.entities.map((e) => e.entity).join(' and ')}, not ${complex.formula}`;
    throw new HttpError(422, detail, { errors: [{ pointer: '#/formula', detail }] });
  }
  const components = [{ complexId: complex.id, perFormulaUnit: own.count }];
  for (const other of reading.entities.filter((entity) => entity !== own)) {
    const [known] = await tx
      .select({ id: complexes.id })
      .from(complexes)
      .where(
        and(
          sql`${complexes.identityKey} like ${`${other.identity.replace(/[\\%_]/g, '\\$&')} / %`} escape '\\'`,
          complexSight(asker),
        ),
      )
      .limit(1);
    if (!known) {
      const detail = `Register ${other.entity} first: a double salt names every complex in it`;
      throw new HttpError(422, detail, { errors: [{ pointer: '#/formula', detail }] });
    }
    components.push({ complexId: known.id, perFormulaUnit: other.count });
  }
  const plain = (parts: { formula: string; count: number }[]) =>
    parts.map(({ formula: part, count }) => ({ formula: part, count }));
  return {
    formula: reading.formula,
    counterIons: plain(reading.counterIons),
    solvates: plain(reading.solvates),
    molarMass: reading.molarMass,
    components,
  };
}

const storeComponents = async (tx: Tx, preparationId: string, unit: FormulaUnit) => {
  await tx.delete(preparationComponents).where(eq(preparationComponents.preparationId, preparationId));
  await tx.insert(preparationComponents).values(unit.components.map((component) => ({ preparationId, ...component })));
};

/** Add a preparation of a complex in sight, for a lab of the asker's. @returns its id */
export async function createPreparation({ asker, complex }: ComplexAccess, input: PreparationInput): Promise<string> {
  requireLab(asker, input.lab);
  requireMemberSight(asker, complex);
  if (complex.state === 'withdrawn') throw new HttpError(409, 'The complex is withdrawn');
  const { write } = await database();
  const id = newId();
  await write(async (tx) => {
    const { lab, answers, formula, ...rest } = input;
    const { components, ...unit } = await formulaUnit(tx, asker, complex, formula, answers ?? {});
    const now = nowIso();
    await tx.insert(preparations).values({
      id,
      complexId: complex.id,
      labId: lab,
      makerId: asker.accountId,
      ...rest,
      ...unit,
      createdAt: now,
      updatedAt: now,
    });
    await storeComponents(tx, id, { ...unit, components });
    await record(tx, asker, {
      action: 'add-preparation',
      subjectType: 'preparation',
      subjectId: id,
      detail: { complex: complex.accession, label: input.label },
    });
    await notifyMentions(tx, asker, { text: input.notes, subject: { type: 'preparation', id } });
  });
  return id;
}

/** @throws {HttpError} 412 when somebody changed it meanwhile, 422 */
export async function changePreparation(
  { asker, complex, preparation }: PreparationChange,
  patch: PreparationPatch,
): Promise<void> {
  if (patch.state === 'withdrawn' && !patch.withdrawnReason)
    throw new HttpError(422, 'Say why it is withdrawn', {
      errors: [{ pointer: '#/withdrawnReason', detail: 'A reason is needed' }],
    });
  const { write } = await database();
  await write(async (tx) => {
    const { answers, formula, ...rest } = patch;
    const unit = formula === undefined ? null : await formulaUnit(tx, asker, complex, formula, answers ?? {});
    const { components: _components, ...columns } = unit ?? { components: [] };
    const changed = await tx
      .update(preparations)
      .set({ ...rest, ...columns, version: preparation.version + 1, updatedAt: nowIso() })
      .where(and(eq(preparations.id, preparation.id), eq(preparations.version, preparation.version)))
      .returning({ id: preparations.id });
    if (changed.length === 0) throw new HttpError(412, 'Somebody changed it meanwhile: read it again and repeat');
    if (unit) await storeComponents(tx, preparation.id, unit);
    await record(tx, asker, {
      action: patch.state === 'withdrawn' ? 'withdraw' : 'change',
      subjectType: 'preparation',
      subjectId: preparation.id,
      detail: patch,
    });
    const { id, notes } = preparation;
    await notifyMentions(tx, asker, {
      text: patch.notes ?? notes,
      before: textBefore(notes, preparation, patch),
      subject: { type: 'preparation', id },
    });
  });
}

/** @throws {HttpError} 409 while a spectrum rests on it */
export async function deletePreparation({ asker, preparation }: PreparationChange): Promise<void> {
  const { write } = await database();
  await write(async (tx) => {
    const [used] = await tx
      .select({ id: spectra.id })
      .from(spectra)
      .where(eq(spectra.preparationId, preparation.id))
      .limit(1);
    if (used) throw new HttpError(409, 'Spectra were measured on it: withdraw it instead');
    await tx.delete(preparationComponents).where(eq(preparationComponents.preparationId, preparation.id));
    await tx.delete(preparations).where(eq(preparations.id, preparation.id));
    await record(tx, asker, {
      action: 'delete',
      subjectType: 'preparation',
      subjectId: preparation.id,
      detail: { label: preparation.label },
    });
  });
}
