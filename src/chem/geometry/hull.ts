import type { Vector3 } from './vector.ts';
import { add, cross, dot, length, normalise, scale, subtract } from './vector.ts';

const TOLERANCE = 1e-6;

/**
 * Faces of the convex hull of a few points, each a ring of indices seen anticlockwise from outside.
 *
 * Points in one plane have one face; two points or one have none. Coplanar triangles are one face, so the side of a
 * prism is a square and its diagonals are no edges.
 */
export function hullFaces(points: readonly Vector3[]): number[][] {
  const faces = new Map<string, number[]>();
  for (let i = 0; i < points.length; i++) {
    for (let j = i + 1; j < points.length; j++) {
      for (let k = j + 1; k < points.length; k++) {
        const face = supportingFace(points, i, j, k);
        if (face) faces.set([...face].sort((a, b) => a - b).join(), face);
      }
    }
  }
  return [...faces.values()];
}

/** Sides of the hull's faces as pairs i < j, in rising order; two points have the one edge between them. */
export function hullEdges(points: readonly Vector3[]): [number, number][] {
  if (points.length === 2) return [[0, 1]];
  const keys = new Map<string, [number, number]>();
  for (const face of hullFaces(points)) {
    face.forEach((a, n) => {
      const b = face[(n + 1) % face.length]!;
      keys.set(`${Math.min(a, b)},${Math.max(a, b)}`, [Math.min(a, b), Math.max(a, b)]);
    });
  }
  return [...keys.values()].sort(([a, b], [c, d]) => a - c || b - d);
}

function supportingFace(points: readonly Vector3[], i: number, j: number, k: number): number[] | null {
  const origin = points[i]!;
  const across = cross(subtract(points[j]!, origin), subtract(points[k]!, origin));
  if (length(across) < TOLERANCE) return null;
  const normal = normalise(across);
  const heights = points.map((point) => dot(normal, subtract(point, origin)));
  const below = heights.every((height) => height < TOLERANCE);
  const above = heights.every((height) => height > -TOLERANCE);
  if (!below && !above) return null;
  const members = points.flatMap((_, index) => (Math.abs(heights[index]!) < TOLERANCE ? [index] : []));
  return inOrder(points, members, below ? normal : scale(normal, -1));
}

function inOrder(points: readonly Vector3[], members: readonly number[], outward: Vector3): number[] {
  const middle = scale(
    members.reduce<Vector3>((sum, index) => add(sum, points[index]!), [0, 0, 0]),
    1 / members.length,
  );
  const u = normalise(subtract(points[members[0]!]!, middle));
  const v = cross(outward, u);
  const angle = (index: number): number => {
    const arm = subtract(points[index]!, middle);
    return Math.atan2(dot(arm, v), dot(arm, u));
  };
  return [...members].sort((a, b) => angle(a) - angle(b));
}
