import { type Geometry, operationsOf } from './catalogue.ts';
import type { LigandKind } from './ligand-slot.ts';
import { type Placement, placementKey, placementsOf } from './placements.ts';

/**
 * Number of stereoisomers by the lemma of Cauchy, Frobenius and Burnside: the mean, over the proper rotations of the
 * polyhedron, of how many arrangements each leaves as it is. Enantiomers count as two.
 *
 * Independent of the enumeration by orbits: an arrangement that a rotation keeps is made of whole cycles of
 * placements, and it is those that are counted.
 */
export function burnsideCount(geometry: Geometry, kinds: readonly LigandKind[]): number {
  const rotations = operationsOf(geometry).filter(({ proper }) => proper);
  const placements = kinds.map((_, k) => placementsOf(geometry, kinds, k));
  const fixed = rotations.map(({ permutation }) => {
    const cycles = placements.flatMap((list, k) => cyclesOf(list, kinds[k]!, permutation));
    return coverings(
      cycles,
      kinds.map(({ count }) => count),
      geometry.coordinationNumber,
    );
  });
  return fixed.reduce((sum, count) => sum + count, 0) / rotations.length;
}

interface Cycle {
  kind: number;
  /** How many ligands it holds. */
  size: number;
  /** Bit i is set where vertex i is taken. */
  mask: number;
}

/** Cycles of placements under a rotation; those whose ligands would collide are left out. */
function cyclesOf(list: readonly Placement[], ligand: LigandKind, permutation: readonly number[]): Cycle[] {
  const seen = new Set<string>();
  const cycles: Cycle[] = [];
  for (const { kind, vertices } of list) {
    let current = vertices;
    let [size, mask, collides] = [0, 0, false];
    while (!seen.has(placementKey(ligand, current))) {
      seen.add(placementKey(ligand, current));
      const own = current.reduce((bits, vertex) => bits | (1 << vertex), 0);
      collides ||= (mask & own) !== 0;
      mask |= own;
      size++;
      current = current.map((vertex) => permutation[vertex]!);
    }
    if (size > 0 && !collides) cycles.push({ kind, size, mask });
  }
  return cycles;
}

function coverings(cycles: readonly Cycle[], left: readonly number[], vertices: number, taken = 0): number {
  if (taken === (1 << vertices) - 1) return 1;
  const lowest = ~taken & (taken + 1);
  let count = 0;
  for (const { kind, size, mask } of cycles) {
    if (!(mask & lowest) || mask & taken || size > left[kind]!) continue;
    const rest = left.map((n, k) => (k === kind ? n - size : n));
    count += coverings(cycles, rest, vertices, taken | mask);
  }
  return count;
}
