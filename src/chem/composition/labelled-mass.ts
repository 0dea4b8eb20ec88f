import { type Composition, findElement, molarMass } from '../elements.ts';
import { nuclidesOf } from './nuclides.ts';

/** Atoms of one nuclide in place of the natural mixture, as a reading counts them. */
export interface Label {
  element: string;
  massNumber: number;
  count: number;
}

/**
 * Molar mass of a labelled compound in g/mol: every labelled atom weighs what its nuclide weighs, and the label is
 * taken to be complete. NaN for a nuclide that is not in the table, or more labels than atoms.
 *
 * @param composition - all atoms, labelled ones included under their element
 */
export function labelledMolarMass(composition: Readonly<Composition>, labels: readonly Label[]): number {
  return labels.reduce((mass, { element, massNumber, count }) => {
    const nuclide = nuclidesOf(element).find((n) => n.massNumber === massNumber);
    const weight = findElement(element)?.weight;
    if (!nuclide || weight === undefined || count > (composition[element] ?? 0)) return Number.NaN;
    return mass + count * (nuclide.mass - weight);
  }, molarMass(composition));
}
