import type { Spin } from '../electrons.ts';

/** Geometries for which optical electronegativities of metals are tabulated. */
export type ChargeTransferGeometry = 'OC-6' | 'T-4' | 'SP-4';

/** Optical electronegativity of a metal ion, corrected for field and spin pairing, on the scale of the ligands'. */
export interface MetalElectronegativity {
  /** The lower end where the tables give a range, as worked examples take it. */
  value: number;
  /** Width of the range in which the tables give it; 0 where one value is given. */
  spread: number;
  source: string;
}

const SHRIVER =
  'Shriver & Atkins, Inorganic Chemistry, 5th ed., Oxford 2010, ch. 20, after C. K. Jørgensen, Prog. Inorg. Chem. 12 (1970) 101 (from memory)';
const JORGENSEN =
  'C. K. Jørgensen, Prog. Inorg. Chem. 12 (1970) 101; A. B. P. Lever, Inorganic Electronic Spectroscopy, 2nd ed., 1984 (from memory)';
const TETROXO =
  'first bands of tetroxo ions: A. Müller, E. Diemann, Chem. Phys. Lett. 9 (1971) 369 (from memory), taken with 3.2 for π of oxide';

type Row = readonly [element: string, oxidationState: number, low: number, high: number, source: string, spin?: Spin];

const ROWS: Record<ChargeTransferGeometry, readonly Row[]> = {
  'OC-6': [
    ['Cr', 3, 1.8, 1.9, SHRIVER],
    ['Co', 3, 2.3, 2.3, SHRIVER, 'low'],
    ['Rh', 3, 2.3, 2.3, SHRIVER, 'low'],
    ['Mo', 6, 2.1, 2.1, SHRIVER],
    ['Ti', 4, 2.05, 2.05, JORGENSEN],
    ['Nb', 5, 1.85, 1.85, JORGENSEN],
    ['Ta', 5, 1.8, 1.8, JORGENSEN],
    ['W', 6, 2.0, 2.0, JORGENSEN],
    ['Fe', 3, 2.4, 2.5, JORGENSEN, 'high'],
    ['Ru', 3, 2.0, 2.1, JORGENSEN, 'low'],
    ['Ru', 4, 2.4, 2.5, JORGENSEN, 'low'],
    ['Os', 3, 1.9, 2.0, JORGENSEN, 'low'],
    ['Os', 4, 2.2, 2.2, JORGENSEN, 'low'],
    ['Ir', 3, 2.2, 2.3, JORGENSEN, 'low'],
    ['Ir', 4, 2.3, 2.4, JORGENSEN, 'low'],
    ['Pd', 4, 2.7, 2.8, JORGENSEN, 'low'],
    ['Pt', 4, 2.6, 2.7, JORGENSEN, 'low'],
  ],
  'T-4': [
    ['Ni', 2, 2.0, 2.1, SHRIVER],
    ['Co', 2, 1.8, 1.9, SHRIVER],
    ['Fe', 3, 2.4, 2.5, JORGENSEN],
    ['Cu', 2, 2.2, 2.2, JORGENSEN],
    ['V', 5, 1.97, 1.97, TETROXO],
    ['Cr', 6, 2.31, 2.31, TETROXO],
    ['Mn', 7, 2.58, 2.58, TETROXO],
    ['Mo', 6, 1.76, 1.76, TETROXO],
    ['Tc', 7, 2.04, 2.04, TETROXO],
    ['Ru', 8, 2.33, 2.33, TETROXO],
    ['W', 6, 1.52, 1.52, TETROXO],
    ['Re', 7, 1.74, 1.74, TETROXO],
    ['Os', 8, 2.1, 2.1, TETROXO],
  ],
  'SP-4': [
    ['Pd', 2, 2.2, 2.2, JORGENSEN, 'low'],
    ['Pt', 2, 2.3, 2.3, JORGENSEN, 'low'],
    ['Cu', 2, 2.2, 2.4, JORGENSEN],
  ],
};

/** Optical electronegativity of an ion in a geometry; null where none is known. */
export function metalElectronegativity(
  element: string,
  oxidationState: number,
  geometry: ChargeTransferGeometry,
): MetalElectronegativity | null {
  const row = ROWS[geometry].find(([symbol, charge]) => symbol === element && charge === oxidationState);
  if (!row) return null;
  const [, , low, high, source] = row;
  return { value: low, spread: high - low, source };
}

/** The spin state to which the tabulated value belongs; null where there is only one, or no value. */
export const tabulatedSpin = (element: string, oxidationState: number, geometry: ChargeTransferGeometry): Spin | null =>
  ROWS[geometry].find(([symbol, charge]) => symbol === element && charge === oxidationState)?.[5] ?? null;
