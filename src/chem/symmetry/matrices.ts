import type { Matrix3, Vector3 } from '../geometry/vector.ts';
import { determinant, length, multiply, normalise, trace } from '../geometry/vector.ts';

export const IDENTITY: Matrix3 = [
  [1, 0, 0],
  [0, 1, 0],
  [0, 0, 1],
];
export const INVERSION: Matrix3 = negative(IDENTITY);

/** The matrix with every sign changed: the same operation followed by inversion. */
export function negative(m: Matrix3): Matrix3 {
  return m.map((row) => row.map((x) => -x)) as Matrix3;
}

/** Rotation by `angle` (radians) about a direction, counter-clockwise seen from its tip (Rodrigues' formula). */
export function rotation(axis: Vector3, angle: number): Matrix3 {
  const [x, y, z] = normalise(axis);
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  const t = 1 - c;
  return [
    [t * x * x + c, t * x * y - s * z, t * x * z + s * y],
    [t * x * y + s * z, t * y * y + c, t * y * z - s * x],
    [t * x * z - s * y, t * y * z + s * x, t * z * z + c],
  ];
}

/** Text that is the same for matrices that agree to about four decimals. */
export const matrixKey = (m: Matrix3): string =>
  m.map((row) => row.map((x) => Math.round(x * 1e4) || 0).join(',')).join(';');

/** Weights without a rational relation, so that no two operations of a group in its standard setting sum alike. */
const [A, B, C] = [1, Math.PI - 3, Math.E - 2];

/** A number that differs between the operations of a group in its standard setting. */
export const matrixMark = ([[a, b, c], [d, e, f], [g, h, i]]: Matrix3): number =>
  A * a + B * b + C * c + 3.1 * (A * e + B * f + C * d) + 7.7 * (A * i + B * g + C * h);

/** All products of some operations, the identity first. They must generate a finite group. */
export function closure(generators: readonly Matrix3[]): Matrix3[] {
  const found = new Map([[matrixKey(IDENTITY), IDENTITY]]);
  // A Map visits what is added while it is walked.
  for (const known of found.values()) {
    for (const generator of generators) {
      const product = multiply(generator, known);
      const key = matrixKey(product);
      if (!found.has(key)) found.set(key, product);
    }
  }
  return [...found.values()];
}

/** What an operation does, apart from where its axis points. */
export interface OperationKind {
  proper: boolean;
  /** Axis of the rotation, of the rotation-reflection, or normal of the mirror; null for E and i. */
  axis: Vector3 | null;
  /** Angle about `axis` in radians, from 0 to 2π; for improper operations that of the rotation before the reflection. */
  angle: number;
}

/** Axis and angle of an orthogonal matrix; of the two opposite axes, the one whose components have the greater sum. */
export function operationKind(m: Matrix3): OperationKind {
  const proper = determinant(m) > 0;
  const turn = proper ? m : negative(m);
  const cosine = Math.min(1, Math.max(-1, (trace(turn) - 1) / 2));
  if (cosine > 1 - 1e-8) return { proper, axis: null, angle: proper ? 0 : Math.PI };
  const axis = orient(rotationAxis(turn));
  const skew: Vector3 = [turn[2][1] - turn[1][2], turn[0][2] - turn[2][0], turn[1][0] - turn[0][1]];
  const sine = (skew[0] * axis[0] + skew[1] * axis[1] + skew[2] * axis[2]) / 2;
  const angle = Math.atan2(sine, cosine);
  // −R(φ) is the reflection in the plane across the axis after a rotation by φ + π.
  return { proper, axis, angle: modulo(proper ? angle : angle + Math.PI) };
}

const modulo = (angle: number): number => {
  const turns = angle / (2 * Math.PI);
  const part = turns - Math.floor(turns + 1e-9);
  return Math.max(0, part) * 2 * Math.PI;
};

function rotationAxis(m: Matrix3): Vector3 {
  const skew: Vector3 = [m[2][1] - m[1][2], m[0][2] - m[2][0], m[1][0] - m[0][1]];
  if (length(skew) > 1e-6) return normalise(skew);
  // A half-turn is 2 a aᵀ − 1, so any column of (m + 1) that is not zero lies along a.
  const columns = [0, 1, 2].map(
    (j): Vector3 => [m[0][j]! + Number(j === 0), m[1][j]! + Number(j === 1), m[2][j]! + Number(j === 2)],
  );
  const best = columns.reduce((a, b) => (length(b) > length(a) + 1e-9 ? b : a));
  return normalise(best);
}

function orient([x, y, z]: Vector3): Vector3 {
  const sum = x + y + z;
  const first = [z, x, y].find((c) => Math.abs(c) > 1e-6) ?? 1;
  const positive = Math.abs(sum) > 1e-6 ? sum > 0 : first > 0;
  return positive ? [x, y, z] : [-x, -y, -z];
}
