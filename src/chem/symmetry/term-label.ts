import { DomainError } from '../errors.ts';
import { requireFinite } from './groups.ts';
import { linearSymbols } from './linear-groups.ts';
import { irrepOfGroup, requireLinear } from './products.ts';

/** A term of a complex: spin multiplicity and irrep. */
export interface Term {
  multiplicity: number;
  irrep: string;
}

/**
 * Reads a term such as `4T2g` or `1Sigma_g+`.
 *
 * @throws DomainError `unreadable` or `unknown-symbol` on `field`
 */
export function readTerm(group: string, text: string, field: string): Term {
  const [, multiplicity, irrep] = /^([1-9]\d?)([A-Z].*)$/.exec(text.trim()) ?? [];
  if (!multiplicity || !irrep) {
    throw new DomainError(
      'unreadable',
      `“${text}” is not a term. Write the spin multiplicity and the irrep: 4T2g.`,
      field,
    );
  }
  requireIrrep(group, irrep, field);
  return { multiplicity: Number(multiplicity), irrep };
}

/**
 * Refuses a label that the group, linear or not, has no irrep for.
 *
 * @throws DomainError `unknown-symbol` on `field`
 */
export function requireIrrep(group: string, irrep: string, field: string): void {
  if (linearSymbols.includes(group)) requireLinear(group, irrep, field);
  else irrepOfGroup(requireFinite(group, 'group'), irrep, field);
}
