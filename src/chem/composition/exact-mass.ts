import type { Composition } from '../elements.ts';
import { nuclidesOf } from './nuclides.ts';

/** Mass of the electron in Da. @see CODATA 2018 */
export const ELECTRON_MASS = 5.48579909065e-4;

/**
 * Exact mass of a composition: the sum of the masses of the most abundant nuclide of each element. Not always the
 * highest peak of the pattern; see `isotopePattern`.
 *
 * @param charge - of the ion; electrons lost or gained are reckoned in
 * @returns Da; NaN where an element has no natural isotopic composition (technetium, promethium, past uranium)
 * @see IUPAC recommendations on terms relating to mass spectrometry, Pure Appl. Chem. 85 (2013) 1515: monoisotopic mass
 */
export function exactMass(composition: Readonly<Composition>, charge = 0): number {
  let sum = 0;
  for (const [symbol, count] of Object.entries(composition)) {
    if (count !== 0) sum += count * (mostAbundant(symbol) ?? Number.NaN);
  }
  return sum - charge * ELECTRON_MASS;
}

function mostAbundant(symbol: string): number | null {
  const [first, ...others] = nuclidesOf(symbol);
  if (!first) return null;
  return others.reduce((best, one) => (one.abundance > best.abundance ? one : best), first).mass;
}
