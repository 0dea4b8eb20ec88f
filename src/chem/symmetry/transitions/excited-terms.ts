import { freeIonTerms } from '../../ligand-field/free-ion.ts';
import { splitTerm } from '../splitting.ts';
import type { Term } from '../term-label.ts';

/** A term of dⁿ in the group of a polyhedron, as often as it occurs. */
export interface ExcitedTerm extends Term {
  label: string;
  /** Levels of this label, the ground term not counted. */
  count: number;
  /** Free-ion terms that they rise from, by rising energy: `4F`, `4P`. */
  freeIon: string[];
}

/** C/B that the free-ion terms are put in order with; their symmetry does not hang on it. */
const USUAL_RATIO = 4.5;

/**
 * The terms of dⁿ whose spin differs from the ground term's by one at most: those of its own spin first, then by the
 * energy of their first free-ion term.
 *
 * @param n - 1 to 9
 */
export function excitedTerms(group: string, n: number, ground: Term): ExcitedTerm[] {
  const found = new Map<string, ExcitedTerm>();
  for (const { label: freeIon, multiplicity } of freeIonTerms(n, 1, USUAL_RATIO)) {
    if (Math.abs(multiplicity - ground.multiplicity) > 2) continue;
    for (const label of splitTerm(group, freeIon)) {
      const entry = found.get(label) ?? { label, multiplicity, irrep: label.slice(1), count: 0, freeIon: [] };
      entry.count++;
      if (!entry.freeIon.includes(freeIon)) entry.freeIon.push(freeIon);
      found.set(label, entry);
    }
  }
  const own = found.get(`${ground.multiplicity}${ground.irrep}`);
  if (own) own.count--;
  return [...found.values()]
    .filter(({ count }) => count > 0)
    .sort((a, b) => Number(a.multiplicity !== ground.multiplicity) - Number(b.multiplicity !== ground.multiplicity));
}
