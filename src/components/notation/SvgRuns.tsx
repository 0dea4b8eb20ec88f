import { placeRuns } from './place-runs.ts';
import type { Run } from './runs.ts';

/** U+200B: carries the way back to the baseline, which an empty tspan would not. */
const ZERO_WIDTH_SPACE = '\u200b';

/**
 * Runs as tspans, to stand inside an SVG `text`. Sizes and shifts are relative, so they follow the font size of the
 * `text`. With `restore`, whatever follows in the same `text` starts on the baseline again.
 */
export function SvgRuns({ runs, restore = false }: { runs: readonly Run[]; restore?: boolean }) {
  const { placed, rest } = placeRuns(runs);
  return (
    <>
      {placed.map(({ text, italic, size, dy }, i) => (
        <tspan
          key={i}
          dy={dy === 0 ? undefined : `${dy}em`}
          fontSize={size === 1 ? undefined : `${size}em`}
          fontStyle={italic ? 'italic' : undefined}
        >
          {text}
        </tspan>
      ))}
      {restore && rest !== 0 && <tspan dy={`${rest}em`}>{ZERO_WIDTH_SPACE}</tspan>}
    </>
  );
}
