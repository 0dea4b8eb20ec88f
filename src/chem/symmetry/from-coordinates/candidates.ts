import {
  add,
  apply,
  cross,
  dot,
  length,
  type Matrix3,
  multiply,
  normalise,
  scale,
  subtract,
  transpose,
  type Vector3,
} from '../../geometry/vector.ts';
import { greatestMisfit, orthogonalFit } from './orthogonal-fit.ts';

/** Atoms about their centre. */
export interface CentredAtoms {
  /** Kind of each atom; only equality matters. */
  kinds: readonly string[];
  positions: readonly Vector3[];
}

/** An operation that nearly keeps the atoms: it is told by what it permutes and its hand, both of which are exact. */
export interface Candidate {
  /** Atom i goes to where atom `permutation[i]` was. */
  permutation: readonly number[];
  proper: boolean;
  /** Greatest distance of an atom's image from the atom it is taken for. */
  misfit: number;
}

export const candidateKey = ({ permutation, proper }: Omit<Candidate, 'misfit'>): string =>
  `${proper ? '+' : '-'}${permutation.join()}`;

/**
 * Every operation that brings each atom within a distance of one of its kind, by least misfit.
 *
 * Two atoms off one line fix an operation, but for its hand, by where they go: each pair of their kinds at like
 * distances is tried, and the operation then fitted to all atoms.
 *
 * @param atoms - not on one line
 * @param slack - largest misfit, in the unit of the positions
 */
export function candidateOperations(atoms: CentredAtoms, slack: number): Candidate[] {
  const { kinds, positions } = atoms;
  const [a, b] = basisOf(atoms);
  const far = (i: number, j: number): number => length(subtract(positions[i]!, positions[j]!));
  const alike = (i: number): number[] =>
    positions.flatMap((p, j) =>
      kinds[j] === kinds[i] && Math.abs(length(p) - length(positions[i]!)) <= slack ? [j] : [],
    );
  // At wide angles the sum of two directions is short, and their difference serves: for every image alike.
  const wide = dot(positions[a]!, positions[b]!) < 0;
  const from = frameOf(positions[a]!, positions[b]!, wide, true);
  const found = new Map<string, Candidate>();
  for (const imageA of alike(a)) {
    for (const imageB of alike(b)) {
      if (imageA === imageB || Math.abs(far(imageA, imageB) - far(a, b)) > 2 * slack) continue;
      for (const proper of [true, false]) {
        const target = frameOf(positions[imageA]!, positions[imageB]!, wide, proper);
        const start = multiply(transpose(target), from);
        const candidate = settled(atoms, start, proper);
        if (candidate && candidate.misfit <= slack) found.set(candidateKey(candidate), candidate);
      }
    }
  }
  return [...found.values()].sort((x, y) => x.misfit - y.misfit);
}

/** Two atoms off one line through the centre, of the rarest kinds, then the farthest out. */
function basisOf({ kinds, positions }: CentredAtoms): [number, number] {
  const rarity = (i: number): number => kinds.filter((kind) => kind === kinds[i]).length;
  const far = Math.max(...positions.map(length));
  const order = positions
    .map((_, i) => i)
    .filter((i) => length(positions[i]!) > 0.3 * far)
    .sort((i, j) => rarity(i) - rarity(j) || length(positions[j]!) - length(positions[i]!));
  const a = order[0]!;
  const sine = (i: number): number =>
    length(cross(positions[a]!, positions[i]!)) / (length(positions[a]!) * length(positions[i]!));
  const wide = order.find((i) => sine(i) > 0.5);
  const best = positions.map((_, i) => i).filter((i) => length(positions[i]!) > 1e-6);
  return [a, wide ?? best.reduce((x, y) => (sine(y) > sine(x) ? y : x))];
}

/** Rows: halfway between two directions (or between one and the opposite other), across it in their plane, its normal. */
function frameOf(a: Vector3, b: Vector3, wide: boolean, proper: boolean): Matrix3 {
  const [u, v] = [normalise(a), normalise(b)];
  const first = normalise(wide ? subtract(u, v) : add(u, v));
  const normal = normalise(cross(u, v));
  return [first, cross(normal, first), scale(normal, proper ? 1 : -1)];
}

/** Pairs each image with the nearest atom of its kind and fits anew, until the pairs stay. */
function settled({ kinds, positions }: CentredAtoms, start: Matrix3, proper: boolean): Candidate | null {
  let matrix = start;
  let known = '';
  for (let round = 0; round < 5; round++) {
    const permutation = positions.map((p, i) => {
      const image = apply(matrix, p);
      return positions.reduce((best, q, j) => {
        if (kinds[j] !== kinds[i]) return best;
        return best < 0 || length(subtract(q, image)) < length(subtract(positions[best]!, image)) ? j : best;
      }, -1);
    });
    if (new Set(permutation).size < permutation.length) return null;
    const images = permutation.map((j) => positions[j]!);
    matrix = orthogonalFit(positions, images, proper);
    if (permutation.join() === known) return { permutation, proper, misfit: greatestMisfit(matrix, positions, images) };
    known = permutation.join();
  }
  return null;
}
