import type uPlot from 'uplot';
import { groupDigits } from '../../notation/quantity.ts';
import { DIGIT_SPACE } from '../../notation/runs.ts';
import { type PlotTheme, SERIES_COLOURS, SERIES_DASHES } from './theme.ts';
import type { PlotSeries } from './types.ts';

/** What the drawing depends on, apart from the data. */
interface OptionsInput {
  width: number;
  height: number;
  series: readonly PlotSeries[];
  theme: PlotTheme;
  /** Leaves room above the curves for the labels of bands. */
  hasBands: boolean;
  /** Log ε has no natural nought; the other quantities show it. */
  fromZero: boolean;
  hooks: uPlot.Hooks.Arrays;
}

/** Looks of one curve: its own, or the next of the plot's. */
export function seriesLooks({ colour, dash }: PlotSeries, index: number): { colour: string; dash: number[] } {
  return {
    colour: colour ?? SERIES_COLOURS[index % SERIES_COLOURS.length]!,
    dash: dash ?? (colour ? [] : [...SERIES_DASHES[index % SERIES_DASHES.length]!]),
  };
}

/** Below this, log ε is noise about the base line and not a band: the lower end of the band strip, too. */
const LOWEST_LOG = -2;

/** Ends of the vertical axis: nought in sight where it means something, room at the top. */
export function verticalRange(
  [min, max]: readonly [number | null, number | null],
  { hasBands, fromZero }: { hasBands: boolean; fromZero: boolean },
): [number, number] {
  if (min === null || max === null) return [0, 1];
  const low = fromZero ? Math.min(0, min) : Math.max(min, Math.min(LOWEST_LOG, max - 1));
  const span = max - low || Math.abs(max) || 1;
  const below = fromZero && min >= 0 ? 0 : 0.04;
  return [low - span * below, max + span * (hasBands ? 0.24 : 0.06)];
}

/** A tick as text. On the canvas the narrow space all but vanishes, so the groups stand a full no-break space apart. */
function tickText(value: number): string {
  return groupDigits(String(Number(value.toPrecision(10)))).replaceAll(DIGIT_SPACE, '\u00a0');
}

/** Options of the plotting library: one linear axis each way, no legend and no title of its own. */
export function uplotOptions({ width, height, series, theme, hooks, ...range }: OptionsInput): uPlot.Options {
  const axis = {
    stroke: theme.soft,
    font: theme.font,
    grid: { stroke: theme.grid, width: 1 },
    ticks: { show: false },
    values: (_: uPlot, ticks: number[]) => ticks.map(tickText),
  };
  return {
    width,
    height,
    legend: { show: false },
    padding: [10, 24, 0, 0],
    cursor: {
      y: false,
      drag: { x: true, y: false, setScale: false, dist: 4 },
      points: { size: 7 },
    },
    scales: {
      x: { time: false, range: (_, min, max) => [min, max] },
      y: { range: (_, min, max) => verticalRange([min, max], range) },
    },
    axes: [
      { ...axis, grid: { show: false }, size: 30, gap: 10, space: 64 },
      { ...axis, size: (_, ticks) => 14 + 7 * Math.max(2, ...(ticks ?? []).map((t) => t.length)), gap: 8, space: 44 },
    ],
    series: [
      {},
      ...series.map((s, i) => {
        const looks = seriesLooks(s, i);
        return {
          label: s.label,
          stroke: theme.colour(looks.colour),
          dash: looks.dash,
          width: i === 0 ? 1.8 : 1.4,
          points: { show: false },
        };
      }),
    ],
    hooks,
  };
}
