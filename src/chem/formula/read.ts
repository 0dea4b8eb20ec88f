import { type CautionContext, cautionsFor } from '../cautions/index.ts';
import { addCompositions, type Composition, findElement, hillFormula, isDBlock, molarMass } from '../elements.ts';
import { DomainError } from '../errors.ts';
import { ligands as builtIn, indexLigands, type Ligand, type LigandIndex } from '../ligands/index.ts';
import { settleAquaIon } from './aqua.ts';
import { type Balance, balanceCharges } from './balance.ts';
import { coordination, geometriesFor, settleBinding } from './coordination.ts';
import type { Context } from './entity.ts';
import { identityOf } from './identity.ts';
import { countLabels, takeLabels } from './isotopes.ts';
import { compositionOf } from './lexicon.ts';
import { settleMeanings } from './meanings.ts';
import { formulaOfName } from './names.ts';
import { type NormalText, normalise } from './normalise.ts';
import { settleOligomer } from './oligomer.ts';
import { codeOfPlace, placeNumbering } from './place.ts';
import { entityText, ionText, type PrintCharges, saltText } from './print.ts';
import type { RawEntity, RawSalt } from './raw.ts';
import { applyRepairs, mistypedMetal, type Repair, suspiciousTokens } from './repairs.ts';
import { interpretSalt } from './salt.ts';
import { shareCharge } from './share.ts';
import { type Component, parseSyntax } from './syntax.ts';
import type { Answers, EntityReading, LigandReading, Question, Reading } from './types.ts';

const builtInIndex = indexLigands(builtIn);

/**
 * Read the formula of a coordination compound: salt, entities, centres, ligands, charges, oxidation states.
 *
 * What is doubtful comes back as a question with choices, and null (NaN for a mass, empty for a list) in the values
 * that hang on it; `answers[code] = value` settles it.
 *
 * @param text - the formula as typed, at most 500 characters
 * @param answers - values chosen for questions of an earlier reading, by code
 * @param ownLigands - ligands of the asker beside the built-in library; where spellings meet, theirs are taken
 * @throws {DomainError} field `formula`, with the 0-based offset: `empty`, `too-large`, `unbalanced-bracket`,
 *   `malformed-hydrate`, `unknown-symbol`, `no-d-block-metal`, `f-block-metal`, `unreadable`
 */
export function readFormula(text: string, answers: Answers = {}, ownLigands: readonly Ligand[] = []): Reading {
  const library = ownLigands.length === 0 ? builtInIndex : indexLigands([...ownLigands, ...builtIn]);
  const labels = takeLabels(formulaOfName(text) ?? normalise(text), library);
  const { source } = labels;
  const components = parseSyntax(source); // brackets are judged before spelling
  const reading = readNormal(source, components, answers, library, text);
  return labels.found.length === 0 ? reading : { ...reading, isotopes: countLabels(labels, components) };
}

function readNormal(
  source: NormalText,
  components: readonly Component[],
  answers: Answers,
  library: LigandIndex,
  text: string,
): Reading {
  const suspicious = suspiciousTokens(source);
  if (suspicious.length > 0) {
    const value = [...new Set(suspicious.map((r) => r.token))].join(',');
    const question = repairQuestion(
      'suspicious-token',
      suspicious,
      value,
      `Is ${quoted(suspicious, 'typed')} meant to be ${quoted(suspicious, 'meant')}?`,
      source,
    );
    if (answers['suspicious-token'] !== value) return unsettled(text, question);
    return read(applyRepairs(source, suspicious), answers, library, text);
  }
  return read(source, answers, library, text, components);
}

const quoted = (repairs: readonly Repair[], key: 'typed' | 'meant') =>
  [...new Set(repairs.map((r) => r[key]))].join(', ');

function repairQuestion(
  code: string,
  repairs: readonly Repair[],
  value: string,
  detail: string,
  source: NormalText,
): Question {
  return {
    code,
    detail,
    choices: [{ value, label: `read as ${quoted(repairs, 'meant')}` }],
    position: source.at[repairs[0]?.start ?? 0],
  };
}

/** Read, and where that fails for want of a metal, look whether one was typed in the wrong case. */
function read(
  source: NormalText,
  answers: Answers,
  library: LigandIndex,
  typed: string,
  parsed: readonly Component[] = parseSyntax(source),
): Reading {
  try {
    return interpret(parsed, { source, library, answers }, typed);
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    const repair = mistypedMetal(source);
    if (!repair || (error.code !== 'unknown-symbol' && error.code !== 'no-d-block-metal'))
      throw plainError(error, source);
    const repaired = applyRepairs(source, [repair]);
    const reading = read(repaired, answers, library, typed); // throws what is wrong beside the metal
    if (answers[error.code] === repair.meant) return reading;
    const detail = `${error.message}. Is ${repair.typed} meant to be ${repair.meant}?`;
    return unsettled(typed, repairQuestion(error.code, [repair], repair.meant, detail, source));
  }
}

