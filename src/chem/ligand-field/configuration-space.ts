import { DomainError } from '../errors.ts';
import { coulombIntegrals } from './coulomb.ts';
import { ANGULAR_MOMENTUM } from './d-orbitals.ts';
import { addScaled, combine, identity, type Matrix, product, zeros } from './matrix.ts';

/**
 * The states of dⁿ with the smallest |M_S|, in which every spin occurs once: one determinant for each choice of
 * spin-up orbitals and of spin-down orbitals, at index up · (number of downs) + down.
 */
export interface ConfigurationSpace {
  n: number;
  /** Orbital sets of the spin-up electrons, each ascending. */
  ups: number[][];
  downs: number[][];
  size: number;
  /** Repulsion per unit of Racah B and of C (A = 0). */
  B: Matrix;
  C: Matrix;
  /** Squares of the total spin and of the total orbital angular momentum, in ħ². */
  spinSquared: Matrix;
  orbitalSquared: Matrix;
  /** Spin-free substitution operators E_pq = Σ_spin a†_p a_q, at p·5 + q. */
  substitutions: Matrix[];
}

const spaces = new Map<number, ConfigurationSpace>();

/**
 * The space of dⁿ with its operators, built once for each n.
 *
 * @param n - whole number 1 to 9
 * @throws DomainError `out-of-range` (field `n`)
 */
export function configurationSpace(n: number): ConfigurationSpace {
  if (!Number.isInteger(n) || n < 1 || n > 9) {
    throw new DomainError(
      'out-of-range',
      `The number of d electrons must be a whole number from 1 to 9, not ${n}.`,
      'n',
    );
  }
  const space = spaces.get(n) ?? build(n);
  spaces.set(n, space);
  return space;
}

function build(n: number): ConfigurationSpace {
  const ups = subsets(Math.ceil(n / 2));
  const downs = subsets(Math.floor(n / 2));
  const size = ups.length * downs.length;
  const substitutions = Array.from({ length: 25 }, (_, pq) => substitution(Math.floor(pq / 5), pq % 5, ups, downs));
  const integrals = coulombIntegrals();
  return {
    n,
    ups,
    downs,
    size,
    substitutions,
    B: repulsion(integrals.B, substitutions),
    C: repulsion(integrals.C, substitutions),
    spinSquared: spinSquared(n, substitutions),
    orbitalSquared: orbitalSquared(substitutions),
  };
}

/** Sets of `count` of the five orbitals, each ascending. */
function subsets(count: number, from = 0): number[][] {
  if (count === 0) return [[]];
  const starts = Array.from({ length: Math.max(0, 5 - from) }, (_, i) => from + i);
  return starts.flatMap((first) => subsets(count - 1, first + 1).map((rest) => [first, ...rest]));
}

/** The set in which q gave place to p, with the sign of bringing it into order; null where Pauli forbids it. */
function substitute(set: readonly number[], p: number, q: number): { set: number[]; sign: number } | null {
  const rest = set.filter((orbital) => orbital !== q);
  if (rest.length === set.length || rest.includes(p)) return null;
  const moves = set.indexOf(q) + rest.filter((orbital) => orbital < p).length;
  return { set: [...rest, p].sort((a, b) => a - b), sign: moves % 2 === 0 ? 1 : -1 };
}

function substitution(p: number, q: number, ups: readonly number[][], downs: readonly number[][]): Matrix {
  const size = ups.length * downs.length;
  const matrix = zeros(size);
  const indexOf = (sets: readonly number[][], set: readonly number[]) => sets.findIndex((s) => `${s}` === `${set}`);
  const entries = (sets: readonly number[][]) =>
    sets.flatMap((set, from) => {
      const result = substitute(set, p, q);
      return result ? [{ from, to: indexOf(sets, result.set), sign: result.sign }] : [];
    });
  const d = downs.length;
  for (const { from, to, sign } of entries(ups)) {
    for (let down = 0; down < d; down++) matrix.data[(to * d + down) * size + from * d + down]! += sign;
  }
  for (const { from, to, sign } of entries(downs)) {
    for (let up = 0; up < ups.length; up++) matrix.data[(up * d + to) * size + up * d + from]! += sign;
  }
  return matrix;
}

/** Σ_pq h_pq E_pq for a 5 × 5 matrix h over the orbitals. */
export function oneElectron(h: Matrix, substitutions: readonly Matrix[]): Matrix {
  const sum = zeros(substitutions[0]!.rows);
  substitutions.forEach((operator, pq) => {
    if (h.data[pq] !== 0) addScaled(sum, operator, h.data[pq]!);
  });
  return sum;
}

/** ½ Σ (pq|rs) (E_pq E_rs − δ_qr E_ps). */
function repulsion(integrals: Float64Array, substitutions: readonly Matrix[]): Matrix {
  const total = zeros(substitutions[0]!.rows);
  const selfTerm = zeros(5);
  for (let pq = 0; pq < 25; pq++) {
    const mean = oneElectron({ rows: 5, columns: 5, data: integrals.subarray(pq * 25, pq * 25 + 25) }, substitutions);
    addScaled(total, product(substitutions[pq]!, mean), 0.5);
    const [p, q] = [Math.floor(pq / 5), pq % 5];
    for (let s = 0; s < 5; s++) selfTerm.data[p * 5 + s]! -= 0.5 * integrals[pq * 25 + q * 5 + s]!;
  }
  addScaled(total, oneElectron(selfTerm, substitutions), 1);
  return total;
}

/**
 * S² = 7n/2 − n²/4 − ½ Σ_pq E_pq E_qp for n electrons in five orbitals: Dirac's identity, in which the exchange of
 * spins is minus the exchange of places.
 */
function spinSquared(n: number, substitutions: readonly Matrix[]): Matrix {
  const size = substitutions[0]!.rows;
  const exchanges = substitutions.map((operator, pq) =>
    product(operator, substitutions[(pq % 5) * 5 + Math.floor(pq / 5)]!),
  );
  return combine([[3.5 * n - n ** 2 / 4, identity(size)], ...exchanges.map((e) => [-0.5, e] as const)]);
}

/** L² = −Σ a², l = i·a, over x, y and z. */
function orbitalSquared(substitutions: readonly Matrix[]): Matrix {
  const parts = ANGULAR_MOMENTUM.map((a) => oneElectron(a, substitutions));
  return combine(parts.map((part) => [-1, product(part, part)] as const));
}
