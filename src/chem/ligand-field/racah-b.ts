/** Repulsion parameters of a free ion. */
export interface FreeIonRacah {
  element: string;
  charge: number;
  /** Racah B in cm⁻¹. */
  B: number;
  /** C/B with which the diagram of the ion is usually printed; null where none is known to us. */
  ratioCB: number | null;
  /** Table of B, to be told wherever a nephelauxetic ratio is: tables differ by up to 15 %. */
  source: string;
}

const JOLLY = 'W. L. Jolly, Modern Inorganic Chemistry, McGraw-Hill, p 411';

/** B of the doubly and triply charged ions, as seen reprinted from Jolly's book. */
const B_OF: Record<string, Partial<Record<number, number>>> = {
  Ti: { 2: 695 },
  V: { 2: 755, 3: 861 },
  Cr: { 2: 810, 3: 918 },
  Mn: { 2: 860, 3: 965 },
  Fe: { 2: 917, 3: 1015 },
  Co: { 2: 971, 3: 1065 },
  Ni: { 2: 1030, 3: 1115 },
};

/**
 * C/B of the printed diagrams after Y. Tanabe, S. Sugano, J. Phys. Soc. Jpn. 9 (1954) 766; from memory, that of Mn²⁺
 * seen in public text.
 */
const RATIO_OF: Record<string, Partial<Record<number, number>>> = {
  V: { 3: 4.42 },
  Cr: { 3: 4.5 },
  Mn: { 2: 4.477, 3: 4.61 },
  Co: { 2: 4.633, 3: 4.8 },
  Ni: { 2: 4.709 },
};

/**
 * Racah B and C/B of a free ion.
 *
 * @param element - symbol, such as `Cr`
 * @param charge - of the ion, the oxidation state of the centre
 * @returns null for an ion that the table does not have
 */
export function freeIonRacah(element: string, charge: number): FreeIonRacah | null {
  const B = Object.hasOwn(B_OF, element) ? B_OF[element]![charge] : undefined;
  if (B === undefined) return null;
  return { element, charge, B, ratioCB: RATIO_OF[element]?.[charge] ?? null, source: JOLLY };
}
