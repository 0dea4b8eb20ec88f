import { type ConfigurationSpace, configurationSpace } from './configuration-space.ts';
import { addScaled, combine, identity, type Matrix, within, zeros } from './matrix.ts';
import { quantumNumber, splitBy } from './subspaces.ts';

/** The states of dⁿ of one spin, at the smallest |M_S|, with the operators among them. */
export interface SpinSpace {
  multiplicity: number;
  /** Orthonormal columns over the determinants. */
  basis: Matrix;
  B: Matrix;
  C: Matrix;
  orbitalSquared: Matrix;
  /** E_pq + E_qp for p < q, E_pp for p = q, at p·5 + q. */
  pairs: ReadonlyMap<number, Matrix>;
}

const known = new Map<number, readonly SpinSpace[]>();

/**
 * The space of dⁿ by spin, the lowest first, built once for each n.
 *
 * @throws DomainError `out-of-range` (field `n`)
 */
export function spinSpaces(n: number): readonly SpinSpace[] {
  const spaces = known.get(n) ?? build(configurationSpace(n));
  known.set(n, spaces);
  return spaces;
}

function build(space: ConfigurationSpace): SpinSpace[] {
  return splitBy(space.spinSquared, identity(space.size)).map(({ value, basis }) => {
    const pairs = new Map<number, Matrix>();
    for (let p = 0; p < 5; p++) {
      for (let q = p; q < 5; q++) {
        const [one, other] = [space.substitutions[p * 5 + q]!, space.substitutions[q * 5 + p]!];
        pairs.set(
          p * 5 + q,
          within(
            basis,
            p === q
              ? one
              : combine([
                  [1, one],
                  [1, other],
                ]),
          ),
        );
      }
    }
    return {
      multiplicity: Math.round(2 * quantumNumber(value)) + 1,
      basis,
      B: within(basis, space.B),
      C: within(basis, space.C),
      orbitalSquared: within(basis, space.orbitalSquared),
      pairs,
    };
  });
}

/** Racah B and C, and Trees' α, in one unit of energy. */
export interface Repulsion {
  B: number;
  C: number;
  alpha?: number | undefined;
}

/** Matrix of a symmetric one-electron field (5 × 5) and of the repulsion among the states of one spin. */
export function spinMatrix(
  { basis, pairs, ...space }: SpinSpace,
  field: Matrix,
  { B, C, alpha = 0 }: Repulsion,
): Matrix {
  const sum = zeros(basis.columns);
  for (const [pq, operator] of pairs) if (field.data[pq] !== 0) addScaled(sum, operator, field.data[pq]!);
  addScaled(sum, space.B, B);
  addScaled(sum, space.C, C);
  if (alpha !== 0) addScaled(sum, space.orbitalSquared, alpha);
  return sum;
}
