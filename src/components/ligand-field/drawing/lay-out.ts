import { runsToText } from '#src/components/notation/runs.ts';
import { parseTerm } from '#src/components/notation/term.ts';
import { clipCurve, type Window } from './clip-curve.ts';
import { placeAlong } from './place-along.ts';

export interface DrawnCurve {
  /** Term, as `4T2g`. */
  label: string;
  x: readonly number[];
  y: readonly number[];
  /** Of the spin of the ground level: drawn in full, and labelled first. */
  strong: boolean;
}

export interface PlacedLabel {
  key: string;
  label: string;
  x: number;
  /** Baseline. */
  y: number;
  anchor: 'start' | 'middle';
  strong: boolean;
  /** From the end of the curve to its label. */
  leader: string | null;
}

interface Plot {
  x: number;
  y: number;
  width: number;
  height: number;
}

const LINE = 15;
const CHARACTER = 7.2;
const LEADER = 12;

/** Finer than any screen, and the same on every machine. */
const hundredths = (px: number): number => Math.round(px * 100) / 100;

/** Width of a term in px at 12 px. It errs on the wide side. */
export const termWidth = (label: string): number => runsToText(parseTerm(label)).length * CHARACTER;

/** Paths of the curves within the window, and labels at their ends: to the right and above, none upon another. */
export function layOut(curves: readonly DrawnCurve[], window: Window, plot: Plot) {
  const toX = (x: number) => hundredths(plot.x + ((x - window.x[0]) / (window.x[1] - window.x[0])) * plot.width);
  const toY = (y: number) =>
    hundredths(plot.y + plot.height - ((y - window.y[0]) / (window.y[1] - window.y[0])) * plot.height);
  const drawn = curves.map((curve, i) => ({
    curve,
    key: `${curve.label} ${i}`,
    ...clipCurve(curve.x, curve.y, window),
  }));
  const text = (value: number) => String(Math.round(value * 100) / 100);
  const paths = drawn.flatMap(({ curve, key, stretches }) =>
    stretches.length === 0
      ? []
      : [
          {
            key,
            strong: curve.strong,
            d: stretches
              .map((points) => `M${points.map(([x, y]) => `${text(toX(x))} ${text(toY(y))}`).join('L')}`)
              .join(''),
          },
        ],
  );
  const ended = drawn.flatMap(({ curve, key, end, stretches }) =>
    end && stretches.length > 0 ? [{ curve, key, end }] : [],
  );
  const rank = ({ curve, end }: (typeof ended)[number]) =>
    (curve.strong ? 0 : 1e6) + end.y + (end.side === 'top' ? end.x * 1e-3 : 0);

  const right = ended.filter(({ end }) => end.side === 'right');
  const alongRight = placeAlong(
    right.map((one) => ({ at: toY(one.end.y), size: LINE, rank: rank(one) })),
    { from: plot.y - 4, to: plot.y + plot.height + 8, gap: 0 },
  );
  const edge = plot.x + plot.width;
  const rightLabels = right.flatMap(({ curve, key, end }, i): PlacedLabel[] => {
    const middle = alongRight[i];
    if (middle === null || middle === undefined) return [];
    const near = Math.abs(middle - toY(end.y)) < 3;
    return [
      {
        key,
        label: curve.label,
        x: edge + LEADER + 3,
        y: Math.round((middle + 4) * 10) / 10,
        anchor: 'start',
        strong: curve.strong,
        leader: near ? null : `M${text(edge + 1)} ${text(toY(end.y))}L${text(edge + LEADER)} ${text(middle)}`,
      },
    ];
  });

  const top = ended.filter(({ end }) => end.side === 'top');
  const alongTop = placeAlong(
    top.map((one) => ({ at: toX(one.end.x), size: termWidth(one.curve.label), rank: rank(one) })),
    { from: plot.x + 26, to: edge + 44, gap: 6 },
  );
  const topLabels = top.flatMap(({ curve, key, end }, i): PlacedLabel[] => {
    const middle = alongTop[i];
    if (middle === null || middle === undefined) return [];
    const near = Math.abs(middle - toX(end.x)) < 6;
    return [
      {
        key,
        label: curve.label,
        x: Math.round(middle * 10) / 10,
        y: plot.y - 11,
        anchor: 'middle',
        strong: curve.strong,
        leader: near ? null : `M${text(toX(end.x))} ${text(plot.y - 1)}L${text(middle)} ${text(plot.y - 7)}`,
      },
    ];
  });
  const labels = [...rightLabels, ...topLabels];
  return { paths, labels, leftOut: right.length + top.length - labels.length, toX, toY };
}
