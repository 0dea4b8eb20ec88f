import { type Composition, findElement } from '../elements.ts';
import { findLigand, type Ligand, type LigandIndex } from '../ligands/index.ts';
import { anions, cations, type Ion, metalOxoanions, solvents } from './ions.ts';

/** Longest spelling that is looked for inside a run of text, in characters. */
const WINDOW = 24;

/** Molecules whose formula reads as a count of atoms when it is not in brackets: CrO2Cl2 holds two oxides. */
const ONLY_IN_BRACKETS = new Set(['O2', 'S2', 'H2', 'I3', 'Br3', 'q', 'NC']);

const cationOf = index(cations);
const anionOf = index(anions);
const solventOf = new Map(solvents.flatMap((s) => [s.symbol, ...s.synonyms].map((spelling) => [spelling, s] as const)));

function index(ions: readonly Ion[]): ReadonlyMap<string, Ion> {
  return new Map(ions.flatMap((i) => [i.symbol, ...i.synonyms].map((spelling) => [spelling, i] as const)));
}

/** The cation, anion or solvent of a whole spelling, or null. */
export const findCation = (spelling: string): Ion | null => cationOf.get(spelling) ?? null;
export const findAnion = (spelling: string): Ion | null => anionOf.get(spelling) ?? null;
export const findSolvent = (spelling: string) => solventOf.get(spelling) ?? null;

/** All spellings of free ions. */
export const ionSpellings = (): Iterable<string> => [...cationOf.keys(), ...anionOf.keys()];

/** The longest spelling at `from` that `find` knows; a spelling ending in a digit must not run on into another digit. */
export function longest<T>(
  text: string,
  from: number,
  find: (spelling: string) => T | null,
): { value: T; length: number } | null {
  for (let length = Math.min(WINDOW, text.length - from); length > 0; length -= 1) {
    const spelling = text.slice(from, from + length);
    const runsOn = /\d$/.test(spelling) && /\d/.test(text[from + length] ?? '');
    if (runsOn || ONLY_IN_BRACKETS.has(spelling)) continue;
    const value = find(spelling);
    if (value !== null) return { value, length };
  }
  return null;
}

/** What a spelling inside a coordination entity can be. */
export type EntitySymbol = { ligand: Ligand } | { element: string };

/** A ligand or a metal, the ligand first where one spelling is both. */
export function entitySymbol(spelling: string, library: LigandIndex): EntitySymbol | null {
  const ligand = findExact(spelling, library);
  if (ligand) return { ligand };
  return findElement(spelling) && !/^(C|P|B|He|Ne|Ar|Kr|Xe|Rn)$/.test(spelling) ? { element: spelling } : null;
}

/** A ligand by exact case: inside a run, tolerance of case would tear symbols apart. */
function findExact(spelling: string, library: LigandIndex): Ligand | null {
  const found = library.exact.get(spelling) ?? null;
  if (found) return found;
  return spelling.length > 2 && /^[A-Z].*\d$/.test(spelling) ? findLigand(spelling, library) : null;
}

/** Free ion of an oxoanion with a metal (`CrO4`), as its charge, or null. */
export function metalOxoanion(spelling: string): { symbol: string; charge: number } | null {
  const charge = metalOxoanions[spelling];
  return charge === undefined ? null : { symbol: spelling, charge };
}

/**
 * Composition of a formula with brackets and counts, or null when a symbol is no element.
 * Brackets are taken to be balanced.
 */
export function compositionOf(formula: string): Composition | null {
  const stack: Composition[] = [{}];
  let rest = formula;
  while (rest !== '') {
    const match = /^([A-Z][a-z]?|[([{]|[)\]}])(\d*)/.exec(rest);
    if (!match) return null;
    const [whole, symbol = '', digits = ''] = match;
    const count = digits === '' ? 1 : Number(digits);
    if ('([{'.includes(symbol)) {
      if (digits !== '') return null;
      stack.push({});
    } else if (')]}'.includes(symbol)) {
      const inner = stack.pop()!;
      const outer = stack.at(-1);
      if (!outer) return null;
      for (const [element, n] of Object.entries(inner)) outer[element] = (outer[element] ?? 0) + n * count;
    } else {
      if (!findElement(symbol)) return null;
      const top = stack.at(-1)!;
      top[symbol] = (top[symbol] ?? 0) + count;
    }
    rest = rest.slice(whole.length);
  }
  return stack.length === 1 ? stack[0]! : null;
}
