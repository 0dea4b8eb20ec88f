import { describe, expect, test } from 'vitest';
import { multiply } from '#src/chem/geometry/vector.ts';
import { doubleGroup } from '#src/chem/symmetry/double-group.ts';
import { finiteGroup } from '#src/chem/symmetry/finite-group.ts';
import { finiteSymbols, symbolParts } from '#src/chem/symmetry/generators.ts';
import { IDENTITY, matrixKey } from '#src/chem/symmetry/matrices.ts';
import { multiplySpin, spinKey } from '#src/chem/symmetry/spin-rotation.ts';
import file from './gap-tables.json';

/** Source of the values: GAP 4.12.1 with CTblLib 1.3.4 (Debian 12), written by scripts/gap-tables.sh; exact cyclotomics. */
interface GapTable {
  sizes: number[];
  orders: number[];
  values: string[];
  rows: number[][];
}
const tables = file as unknown as Record<string, GapTable>;

/** One column is a class, one row an irrep; a complex-conjugate pair of irreps is the one row of their sum. */
interface Table {
  sizes: number[];
  orders: number[];
  rows: number[][];
}

/** `-2*E(8)-E(8)^3` as real and imaginary part. */
function cyclotomic(text: string): [number, number] {
  let [re, im] = [0, 0];
  for (const [, sign, factor, number, n, power] of text.matchAll(
    /([+-]?)(?:(\d+)\*)?(?:(\d+)|E\((\d+)\)(?:\^(\d+))?)/g,
  )) {
    if (number === undefined && n === undefined) continue;
    const size = (sign === '-' ? -1 : 1) * Number(factor ?? 1) * Number(number ?? 1);
    const angle = n ? (2 * Math.PI * Number(power ?? 1)) / Number(n) : 0;
    re += size * Math.cos(angle);
    im += size * Math.sin(angle);
  }
  return [re, im];
}

function fromGap(name: string): Table {
  const { sizes, orders, values, rows } = tables[name]!;
  const numbers = values.map(cyclotomic);
  const merged = rows.flatMap((row, i) => {
    const complex = row.map((k) => numbers[k]!);
    if (complex.every(([, im]) => Math.abs(im) < 1e-12)) return [complex.map(([re]) => re)];
    const partner = rows.findIndex((other) =>
      other.every((k, c) => Math.hypot(numbers[k]![0] - complex[c]![0], numbers[k]![1] + complex[c]![1]) < 1e-12),
    );
    return partner > i ? [complex.map(([re]) => 2 * re)] : [];
  });
  return { sizes, orders, rows: merged };
}

/** Order of each element by multiplying it until it is the identity. */
function orderOf<T>(element: T, times: (a: T, b: T) => T, isIdentity: (a: T) => boolean): number {
  let order = 1;
  for (let power = element; !isIdentity(power); power = times(power, element)) order++;
  return order;
}

function pointTable(symbol: string): Table {
  const { classes, irreps } = finiteGroup(symbol)!;
  const one = matrixKey(IDENTITY);
  return {
    sizes: classes.map(({ size }) => size),
    orders: classes.map(({ representative }) => orderOf(representative, multiply, (m) => matrixKey(m) === one)),
    rows: irreps.map(({ characters }) => characters),
  };
}

function spinTable(symbol: string): Table {
  const { classes, irreps } = doubleGroup(symbol);
  const one = spinKey({ turn: [1, 0, 0, 0], parity: 1 });
  return {
    sizes: classes.map(({ size }) => size),
    orders: classes.map(({ representative }) => orderOf(representative, multiplySpin, (g) => spinKey(g) === one)),
    rows: irreps.map(({ characters }) => characters),
  };
}

const TOLERANCE = 1e-12;

/**
 * Whether some order of the columns makes the rows of both tables the same set: columns are matched one by one, each
 * to one of like size and order, and rows are kept together in parts that agree so far.
 */
function sameTable(a: Table, b: Table): boolean {
  const columns = a.sizes.length;
  if (b.sizes.length !== columns || a.rows.length !== b.rows.length) return false;
  const split = (parts: number[][], rows: number[][], column: number): Map<string, number[]>[] =>
    parts.map((part) => {
      const by = new Map<string, number[]>();
      for (const row of part) {
        const value = rows[row]![column]!;
        const key = [...by.keys()].find((k) => Math.abs(Number(k) - value) < TOLERANCE) ?? `${value}`;
        by.set(key, [...(by.get(key) ?? []), row]);
      }
      return by;
    });
  const match = (column: number, used: ReadonlySet<number>, partsA: number[][], partsB: number[][]): boolean => {
    if (column === columns) return true;
    const ofA = split(partsA, a.rows, column);
    for (let candidate = 0; candidate < columns; candidate++) {
      if (used.has(candidate) || b.sizes[candidate] !== a.sizes[column] || b.orders[candidate] !== a.orders[column])
        continue;
      const ofB = split(partsB, b.rows, candidate);
      const next: [number[], number[]][] = [];
      const agree = ofA.every((by, i) => {
        const other = ofB[i]!;
        return (
          by.size === other.size &&
          [...by].every(([value, rows]) => {
            const key = [...other.keys()].find((k) => Math.abs(Number(k) - Number(value)) < TOLERANCE);
            const found = key === undefined ? [] : other.get(key)!;
            next.push([rows, found]);
            return found.length === rows.length;
          })
        );
      });
      if (
        agree &&
        match(
          column + 1,
          new Set([...used, candidate]),
          next.map(([x]) => x),
          next.map(([, y]) => y),
        )
      )
        return true;
    }
    return false;
  };
  const all = a.rows.map((_, i) => i);
  return match(0, new Set(), [all], [all]);
}

