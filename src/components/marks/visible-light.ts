/** Where the rule of visible light begins and ends, in nm. */
export const VISIBLE_NM = [380, 750] as const;

/** Hues by wavelength in nm, for orientation; muted, not colorimetric. */
const HUES: readonly (readonly [nm: number, colour: string])[] = [
  [380, '#5b2a9d'],
  [445, '#2a49d8'],
  [490, '#169c9c'],
  [530, '#3aa53a'],
  [580, '#d9c21c'],
  [610, '#e06a1a'],
  [670, '#b9291d'],
  [750, '#8c1a1a'],
];

/** A stretch of an axis from 0 to 1 with the gradient that lies on it; null where the axis shows no visible light. */
export interface VisibleRule {
  start: number;
  width: number;
  gradient: string;
}

/**
 * The rule of visible light under an axis of any kind.
 *
 * @param place - position of a wavelength (nm) on the axis, 0 at the left end to 1 at the right, monotonic; values
 *   outside 0…1 lie beyond the ends
 */
export function visibleRule(place: (nm: number) => number): VisibleRule | null {
  const [a, b] = [place(VISIBLE_NM[0]), place(VISIBLE_NM[1])];
  const start = Math.max(0, Math.min(a, b));
  const width = Math.min(1, Math.max(a, b)) - start;
  if (!(width > 0)) return null;
  const stops = HUES.map(([nm, colour]) => ({ at: (100 * (place(nm) - start)) / width, colour }))
    .sort((p, q) => p.at - q.at)
    .map(({ at, colour }) => `${colour} ${at.toFixed(1)}%`);
  return { start, width, gradient: `linear-gradient(to right, ${stops.join(', ')})` };
}
