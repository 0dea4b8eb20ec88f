import type { Geometry } from './catalogue.ts';

/** Vertices of the ring of a bipyramid follow the two axial ones. */
const FIRST_OF_RING = 2;
/** Vertices of a trigonal prism: three above, then the three below them in the same order. */
const PILLARS = [0, 1, 2] as const;

/** Bipyramids whose ring is long enough for its order to matter, mirror images being alike. */
const LONG_RINGS = new Set(['PBPY-7', 'HBPY-8', 'HBPY-9']);

/** Donors along the ring of a bipyramid, from the start and in the direction that come first; null for other shapes. */
export function ringText(geometry: Geometry, sites: readonly string[]): string | null {
  if (!LONG_RINGS.has(geometry.symbol)) return null;
  const ring = sites.slice(FIRST_OF_RING);
  const readings = [ring, [...ring].reverse()].flatMap((order) =>
    order.map((_, start) => [...order.slice(start), ...order.slice(0, start)].join(', ')),
  );
  return `ring: ${readings.sort()[0]}`;
}

/** Donors above each other in a trigonal prism. */
export function pillarsText(sites: readonly string[]): string {
  const pillars = PILLARS.map((i) => [sites[i]!, sites[i + 3]!].sort().join('–'));
  return `pillars: ${pillars.sort().join(', ')}`;
}

/** Donors of the two triangles of a trigonal prism. */
export function trianglesText(sites: readonly string[]): string {
  const triangles = [sites.slice(0, 3), sites.slice(3)].map((triangle) => triangle.sort().join(' '));
  return `triangles: ${triangles.sort().join(' and ')}`;
}