/** A plain molecule such as C6H12O6 is refused for want of a metal, not for its spelling. */
function plainError(error: DomainError, source: NormalText): DomainError {
  const composition = error.code === 'unknown-symbol' ? compositionOf(source.text) : null;
  if (!composition || Object.keys(composition).some(isDBlock)) return error;
  return noMetal(Object.keys(composition), 0);
}

function noMetal(elements: readonly string[], position: number): DomainError {
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

function interpret(components: readonly Component[], base: Omit<Context, 'ask' | 'codeAt'>, typed: string): Reading {
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

const ENTITY_DOUBTS = [
  'impossible-oxidation-state',
  'implausible-oxidation-state',
  'mixed-valence',
  'oxidation-state-sharing',
];

function entityReading(entity: RawEntity, charge: number | null, sphereOpen: boolean, context: Context): EntityReading {
  // Each entity takes its number here, doubtful or not, so that an answer keeps its place.
  for (const code of ENTITY_DOUBTS) context.codeAt(code, entity.start);
  const shared = shareCharge(entity, charge, context);
  const { number, denticity } = coordination(entity);
  const coordinationNumber = sphereOpen ? null : number;
  const composition = entityComposition(entity);
  const centre = shared.centres.find((c) => isDBlock(c.element));
  return {
    entity: entityText(entity, charge),
    charge,
    hill: hillFormula(composition),
    molarMass: molarMass(composition),
    count: entity.count,
    composition,
    centres: shared.centres,
    ligands: entity.ligands.map(
      (l): LigandReading => ({
        abbreviation: l.ligand.abbreviation,
        count: l.count,
        charge: l.known ? (shared.ligandCharges.get(l) ?? l.ligand.charge) : null,
        denticity: denticity.get(l) ?? 1,
        hapticity: l.hapticity,
        donors: l.donors.slice(0, l.hapticity ?? denticity.get(l) ?? l.donors.length),
        ...shapeOf(l.ligand, denticity.get(l) ?? 1),
        bridging: l.mu !== null,
        name: l.ligand.name,
      }),
    ),
    coordinationNumber,
    geometries: geometriesFor(coordinationNumber, centre?.dCount ?? null),
    configuration: entity.configuration,
    identity: identityOf(entity, composition, charge),
  };
}

/** How a ligand holds its donors, where it uses all of them. */
function shapeOf(
  { bite, span, planar, donors }: Ligand,
  denticity: number,
): Pick<LigandReading, 'bite' | 'span' | 'planar'> {
  if (denticity < 2 || denticity !== donors.length) return {};
  return {
    bite: bite.map(([a, b]) => [a, b]),
    ...(span ? { span } : {}),
    ...(planar ? { planar } : {}),
  };
}

function entityComposition(entity: RawEntity): Composition {
  return addCompositions([
    ...entity.metals.map((m) => ({ composition: { [m.element]: 1 }, count: m.count })),
    ...entity.ligands.map((l) => ({ composition: l.ligand.composition, count: l.count })),
  ]);
}

function totalComposition(salt: RawSalt, entities: readonly EntityReading[]): Composition {
  return addCompositions([
    ...entities.map((e) => ({ composition: e.composition, count: e.count })),
    ...salt.ions.map(({ ion, count }) => ({ composition: compositionOf(ion.formula) ?? {}, count })),
    ...salt.bareMetals.map((m) => ({ composition: { [m.element]: 1 }, count: m.count })),
    ...salt.solvates,
  ]);
}

function allLigands(entities: readonly EntityReading[]): LigandReading[] {
  const merged = new Map<string, LigandReading>();
  for (const ligand of entities.flatMap((e) => e.ligands)) {
    const key = [ligand.abbreviation, ligand.bridging, ligand.hapticity, ligand.donors.join()].join('|');
    merged.set(key, { ...ligand, count: ligand.count + (merged.get(key)?.count ?? 0) });
  }
  return [...merged.values()];
}

/** The facts of a reading that cautions are drawn from. */
export function cautionContext(reading: Omit<Reading, 'cautions'>): CautionContext {
  return {
    composition: reading.composition,
    ligands: reading.ligands.map((l) => ({ abbreviation: l.abbreviation, count: l.count })),
    counterIons: reading.counterIons.map((i) => i.formula),
    metals: reading.centres.map(({ element, oxidationState }) => ({ element, oxidationState })),
  };
}

/** A reading of a text that must be settled before it can be read at all. */
function unsettled(typed: string, question: Question): Reading {
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
