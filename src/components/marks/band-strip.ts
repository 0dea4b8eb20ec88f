import { type VisibleRule, visibleRule } from './visible-light.ts';

/** Ends of the strip in cm⁻¹, left and right. */
export const STRIP_ENDS = [50_000, 4_000] as const;
/** Range of log ε that the height tells. */
const LOG_EPSILON = [-2, 5] as const;
/** Heights in px at the two ends of that range, and for a band whose ε is not known. */
const HEIGHT = { least: 4, most: 28, unknown: 9 };

/** Position on the strip, 0 at 50 000 and 1 at 4 000 cm⁻¹; beyond the ends it lies outside 0…1. */
export function placeOnStrip(wavenumber: number): number {
  return (STRIP_ENDS[0] - wavenumber) / (STRIP_ENDS[0] - STRIP_ENDS[1]);
}

/** Height of a tick in px by log ε, with a least height that still shows. */
export function tickHeight(epsilon: number | null): number {
  if (epsilon === null || !Number.isFinite(epsilon)) return HEIGHT.unknown;
  const log = epsilon > 0 ? Math.log10(epsilon) : LOG_EPSILON[0];
  const share = (log - LOG_EPSILON[0]) / (LOG_EPSILON[1] - LOG_EPSILON[0]);
  return HEIGHT.least + Math.min(1, Math.max(0, share)) * (HEIGHT.most - HEIGHT.least);
}

/** The rule of visible light lies the same on every strip. */
export const STRIP_VISIBLE: VisibleRule | null = visibleRule((nm) => placeOnStrip(1e7 / nm));
