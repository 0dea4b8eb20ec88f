import { type Composition, findElement } from '../elements.ts';

/** What the rules look at. All but the composition may be unknown; a rule that lacks its facts stays silent. */
export interface CautionContext {
  composition: Readonly<Composition>;
  /** Library abbreviations of the bound ligands. */
  ligands: readonly { abbreviation: string; count: number }[];
  /** As printed, with charge: `ClO4-`, `SO4^2-`. */
  counterIons: readonly string[];
  metals: readonly { element: string; oxidationState: number | null }[];
  /** Solvents by common name or formula, and others the sample is in contact with. */
  solvent?: readonly string[];
  /** `solution absorption`, `diffuse reflectance`, `emission`, `circular dichroism` … */
  technique?: string;
  /** Kelvin */
  temperature?: number;
  /** Supporting electrolyte or medium: `NBu4ClO4`, `H2SO4 conc.`, `HCl` … */
  electrolyte?: string;
}

/** One usual caution. Never a classification of the compound itself. */
export interface Caution {
  id: string;
  detail: string;
  /** GHS statements and pictograms typical of the parent substances, from memory; not assigned to this compound. */
  codes: string[];
  source: string;
}

/** A rule as data. */
export interface CautionRule {
  id: string;
  test(facts: Facts): boolean;
  sentence: string;
  codes: readonly string[];
  source: string;
}

/** A context with the questions rules ask of it. */
export interface Facts {
  context: CautionContext;
  /** Whether the element occurs at all. */
  element(...symbols: string[]): boolean;
  /** Number of atoms of an element. */
  count(symbol: string): number;
  /** Whether one of these is bound as a ligand (by abbreviation). */
  ligand(...abbreviations: string[]): boolean;
  /** Whether one of these is a free ion (by symbol without charge). */
  ion(...symbols: string[]): boolean;
  /** Ligand or free ion. */
  group(...symbols: string[]): boolean;
  /** Free ion, ligand or supporting electrolyte that holds this symbol. */
  anywhere(symbol: string): boolean;
  /** A centre of this element, in this state if one is given; an unknown state counts as any. */
  metal(element: string, state?: number): boolean;
  /** Carbon and hydrogen, ammonia, hydrazine or ammonium: something that an oxidant can burn. */
  oxidisable: boolean;
  /** N–H or N–N groups that make oxoanion salts energetic. */
  nitrogenFuel: boolean;
  /** Solvent matches the pattern. */
  solvent(pattern: RegExp): boolean;
  medium(pattern: RegExp): boolean;
  /** The sample is ground, pressed or rubbed in preparation. */
  ground: boolean;
}

const AMMINES = [
  'NH3',
  'N2H4',
  'NH2OH',
  'NH2',
  'en',
  'pn',
  'tn',
  'dien',
  'trien',
  'tren',
  'chxn',
  'cyclam',
  'cyclen',
  'tacn',
  'sep',
  'NH2Me',
  'biguanide',
];
const NITROGEN_CATIONS = ['NH4', 'N2H5', 'enH2'];

/** `SO4^2-` and `SO4 2-` are SO4, `ClO4-` is ClO4, `Ca2+` is Ca. */
function withoutCharge(ion: string): string {
  return ion
    .replace(/[\^ ]\d*[+-]$/, '')
    .replace(/^([A-Z][a-z]?)\d\+$/, '$1')
    .replace(/[+-]$/, '');
}

/** Read a context the way the rules ask. */
export function factsOf(context: CautionContext): Facts {
  const ligandSet = new Set(context.ligands.map((l) => l.abbreviation));
  const ionSet = new Set(context.counterIons.map(withoutCharge));
  const ligand = (...names: string[]) => names.some((n) => ligandSet.has(n));
  const ion = (...names: string[]) => names.some((n) => ionSet.has(n));
  const electrolyte = context.electrolyte ?? '';
  const nitrogenFuel = ligand(...AMMINES) || ion(...NITROGEN_CATIONS);
  return {
    context,
    element: (...symbols) => symbols.some((s) => (context.composition[s] ?? 0) > 0),
    count: (symbol) => context.composition[symbol] ?? 0,
    ligand,
    ion,
    group: (...symbols) => ligand(...symbols) || ion(...symbols),
    anywhere: (symbol) => ligand(symbol) || ion(symbol) || electrolyte.includes(symbol),
    metal: (element, state) =>
      context.metals.some(
        (m) =>
          m.element === element && (state === undefined || m.oxidationState === null || m.oxidationState === state),
      ),
    oxidisable: nitrogenFuel || ((context.composition.C ?? 0) > 0 && (context.composition.H ?? 0) > 0),
    nitrogenFuel,
    solvent: (pattern) => (context.solvent ?? []).some((s) => pattern.test(s)),
    medium: (pattern) => pattern.test(electrolyte) || (context.solvent ?? []).some((s) => pattern.test(s)),
    ground: /reflectance|disc|disk|pellet|KBr|grind|press|mull/i.test(context.technique ?? ''),
  };
}

/** Radioactive without a stable isotope, by the element table. */
export function isRadioactive(symbol: string): boolean {
  const element = findElement(symbol);
  return element !== null && (element.radioactive || ['Th', 'Pa', 'U'].includes(symbol));
}
