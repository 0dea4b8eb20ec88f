import { carbonPhosphorusLigands } from './carbon-phosphorus.ts';
import { type Ligand, plainComposition } from './ligand.ts';
import { nitrogenLigands } from './nitrogen.ts';
import { oxygenSulfurLigands } from './oxygen-sulfur.ts';
import { simpleLigands } from './simple.ts';

export type { Ligand, LigandOptions, PiCharacter } from './ligand.ts';
export { ligand, plainComposition } from './ligand.ts';

/** The built-in library. A lab's own ligands are handed to the reader beside it. */
export const ligands: readonly Ligand[] = [
  ...simpleLigands,
  ...oxygenSulfurLigands,
  ...nitrogenLigands,
  ...carbonPhosphorusLigands,
];

/** Spellings of a set of ligands: as written, and for words (not formulae) without regard to case. */
export interface LigandIndex {
  all: readonly Ligand[];
  exact: ReadonlyMap<string, Ligand>;
  word: ReadonlyMap<string, Ligand>;
  /** All ligands of a molecular formula: more than one is an ambiguity that a person must settle. */
  byFormula: ReadonlyMap<string, readonly Ligand[]>;
}

/** An index over ligands; where two claim one spelling, the earlier entry keeps it. */
export function indexLigands(all: readonly Ligand[]): LigandIndex {
  const exact = new Map<string, Ligand>();
  const word = new Map<string, Ligand>();
  // Abbreviations first, so that a synonym or bare formula never takes the place of another ligand's symbol.
  const spellings = [
    ...all.map((entry) => [entry.abbreviation, entry] as const),
    ...all.flatMap((entry) => entry.synonyms.map((synonym) => [synonym, entry] as const)),
  ];
  for (const [spelling, entry] of spellings) {
    if (!exact.has(spelling)) exact.set(spelling, entry);
    // Formulae keep their case: `co` must not become carbonyl.
    const lower = spelling.toLowerCase();
    if (plainComposition(spelling) === null && !word.has(lower)) word.set(lower, entry);
  }
  const byFormula = new Map<string, Ligand[]>();
  for (const entry of all) byFormula.set(entry.formula, [...(byFormula.get(entry.formula) ?? []), entry]);
  return { all, exact, word, byFormula };
}

const builtIn = indexLigands(ligands);

/** The ligand of a spelling (`ox`, `C2O4`, `OH2`, `BPY`), or null. Case matters for formulae, not for abbreviations. */
export function findLigand(token: string, index: LigandIndex = builtIn): Ligand | null {
  const sameFormula = index.byFormula.get(token) ?? [];
  return (
    index.exact.get(token) ??
    (sameFormula.length === 1 ? sameFormula[0]! : (index.word.get(token.toLowerCase()) ?? null))
  );
}

/** The library spelling nearest to an unknown token (at most two letters changed, swapped, missing), or null. */
export function nearestLigand(token: string, index: LigandIndex = builtIn): string | null {
  return nearestSpelling(token, index.exact.keys());
}

/** The spelling nearest to a token of three letters or more, by at most two edits; null when none is near. */
export function nearestSpelling(token: string, spellings: Iterable<string>): string | null {
  if (token.length < 3) return null; // two letters are near to everything
  let best: string | null = null;
  let bestDistance = token.length > 3 ? 2.5 : 1.5;
  for (const spelling of spellings) {
    const distance = editDistance(token.toLowerCase(), spelling.toLowerCase());
    if (distance < bestDistance && distance < spelling.length) {
      best = spelling;
      bestDistance = distance;
    }
  }
  return best;
}

/** Optimal string alignment: insertions, deletions, substitutions and swaps of neighbours cost one each. */
function editDistance(a: string, b: string): number {
  if (Math.abs(a.length - b.length) > 2) return 3;
  const rows = Array.from({ length: a.length + 1 }, (_, i) => [i, ...Array<number>(b.length).fill(0)]);
  for (let j = 0; j <= b.length; j += 1) rows[0]![j] = j;
  for (let i = 1; i <= a.length; i += 1) {
    for (let j = 1; j <= b.length; j += 1) {
      const same = a[i - 1] === b[j - 1] ? 0 : 1;
      let value = Math.min(rows[i - 1]![j]! + 1, rows[i]![j - 1]! + 1, rows[i - 1]![j - 1]! + same);
      if (i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1])
        value = Math.min(value, rows[i - 2]![j - 2]! + 1);
      rows[i]![j] = value;
    }
  }
  return rows[a.length]![b.length]!;
}
