import { add, apply, length, type Matrix3, scale, subtract, transpose, type Vector3 } from '../../geometry/vector.ts';
import type { Candidate } from './candidates.ts';
import { greatestMisfit, orthogonalFit } from './orthogonal-fit.ts';

/** Atoms brought to where a group keeps them exactly. */
export interface Symmetrised {
  positions: Vector3[];
  /** The operations, in the order given. */
  matrices: Matrix3[];
  /** Greatest and root mean square distance that an atom was moved. */
  largest: number;
  rms: number;
}

/**
 * Averages the positions over a group of operations known by their permutations.
 *
 * Each round fits the operations to the positions and the positions to the operations. The fits err in the second
 * order of what is left to average, so that a few rounds reach the precision of the numbers.
 *
 * @param positions - about their centre, not on one line
 * @param group - closed under multiplication
 * @param rounds - most rounds; the default reaches the precision of the numbers
 */
export function symmetrise(
  positions: readonly Vector3[],
  group: readonly Omit<Candidate, 'misfit'>[],
  rounds = 40,
): Symmetrised {
  let current: readonly Vector3[] = positions;
  let matrices: Matrix3[] = [];
  for (let round = 0; round < rounds; round++) {
    const points = current;
    const targets = group.map(({ permutation }) => permutation.map((j) => points[j]!));
    matrices = group.map(({ proper }, g) => orthogonalFit(points, targets[g]!, proper));
    if (matrices.every((m, g) => greatestMisfit(m, points, targets[g]!) < 1e-12)) break;
    const back = matrices.map(transpose);
    current = points.map((_, i) => {
      const sum = back.reduce<Vector3>((total, m, g) => add(total, apply(m, targets[g]![i]!)), [0, 0, 0]);
      return scale(sum, 1 / group.length);
    });
  }
  const shifts = current.map((p, i) => length(subtract(p, positions[i]!)));
  return {
    positions: [...current],
    matrices,
    largest: Math.max(...shifts),
    rms: Math.sqrt(shifts.reduce((sum, d) => sum + d * d, 0) / shifts.length),
  };
}
