import { type Matrix3, multiply } from '../geometry/vector.ts';
import { classAlgebra, multiplicationTable } from './class-algebra.ts';
import { labelClasses } from './class-labels.ts';
import { sortFunctions } from './functions.ts';
import {
  acrossY,
  acrossZ,
  finiteSymbols,
  fivefold,
  generatorsOf,
  type SymbolParts,
  symbolParts,
  turn,
  turnReflect,
} from './generators.ts';
import { type LabelProbe, labelRank, mullikenLabels, principalOperation } from './irrep-labels.ts';
import { closure, IDENTITY, INVERSION, matrixKey, matrixMark, rotation } from './matrices.ts';

/** An irreducible representation of a finite group; a complex-conjugate pair counts as one, of dimension 2. */
export interface FiniteIrrep {
  label: string;
  dimension: number;
  pair: boolean;
  /** By class. */
  characters: number[];
  functions: string[];
}

/** A finite point group in its standard setting. */
export interface FiniteGroup {
  symbol: string;
  order: number;
  centrosymmetric: boolean;
  operations: Matrix3[];
  /** Class of the operation with this matrix, or null when it is none of the group's. */
  classOfMatrix: (m: Matrix3) => number | null;
  classes: { label: string; size: number; representative: Matrix3 }[];
  /** `powerClass(k)[c]`: class of the k-th power of the operations of class c. */
  powerClass: (power: number) => number[];
  irreps: FiniteIrrep[];
}

const known = new Map<string, FiniteGroup>();

/** The finite group with this symbol, generated at first use; null when it is not in the list. */
export function finiteGroup(symbol: string): FiniteGroup | null {
  if (!finiteSymbols.includes(symbol)) return null;
  const group = known.get(symbol) ?? generateGroup(symbol);
  known.set(symbol, group);
  return group;
}

/** Generates the table of a symbol of `finiteSymbols` anew. */
export function generateGroup(symbol: string): FiniteGroup {
  const parts = symbolParts(symbol);
  const operations = closure(generatorsOf(parts));
  const algebra = classAlgebra(multiplicationTable(operations, multiply, matrixMark));
  const labelled = labelClasses(parts, operations, algebra.classes);
  const place = algebra.classes.map((members) => labelled.findIndex((c) => c.members === members));
  const indices = new Map(operations.map((m, g) => [matrixKey(m), place[algebra.classOf[g]!]!]));
  const classOfMatrix = (m: Matrix3): number | null => indices.get(matrixKey(m)) ?? null;

  const characters = algebra.characters.map((byClass) => reorder(byClass, place));
  const labels = mullikenLabels(parts, probesOf(parts, characters, classOfMatrix));
  const norm = (row: readonly number[]): number =>
    row.reduce((sum, x, c) => sum + x * x * labelled[c]!.members.length, 0) / operations.length;
  const bare = characters
    .map((row, k) => ({ label: labels[k]!, dimension: row[0]!, pair: norm(row) > 1.5, characters: row }))
    .sort((a, b) => labelRank(a.label) - labelRank(b.label));
  const functions = sortFunctions(
    operations,
    bare.map((irrep) => ({ ...irrep, characters: operations.map((m) => irrep.characters[classOfMatrix(m)!]!) })),
  );
  return {
    symbol,
    order: operations.length,
    centrosymmetric: classOfMatrix(INVERSION) !== null,
    operations,
    classOfMatrix,
    classes: labelled.map(({ label, members }) => ({
      label,
      size: members.length,
      representative: operations[members[0]!]!,
    })),
    powerClass: (power) =>
      reorder(
        algebra.powerClass(power).map((c) => place[c]!),
        place,
      ),
    irreps: bare.map((irrep, k) => ({ ...irrep, functions: functions[k]! })),
  };
}

/** Values by old class to values by place in the table. */
function reorder(values: readonly number[], place: readonly number[]): number[] {
  const sorted = values.map(() => 0);
  values.forEach((value, c) => {
    sorted[place[c]!] = value;
  });
  return sorted;
}

function probesOf(
  parts: SymbolParts,
  characters: readonly number[][],
  classOfMatrix: (m: Matrix3) => number | null,
): LabelProbe[] {
  const halfTurnX = classOfMatrix(rotation([1, 0, 0], Math.PI));
  const at = (row: readonly number[], c: number | null): number => (c === null ? 0 : row[c]!);
  return characters.map((row) => ({
    dimension: at(row, classOfMatrix(IDENTITY)),
    principal: at(row, classOfMatrix(principalMatrix(parts))),
    secondary: at(row, halfTurnX ?? classOfMatrix(acrossY)),
    halfTurnY: at(row, classOfMatrix(rotation([0, 1, 0], Math.PI))),
    inversion: at(row, classOfMatrix(INVERSION)),
    horizontal: at(row, classOfMatrix(acrossZ)),
  }));
}

function principalMatrix(parts: SymbolParts): Matrix3 {
  if (parts.family === 'I') return fivefold;
  if (parts.family === 'O') return turn(4);
  if (parts.family === 'T') return turnReflect(4);
  if (parts.n < 2) return IDENTITY;
  const { order, improper } = principalOperation(parts);
  return improper ? turnReflect(order) : turn(order);
}
