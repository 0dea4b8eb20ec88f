import { DomainError } from '../errors.ts';

/** Factors of a ligand: f for Δ, h for the nephelauxetic effect; null where the table has none. */
export interface LigandFactors {
  f: number;
  h: number | null;
}

/** Factors of an ion: g in cm⁻¹ for Δ, k for the nephelauxetic effect; null where the table has none. */
export interface IonFactors {
  g: number;
  k: number | null;
}

/** Where the factors come from, to be told with every estimate. */
export const JORGENSEN_SOURCE =
  'C. K. Jørgensen, Modern Aspects of Ligand Field Theory, Elsevier 1971, pp 347–348; Absorption Spectra and Chemical Bonding in Complexes, Pergamon 1962, p 113';

/**
 * f and h by the abbreviation of the ligand, as seen reprinted. The entry that reprints give as C5H5 is pyridine (f of
 * pyridine from memory); h of thiourea and glycinate stands in one of two reprints seen.
 */
const LIGANDS: Record<string, LigandFactors> = {
  Br: { f: 0.72, h: 2.3 },
  SCN: { f: 0.75, h: null },
  Cl: { f: 0.78, h: 2.0 },
  N3: { f: 0.83, h: null },
  F: { f: 0.9, h: 0.8 },
  dmso: { f: 0.91, h: null },
  acetone: { f: 0.92, h: 1.2 },
  EtOH: { f: 0.97, h: null },
  dmf: { f: 0.98, h: null },
  ox: { f: 0.99, h: 1.5 },
  H2O: { f: 1.0, h: 1.0 },
  tu: { f: 1.01, h: 2.0 },
  NCS: { f: 1.02, h: null },
  NCSe: { f: 1.03, h: null },
  gly: { f: 1.18, h: 2.0 },
  SO3: { f: 1.2, h: null },
  MeCN: { f: 1.22, h: null },
  py: { f: 1.23, h: null },
  NH3: { f: 1.25, h: 1.4 },
  en: { f: 1.28, h: 1.5 },
  bpy: { f: 1.33, h: null },
  diars: { f: 1.33, h: null },
  NO2: { f: 1.4, h: null },
  CN: { f: 1.7, h: 2.0 },
};

/** g and k by element and charge, as seen reprinted; g of iridium(III) as in the reprint that is free of the misprint. */
const IONS: Record<string, IonFactors> = {
  Mn2: { g: 8000, k: 0.07 },
  Fe2: { g: 8500, k: 0.08 },
  Ni2: { g: 8700, k: 0.12 },
  Co2: { g: 9000, k: 0.09 },
  V2: { g: 12_000, k: 0.08 },
  Fe3: { g: 14_000, k: 0.24 },
  Cu3: { g: 15_700, k: null },
  Cr3: { g: 17_400, k: 0.21 },
  Co3: { g: 18_200, k: 0.35 },
  Ru2: { g: 20_000, k: null },
  Ag3: { g: 20_400, k: null },
  Ni4: { g: 22_000, k: null },
  Mn4: { g: 24_000, k: 0.5 },
  Mo3: { g: 24_600, k: 0.15 },
  Rh3: { g: 27_000, k: 0.3 },
  Pd4: { g: 29_000, k: null },
  Tc4: { g: 31_000, k: null },
  Ir3: { g: 32_000, k: 0.3 },
  Pt4: { g: 36_000, k: 0.5 },
};

/** f and h of a ligand by its abbreviation, or null. */
export function ligandFactors(abbreviation: string): LigandFactors | null {
  return Object.hasOwn(LIGANDS, abbreviation) ? LIGANDS[abbreviation]! : null;
}

/** g and k of an ion, or null. */
export function ionFactors(element: string, charge: number): IonFactors | null {
  const key = `${element}${charge}`;
  return Object.hasOwn(IONS, key) ? IONS[key]! : null;
}

/** An octahedral complex by ion and donor atoms: three bidentate en count six. */
export interface OctahedralComplex {
  element: string;
  oxidationState: number;
  donors: readonly { abbreviation: string; count: number }[];
}

/**
 * Δ ≈ f·g in cm⁻¹, f being the mean over the six donors (rule of average environment).
 *
 * @returns null where the ion or a ligand is not in the table
 * @throws DomainError `out-of-range` where the donors are not six (field `donors`)
 */
export function estimateDelta({ element, oxidationState, donors }: OctahedralComplex): number | null {
  const f = meanOverDonors(donors, (ligand) => ligand.f);
  const ion = ionFactors(element, oxidationState);
  return f === null || ion === null ? null : f * ion.g;
}

/**
 * Nephelauxetic ratio β = B/B(free ion) ≈ 1 − h·k, h being the mean over the six donors.
 *
 * @returns null where the table lacks a factor
 * @throws DomainError `out-of-range` where the donors are not six (field `donors`)
 */
export function estimateBeta({ element, oxidationState, donors }: OctahedralComplex): number | null {
  const h = meanOverDonors(donors, (ligand) => ligand.h);
  const k = ionFactors(element, oxidationState)?.k ?? null;
  return h === null || k === null ? null : 1 - h * k;
}

function meanOverDonors(
  donors: OctahedralComplex['donors'],
  factor: (ligand: LigandFactors) => number | null,
): number | null {
  const total = donors.reduce((sum, { count }) => sum + count, 0);
  if (total !== 6 || donors.some(({ count }) => count < 0)) {
    throw new DomainError('out-of-range', `The estimate is for six donor atoms, not ${total}.`, 'donors');
  }
  let sum = 0;
  for (const { abbreviation, count } of donors) {
    const ligand = ligandFactors(abbreviation);
    const value = ligand && factor(ligand);
    if (value === null) return null;
    sum += value * count;
  }
  return sum / 6;
}
