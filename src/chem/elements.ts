/** Atomic number to symbol, group, period and weight, and what follows from a composition: mass and Hill formula. */

export type Block = 's' | 'p' | 'd' | 'f';

export interface Element {
  symbol: string;
  number: number;
  /** Group 1 to 18; null for the f block. */
  group: number | null;
  period: number;
  block: Block;
  name: string;
  /** Abridged conventional standard atomic weight (dimensionless; g/mol for a mole of atoms). */
  weight: number;
  /** True where no standard weight exists and the mass number of a long-lived isotope stands in. */
  radioactive: boolean;
}

/** Atoms of each element, by symbol. Counts may be fractional where a solvate is. */
export type Composition = Record<string, number>;

/** Edition of the weights: T. Prohaska et al., Pure Appl. Chem. 94 (2022) 573 (abridged to five figures). */
export const ATOMIC_WEIGHTS_EDITION = 'IUPAC/CIAAW 2021, abridged';

// Symbol, group (- in the f block), period, weight ([n] = mass number, no standard weight), name; in order of Z.
// Lanthanoids and actinoids, La, Lu, Ac and Lr among them, are kept together as the f block.
const ROWS = `
H 1 1 1.008 Hydrogen;He 18 1 4.0026 Helium;Li 1 2 6.94 Lithium;Be 2 2 9.0122 Beryllium;B 13 2 10.81 Boron;
C 14 2 12.011 Carbon;N 15 2 14.007 Nitrogen;O 16 2 15.999 Oxygen;F 17 2 18.998 Fluorine;Ne 18 2 20.180 Neon;
Na 1 3 22.990 Sodium;Mg 2 3 24.305 Magnesium;Al 13 3 26.982 Aluminium;Si 14 3 28.085 Silicon;
P 15 3 30.974 Phosphorus;S 16 3 32.06 Sulfur;Cl 17 3 35.45 Chlorine;Ar 18 3 39.95 Argon;K 1 4 39.098 Potassium;
Ca 2 4 40.078 Calcium;Sc 3 4 44.956 Scandium;Ti 4 4 47.867 Titanium;V 5 4 50.942 Vanadium;
Cr 6 4 51.996 Chromium;Mn 7 4 54.938 Manganese;Fe 8 4 55.845 Iron;Co 9 4 58.933 Cobalt;Ni 10 4 58.693 Nickel;
Cu 11 4 63.546 Copper;Zn 12 4 65.38 Zinc;Ga 13 4 69.723 Gallium;Ge 14 4 72.630 Germanium;As 15 4 74.922 Arsenic;
Se 16 4 78.971 Selenium;Br 17 4 79.904 Bromine;Kr 18 4 83.798 Krypton;Rb 1 5 85.468 Rubidium;
Sr 2 5 87.62 Strontium;Y 3 5 88.906 Yttrium;Zr 4 5 91.224 Zirconium;Nb 5 5 92.906 Niobium;
Mo 6 5 95.95 Molybdenum;Tc 7 5 [97] Technetium;Ru 8 5 101.07 Ruthenium;Rh 9 5 102.91 Rhodium;
Pd 10 5 106.42 Palladium;Ag 11 5 107.87 Silver;Cd 12 5 112.41 Cadmium;In 13 5 114.82 Indium;Sn 14 5 118.71 Tin;
Sb 15 5 121.76 Antimony;Te 16 5 127.60 Tellurium;I 17 5 126.90 Iodine;Xe 18 5 131.29 Xenon;
Cs 1 6 132.91 Caesium;Ba 2 6 137.33 Barium;La 3 6 138.91 Lanthanum;Ce - 6 140.12 Cerium;
Pr - 6 140.91 Praseodymium;Nd - 6 144.24 Neodymium;Pm - 6 [145] Promethium;Sm - 6 150.36 Samarium;
Eu - 6 151.96 Europium;Gd - 6 157.25 Gadolinium;Tb - 6 158.93 Terbium;Dy - 6 162.50 Dysprosium;
Ho - 6 164.93 Holmium;Er - 6 167.26 Erbium;Tm - 6 168.93 Thulium;Yb - 6 173.05 Ytterbium;Lu - 6 174.97 Lutetium;
Hf 4 6 178.49 Hafnium;Ta 5 6 180.95 Tantalum;W 6 6 183.84 Tungsten;Re 7 6 186.21 Rhenium;Os 8 6 190.23 Osmium;
Ir 9 6 192.22 Iridium;Pt 10 6 195.08 Platinum;Au 11 6 196.97 Gold;Hg 12 6 200.59 Mercury;
Tl 13 6 204.38 Thallium;Pb 14 6 207.2 Lead;Bi 15 6 208.98 Bismuth;Po 16 6 [209] Polonium;At 17 6 [210] Astatine;
Rn 18 6 [222] Radon;Fr 1 7 [223] Francium;Ra 2 7 [226] Radium;Ac 3 7 [227] Actinium;Th - 7 232.04 Thorium;
Pa - 7 231.04 Protactinium;U - 7 238.03 Uranium;Np - 7 [237] Neptunium;Pu - 7 [244] Plutonium;
Am - 7 [243] Americium;Cm - 7 [247] Curium;Bk - 7 [247] Berkelium;Cf - 7 [251] Californium;
Es - 7 [252] Einsteinium;Fm - 7 [257] Fermium;Md - 7 [258] Mendelevium;No - 7 [259] Nobelium;
Lr - 7 [262] Lawrencium;Rf 4 7 [267] Rutherfordium;Db 5 7 [270] Dubnium;Sg 6 7 [269] Seaborgium;
Bh 7 7 [270] Bohrium;Hs 8 7 [270] Hassium;Mt 9 7 [278] Meitnerium;Ds 10 7 [281] Darmstadtium;
Rg 11 7 [281] Roentgenium;Cn 12 7 [285] Copernicium;Nh 13 7 [286] Nihonium;Fl 14 7 [289] Flerovium;
Mc 15 7 [289] Moscovium;Lv 16 7 [293] Livermorium;Ts 17 7 [294] Tennessine;Og 18 7 [294] Oganesson;
`;

