/** A point or direction in the frame of the polyhedron; vertices are unit vectors from the metal. */
export type Vector3 = [number, number, number];

/** Rows of a 3 × 3 matrix. */
export type Matrix3 = [Vector3, Vector3, Vector3];

export const dot = (a: Vector3, b: Vector3): number => a[0] * b[0] + a[1] * b[1] + a[2] * b[2];

export const cross = (a: Vector3, b: Vector3): Vector3 => [
  a[1] * b[2] - a[2] * b[1],
  a[2] * b[0] - a[0] * b[2],
  a[0] * b[1] - a[1] * b[0],
];

export const add = (a: Vector3, b: Vector3): Vector3 => [a[0] + b[0], a[1] + b[1], a[2] + b[2]];

export const subtract = (a: Vector3, b: Vector3): Vector3 => [a[0] - b[0], a[1] - b[1], a[2] - b[2]];

export const scale = (a: Vector3, factor: number): Vector3 => [a[0] * factor, a[1] * factor, a[2] * factor];

export const length = (a: Vector3): number => Math.sqrt(dot(a, a));

export const normalise = (a: Vector3): Vector3 => scale(a, 1 / length(a));

export const apply = (m: Matrix3, v: Vector3): Vector3 => [dot(m[0], v), dot(m[1], v), dot(m[2], v)];

export const transpose = (m: Matrix3): Matrix3 => [
  [m[0][0], m[1][0], m[2][0]],
  [m[0][1], m[1][1], m[2][1]],
  [m[0][2], m[1][2], m[2][2]],
];

export function multiply(a: Matrix3, b: Matrix3): Matrix3 {
  const columns = transpose(b);
  const row = (r: Vector3): Vector3 => [dot(r, columns[0]), dot(r, columns[1]), dot(r, columns[2])];
  return [row(a[0]), row(a[1]), row(a[2])];
}

export const determinant = (m: Matrix3): number => dot(m[0], cross(m[1], m[2]));

export const trace = (m: Matrix3): number => m[0][0] + m[1][1] + m[2][2];

/** Inverse of a matrix whose determinant is not zero. */
export function inverse(m: Matrix3): Matrix3 {
  const d = determinant(m);
  return transpose([scale(cross(m[1], m[2]), 1 / d), scale(cross(m[2], m[0]), 1 / d), scale(cross(m[0], m[1]), 1 / d)]);
}
