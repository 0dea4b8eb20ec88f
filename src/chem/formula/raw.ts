import type { Composition } from '../elements.ts';
import type { Ligand } from '../ligands/index.ts';
import type { Ion } from './ions.ts';

/** A ligand as written in an entity, before charges are balanced. */
export interface RawLigand {
  ligand: Ligand;
  count: number;
  /** Centres held: null for terminal, 2 for a plain μ. */
  mu: number | null;
  /** Hapticity as written, or that of the library. */
  hapticity: number | null;
  /** Donor atoms, changed where a κ names others. */
  donors: readonly string[];
  /** Donor atoms used as a κ or an answer states them, where that is not what the sphere implies; else null. */
  denticity: number | null;
  /** Symbol as typed, where it can mean several ligands. */
  typed: string;
  /** False while a question about the ligand itself is open. */
  known: boolean;
  start: number;
}

export interface RawMetal {
  element: string;
  count: number;
  start: number;
}

/** A mononuclear part of a polynuclear entity, with the ligands that end on it. */
export interface Fragment {
  metals: RawMetal[];
  ligands: RawLigand[];
  count: number;
}

/** An entity as written: flat sums, and its parts where the spelling tells them. */
export interface RawEntity {
  metals: RawMetal[];
  ligands: RawLigand[];
  fragments: Fragment[];
  /** Typed charge of one entity, or null. */
  charge: number | null;
  count: number;
  configuration: string | null;
  /** Written in square brackets, so that what is inside is settled. */
  bracketed: boolean;
  start: number;
}

export interface RawIon {
  ion: Ion;
  count: number;
}

/** A d-block atom outside the brackets of a complex anion, or alone: its charge is found from the balance. */
export interface BareMetal {
  element: string;
  count: number;
  charge: number | null;
  start: number;
}

/** All that was typed, taken apart. */
export interface RawSalt {
  entities: RawEntity[];
  ions: RawIon[];
  bareMetals: BareMetal[];
  solvates: { symbol: string; composition: Composition; count: number }[];
  /** Charge written behind an unbracketed formula, thus of all of it. */
  overallCharge: number | null;
}
