import { apply, length, type Matrix3, subtract, type Vector3 } from '../../geometry/vector.ts';
import { eigenvectors } from '../eigenvectors.ts';
import { negative } from '../matrices.ts';

/**
 * The rotation, or rotation-reflection, that carries points about the origin nearest to others in the least-squares
 * sense.
 *
 * @param from - points; those on one line leave the answer open
 * @param to - as many points, in the same order
 * @param proper - whether a rotation is asked for
 * @see B. K. P. Horn, J. Opt. Soc. Am. A 4 (1987) 629, by unit quaternions
 */
export function orthogonalFit(from: readonly Vector3[], to: readonly Vector3[], proper: boolean): Matrix3 {
  // An improper operation is inversion after a rotation.
  const sign = proper ? 1 : -1;
  const s = (a: number, b: number): number => from.reduce((sum, p, i) => sum + sign * p[a]! * to[i]![b]!, 0);
  const [xx, yy, zz] = [s(0, 0), s(1, 1), s(2, 2)];
  const [yz, zx, xy] = [s(1, 2) - s(2, 1), s(2, 0) - s(0, 2), s(0, 1) - s(1, 0)];
  const [pxy, pyz, pzx] = [s(0, 1) + s(1, 0), s(1, 2) + s(2, 1), s(2, 0) + s(0, 2)];
  const form = [
    [xx + yy + zz, yz, zx, xy],
    [yz, xx - yy - zz, pxy, pzx],
    [zx, pxy, yy - xx - zz, pyz],
    [xy, pzx, pyz, zz - xx - yy],
  ];
  const value = (v: readonly number[]): number =>
    v.reduce((sum, a, i) => sum + a * v.reduce((inner, b, j) => inner + form[i]![j]! * b, 0), 0);
  const best = eigenvectors(form).reduce((a, b) => (value(b) > value(a) ? b : a));
  const turn = fromQuaternion(best as [number, number, number, number]);
  return proper ? turn : negative(turn);
}

function fromQuaternion([w, x, y, z]: [number, number, number, number]): Matrix3 {
  return [
    [w * w + x * x - y * y - z * z, 2 * (x * y - w * z), 2 * (x * z + w * y)],
    [2 * (x * y + w * z), w * w - x * x + y * y - z * z, 2 * (y * z - w * x)],
    [2 * (x * z - w * y), 2 * (y * z + w * x), w * w - x * x - y * y + z * z],
  ];
}

/** Greatest distance left between the images of some points and others. */
export function greatestMisfit(m: Matrix3, from: readonly Vector3[], to: readonly Vector3[]): number {
  return from.reduce((most, p, i) => Math.max(most, length(subtract(apply(m, p), to[i]!))), 0);
}
