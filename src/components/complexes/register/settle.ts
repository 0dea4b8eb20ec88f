import type { SpinChoice, spinChoices as SpinChoices } from '#src/chem/electrons.ts';
import type { EntityReading } from '#src/chem/formula/index.ts';
import type { Isomer, IsomerList, isomersOf as IsomersOf } from '#src/chem/geometry/index.ts';
import type { ComplexInput } from '#src/contracts/complexes.ts';

/** An isomer by its place in the list; `rac` where the hand is not told. Null: not stated. */
export type IsomerPick = { index: number; rac: boolean } | null;
export type SpinPick = SpinChoice['spin'] | 'crossover' | null;

/** What a person chose; what is left out takes its default. */
export interface Choices {
  /** The entity they were made for: choices do not outlive it. */
  of: string;
  geometry?: string | null;
  isomer?: IsomerPick;
  spinState?: SpinPick;
}

/** Everything that follows from an entity and the choices made for it. */
export interface Settled {
  geometry: string | null;
  list: IsomerList | null;
  pick: IsomerPick;
  isomer: Isomer | null;
  chirality: string | null;
  spins: SpinChoice[];
  spinState: SpinPick;
  groundTerm: SpinChoice['groundTerm'];
}

interface Chemistry {
  isomersOf: typeof IsomersOf;
  spinChoices: typeof SpinChoices;
}

/** The entity, and the prefix before it: what choices are made for. */
export const subjectOf = (entity: EntityReading): string => `${entity.identity} ${entity.configuration ?? ''}`;

/** How many forms there are when mirror images count as one. */
export const formCount = (list: IsomerList): number => list.count - list.enantiomericPairs;

/**
 * The isomer that the formula itself states: by being the only form, or by its prefix (`trans-`, `Λ-`). Of a chiral
 * one without a hand, the pair.
 */
export function defaultPick(list: IsomerList, configuration: string | null): IsomerPick {
  const hand = /[ΔΛ]/.exec(configuration ?? '')?.[0];
  const name = configuration?.replace(/[ΔΛ]-?|rac-?/g, '').replace(/^-|-$/g, '') || null;
  const form = formCount(list) === 1 ? list.isomers : list.isomers.filter((one) => name && one.descriptor === name);
  const [first] = form;
  if (!first || form.length !== (first.chiral ? 2 : 1)) return null;
  const isomer = (hand && form.find((one) => one.chirality === hand)) || first;
  return { index: list.isomers.indexOf(isomer), rac: isomer.chiral && !(hand && isomer.chirality === hand) };
}

const FIELDS = new Set(['OC-6', 'T-4', 'SP-4']);

/** The spin states to choose from; empty where there is no choice, or the polyhedron is not one they are told for. */
function spinsOf(spinChoices: Chemistry['spinChoices'], entity: EntityReading, geometry: string | null): SpinChoice[] {
  const [centre, ...others] = entity.centres;
  if (!centre || others.length > 0 || geometry === null || !FIELDS.has(geometry)) return [];
  return spinChoices(centre.dCount, geometry as 'OC-6' | 'T-4' | 'SP-4');
}

/** Choices made for another entity, and those that no longer fit, give way to the defaults. */
export function settle({ isomersOf, spinChoices }: Chemistry, entity: EntityReading, choices: Choices): Settled {
  const own: Partial<Choices> = choices.of === subjectOf(entity) ? choices : {};
  const isSingle = entity.centres.length === 1;
  const fits = own.geometry === null || (own.geometry !== undefined && entity.geometries.includes(own.geometry));
  const geometry = !isSingle ? null : fits ? own.geometry! : (entity.geometries[0] ?? null);

  const list = isomersOf(entity, geometry)?.list ?? null;
  const chosen = own.isomer === null || (own.isomer && list?.isomers[own.isomer.index]) ? own.isomer : undefined;
  const pick = list ? (chosen === undefined ? defaultPick(list, entity.configuration) : chosen) : null;
  const isomer = (pick && list?.isomers[pick.index]) ?? null;

  const spins = spinsOf(spinChoices, entity, geometry);
  const spinState = spins.length > 1 ? (own.spinState ?? null) : null;
  const state = spins.length === 1 ? spins[0] : spins.find(({ spin }) => spin === spinState);
  return {
    geometry,
    list,
    pick,
    isomer,
    chirality: isomer?.chiral ? (pick?.rac ? 'rac' : isomer.chirality) : null,
    spins,
    spinState,
    groundTerm: state?.groundTerm ?? null,
  };
}

/** The parts of a registration that are settled here. */
export function settledInput({
  geometry,
  pick,
  spinState,
}: Settled): Pick<ComplexInput, 'geometry' | 'isomer' | 'chirality' | 'spinState'> {
  return {
    geometry,
    isomer: pick === null ? null : pick.index,
    ...(pick?.rac ? { chirality: 'rac' as const } : {}),
    spinState,
  };
}
