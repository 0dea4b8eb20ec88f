import { DomainError } from '../errors.ts';
import { BlockSweep } from './block-sweep.ts';
import { blockParents, cubicBlocks } from './cubic-blocks.ts';
import { termLetter } from './free-ion.ts';
import { requireStrength } from './levels.ts';

export interface OrgelRequest {
  /** d electrons, 1 to 9. */
  n: number;
  /** Racah B, and C where it matters: it moves no level of highest spin against another. */
  B: number;
  C?: number | undefined;
  /** Largest Δ to each side, in the unit of B. */
  max: number;
  /** Points from −max to max; 81 unless told. */
  points?: number | undefined;
}

export interface OrgelDiagram {
  /** Δ of the octahedron to the right of 0, minus Δ of the tetrahedron or cube to the left. */
  x: number[];
  /** Levels of highest spin; labels without `g`, as they serve both sides. Energies count from the free ion's ground term. */
  curves: { label: string; parent: string | null; y: number[] }[];
}

const MOST_POINTS = 2001;

/**
 * Orgel's diagram: the levels of highest spin over the field, tetrahedral to the left and octahedral to the right.
 *
 * @throws DomainError `out-of-range` (fields `n`, `B`, `C`, `max`, `points`)
 * @see L. E. Orgel, J. Chem. Phys. 23 (1955) 1004 (from memory)
 */
export function orgelDiagram({ n, B, C = 4.5 * B, max, points = 81 }: OrgelRequest): OrgelDiagram {
  requireStrength(B, 'B');
  requireStrength(C, 'C');
  if (!(max > 0 && Number.isFinite(max))) throw new DomainError('out-of-range', 'max must be above 0.', 'max');
  if (!Number.isInteger(points) || points < 2 || points > MOST_POINTS) {
    throw new DomainError('out-of-range', `points must be a whole number from 2 to ${MOST_POINTS}.`, 'points');
  }
  const all = cubicBlocks(n);
  const blocks = all.filter(({ multiplicity }) => multiplicity === all[0]!.multiplicity);
  const sweeps = blocks.map((block) => new BlockSweep(block, 1, B, C));
  const energies = (sweep: BlockSweep, delta: number): Float64Array => {
    const values = new Float64Array(sweep.size);
    sweep.energies(delta, values);
    return values;
  };
  const origin = Math.min(...sweeps.map((sweep) => energies(sweep, 0)[0]!));
  const x = Array.from({ length: points }, (_, i) => -max + (2 * max * i) / (points - 1));
  const tables = sweeps.map((sweep) => x.map((delta) => energies(sweep, delta)));
  const curves = blocks.flatMap((block, b) =>
    blockParents(block, B, C).map((parent, root) => ({
      label: `${block.multiplicity}${block.irrep}`,
      parent: parent === null ? null : termLetter(parent),
      y: tables[b]!.map((values) => values[root]! - origin),
    })),
  );
  return { x, curves };
}
