/** A level at a place of a diagram. */
export interface Reading {
  label: string;
  energy: number;
  strong: boolean;
}

/** Energies of all curves at a place, by straight lines between the points; ascending. Empty outside the curves. */
export function readOut(
  curves: readonly { label: string; x: readonly number[]; y: readonly number[]; strong: boolean }[],
  at: number,
): Reading[] {
  return curves
    .flatMap(({ label, x, y, strong }): Reading[] => {
      const next = x.findIndex((value) => value >= at);
      if (next < 0 || (next === 0 && x[0] !== at)) return [];
      if (next === 0) return [{ label, energy: y[0]!, strong }];
      const share = (at - x[next - 1]!) / (x[next]! - x[next - 1]!);
      return [{ label, energy: y[next - 1]! + share * (y[next]! - y[next - 1]!), strong }];
    })
    .sort((a, b) => a.energy - b.energy);
}
