import { DomainError } from '../errors.ts';
import { type DoubleGroup, type DoubleIrrep, doubleGroup } from './double-group.ts';
import type { IrrepCount } from './groups.ts';
import { momentumCharacter } from './spin-rotation.ts';

/** How often each irrep of a double group occurs. */
export interface DoubleCount {
  irrep: DoubleIrrep;
  count: number;
}

/**
 * Reduces a representation of a double group.
 *
 * @param characters - real characters by class
 */
export function reduceDouble({ classes, irreps }: DoubleGroup, characters: readonly number[]): DoubleCount[] {
  const inner = (a: readonly number[], b: readonly number[]): number =>
    classes.reduce((sum, { size }, c) => sum + size * a[c]! * b[c]!, 0);
  return irreps
    .map((irrep) => ({
      irrep,
      count: Math.round(inner(characters, irrep.characters) / inner(irrep.characters, irrep.characters)),
    }))
    .filter(({ count }) => count !== 0);
}

/**
 * The irrep of a double group with this label, of either kind: `Γ8+`, `G3/2g`, `T2g`. A pair answers to both its
 * numbers together.
 *
 * @throws DomainError `unknown-symbol` on `field`
 */
export function doubleIrrep(group: DoubleGroup, label: string, field: string): DoubleIrrep {
  const found = group.irreps.find(({ bethe, label: own }) => bethe === label || own === label);
  if (found) return found;
  const listed = group.irreps.map(({ bethe, label: own }) => `${own} (${bethe})`).join(', ');
  throw new DomainError(
    'unknown-symbol',
    `The double group of ${group.symbol} has no irrep “${label}”. It has ${listed}.`,
    field,
  );
}

/** Whether a label is one of a double group alone: by number after Bethe, or by a half-integer j. */
export const isDoubleLabel = (label: string): boolean => label.startsWith('Γ') || label.includes('/2');

/**
 * Reduces the direct product of irreps of a double group.
 *
 * @returns labels after Bethe where one of the factors has such a label, else `T2g` and `E1/2g`
 * @throws DomainError `unknown-symbol` on `group` or `irreps`
 */
export function doubleProduct(symbol: string, irreps: readonly string[]): IrrepCount[] {
  const group = doubleGroup(symbol);
  const factors = irreps.map((label) => doubleIrrep(group, label, 'irreps').characters);
  const characters = group.classes.map((_, c) => factors.reduce((product, row) => product * row[c]!, 1));
  const bethe = irreps.some((label) => label.startsWith('Γ'));
  return reduceDouble(group, characters).map(({ irrep, count }) => ({
    irrep: bethe ? irrep.bethe : irrep.label,
    count,
  }));
}

/** Characters of the spin of a term, which does not see inversion: those of D of j = S. */
export function spinCharacters({ classes }: DoubleGroup, multiplicity: number): number[] {
  return classes.map(({ representative }) => momentumCharacter(multiplicity, representative));
}

/** Characters of an irrep of the point group in its double group. */
export function orbitalCharacters(group: DoubleGroup, irrep: string, field: string): number[] {
  return doubleIrrep(group, irrep, field).characters;
}

/**
 * What a term becomes under spin–orbit coupling: its spin times its orbital part, in the double group.
 *
 * @throws DomainError `unknown-symbol`, or `unsupported` for a linear group
 */
export function spinOrbitComponents(symbol: string, term: { multiplicity: number; irrep: string }): DoubleCount[] {
  const group = doubleGroup(symbol);
  const [spin, orbital] = [spinCharacters(group, term.multiplicity), orbitalCharacters(group, term.irrep, 'term')];
  return reduceDouble(
    group,
    spin.map((x, c) => x * orbital[c]!),
  );
}
