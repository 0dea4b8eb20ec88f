import type { ConfigurationSpace } from './configuration-space.ts';
import { type Matrix, zeros } from './matrix.ts';

/** What a transformation of the orbitals does to the determinants of dⁿ. */
export function turnOfSpace(space: ConfigurationSpace, orbitals: Matrix): Matrix {
  const up = minors(orbitals, space.ups);
  const down = minors(orbitals, space.downs);
  const turn = zeros(space.size);
  const d = space.downs.length;
  for (let i = 0; i < space.size; i++) {
    const [ups, downs] = [up[Math.floor(i / d)]!, down[i % d]!];
    for (let j = 0; j < space.size; j++) turn.data[i * space.size + j] = ups[Math.floor(j / d)]! * downs[j % d]!;
  }
  return turn;
}

/** How a transformation acts on antisymmetric products of orbitals: by its minors. */
function minors(orbitals: Matrix, sets: readonly number[][]): number[][] {
  return sets.map((rows) => sets.map((columns) => minor(orbitals, rows, columns)));
}

function minor(m: Matrix, rows: readonly number[], columns: readonly number[]): number {
  const [first, ...rest] = rows;
  if (first === undefined) return 1;
  return columns.reduce((sum, column, k) => {
    const entry = m.data[first * m.columns + column]!;
    if (entry === 0) return sum;
    const others = columns.filter((c) => c !== column);
    return sum + (k % 2 === 0 ? entry : -entry) * minor(m, rest, others);
  }, 0);
}
