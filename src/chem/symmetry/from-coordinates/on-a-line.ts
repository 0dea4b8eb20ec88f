import { add, cross, dot, length, normalise, scale, subtract, type Vector3 } from '../../geometry/vector.ts';
import { eigenvectors } from '../eigenvectors.ts';
import type { CentredAtoms } from './candidates.ts';
import { withinTolerance } from './find-operations.ts';

/** Atoms that lie on one line within a tolerance. */
export interface OnALine {
  group: 'Dinfh' | 'Cinfv';
  /** Unit vector. */
  direction: Vector3;
  /** The atoms on the line, in D∞h evenly about its middle. */
  positions: Vector3[];
  /** Centre of the line in D∞h, of the atoms in C∞v. */
  middle: Vector3;
  /** Where inversion sends each atom; in C∞v each to itself. */
  images: number[];
  largest: number;
  rms: number;
}

/** The line through atoms, with its group, or null when they lie off every line by more than the tolerance. */
export function onALine({ kinds, positions }: CentredAtoms, tolerance: number): OnALine | null {
  const direction = longestAxis(positions);
  const along = positions.map((p) => dot(p, direction));
  const plain = brought(positions, direction, along);
  if (!withinTolerance(plain, tolerance)) return null;
  const order = along.map((_, i) => i).sort((i, j) => along[i]! - along[j]!);
  const partner = (i: number): number => order[order.length - 1 - order.indexOf(i)]!;
  const even = along.map((t, i) => (t - along[partner(i)]!) / 2);
  const evened = brought(positions, direction, even);
  const central = kinds.every((kind, i) => kinds[partner(i)] === kind) && withinTolerance(evened, tolerance);
  return central
    ? { group: 'Dinfh', direction, images: kinds.map((_, i) => partner(i)), ...evened }
    : { group: 'Cinfv', direction, images: kinds.map((_, i) => i), ...plain };
}

function brought(positions: readonly Vector3[], direction: Vector3, along: readonly number[]) {
  const placed = along.map((t) => scale(direction, t));
  // The middle of the line is free to lie where it moves the atoms least.
  const shift = positions.reduce<Vector3>(
    (sum, p, i) => add(sum, scale(subtract(p, placed[i]!), 1 / positions.length)),
    [0, 0, 0],
  );
  const moved = placed.map((p) => add(p, shift));
  const distances = moved.map((p, i) => length(subtract(p, positions[i]!)));
  const rms = Math.sqrt(distances.reduce((sum, d) => sum + d * d, 0) / distances.length);
  return { positions: moved, middle: shift, largest: Math.max(...distances), rms };
}

function longestAxis(positions: readonly Vector3[]): Vector3 {
  const form = [0, 1, 2].map((i) => [0, 1, 2].map((j) => positions.reduce((sum, p) => sum + p[i]! * p[j]!, 0)));
  const spread = (v: readonly number[]): number => positions.reduce((sum, p) => sum + dot(p, v as Vector3) ** 2, 0);
  return eigenvectors(form).reduce((a, b) => (spread(b) > spread(a) ? b : a)) as Vector3;
}

/** x and y across a direction, x in the plane of it and the axis of the frame that lies least along it. */
export function axesAbout(z: Vector3): { x: Vector3; y: Vector3; z: Vector3 } {
  const least = z.reduce((best, c, k) => (Math.abs(c) < Math.abs(z[best]!) ? k : best), 0);
  const start: Vector3 = [Number(least === 0), Number(least === 1), Number(least === 2)];
  const x = normalise(subtract(start, scale(z, dot(start, z))));
  return { x, y: cross(z, x), z };
}
