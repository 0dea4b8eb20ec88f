import { fromWavenumber, type XUnit, type YUnit } from './units.ts';

/** A trace as it comes from the server: x ascending in cm⁻¹, null in y for a gap. */
export interface Trace {
  x: readonly number[];
  y: readonly (number | null)[];
}

/** Traces on one grid: x ascending in the unit of the axis, and a row of y for each trace, null where it has none. */
export interface JoinedSeries {
  x: number[];
  y: (number | null)[][];
}

/** Points after which the common grid is thinned: several for each pixel of a wide screen. */
const MOST_POINTS = 12_000;
/** Wavenumbers that differ by less are one point, cm⁻¹. */
const SAME_POINT = 1e-6;

/**
 * Puts traces with grids of their own on one, as the plot needs it. The grid is the union of all; between its own points
 * a trace is interpolated linearly in wavenumber, never beyond its ends and never across a gap.
 *
 * @returns x in `xUnit`, ascending; y as given, or log₁₀ of it for `log-epsilon`, where what is not above zero is a gap
 */
export function joinSeries(traces: readonly Trace[], xUnit: XUnit, yUnit: YUnit): JoinedSeries {
  const grid = commonGrid(traces);
  const y = traces.map((trace) => {
    const row = interpolate(trace, grid);
    return yUnit === 'log-epsilon' ? row.map((v) => (v !== null && v > 0 ? Math.log10(v) : null)) : row;
  });
  const x = grid.map((wavenumber) => fromWavenumber(wavenumber, xUnit));
  return xUnit === 'nm' ? { x: x.reverse(), y: y.map((row) => row.reverse()) } : { x, y };
}

function commonGrid(traces: readonly Trace[]): number[] {
  const all = traces.flatMap(({ x }) => [...x]).sort((a, b) => a - b);
  const grid = all.filter((x, i) => i === 0 || x - all[i - 1]! > SAME_POINT);
  const step = Math.ceil(grid.length / MOST_POINTS);
  return step <= 1 ? grid : grid.filter((_, i) => i % step === 0 || i === grid.length - 1);
}

/** Values of a trace on a grid; both ascending, so one walk along both is enough. */
function interpolate({ x, y }: Trace, grid: readonly number[]): (number | null)[] {
  let i = 0;
  return grid.map((at) => {
    while (i < x.length - 1 && x[i + 1]! <= at + SAME_POINT) i++;
    const [x0, y0] = [x[i], known(y[i])];
    if (x0 === undefined || at < x0 - SAME_POINT) return null;
    if (at - x0 <= SAME_POINT) return y0;
    const [x1, y1] = [x[i + 1], known(y[i + 1])];
    if (x1 === undefined || y0 === null || y1 === null) return null;
    return y0 + ((y1 - y0) * (at - x0)) / (x1 - x0);
  });
}

const known = (v: number | null | undefined) => (v === null || v === undefined || Number.isNaN(v) ? null : v);

/** Index of the grid point nearest to a place on the axis; −1 on an empty grid. */
export function nearestIndex(x: readonly number[], at: number): number {
  let low = 0;
  let high = x.length - 1;
  if (high < 0) return -1;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (x[middle]! <= at) low = middle;
    else high = middle;
  }
  return Math.abs(x[low]! - at) <= Math.abs(x[high]! - at) ? low : high;
}

/** About `most` indices spread evenly over a grid, both ends among them: the rows of the table. */
export function spreadIndices(length: number, most: number): number[] {
  if (length <= most) return Array.from({ length }, (_, i) => i);
  return Array.from({ length: most }, (_, i) => Math.round((i * (length - 1)) / (most - 1)));
}
