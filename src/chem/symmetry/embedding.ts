import type { Matrix3, Vector3 } from '../geometry/vector.ts';
import { cross, dot, length, multiply, normalise, transpose } from '../geometry/vector.ts';
import type { FiniteGroup } from './finite-group.ts';
import { generatorsOf, symbolParts } from './generators.ts';
import { IDENTITY, matrixKey, operationKind } from './matrices.ts';

/** One way in which a group in its standard setting lies within a set of operations. */
export interface Embedding {
  /** Rows: the x, y and z of the embedded group's standard setting, in the frame of the operations. */
  frame: Matrix3;
  /** The embedded operations, in the frame of the set, in the order of the group's own. */
  images: Matrix3[];
}

/**
 * Every setting of a group within a closed set of operations, as far as the settings differ in where x, y and z point
 * along axes and mirror normals; the setting that leaves the axes as they are comes first, then those that keep z.
 *
 * @param operations - all operations of a group, about any axes
 */
export function embeddings(group: FiniteGroup, operations: readonly Matrix3[]): Embedding[] {
  const keys = new Set(operations.map(matrixKey));
  const generators = generatorsOf(symbolParts(group.symbol));
  return frames(operations)
    .filter((frame) => generators.every((m) => keys.has(matrixKey(carried(m, frame)))))
    .map((frame) => ({ frame, images: group.operations.map((m) => carried(m, frame)) }));
}

/** An operation of the standard setting, in the frame that its axes are given in. */
const carried = (m: Matrix3, frame: Matrix3): Matrix3 => multiply(transpose(frame), multiply(m, frame));

/** Radians; below the angle between any two axes of a group in the list. */
const NEARLY = 0.05;

function frames(operations: readonly Matrix3[]): Matrix3[] {
  const standard: Vector3[] = [IDENTITY[2], IDENTITY[0], IDENTITY[1]];
  const axes = operations.map((m) => operationKind(m).axis).filter((axis) => axis !== null);
  // Axes found in coordinates may lie nearly along x, y or z, and then stand for these.
  const snapped = standard.map((d) => axes.find((axis) => length(cross(axis, d)) < NEARLY) ?? d);
  const directions = distinct([...snapped, ...axes]);
  return directions.flatMap((z) => {
    const across = directions.flatMap((d): Vector3[] => {
      const other = cross(d, z);
      if (length(other) < 1e-6) return [];
      return Math.abs(dot(d, z)) < 1e-6 ? [d, normalise(other)] : [normalise(other)];
    });
    return distinct(across).map((x): Matrix3 => [x, cross(z, x), z]);
  });
}

/** Directions that differ, one of each opposite pair. */
function distinct(directions: readonly Vector3[]): Vector3[] {
  const kept: Vector3[] = [];
  for (const d of directions) if (!kept.some((k) => length(cross(k, d)) < 1e-6)) kept.push(d);
  return kept;
}
