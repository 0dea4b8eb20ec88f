import { addCompositions, type Composition, findElement } from '../elements.ts';

/** What a ligand can do with metal dπ electrons: give to them, neither, or take from them. */
export type PiCharacter = 'donor' | 'none' | 'acceptor';

/** One ligand as it is bound: a linkage isomer is a ligand of its own. */
export interface Ligand {
  /** Symbol used on output: `ox`, `NH3`, `NCS`. */
  abbreviation: string;
  /** Other spellings read as this ligand, beside its molecular formula where that is no other ligand's too. */
  synonyms: readonly string[];
  /** Name in a complex, after Red Book 2005. */
  name: string;
  formula: string;
  composition: Composition;
  /** Charge that is counted for the ligand (ionic counting). */
  charge: number;
  /** Other charges the same atoms are met with, e.g. nitrosyl counted 1-; the usual one is `charge`. */
  alternativeCharges: readonly number[];
  /** Donor atoms in the order of the chain, as many as the ligand can use. */
  donors: readonly string[];
  denticity: number;
  /** Denticities the ligand is met with at one centre, usual first. */
  denticities: readonly number[];
  /** Contiguous atoms bound side-on; null for plain donor atoms. */
  hapticity: number | null;
  /** Pairs of donor indices linked by a chelate ring. */
  bite: readonly (readonly [number, number])[];
  /** Where a stiff tridentate always sits: its ends face to face (mer) or all three on one face (fac). */
  span?: 'fac' | 'mer';
  /** All donors in one plane with the metal, as a macrocycle or a salicylaldimine holds them. */
  planar?: boolean;
  /** Donor atoms the ligand can turn to instead, e.g. dmso by S. */
  otherDonors: readonly string[];
  /** Able to hold two centres, so that it bridges when written between two metals. */
  canBridge: boolean;
  /** Electrons are shared with the metal so evenly that an oxidation state is a convention. */
  redoxActive: boolean;
  /** The free ligand, with stereo where it has any. */
  smiles: string;
  piCharacter: PiCharacter;
  /** Jørgensen's f for the field of an octahedron, water = 1. */
  f?: number;
  /** Optical electronegativity (Pauling-like scale) for charge transfer from π or σ orbitals. */
  opticalElectronegativity?: { pi?: number; sigma?: number };
  /** Place in the spectrochemical series, weak first; equal places are not told apart. */
  seriesRank?: number;
  source?: string;
}

/** Rare parts of a library entry; everything else follows from the donors. */
export interface LigandOptions {
  synonyms?: readonly string[];
  alternativeCharges?: readonly number[];
  denticities?: readonly number[];
  hapticity?: number;
  bite?: readonly (readonly [number, number])[];
  span?: 'fac' | 'mer';
  planar?: boolean;
  otherDonors?: readonly string[];
  canBridge?: boolean;
  redoxActive?: boolean;
  f?: number;
  opticalElectronegativity?: { pi?: number; sigma?: number };
  seriesRank?: number;
  source?: string;
}

/** Composition of a formula without brackets (`C10H8N2`); null when a symbol is no element. */
export function plainComposition(formula: string): Composition | null {
  const parts: { composition: Composition; count: number }[] = [];
  let rest = formula;
  while (rest !== '') {
    const match = /^([A-Z][a-z]?)(\d*)/.exec(rest);
    const symbol = match?.[1] ?? '';
    if (!match || !findElement(symbol)) return null;
    parts.push({ composition: { [symbol]: 1 }, count: match[2] ? Number(match[2]) : 1 });
    rest = rest.slice(match[0].length);
  }
  return addCompositions(parts);
}

/**
 * A library entry. `donors` holds one symbol per donor atom, blank-separated for two-letter symbols (`'N N'`, `'Cl'`);
 * neighbours in the chain are taken to be chelate-linked unless `bite` says otherwise.
 *
 * @throws {Error} when the formula of the entry is no composition, which is a mistake in the library itself
 */
export function ligand(
  abbreviation: string,
  formula: string,
  charge: number,
  donors: string,
  name: string,
  smiles: string,
  piCharacter: PiCharacter,
  options: LigandOptions = {},
): Ligand {
  const composition = plainComposition(formula);
  if (!composition) throw new Error(`ligand ${abbreviation}: ${formula} is no composition`);
  const { synonyms = [], denticities, hapticity = null, bite, ...rest } = options;
  const named = donors.split(' ');
  // A ligand that can take two places by like atoms names its donor once: nitrate, acetate.
  const extra = Math.max(named.length, ...(denticities ?? [])) - named.length;
  const atoms = [...named, ...Array<string>(extra).fill(named[0]!)];
  return {
    alternativeCharges: [],
    otherDonors: [],
    canBridge: false,
    redoxActive: false,
    ...rest,
    abbreviation,
    synonyms,
    name,
    formula,
    composition,
    charge,
    donors: atoms,
    denticity: hapticity === null ? (denticities?.[0] ?? atoms.length) : 1,
    denticities: hapticity === null ? (denticities ?? [atoms.length]) : [1],
    hapticity,
    bite: bite ?? (hapticity === null ? atoms.slice(1).map((_, i) => [i, i + 1] as const) : []),
    smiles,
    piCharacter,
  };
}

/** Links of a ring of n donors: each to the next, the last to the first. */
export function ring(n: number): readonly (readonly [number, number])[] {
  return Array.from({ length: n }, (_, i) => [i, (i + 1) % n] as const);
}
