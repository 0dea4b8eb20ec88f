import type { Caution } from '../cautions/index.ts';
import type { Composition } from '../elements.ts';

/**
 * Something a person must settle: the code is the key of the answer, the choices its values. A doubt that comes up in
 * several places is told apart by number: `unknown-ligand`, `unknown-ligand:2`.
 */
export interface Question {
  code: string;
  detail: string;
  choices: readonly { value: string; label: string }[];
  /** 0-based character offset in the text as typed, where the doubt has a place. */
  position?: number;
}

/** One metal atom. */
export interface CentreReading {
  element: string;
  /** Group 3 to 12; null for an f-block partner of a d-block centre. */
  group: number | null;
  /** Fractional where equal centres share electrons that the formula cannot assign; null while a question is open. */
  oxidationState: number | null;
  dCount: number | null;
  /** The state is a convention (redox-active ligand, metal–metal bond), not a measured thing. */
  nominal: boolean;
  /** Other oxidation states that another convention gives. */
  alternatives: number[];
}

export interface LigandReading {
  abbreviation: string;
  count: number;
  charge: number | null;
  /** Donor atoms used at one centre; 1 for a hapto ligand (one vertex at its centroid). */
  denticity: number;
  hapticity: number | null;
  /** Donor atoms in the order of the chain. */
  donors: string[];
  /** Pairs of those donors joined by a chelate ring; left out where it binds by fewer donors than it has. */
  bite?: [number, number][];
  /** Where a stiff tridentate always sits. */
  span?: 'fac' | 'mer';
  planar?: boolean;
  bridging: boolean;
  name: string;
}

export interface CounterIon {
  /** `K+`, `SO4^2-`: read back by the reader. */
  formula: string;
  charge: number;
  count: number;
}

/** Atoms that a formula names by nuclide. Isotopologues share composition, mass and identity of the reading. */
export interface IsotopeLabel {
  /** `2H` */
  isotope: string;
  element: string;
  massNumber: number;
  /** Labelled atoms per formula unit typed. */
  count: number;
}

export interface Solvate {
  formula: string;
  /** Per formula unit; may be fractional. */
  count: number;
}

/** One coordination entity. Values are per entity, `count` says how many there are in what was typed. */
export interface EntityReading {
  entity: string;
  charge: number | null;
  hill: string;
  /** g/mol */
  molarMass: number;
  count: number;
  composition: Composition;
  centres: CentreReading[];
  ligands: LigandReading[];
  coordinationNumber: number | null;
  geometries: string[];
  configuration: string | null;
  /** Equal for every spelling of one entity, whatever the salt, solvate, isomer or oxidation state. */
  identity: string;
}

/** What a formula says. `hill`, `molarMass`, `composition` and `overallCharge` are of all that was typed. */
export interface Reading {
  /** Red Book order; the text as typed while it cannot be read. */
  formula: string;
  entity: string;
  entityCharge: number | null;
  hill: string;
  /** g/mol; NaN while the text cannot be read. */
  molarMass: number;
  composition: Composition;
  overallCharge: number | null;
  coordinationNumber: number | null;
  centres: CentreReading[];
  ligands: LigandReading[];
  counterIons: CounterIon[];
  solvates: Solvate[];
  /** Isotopic labels typed; values of the reading are those of natural abundance. */
  isotopes: IsotopeLabel[];
  entities: EntityReading[];
  /** IUPAC polyhedral symbols possible for the first entity, usual first. */
  geometries: string[];
  configuration: string | null;
  questions: Question[];
  cautions: Caution[];
}

/** Answers to questions, by question code. */
export type Answers = Readonly<Record<string, string>>;
