import { findElement } from '../../elements.ts';
import { length, subtract, type Vector3 } from '../../geometry/vector.ts';
import { covalentRadius } from './covalent-radii.ts';

/**
 * By so much in Å may a bond be longer than the radii of its atoms together; common practice of crystal structures.
 * Between two that are no metals it is less, as donors about a metal crowd.
 */
const LEEWAY = { metal: 0.4, other: 0.2 };

/**
 * Pairs of atoms near enough to be bound, by covalent radii.
 *
 * @param positions - in Å
 * @returns null where an element has no radius, so that no bond can be told
 */
export function bondsBetween(elements: readonly string[], positions: readonly Vector3[]): [number, number][] | null {
  const radii = elements.map(covalentRadius);
  if (radii.includes(null)) return null;
  const metal = elements.map(isMetal);
  const bonds: [number, number][] = [];
  positions.forEach((p, i) => {
    positions.forEach((q, j) => {
      const leeway = metal[i] || metal[j] ? LEEWAY.metal : LEEWAY.other;
      if (i < j && length(subtract(p, q)) <= radii[i]! + radii[j]! + leeway) bonds.push([i, j]);
    });
  });
  return bonds;
}

const isMetal = (symbol: string): boolean => 'df'.includes(findElement(symbol)?.block ?? '-');

/** Indices of the atoms bound to metals of the d and f block; empty where there is no such metal. */
export function donorsAmong(elements: readonly string[], bonds: readonly (readonly [number, number])[]): number[] {
  const metal = elements.map(isMetal);
  const donors = bonds.flatMap(([i, j]) => [
    ...(metal[i] && !metal[j] ? [j] : []),
    ...(metal[j] && !metal[i] ? [i] : []),
  ]);
  return [...new Set(donors)].sort((a, b) => a - b);
}