function block(number: number, group: number | null): Block {
  if ((number >= 57 && number <= 71) || (number >= 89 && number <= 103)) return 'f';
  if (number === 2 || (group !== null && group <= 2)) return 's';
  return group !== null && group <= 12 ? 'd' : 'p';
}

function element(row: string, index: number): Element {
  const [symbol = '', groupText = '', period = '', weightText = '', name = ''] = row.trim().split(' ');
  const number = index + 1;
  const radioactive = weightText.startsWith('[');
  const group = groupText === '-' ? null : Number(groupText);
  return {
    symbol,
    number,
    group: block(number, group) === 'f' ? null : group,
    period: Number(period),
    block: block(number, group),
    name,
    weight: Number(weightText.replace(/[[\]]/g, '')),
    radioactive,
  };
}

/** All 118 elements, by rising atomic number. */
export const elements: readonly Element[] = ROWS.trim()
  .split(/[;\n]+/)
  .filter((row) => row.trim())
  .map(element);

const bySymbol: ReadonlyMap<string, Element> = new Map(elements.map((e) => [e.symbol, e]));

/** The element of a symbol (case matters), or null when there is none. */
export function findElement(symbol: string): Element | null {
  return bySymbol.get(symbol) ?? null;
}

/** Whether the symbol is a d-block metal (groups 3 to 12, without lanthanoids and actinoids). */
export function isDBlock(symbol: string): boolean {
  return bySymbol.get(symbol)?.block === 'd';
}

/**
 * Molar mass in g/mol from abridged standard atomic weights. NaN when the composition is empty of meaning
 * (a symbol that is no element).
 */
export function molarMass(composition: Readonly<Composition>): number {
  let sum = 0;
  for (const [symbol, count] of Object.entries(composition))
    sum += count * (bySymbol.get(symbol)?.weight ?? Number.NaN);
  return sum;
}

/**
 * Hill formula: carbon, then hydrogen, then the rest by alphabet; all by alphabet when there is no carbon.
 *
 * @see E. A. Hill, J. Am. Chem. Soc. 22 (1900) 478; Red Book 2005, IR-4.4.2.2
 */
export function hillFormula(composition: Readonly<Composition>): string {
  const symbols = Object.keys(composition).filter((s) => (composition[s] ?? 0) > 0);
  const first = symbols.includes('C') ? ['C', 'H'].filter((s) => symbols.includes(s)) : [];
  const rest = symbols.filter((s) => !first.includes(s)).sort((a, b) => (a < b ? -1 : 1));
  return [...first, ...rest].map((s) => s + countText(composition[s] ?? 0)).join('');
}

function countText(count: number): string {
  return count === 1 ? '' : String(Number(count.toFixed(4)));
}

/** The sum of compositions, each times its factor. */
export function addCompositions(parts: readonly { composition: Readonly<Composition>; count: number }[]): Composition {
  const sum: Composition = {};
  for (const { composition, count } of parts) {
    for (const [symbol, n] of Object.entries(composition)) sum[symbol] = (sum[symbol] ?? 0) + n * count;
  }
  return sum;
}
