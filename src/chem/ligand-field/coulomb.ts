import { D_TENSORS } from './d-orbitals.ts';

/** Two-electron integrals (pq|rs) per unit of Racah B and C, at ((p·5 + q)·5 + r)·5 + s. */
export interface CoulombIntegrals {
  B: Float64Array;
  C: Float64Array;
}

const AXES = [0, 1, 2] as const;

const doubleFactorial = (n: number): number => (n <= 1 ? 1 : n * doubleFactorial(n - 2));

/** Mean over the unit sphere of the product of the coordinates named by `axes`. */
function sphereMean(axes: readonly number[]): number {
  const powers = AXES.map((axis) => axes.filter((a) => a === axis).length);
  if (powers.some((power) => power % 2 === 1)) return 0;
  return powers.reduce((p, power) => p * doubleFactorial(power - 1), 1) / doubleFactorial(axes.length + 1);
}

const tuples = (length: number): number[][] =>
  length === 0 ? [[]] : tuples(length - 1).flatMap((head) => AXES.map((axis) => [...head, axis]));

/** ⟨p| n_i n_j … |q⟩ for every pair of orbitals (rows) and every tuple of axes (columns). */
function moments(order: 0 | 2 | 4): number[][] {
  const outer = tuples(order);
  const inner = tuples(4);
  const means = outer.map((axes) => inner.map((rest) => sphereMean([...axes, ...rest])));
  return D_TENSORS.flatMap((p) =>
    D_TENSORS.map((q) => {
      const weights = inner.map(([i, j, k, l]) => 7.5 * p[i as 0]![j as 0]! * q[k as 0]![l as 0]!);
      return means.map((row) => row.reduce((sum, mean, t) => sum + mean * weights[t]!, 0));
    }),
  );
}

const contract = (a: readonly number[], b: readonly number[]): number => a.reduce((sum, x, i) => sum + x * b[i]!, 0);

/**
 * Repulsion integrals between real d orbitals, (pq|rs) = Σₖ Fᵏ ⟨pq| Pₖ(n₁·n₂) |rs⟩, k = 0, 2, 4, with Slater's
 * F⁰ = 7C/5, F² = 49B + 7C, F⁴ = 63C/5, that is Racah's A = 0.
 *
 * The Legendre polynomials are written out in powers of n₁·n₂, so that only moments of one electron are needed.
 *
 * @see G. Racah, Phys. Rev. 62 (1942) 438; J. S. Griffith, The Theory of Transition-Metal Ions, Cambridge 1961 (from memory)
 */
export function coulombIntegrals(): CoulombIntegrals {
  const [zeroth, second, fourth] = [moments(0), moments(2), moments(4)];
  const B = new Float64Array(625);
  const C = new Float64Array(625);
  for (let pq = 0; pq < 25; pq++) {
    for (let rs = 0; rs < 25; rs++) {
      const m0 = contract(zeroth[pq]!, zeroth[rs]!);
      const m2 = contract(second[pq]!, second[rs]!);
      const m4 = contract(fourth[pq]!, fourth[rs]!);
      const p2 = (3 * m2 - m0) / 2;
      const p4 = (35 * m4 - 30 * m2 + 3 * m0) / 8;
      B[pq * 25 + rs] = 49 * p2;
      C[pq * 25 + rs] = (7 / 5) * m0 + 7 * p2 + (63 / 5) * p4;
    }
  }
  return { B, C };
}
