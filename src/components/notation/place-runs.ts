import type { Run } from './runs.ts';

/** Size of a raised or lowered run, as a share of the size of the line. */
const SMALL = 0.72;
/** Where each style sits, in em of the line, downwards. */
const OFFSET: Record<Run['style'], number> = { normal: 0, italic: 0, sub: 0.22, sup: -0.36 };

/** A run on its way into SVG: `dy` in em of its own size, relative to the run before. */
export interface PlacedRun {
  text: string;
  italic: boolean;
  /** Share of the line's font size: 1 or 0.72. */
  size: number;
  dy: number;
}

/**
 * Turns styles into shifts for SVG text, where dy is relative and adds up. Each run is moved from where the last one
 * left the pen, so that a normal run always comes back to the baseline.
 *
 * @returns the placed runs, and `rest`: the shift in em that leads back to the baseline after the last one
 */
export function placeRuns(runs: readonly Run[]): { placed: PlacedRun[]; rest: number } {
  let pen = 0;
  const placed = runs.map(({ text, style }) => {
    const size = style === 'sub' || style === 'sup' ? SMALL : 1;
    const shift = OFFSET[style] - pen;
    pen = OFFSET[style];
    return { text, italic: style === 'italic', size, dy: rounded(shift / size) };
  });
  return { placed, rest: rounded(-pen) };
}

const rounded = (em: number) => Math.round(em * 1000) / 1000 || 0;
