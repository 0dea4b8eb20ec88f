import { cautionsFor } from '../cautions/index.ts';
import { findElement, hillFormula, isDBlock, molarMass } from '../elements.ts';
import { DomainError } from '../errors.ts';
import { settleAquaIon } from './aqua.ts';
import { type Balance, balanceCharges } from './balance.ts';
import { settleBinding } from './coordination.ts';
import type { Context } from './entity.ts';
import { allLigands, cautionContext, entityReading, totalComposition } from './entity-reading.ts';
import { settleMeanings } from './meanings.ts';
import { settleOligomer } from './oligomer.ts';
import { codeOfPlace, placeNumbering } from './place.ts';
import { ionText, type PrintCharges, saltText } from './print.ts';
import type { RawSalt } from './raw.ts';
import { interpretSalt } from './salt.ts';
import type { Component } from './syntax.ts';
import type { Answers, Question, Reading } from './types.ts';

/** Everything that follows from parsed brackets; questions are gathered on the way. @throws {DomainError} */
export function interpret(
  components: readonly Component[],
  base: Omit<Context, 'ask' | 'codeAt'>,
  typed: string,
): Reading {
  const questions: Question[] = [];
  const ask = (question: Question) => {
    if (!questions.some((q) => q.code === question.code)) questions.push(question);
  };
  const context: Context = { ...base, ask, codeAt: placeNumbering() };
  const written = separateBareIons(interpretSalt(components, context));
  requireMetal(written, context);
  const charge = questions.find((q) => /^charge-text\b/.test(q.code));
  if (charge) return unsettled(typed, charge); // even the composition hangs on it
  const { salt: placed, open: aquaOpen } = settleAquaIon(
    withAnsweredCharge(settleOligomer(written, context), base.answers),
    context,
  );
  const balance = balanceCharges(placed, context);
  const bound = placed.entities.map((entity, i) =>
    settleBinding(settleMeanings(entity, balance.entities[i] ?? null, context), context),
  );
  const salt = { ...placed, entities: bound.map(({ entity }) => entity) };
  const entities = salt.entities.map((entity, i) =>
    entityReading(entity, balance.entities[i] ?? null, aquaOpen || bound[i]!.open, context),
  );
  const composition = totalComposition(salt, entities);
  const first = entities[0]!;
  const formula = saltText(salt, printCharges(salt, balance, base.answers));
  const counterIons = [
    ...salt.ions.map(({ ion, count }) => ({ formula: ionText(ion.symbol, ion.charge), charge: ion.charge, count })),
    ...salt.bareMetals.flatMap((metal, i) => {
      const charge = balance.bareMetals[i];
      return charge === null || charge === undefined
        ? []
        : [{ formula: ionText(metal.element, charge), charge, count: metal.count }];
    }),
  ];
  const reading: Omit<Reading, 'cautions'> = {
    formula,
    entity: first.entity,
    entityCharge: first.charge,
    hill: hillFormula(composition),
    molarMass: molarMass(composition),
    composition,
    overallCharge: balance.overall,
    coordinationNumber: first.coordinationNumber,
    centres: entities.flatMap((e) => e.centres),
    ligands: allLigands(entities),
    counterIons,
    solvates: salt.solvates.map(({ symbol, count }) => ({ formula: symbol, count })),
    isotopes: [],
    entities,
    geometries: first.geometries,
    configuration: first.configuration,
    questions,
  };
  return { ...reading, cautions: cautionsFor(cautionContext(reading)) };
}

/** Charges are printed where the whole is charged, where they were a person's choice, and as typed while in question. */
function printCharges(salt: RawSalt, balance: Balance, answers: Answers): PrintCharges {
  if (balance.overall === null) {
    const typed = (parts: readonly { charge: number | null }[]) => parts.map((part) => part.charge);
    return { entities: typed(salt.entities), bareMetals: typed(salt.bareMetals), written: true };
  }
  const chosen = answers['charge-split'] !== undefined || answers['mixed-valence'] !== undefined;
  return {
    ...balance,
    written: balance.overall !== 0 || (chosen && salt.entities.length + salt.bareMetals.length > 1),
  };
}

/** `Cr2(SO4)3`: two ions, not one pair of bound atoms. */
function separateBareIons(salt: RawSalt): RawSalt {
  return {
    ...salt,
    entities: salt.entities.map((entity) => {
      const [metal, other] = entity.metals;
      if (entity.bracketed || entity.ligands.length > 0 || !metal || other) return entity;
      return { ...entity, count: entity.count * metal.count, metals: [{ ...metal, count: 1 }] };
    }),
  };
}

/** The charge a person chose for a doubtful oxidation state takes the place of the typed one. */
function withAnsweredCharge(salt: RawSalt, answers: Answers): RawSalt {
  const answered = salt.entities.map((_, i) => {
    // The answer to the later question first: a repair of an impossible state may still be an implausible one.
    const given = ['implausible', 'impossible'].map((kind) => answers[codeOfPlace(`${kind}-oxidation-state`, i)] ?? '');
    const answer = given.find((value) => /^-?\d{1,2}$/.test(value));
    return answer === undefined ? null : Number(answer);
  });
  if (answered.every((charge) => charge === null)) return salt;
  return {
    ...salt,
    overallCharge: null,
    entities: salt.entities.map((e, i) => ({ ...e, charge: answered[i] ?? e.charge })),
  };
}

function requireMetal(salt: RawSalt, context: Context): void {
  const symbols = [
    ...salt.entities.flatMap((e) => e.metals.map((m) => m.element)),
    ...salt.bareMetals.map((m) => m.element),
  ];
  // Beside a complex, brackets may hold [Al(H2O)6]3+, but hardly no metal at all: [CO(NH3)6][Cr(CN)6]
  const empty = salt.entities.find((e) => e.bracketed && e.metals.length === 0);
  if (!empty && salt.entities.some((e) => e.metals.some((m) => isDBlock(m.element)))) return;
  const start = (empty ?? salt.entities[0])?.start ?? 0;
  throw noMetal([...symbols, ...salt.ions.map((one) => one.ion.symbol)], context.source.at[start] ?? 0);
}

/** The refusal of a formula without a d-block metal. */
export function noMetal(elements: readonly string[], position: number): DomainError {
  const f = elements.find((symbol) => findElement(symbol)?.block === 'f');
  return f
    ? new DomainError(
        'f-block-metal',
        `${findElement(f)!.name} is an f-block metal; a d-block centre is needed`,
        'formula',
        position,
      )
    : new DomainError(
        'no-d-block-metal',
        'There is no d-block metal (groups 3 to 12) in the formula',
        'formula',
        position,
      );
}

/** A reading of a text that must be settled before it can be read at all. */
export function unsettled(typed: string, question: Question): Reading {
  return {
    formula: typed.trim(),
    entity: '',
    entityCharge: null,
    hill: '',
    molarMass: Number.NaN,
    composition: {},
    overallCharge: null,
    coordinationNumber: null,
    centres: [],
    ligands: [],
    counterIons: [],
    solvates: [],
    isotopes: [],
    entities: [],
    geometries: [],
    configuration: null,
    questions: [question],
    cautions: [],
  };
}
