import { findElement } from '../elements.ts';
import type { LigandIndex } from '../ligands/index.ts';
import { solvents } from './ions.ts';
import type { NormalText } from './normalise.ts';
import { applyRepairs, type Repair } from './repairs.ts';
import type { Component, Item } from './syntax.ts';
import type { IsotopeLabel } from './types.ts';

/** A label taken out of the text: where its atom (or ligand) now stands, and how many atoms where it says so itself. */
interface Found {
  repair: Repair;
  element: string;
  massNumber: number;
  /** Null: the count written behind the symbol. */
  atoms: number | null;
}

/** Labels of a formula, at offsets of the text without them. */
export interface Labels {
  source: NormalText;
  found: readonly { offset: number; element: string; massNumber: number; atoms: number | null }[];
}

/** Nuclides of the light elements that are used as labels: for them a number before the symbol may be a count. */
const LIGHT: Readonly<Record<string, readonly number[]>> = {
  H: [1, 2, 3],
  Li: [6, 7],
  B: [10, 11],
  C: [13, 14],
  N: [15],
  O: [17, 18],
  F: [18],
  P: [32, 33],
  S: [33, 34, 35, 36],
};

function isNuclide(symbol: string, massNumber: number): boolean {
  const element = findElement(symbol);
  if (!element) return false;
  const light = LIGHT[symbol];
  if (light) return light.includes(massNumber);
  return element.number > 12 && Math.abs(massNumber - element.weight) <= 0.06 * element.weight + 1;
}