/** The abstract group of a point group; textbook isomorphisms (S. L. Altmann, P. Herzig, Point-Group Theory Tables, 1994; from memory). */
function abstractGroup(symbol: string): string {
  const { family, n, suffix } = symbolParts(symbol);
  const dihedral = (m: number): string => (m === 2 ? 'Z2xZ2' : `Dih${m}`);
  if (symbol === 'C1') return 'Z1';
  if (symbol === 'Cs' || symbol === 'Ci') return 'Z2';
  if (family === 'T') return { '': 'A4', d: 'S4', h: 'A4xZ2' }[suffix as '' | 'd' | 'h'];
  if (family === 'O') return suffix ? 'S4xZ2' : 'S4';
  if (family === 'I') return suffix ? 'A5xZ2' : 'A5';
  if (family === 'S') return `Z${n}`;
  if (suffix === '') return family === 'C' ? `Z${n}` : dihedral(n);
  if (suffix === 'v') return dihedral(n);
  if (family === 'C') return n % 2 ? `Z${2 * n}` : `Z${n}xZ2`;
  if (suffix === 'd') return n % 2 ? `Dih${n}xZ2` : dihedral(2 * n);
  return `Dih${n}xZ2`;
}

/** The abstract group of its double group: binary cyclic, binary dihedral (dicyclic), binary polyhedral, or one of these × 2. */
function abstractDouble(symbol: string): string {
  const { family, n, suffix } = symbolParts(symbol);
  if (symbol === 'C1') return 'Z2';
  if (symbol === 'Cs') return 'Z4';
  if (symbol === 'Ci') return 'Z2xZ2';
  if (family === 'T') return { '': '2T', d: '2O', h: '2TxZ2' }[suffix as '' | 'd' | 'h'];
  if (family === 'O') return suffix ? '2OxZ2' : '2O';
  if (family === 'I') return suffix ? '2IxZ2' : '2I';
  if (family === 'S') return n === 6 ? 'Z6xZ2' : `Z${2 * n}`;
  if (suffix === '') return family === 'C' ? `Z${2 * n}` : `Dic${n}`;
  if (suffix === 'v') return `Dic${n}`;
  if (family === 'C') return n % 2 ? `Z${4 * n}` : `Z${2 * n}xZ2`;
  if (suffix === 'd') return n % 2 ? `Dic${n}xZ2` : `Dic${2 * n}`;
  return n % 2 ? `Dic${2 * n}` : `Dic${n}xZ2`;
}

/** D2h is Z2 × Z2 × Z2, for which the file has no table of its own: the product is taken here. */
function expected(name: string): Table {
  if (name !== 'Dih2xZ2') return fromGap(name);
  const half = fromGap('Z2xZ2');
  return {
    sizes: [...half.sizes, ...half.sizes],
    orders: [...half.orders, ...half.orders.map(() => 2)],
    rows: half.rows.flatMap((row) => [
      [...row, ...row],
      [...row, ...row.map((x) => -x)],
    ]),
  };
}

describe.each(finiteSymbols)('%s beside the table library of GAP', (symbol) => {
  test('point group', () => expect(sameTable(pointTable(symbol), expected(abstractGroup(symbol)))).toBe(true));
  test('double group', () => expect(sameTable(spinTable(symbol), expected(abstractDouble(symbol)))).toBe(true));
});

test('the comparison tells apart what only class sizes or only orders have in common', () => {
  // Dih4 and Dic2 share sizes and characters, and differ in the orders of elements alone.
  expect(sameTable(fromGap('Dih4'), fromGap('Dic2'))).toBe(false);
  expect(sameTable(fromGap('Dih8'), fromGap('Dic4'))).toBe(false);
  expect(sameTable(pointTable('D3d'), fromGap('Z12'))).toBe(false);
  const spoiled = pointTable('Oh');
  spoiled.rows[3] = spoiled.rows[3]!.with(1, 0.5);
  expect(sameTable(spoiled, fromGap('S4xZ2'))).toBe(false);
});
