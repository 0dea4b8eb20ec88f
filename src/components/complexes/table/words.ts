import { bandStyle } from '#src/components/marks/band-classes.ts';

/** Names of polyhedra by their IUPAC symbols, as the page was given them. */
export type GeometryNames = Readonly<Record<string, string>>;

const SPIN: Record<string, string> = {
  low: 'low spin',
  intermediate: 'intermediate spin',
  high: 'high spin',
  crossover: 'spin crossover',
};
export const spinWords = (spin: string): string => SPIN[spin] ?? spin;

const STATES: Record<string, string> = { draft: 'drafts', registered: 'registered', withdrawn: 'withdrawn' };
export const stateWords = (state: string): string => STATES[state] ?? state;

export const bandClassWords = (bandClass: string): string => bandStyle(bandClass).name;

/** An oxidation state as a filter names it: III, −I, 0; a fraction in figures. */
export function oxidationWords(value: string): string {
  const state = Number(value);
  const roman = ['0', 'I', 'II', 'III', 'IV', 'V', 'VI', 'VII', 'VIII', 'IX'][Math.abs(state)];
  return `${state < 0 ? '−' : ''}${roman ?? Math.abs(state)}`;
}
