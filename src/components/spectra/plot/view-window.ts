/** A window of the horizontal axis, in the unit of the axis, lower end first. */
export type ViewWindow = readonly [number, number];

/**
 * A window made narrower (factor < 1) or wider about a point, kept inside the whole axis.
 *
 * @returns null when all of the axis is in sight
 */
export function zoomed(view: ViewWindow | null, whole: ViewWindow, factor: number, centre?: number): ViewWindow | null {
  const [a, b] = view ?? whole;
  const span = (b - a) * factor;
  if (span >= whole[1] - whole[0]) return null;
  const pin = Math.min(b, Math.max(a, centre ?? (a + b) / 2));
  const low = pin - ((pin - a) / (b - a)) * span;
  return kept([low, low + span], whole);
}

/** A window moved by a share of its own width, kept inside the whole axis. */
export function panned(view: ViewWindow | null, whole: ViewWindow, share: number): ViewWindow | null {
  if (view === null) return null;
  const shift = (view[1] - view[0]) * share;
  return kept([view[0] + shift, view[1] + shift], whole);
}

function kept([a, b]: ViewWindow, [low, high]: ViewWindow): ViewWindow {
  const shift = a < low ? low - a : b > high ? high - b : 0;
  return [a + shift, b + shift];
}