// `[2H]`, `(13C)`, `[2H8]bpy`; superscripts `^57Fe`; digits that open a bracket `(13CO)`; `C18O`, `H218O`.
const IN_BRACKETS = /(?:\[\^?(\d{1,3})([A-Z][a-z]?)(\d*)\]|\(\^?(\d{1,3})([A-Z][a-z]?)(\d*)\))-?/g;
const RAISED = /\^(\d{1,3})([A-Z][a-z]?)/g;
const OPENING = /(?<=[([{])(\d{1,3})([A-Z][a-z]?)/g;
const BETWEEN = /(?<=(?:\(C|H2))(1[78])(O)(?![A-Za-z\d])|(?<=\(C)(15)(N)(?![A-Za-z\d])/g;
// `d6-dmso`, `[D8]bpy`, `bpy-d8`
const WHOLE = /(?<=^|[([{·])(?:d|\[D)(\d{1,2})\]?-?(?=[A-Za-z])|(?<=[A-Za-z\d])-[dD](\d{1,2})(?=[)\]}·]|$)/g;
const MIXED = /HDO|HOD|NH2D(?!\d)|NHD2/g;
/** Partly labelled molecules: how they are read, and how many atoms are labelled. */
const MIXED_MEANT: Readonly<Record<string, readonly [string, number]>> = {
  HDO: ['H2O', 1],
  HOD: ['H2O', 1],
  NH2D: ['NH3', 1],
  NHD2: ['NH3', 2],
};
const DEUTERIUM = /D(?![a-z])/g;

/**
 * Take isotopic labels out of a formula, so that isotopologues are read as one entity: `[Co(D2O)6]2+` becomes
 * `[Co(H2O)6]2+` with a label on twelve hydrogens.
 */
export function takeLabels(source: NormalText, library: LigandIndex): Labels {
  const { text } = source;
  if (!/D|[([{^·]\d|^d\d|[([{]d\d|-d\d|1[578][ON]/.test(text)) return { source, found: [] };
  const found: Found[] = [];
  const add = (
    start: number,
    length: number,
    meant: string,
    element: string,
    massNumber: number,
    atoms: number | null,
  ) => {
    const clash = found.some(({ repair: r }) => start < r.start + r.length && r.start < start + length);
    if (clash || !isNuclide(element, massNumber)) return;
    const typed = text.slice(start, start + length);
    found.push({ repair: { start, length, typed, meant, token: meant }, element, massNumber, atoms });
  };
  for (const match of text.matchAll(MIXED)) {
    const [meant, atoms] = MIXED_MEANT[match[0]] ?? ['', 0];
    add(match.index, match[0].length, meant, 'H', 2, atoms);
  }
  for (const match of text.matchAll(IN_BRACKETS)) {
    const [whole, a, b, c, d = a, e = b, f = c] = match;
    const [mass, element = '', digits = ''] = [Number(d), e, f];
    if (digits === '') add(match.index, whole.replace(/-$/, '').length, element, element, mass, null);
    else if (/[A-Za-z]/.test(text[match.index + whole.length] ?? ''))
      add(match.index, whole.length, '', element, mass, Number(digits));
  }
  for (const match of text.matchAll(WHOLE)) add(match.index, match[0].length, '', 'H', 2, Number(match[1] ?? match[2]));
  for (const match of text.matchAll(RAISED))
    add(match.index, match[1]!.length + 1, '', match[2]!, Number(match[1]), null);
  for (const match of text.matchAll(OPENING)) add(match.index, match[1]!.length, '', match[2]!, Number(match[1]), null);
  for (const match of text.matchAll(BETWEEN)) {
    const mass = match[1] ?? match[3] ?? '';
    add(match.index, mass.length, '', match[2] ?? match[4] ?? '', Number(mass), null);
  }
  const words = text.includes('D') ? wordsWithD(library) : [];
  for (const match of text.matchAll(DEUTERIUM)) {
    const descriptor = text[match.index + 1] === '-' && /^$|[)\]·]$/.test(text.slice(0, match.index));
    if (!descriptor && !insideWord(text, match.index, words)) add(match.index, 1, 'H', 'H', 2, null);
  }
  found.sort((a, b) => a.repair.start - b.repair.start);
  let shift = 0;
  const labels = found.map(({ repair, element, massNumber, atoms }) => {
    const offset = repair.start + shift;
    shift += repair.meant.length - repair.length;
    return { offset, element, massNumber, atoms };
  });
  return {
    source: applyRepairs(
      source,
      found.map((one) => one.repair),
    ),
    found: labels,
  };
}

const wordsCache = new WeakMap<LigandIndex, readonly string[]>();

/** Spellings in which a D is a letter of a word: COD, DMSO, EDTA. */
function wordsWithD(library: LigandIndex): readonly string[] {
  const kept = wordsCache.get(library);
  if (kept) return kept;
  const all = [...library.exact.keys(), ...solvents.flatMap((s) => [s.symbol, ...s.synonyms])];
  const words = all.filter((spelling) => /[A-Z]*D[A-Z]+|[A-Z]+D/.test(spelling));
  wordsCache.set(library, words);
  return words;
}

function insideWord(text: string, index: number, words: readonly string[]): boolean {
  return words.some((word) => {
    for (let at = word.indexOf('D'); at >= 0; at = word.indexOf('D', at + 1))
      if (text.startsWith(word, index - at)) return true;
    return false;
  });
}

/** How many atoms each nuclide labels in all that was typed, by element and mass number. */
export function countLabels({ source, found }: Labels, components: readonly Component[]): IsotopeLabel[] {
  const sums = new Map<string, IsotopeLabel>();
  for (const { offset, element, massNumber, atoms } of found) {
    const digits = /^\d+/.exec(source.text.slice(offset + element.length))?.[0];
    const own = atoms ?? (digits === undefined ? 1 : Number(digits));
    const component = components.findLast((one) => one.start <= offset);
    const count = own * (component ? component.coefficient * multiplier(component.items, offset) : 1);
    const isotope = `${massNumber}${element}`;
    sums.set(isotope, { isotope, element, massNumber, count: count + (sums.get(isotope)?.count ?? 0) });
  }
  return [...sums.values()].sort((a, b) =>
    a.element < b.element ? -1 : a.element > b.element ? 1 : a.massNumber - b.massNumber,
  );
}

/** Product of the counts behind all brackets that hold an offset; a label taken off the end stands at the bracket. */
function multiplier(items: readonly Item[], offset: number): number {
  for (const item of items) {
    if (item.kind === 'group' && offset > item.start && offset <= item.start + item.inner.length + 1)
      return item.count * multiplier(item.items, offset);
  }
  return 1;
}
