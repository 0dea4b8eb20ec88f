import type { Matrix3, Vector3 } from '../geometry/vector.ts';
import {
  apply,
  cross,
  determinant,
  dot,
  inverse,
  length,
  multiply,
  normalise,
  subtract,
  transpose,
} from '../geometry/vector.ts';

/** A symmetry operation of a set of points about the origin. */
export interface PermutingOperation {
  /** Orthogonal matrix. */
  matrix: Matrix3;
  /** Point i goes to where point `permutation[i]` was. */
  permutation: number[];
  /** A rotation, that is determinant +1. */
  proper: boolean;
}

const TOLERANCE = 1e-6;

/**
 * Every orthogonal matrix that carries a set of points into itself.
 *
 * Points that span space fix each operation by what it does to three of them. Points in a plane through the origin
 * leave the side of the plane open, so each permutation comes twice, once as a rotation and once with the plane's
 * reflection. Points on one line have the infinite groups; four operations (E, a C2 across the line, i, one σv) stand
 * for them, which is enough to tell which points change places.
 *
 * @param points - at least one point; none at the origin
 */
export function permutingOperations(points: readonly Vector3[]): PermutingOperation[] {
  const basis = independentPoints(points);
  const found: PermutingOperation[] = [];
  for (const images of imagesOf(basis, points)) {
    for (const matrix of matricesThatMap(
      basis.map((i) => points[i]!),
      images.map((i) => points[i]!),
    )) {
      const permutation = permutationBy(matrix, points);
      if (permutation) found.push({ matrix, permutation, proper: determinant(matrix) > 0 });
    }
  }
  return found;
}

/** Whether all points lie on one line through the origin. */
export function isLinear(points: readonly Vector3[]): boolean {
  return independentPoints(points).length < 2;
}

/** Indices of up to three points that span what all of them span. */
function independentPoints(points: readonly Vector3[]): number[] {
  const second = points.findIndex((p) => length(cross(points[0]!, p)) > TOLERANCE);
  if (second < 0) return [0];
  const normal = cross(points[0]!, points[second]!);
  const third = points.findIndex((p) => Math.abs(dot(normal, p)) > TOLERANCE);
  return third < 0 ? [0, second] : [0, second, third];
}

/** Ordered choices of points with the same lengths and angles as the basis. */
function imagesOf(basis: readonly number[], points: readonly Vector3[]): number[][] {
  let partial: number[][] = [[]];
  for (let k = 0; k < basis.length; k++) {
    partial = partial.flatMap((chosen) =>
      points.flatMap((point, candidate) => {
        const fits = [...chosen, candidate].every(
          (image, j) => Math.abs(dot(points[image]!, point) - dot(points[basis[j]!]!, points[basis[k]!]!)) < TOLERANCE,
        );
        return fits ? [[...chosen, candidate]] : [];
      }),
    );
  }
  return partial;
}

function matricesThatMap(from: readonly Vector3[], to: readonly Vector3[]): Matrix3[] {
  const completed = completions(from)[0]!;
  const back = inverse(transpose(completed));
  const targets = from.length === 3 ? [to as Matrix3] : completions(to);
  return targets.map((target) => multiply(transpose(target), back)).filter(isOrthogonal);
}

/** The two ways, one of each hand, of completing one or two vectors to a basis with perpendicular unit vectors. */
function completions(vectors: readonly Vector3[]): Matrix3[] {
  const [a, b, c] = vectors;
  if (a && b && c) return [[a, b, c]];
  if (a && b) {
    const normal = normalise(cross(a, b));
    return [
      [a, b, normal],
      [a, b, [-normal[0], -normal[1], -normal[2]]],
    ];
  }
  const least = a!.map(Math.abs).reduce((best, x, i, all) => (x < all[best]! ? i : best), 0);
  const p = normalise(cross(a!, [Number(least === 0), Number(least === 1), Number(least === 2)]));
  const q = normalise(cross(a!, p));
  return [
    [a!, p, q],
    [a!, p, [-q[0], -q[1], -q[2]]],
  ];
}

function isOrthogonal(m: Matrix3): boolean {
  const product = multiply(m, transpose(m));
  return product.every((row, i) => row.every((x, j) => Math.abs(x - Number(i === j)) < TOLERANCE));
}

function permutationBy(matrix: Matrix3, points: readonly Vector3[]): number[] | null {
  const permutation = points.map((point) => {
    const image = apply(matrix, point);
    return points.findIndex((other) => length(subtract(other, image)) < 1e-4);
  });
  return permutation.includes(-1) ? null : permutation;
}
