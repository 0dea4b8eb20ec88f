import { spinChoices } from '../../chem/electrons.ts';
import { type EntityReading, type Reading, readFormula } from '../../chem/formula/index.ts';
import { type Isomer, isomerIndex, isomersOf } from '../../chem/geometry/index.ts';
import { relativeConfigurationKey } from '../../chem/geometry/isomer-key.ts';
import type { ComplexInput } from '../../contracts/complexes.ts';
import { HttpError } from '../http.ts';

/** The choices of a person from which everything else of a complex follows. */
export type IdentityChoices = Pick<ComplexInput, 'formula' | 'answers' | 'geometry' | 'chirality' | 'spinState'> & {
  /** As a person gives it, or as a record keeps it. */
  isomer?: ComplexInput['isomer'] | KeptIsomer;
};

/** An isomer as its record has it, with the hand that was stated: of a chiral form that may be none. */
export interface KeptIsomer {
  sites: string[];
  chelates: [number, number][];
  chirality: Identity['chirality'];
}

const isKept = (isomer: IdentityChoices['isomer']): isomer is KeptIsomer =>
  typeof isomer === 'object' && isomer !== null && !Array.isArray(isomer);

export interface Identity {
  reading: Reading;
  entity: EntityReading;
  charge: number;
  geometries: (string | null)[];
  spinStates: (string | null)[];
  /** The isomer, or null while it is not stated. */
  isomer: Isomer | null;
  descriptor: string | null;
  chirality: 'Δ' | 'Λ' | 'C' | 'A' | 'rac' | null;
  /** What makes it one complex; equal for every way of writing it. */
  key: string;
}

/** The part of an identity key that stereoisomers share: composition, charge, ligands and their linkage. */
export const connectivityOf = (identityKey: string): string => identityKey.split(' / ')[0] ?? '';

const refuse = (pointer: string, detail: string, more: Record<string, unknown> = {}) =>
  new HttpError(422, detail, { errors: [{ pointer, detail }], members: more });

/** The one entity of a formula, with every question answered. @throws {HttpError} 422 @throws {DomainError} */
function readEntity(choices: IdentityChoices): { reading: Reading; entity: EntityReading; charge: number } {
  const reading = readFormula(choices.formula, choices.answers ?? {});
  if (reading.questions.length > 0) {
    const errors = reading.questions.map(({ code, detail }) => ({ pointer: `#/answers/${code}`, detail }));
    throw new HttpError(422, 'The formula leaves questions that only you can answer', {
      errors,
      members: { questions: reading.questions },
    });
  }
  const [entity, ...others] = reading.entities;
  if (!entity) throw refuse('#/formula', 'There is no coordination entity in this formula');
  if (others.length > 0)
    throw refuse(
      '#/formula',
      `This is a salt of ${reading.entities.length} complexes: register each on its own, then the salt as a preparation`,
    );
  if (entity.charge === null)
    throw refuse('#/formula', 'The charge of the entity does not follow: write it, for example "3+"');
  return { reading, entity, charge: entity.charge };
}

function perCentre<T>(given: T | T[] | null | undefined, count: number, pointer: string): (T | null)[] {
  if (given === null || given === undefined) return Array<null>(count).fill(null);
  if (!Array.isArray(given)) return Array<T>(count).fill(given);
  if (given.length !== count) throw refuse(pointer, `Give one value, or one for each of the ${count} centres`);
  return given;
}

function chosenIsomer(
  choices: IdentityChoices,
  prefix: string | null,
  found: NonNullable<ReturnType<typeof isomersOf>>,
): Isomer | null {
  const { list, request } = found;
  if (typeof choices.isomer === 'number') {
    const isomer = list.isomers[choices.isomer];
    if (!isomer) throw refuse('#/isomer', `There are ${list.isomers.length} isomers, counted from 0`);
    return isomer;
  }
  if (choices.isomer) {
    const { sites, chelates } = Array.isArray(choices.isomer)
      ? { sites: choices.isomer, chelates: undefined }
      : choices.isomer;
    const index = isomerIndex(request, list, sites, chelates);
    if (index === null)
      throw refuse('#/isomer', 'These sites fit no isomer, or several: take one as derive/isomers lists it');
    return list.isomers[index]!;
  }
  // One relative configuration only: there is nothing to state but the hand.
  if (list.count - list.enantiomericPairs === 1) return list.isomers[0] ?? null;
  if (choices.isomer === undefined && prefix) {
    const named = list.isomers.filter((isomer) => isomer.descriptor === prefix);
    if (named.length > 0 && named.length - (named[0]!.chiral ? 1 : 0) === 1) return named[0]!;
  }
  return null;
}

/**
 * Everything that follows from a formula and the choices made.
 *
 * @throws {DomainError} where the formula cannot be read
 * @throws {HttpError} 422 where it leaves questions or a choice does not fit
 */
export function deriveIdentity(choices: IdentityChoices): Identity {
  const { reading, entity, charge } = readEntity(choices);
  const count = entity.centres.length;
  const geometries = perCentre(choices.geometry, count, '#/geometry');
  const spinStates = perCentre(choices.spinState, count, '#/spinState');
  for (const geometry of geometries) {
    if (geometry !== null && count === 1 && !entity.geometries.includes(geometry))
      throw refuse(
        '#/geometry',
        `${geometry} does not fit: coordination number ${entity.coordinationNumber} has ${entity.geometries.join(', ') || 'no listed polyhedron'}`,
      );
  }

  const hand = /[ΔΛ]/.exec(reading.configuration ?? '')?.[0] as 'Δ' | 'Λ' | undefined;
  const prefix = reading.configuration?.replace(/[ΔΛ]-?|rac-?/g, '').replace(/^-|-$/g, '') || null;
  const found = isomersOf(entity, geometries[0] ?? null);
  let isomer = found ? chosenIsomer(choices, prefix, found) : null;
  const picked = choices.isomer !== undefined && choices.isomer !== null;
  // A hand is stated by picking one of the two mirror images, or by the formula's prefix; rac takes it back.
  let chirality: Identity['chirality'] = null;
  if (isomer?.chiral) {
    if (choices.chirality === 'rac' || (!picked && reading.configuration?.includes('rac'))) chirality = 'rac';
    else if (isKept(choices.isomer)) chirality = choices.isomer.chirality;
    else if (picked) chirality = isomer.chirality;
    else if (hand && isomer.chirality) {
      const { descriptor } = isomer;
      isomer =
        found?.list.isomers.find((other) => other.descriptor === descriptor && other.chirality === hand) ?? isomer;
      chirality = hand;
    }
  }
  const configuration = isomer ? relativeConfigurationKey(geometries[0]!, isomer.sites, isomer.chelates) : '';
  // rac and "not stated" are one record; each hand is one of its own.
  const handKey = chirality === null || chirality === 'rac' ? '' : chirality;
  return {
    reading,
    entity,
    charge,
    geometries,
    spinStates,
    isomer,
    descriptor: isomer?.descriptor ?? null,
    chirality,
    key: [entity.identity, geometries.map((g) => g ?? '').join(','), configuration, handKey].join(' / '),
  };
}

/** The ground term of a centre in its parent cubic field, where geometry, d-count and spin state settle it. */
export function groundTermOf(
  dCount: number | null,
  geometry: string | null,
  spinState: string | null,
): { label: string; group: string } | null {
  if (geometry !== 'OC-6' && geometry !== 'T-4') return null;
  const choices = spinChoices(dCount, geometry);
  const choice = choices.length === 1 ? choices[0] : choices.find((c) => c.spin === spinState);
  return choice?.groundTerm ?? null;
}
