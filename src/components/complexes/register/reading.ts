import { DomainError } from '#src/chem/errors.ts';
import type { EntityReading, LigandReading, Question, Reading } from '#src/chem/formula/index.ts';

/** What came of reading the text: nothing typed, a refusal with its place, or a reading. */
export type Attempt =
  | { kind: 'empty' }
  | { kind: 'refused'; message: string; position: number | null }
  | { kind: 'read'; reading: Reading };

/** A question that was answered. It is kept whole, since a settled reading no longer asks it. */
export interface Answered {
  question: Question;
  value: string;
}

export const answersOf = (answered: readonly Answered[]): Record<string, string> =>
  Object.fromEntries(answered.map(({ question, value }) => [question.code, value]));

/** Reads the text; what the reader refuses becomes something to show. */
export function attemptReading(
  readFormula: (text: string, answers: Record<string, string>) => Reading,
  text: string,
  answered: readonly Answered[],
): Attempt {
  if (text.trim() === '') return { kind: 'empty' };
  try {
    return { kind: 'read', reading: readFormula(text, answersOf(answered)) };
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    return { kind: 'refused', message: sentence(error.message), position: error.position ?? null };
  }
}

const sentence = (text: string) => text.charAt(0).toUpperCase() + text.slice(1);

/** The one entity of a reading that a record can be made of; null while there is none, or several. */
export function soleEntity(reading: Reading): EntityReading | null {
  const [entity, ...others] = reading.entities;
  return entity && others.length === 0 ? entity : null;
}

/** Whether more than the entity was typed: counter-ions or solvates, which belong to a preparation. */
export const isSalt = (reading: Reading): boolean => reading.counterIons.length > 0 || reading.solvates.length > 0;

/** `Cl^-`, `ox^2-`, `en`: a ligand with its charge, in the text the formula setting reads. */
export function ligandText({ abbreviation, charge }: Pick<LigandReading, 'abbreviation' | 'charge'>): string {
  if (!charge) return abbreviation;
  const size = Math.abs(charge) === 1 ? '' : Math.abs(charge);
  return `${abbreviation}^${size}${charge > 0 ? '+' : '-'}`;
}

const WATER = new Set(['H2O', 'OH2', 'D2O']);

/** What of the typed text stays with the preparation, in words: "the counter-ion and the water of crystallisation". */
export function besideEntity({ counterIons, solvates }: Pick<Reading, 'counterIons' | 'solvates'>): string {
  const ions = counterIons.length > 0 ? [counterIons.length === 1 ? 'the counter-ion' : 'the counter-ions'] : [];
  const water = solvates.some(({ formula }) => WATER.has(formula)) ? ['water of crystallisation'] : [];
  const other = solvates.some(({ formula }) => !WATER.has(formula)) ? ['solvent of crystallisation'] : [];
  return [...ions, ...water, ...other].join(' and ');
}
