import { type ConfigurationSpace, configurationSpace } from './configuration-space.ts';
import { combine, identity, type Matrix, within } from './matrix.ts';
import { quantumNumber, splitBy } from './subspaces.ts';
import { symmetricEigenvalues } from './symmetric-eigen.ts';

/** A term of the free dⁿ ion. */
export interface FreeIonTerm {
  /** Multiplicity and letter: `3F`. */
  label: string;
  multiplicity: number;
  /** Total orbital angular momentum L. */
  orbital: number;
  /** Energy with Racah's A = 0, in the unit of B and C. */
  energy: number;
}

/** Letter of L: S, P, D, F, G, H, I; J is passed over, and dⁿ goes no further. */
export function termLetter(orbital: number): string {
  return 'SPDFGHI'.charAt(orbital);
}

interface TermSpace {
  multiplicity: number;
  orbital: number;
  B: Matrix;
  C: Matrix;
}

const known = new Map<number, readonly TermSpace[]>();

function termSpaces(n: number): readonly TermSpace[] {
  const spaces = known.get(n) ?? build(configurationSpace(n));
  known.set(n, spaces);
  return spaces;
}

function build(space: ConfigurationSpace): TermSpace[] {
  return splitBy(space.spinSquared, identity(space.size)).flatMap((spin) =>
    splitBy(space.orbitalSquared, spin.basis).map(({ value, basis }) => ({
      multiplicity: Math.round(2 * quantumNumber(spin.value)) + 1,
      orbital: quantumNumber(value),
      B: within(basis, space.B),
      C: within(basis, space.C),
    })),
  );
}

/**
 * Terms of dⁿ with their energies, ascending; a term that occurs twice is told twice.
 *
 * @param n - whole number 1 to 9
 * @param B - Racah B, and C in the same unit; A = 0
 * @throws DomainError `out-of-range` (field `n`)
 * @see J. S. Griffith, The Theory of Transition-Metal Ions, Cambridge 1961, for the energies (from memory)
 */
export function freeIonTerms(n: number, B: number, C: number): FreeIonTerm[] {
  const terms = termSpaces(n).flatMap(({ multiplicity, orbital, ...matrices }) => {
    const energies = symmetricEigenvalues(
      combine([
        [B, matrices.B],
        [C, matrices.C],
      ]),
    );
    // Each term comes with its 2L + 1 components of one energy.
    return energies
      .filter((_, i) => i % (2 * orbital + 1) === 0)
      .map((energy) => ({ label: `${multiplicity}${termLetter(orbital)}`, multiplicity, orbital, energy }));
  });
  return terms.sort((a, b) => a.energy - b.energy);
}

/**
 * Ground term by Hund's rules with the J of its lowest level: |L − S| up to the half-filled shell, L + S beyond.
 *
 * @throws DomainError `out-of-range` (field `n`)
 */
export function hundGround(n: number): { label: string; multiplicity: number; orbital: number; J: number } {
  const spaces = [...termSpaces(n)].sort((a, b) => b.multiplicity - a.multiplicity || b.orbital - a.orbital);
  const { multiplicity, orbital } = spaces[0]!;
  const spin = (multiplicity - 1) / 2;
  const J = n <= 5 ? Math.abs(orbital - spin) : orbital + spin;
  return { label: `${multiplicity}${termLetter(orbital)}`, multiplicity, orbital, J };
}
