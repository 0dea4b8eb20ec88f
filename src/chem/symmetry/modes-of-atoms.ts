import type { Matrix3, Vector3 } from '../geometry/vector.ts';
import { apply, determinant, dot, length, subtract, trace } from '../geometry/vector.ts';
import { type Embedding, embeddings } from './embedding.ts';
import type { FiniteGroup } from './finite-group.ts';
import type { IrrepCount } from './groups.ts';
import { reduce } from './products.ts';
import type { SkeletonVibrations } from './vibrations.ts';

/** Atoms about a point that every operation leaves alone. */
export interface AtomSet {
  positions: readonly Vector3[];
  /** Pairs of atoms, by index. */
  bonds: readonly (readonly [number, number])[];
  /** Places that the axes go through where the labels leave a choice, such as the donors. */
  guides: readonly Vector3[];
}

/**
 * Normal modes of atoms that a group keeps exactly.
 *
 * Where the labels leave a choice of axes, x (or the plane xz) goes through as many guides as it can.
 *
 * @param matrices - all operations of the group, in the frame of the atoms
 * @returns the modes with the setting that their labels hang on
 */
export function modesOfAtoms(
  group: FiniteGroup,
  matrices: readonly Matrix3[],
  { positions, bonds, guides }: AtomSet,
): { modes: SkeletonVibrations; setting: Embedding } {
  const setting = bestSetting(group, matrices, guides);
  const operations = group.classes.map(
    ({ representative }) => setting.images[group.operations.indexOf(representative)]!,
  );
  const images = operations.map((m) => positions.map((p) => indexAt(positions, apply(m, p))));
  const stays = images.map((image) => image.filter((to, i) => to === i).length);
  const vector = operations.map(trace);
  const axial = operations.map((m) => trace(m) * Math.sign(determinant(m)));
  // Γ(3N): each atom that stays put gives the character of a vector.
  const all = vector.map((x, c) => x * stays[c]!);
  const inner = all.map((x, c) => x - vector[c]! - axial[c]!);
  const kept = images.map((image) => bonds.filter((bond) => isSame(bond, image)).length);
  const squares = group.powerClass(2);
  const quadratic = vector.map((x, c) => (x * x + vector[squares[c]!]!) / 2);
  const [polar, tensor] = [vector, quadratic].map((row) => new Set(reduce(group, row).map(({ irrep }) => irrep)));
  const bends = reduce(
    group,
    inner.map((x, c) => x - kept[c]!),
  );
  const modes = {
    group: group.symbol,
    total: reduce(group, all),
    vibrations: reduce(group, inner).map((term) => ({
      ...term,
      infrared: polar!.has(term.irrep),
      raman: tensor!.has(term.irrep),
    })),
    stretches: reduce(group, kept),
    bends: bends.some(({ count }: IrrepCount) => count < 0) ? null : bends,
    permutation: reduce(group, stays),
    axes: axesText(setting.frame, guides),
  };
  return { modes, setting };
}

const indexAt = (positions: readonly Vector3[], place: Vector3): number =>
  positions.findIndex((p) => length(subtract(p, place)) < 1e-4);

const isSame = ([i, j]: readonly [number, number], image: readonly number[]): boolean =>
  (image[i] === i && image[j] === j) || (image[i] === j && image[j] === i);

/**
 * The setting whose z is normal to a plane of guides or else holds the most of them, then whose plane xz does, then x;
 * the set's own axes win a tie. Where there is a principal axis, z has no choice: this is for D2 and D2h.
 */
function bestSetting(group: FiniteGroup, matrices: readonly Matrix3[], guides: readonly Vector3[]): Embedding {
  const across = (v: Vector3, axis: Vector3): boolean => Math.abs(dot(v, axis)) < 1e-4;
  const score = ({ frame: [x, y, z] }: Embedding): number => {
    const upright = guides.every((v) => across(v, z)) ? 1e6 : 0;
    return guides.reduce(
      (sum, v) => sum + (onAxis(v, z) ? 1e3 : 0) + (across(v, y) ? 10 : 0) + (onAxis(v, x) ? 1 : 0),
      upright,
    );
  };
  return embeddings(group, matrices).reduce((best, other) => (score(other) > score(best) ? other : best));
}

const onAxis = (v: Vector3, axis: Vector3): boolean => Math.abs(Math.abs(dot(v, axis)) - length(v)) < 1e-4;

function axesText([x, y, z]: Matrix3, guides: readonly Vector3[]): string {
  const on = (axis: Vector3): string => `${guides.filter((v) => onAxis(v, axis)).length}`;
  return `Donors on the axes of the labels: ${on(x)} on x, ${on(y)} on y, ${on(z)} on z.`;
}
