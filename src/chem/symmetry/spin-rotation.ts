import type { Matrix3 } from '../geometry/vector.ts';
import { negative, operationKind } from './matrices.ts';

/**
 * What an operation does to spin: a unit quaternion w + xi + yj + zk for the rotation by φ about (x, y, z), w being
 * cos φ/2, and whether an inversion follows. A quaternion and its negative turn space alike and spin oppositely.
 */
export interface SpinRotation {
  turn: [w: number, x: number, y: number, z: number];
  /** −1 where inversion follows the turn; inversion itself leaves spin alone. */
  parity: 1 | -1;
}

/** The one of both lifts of an operation that turns by no more than half a turn. */
export function lift(m: Matrix3): SpinRotation {
  const { proper } = operationKind(m);
  const { axis, angle } = operationKind(proper ? m : negative(m));
  const parity = proper ? 1 : -1;
  if (!axis) return { turn: [1, 0, 0, 0], parity };
  const half = (angle > Math.PI + 1e-9 ? angle - 2 * Math.PI : angle) / 2;
  const [x, y, z] = axis;
  return { turn: [Math.cos(half), x * Math.sin(half), y * Math.sin(half), z * Math.sin(half)], parity };
}

/** The other lift of the same operation: after a full turn more. */
export function barred({ turn: [w, x, y, z], parity }: SpinRotation): SpinRotation {
  return { turn: [-w, -x, -y, -z], parity };
}

/** First `b`, then `a`. */
export function multiplySpin(a: SpinRotation, b: SpinRotation): SpinRotation {
  const [aw, ax, ay, az] = a.turn;
  const [bw, bx, by, bz] = b.turn;
  return {
    turn: [
      aw * bw - ax * bx - ay * by - az * bz,
      aw * bx + ax * bw + ay * bz - az * by,
      aw * by - ax * bz + ay * bw + az * bx,
      aw * bz + ax * by - ay * bx + az * bw,
    ],
    parity: (a.parity * b.parity) as 1 | -1,
  };
}

/** Text that is the same for elements that agree to about four decimals. */
export const spinKey = ({ turn, parity }: SpinRotation): string =>
  `${turn.map((x) => Math.round(x * 1e4) || 0).join()};${parity}`;

/** Character of a turn in the 2j + 1 states of angular momentum j, whole or half: sin((2j + 1)φ/2) / sin(φ/2). */
export function momentumCharacter(multiplicity: number, { turn: [w] }: SpinRotation): number {
  // Chebyshev polynomials of the second kind in cos φ/2, which need no division.
  let [before, value] = [0, 1];
  for (let k = 1; k < multiplicity; k++) [before, value] = [value, 2 * w * value - before];
  return value;
}

/** A number that differs between the elements of a double group in its standard setting. */
export const spinMark = ({ turn: [w, x, y, z], parity }: SpinRotation): number =>
  10 * parity + w + (Math.PI - 3) * x + (Math.E - 2) * y + Math.SQRT1_2 * Math.LN2 * z;
