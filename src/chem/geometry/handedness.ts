import type { Geometry } from './catalogue.ts';
import { add, cross, dot, scale, subtract } from './vector.ts';

/** Below this a pair of chelate edges is parallel, crossing or at right angles and has no handedness. */
const TOLERANCE = 1e-6;

/**
 * Δ or Λ of an octahedral arrangement from its pairs of skew chelate edges, null where it has none or they disagree.
 *
 * For edges along u and v, taken so that u·v > 0, with d from the one to the other, d·(u×v) < 0 is a right-handed
 * helix and so Δ.
 *
 * @param chelates - linked pairs of vertices
 * @see IUPAC Red Book 2005, IR-9.3.4.11 to 13 (skew-lines convention)
 */
export function skewLineChirality(geometry: Geometry, chelates: readonly [number, number][]): 'Δ' | 'Λ' | null {
  if (geometry.symbol !== 'OC-6') return null;
  const signs = new Set<number>();
  chelates.forEach((first, n) => {
    for (const second of chelates.slice(n + 1)) {
      const sign = handedness(geometry, first, second);
      if (sign !== 0) signs.add(sign);
    }
  });
  if (signs.size !== 1) return null;
  return signs.has(-1) ? 'Δ' : 'Λ';
}

function handedness(geometry: Geometry, first: [number, number], second: [number, number]): number {
  const [a, b, c, d] = [...first, ...second].map((vertex) => geometry.vertices[vertex]!);
  const u = subtract(b!, a!);
  const v = subtract(d!, c!);
  const along = dot(u, v);
  const between = scale(subtract(add(c!, d!), add(a!, b!)), 0.5);
  const volume = Math.sign(along) * dot(between, cross(u, v));
  return Math.abs(along) < TOLERANCE || Math.abs(volume) < TOLERANCE ? 0 : Math.sign(volume);
}
