import { ANGULAR_MOMENTUM } from './d-orbitals.ts';
import { combine, fromRows, identity, type Matrix, product } from './matrix.ts';

/** Octahedral field of strength Dq = Δ/10 with e above t2. */
const OCTAHEDRAL = fromRows([6, 6, -4, -4, -4].map((energy, i, all) => all.map((_, j) => (i === j ? energy : 0))));

/**
 * Tetragonal field Dq, Ds, Dt in the basis z², x²−y², xy, xz, yz: the cubic part, Ds·(m² − 2) and
 * Dt·(−35m⁴ + 155m² − 72)/12, m² being the square of the orbital momentum about the axis.
 *
 * @returns 5 × 5, in the unit of the parameters, centre of gravity at 0
 * @see C. J. Ballhausen, Introduction to Ligand Field Theory, McGraw-Hill 1962 (from memory)
 */
export function tetragonalField({ Dq, Ds, Dt }: { Dq: number; Ds: number; Dt: number }): Matrix {
  const aboutZ = ANGULAR_MOMENTUM[2]!;
  const m2 = combine([[-1, product(aboutZ, aboutZ)]]);
  const one = identity(5);
  return combine([
    [Dq, OCTAHEDRAL],
    [Ds, m2],
    [-2 * Ds, one],
    [(-35 / 12) * Dt, product(m2, m2)],
    [(155 / 12) * Dt, m2],
    [-6 * Dt, one],
  ]);
}
