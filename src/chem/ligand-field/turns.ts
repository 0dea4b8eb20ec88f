import type { ConfigurationSpace } from './configuration-space.ts';
import { type Matrix, zeros } from './matrix.ts';

/** What a transformation of the orbitals does to the determinants of dⁿ. */
export function turnOfSpace(space: ConfigurationSpace, orbitals: Matrix): Matrix {
  const { up, down } = turnFactors(space, orbitals);
  const turn = zeros(space.size);
  const d = space.downs.length;
  for (let i = 0; i < space.size; i++) {
    const [ups, downs] = [Math.floor(i / d) * space.ups.length, (i % d) * d];
    for (let j = 0; j < space.size; j++) {
      turn.data[i * space.size + j] = up.data[ups + Math.floor(j / d)]! * down.data[downs + (j % d)]!;
    }
  }
  return turn;
}

/** The same as two factors, over the choices of spin-up orbitals and of spin-down orbitals. */
export function turnFactors(space: ConfigurationSpace, orbitals: Matrix): { up: Matrix; down: Matrix } {
  return { up: minors(orbitals, space.ups), down: minors(orbitals, space.downs) };
}

/** The columns of `states` turned: by one factor, then by the other, which is far less work than by their product. */
export function turnStates(space: ConfigurationSpace, orbitals: Matrix, states: Matrix): Matrix {
  const { up, down } = turnFactors(space, orbitals);
  const d = space.downs.length;
  const half = zeros(states.rows, states.columns);
  const turned = zeros(states.rows, states.columns);
  for (let u = 0; u < up.rows; u++) {
    for (let to = 0; to < d; to++) {
      for (let from = 0; from < d; from++) {
        addRow(half, u * d + to, states, u * d + from, down.data[to * d + from]!);
      }
    }
  }
  for (let to = 0; to < up.rows; to++) {
    for (let from = 0; from < up.rows; from++) {
      const factor = up.data[to * up.rows + from]!;
      for (let k = 0; k < d; k++) addRow(turned, to * d + k, half, from * d + k, factor);
    }
  }
  return turned;
}

/** Elements of a turn below this are rounding. */
const NONE = 1e-14;

function addRow(target: Matrix, to: number, source: Matrix, from: number, factor: number): void {
  if (Math.abs(factor) < NONE) return;
  const width = target.columns;
  const a = target.data;
  const b = source.data;
  const t = to * width;
  const s = from * width;
  for (let k = 0; k < width; k++) a[t + k] = a[t + k]! + factor * b[s + k]!;
}

/** How a transformation acts on antisymmetric products of orbitals: by its minors. */
function minors(orbitals: Matrix, sets: readonly number[][]): Matrix {
  const all = zeros(sets.length);
  sets.forEach((rows, i) => {
    sets.forEach((columns, j) => {
      all.data[i * sets.length + j] = minor(orbitals, rows, columns);
    });
  });
  return all;
}

/** Determinant of the part of m in some rows and columns, at most five of each. */
function minor(m: Matrix, rows: readonly number[], columns: readonly number[]): number {
  const at = (i: number, j: number): number => m.data[rows[i]! * m.columns + columns[j]!]!;
  switch (rows.length) {
    case 0:
      return 1;
    case 1:
      return at(0, 0);
    case 2:
      return at(0, 0) * at(1, 1) - at(0, 1) * at(1, 0);
    case 3:
      return (
        at(0, 0) * (at(1, 1) * at(2, 2) - at(1, 2) * at(2, 1)) -
        at(0, 1) * (at(1, 0) * at(2, 2) - at(1, 2) * at(2, 0)) +
        at(0, 2) * (at(1, 0) * at(2, 1) - at(1, 1) * at(2, 0))
      );
    default: {
      const [first, ...rest] = rows;
      return columns.reduce((sum, column, k) => {
        const entry = m.data[first! * m.columns + column]!;
        if (entry === 0) return sum;
        const others = columns.filter((c) => c !== column);
        return sum + (k % 2 === 0 ? entry : -entry) * minor(m, rest, others);
      }, 0);
    }
  }
}
