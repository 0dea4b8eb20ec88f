import { type PointerEvent, type ReactNode, useMemo } from 'react';
import { groupDigits } from '#src/components/notation/quantity.ts';
import type { Run } from '#src/components/notation/runs.ts';
import { SvgRuns } from '#src/components/notation/SvgRuns.tsx';
import { parseTerm } from '#src/components/notation/term.ts';
import { ticksOf, type Window } from './clip-curve.ts';
import { type DrawnCurve, layOut, type PlacedLabel } from './lay-out.ts';

export interface DiagramMark {
  key: string;
  y: number;
  /** Filled for an assigned band, hollow for one that a fit only proposes. */
  filled: boolean;
  title: string;
}

interface LevelDiagramProps {
  /** Read aloud. */
  title: string;
  width: number;
  height: number;
  window: Window;
  curves: readonly DrawnCurve[];
  xLabel: readonly Run[];
  yLabel: readonly Run[];
  /** Places where the ground level changes. */
  crossings?: readonly { x: number; title: string }[];
  /** The place told, with what was observed there. */
  at?: number | null;
  marks?: readonly DiagramMark[];
  /** What marks on the x axis say, where that is no number. */
  xNames?: readonly { x: number; text: string }[];
  onPoint?: ((x: number) => void) | undefined;
  id?: string;
}

const FONT = 'Noto Sans, sans-serif';
const INK = 'var(--color-ink)';
const SOFT = 'var(--color-ink-soft)';
const RULE = 'var(--color-hairline)';
const ACCENT = 'var(--color-zaffre)';
export const MARGIN = { left: 52, right: 58, top: 28, bottom: 42 };

/** An energy-level diagram as SVG whose looks are attributes, so that it can leave the page as a file. */
export function LevelDiagram(props: LevelDiagramProps) {
  const { title, width, height, window, curves, at = null, marks = [], onPoint, id } = props;
  const plot = useMemo(
    () => ({
      x: MARGIN.left,
      y: MARGIN.top,
      width: width - MARGIN.left - MARGIN.right,
      height: height - MARGIN.top - MARGIN.bottom,
    }),
    [width, height],
  );
  const { paths, labels, leftOut, toX, toY } = useMemo(() => layOut(curves, window, plot), [curves, window, plot]);
  const point = (event: PointerEvent<SVGSVGElement>) => {
    const box = event.currentTarget.getBoundingClientRect();
    const px = ((event.clientX - box.left) * width) / box.width;
    const [from, to] = window.x;
    const share = (px - plot.x) / plot.width;
    if (share >= -0.02 && share <= 1.02) onPoint?.(from + Math.min(1, Math.max(0, share)) * (to - from));
  };
  return (
    <svg
      xmlns="http://www.w3.org/2000/svg"
      id={id}
      role="img"
      aria-label={title}
      viewBox={`0 0 ${width} ${height}`}
      width={width}
      height={height}
      fontFamily={FONT}
      fontSize="12"
      className="h-auto w-full max-w-full touch-pan-y"
      onPointerMove={onPoint && point}
      onPointerDown={onPoint && point}
    >
      <title>{title}</title>
      <Axes {...props} plot={plot} toX={toX} toY={toY} />
      {props.crossings?.map((crossing) => (
        <line
          key={crossing.x}
          x1={toX(crossing.x)}
          x2={toX(crossing.x)}
          y1={plot.y}
          y2={plot.y + plot.height}
          stroke={SOFT}
          strokeWidth="1"
          strokeDasharray="1.5 3"
        >
          <title>{crossing.title}</title>
        </line>
      ))}
      {paths.map(({ key, d, strong }) => (
        <path
          key={key}
          d={d}
          fill="none"
          stroke={strong ? INK : SOFT}
          strokeWidth={strong ? 1.6 : 0.9}
          strokeDasharray={strong ? undefined : '4 3'}
          strokeLinejoin="round"
        />
      ))}
      {labels.map((label) => (
        <CurveLabel key={label.key} placed={label} />
      ))}
      {at !== null && at >= window.x[0] && at <= window.x[1] && (
        <line
          x1={toX(at)}
          x2={toX(at)}
          y1={plot.y}
          y2={plot.y + plot.height}
          stroke={ACCENT}
          strokeWidth="1.6"
          data-at={at.toFixed(3)}
        />
      )}
      {at !== null &&
        marks
          .filter(({ y }) => y >= window.y[0] && y <= window.y[1])
          .map(({ key, y, filled, title: said }) => (
            <circle
              key={key}
              data-band={key}
              cx={toX(at)}
              cy={toY(y)}
              r="4.5"
              fill={filled ? ACCENT : 'var(--color-glaze)'}
              stroke={ACCENT}
              strokeWidth="1.6"
            >
              <title>{said}</title>
            </circle>
          ))}
      {leftOut > 0 && (
        <text x={width - 4} y={height - 6} textAnchor="end" fontSize="10.5" fill={SOFT}>
          {`${leftOut} labels left out for want of room`}
        </text>
      )}
    </svg>
  );
}

function CurveLabel({ placed: { label, x, y, anchor, strong, leader } }: { placed: PlacedLabel }) {
  return (
    <>
      {leader && <path d={leader} fill="none" stroke={strong ? SOFT : RULE} strokeWidth="0.7" />}
      <text x={x} y={y} textAnchor={anchor} fill={strong ? INK : SOFT}>
        <SvgRuns runs={parseTerm(label)} />
      </text>
    </>
  );
}

interface AxesProps extends Pick<LevelDiagramProps, 'window' | 'xLabel' | 'yLabel' | 'xNames'> {
  plot: { x: number; y: number; width: number; height: number };
  toX: (x: number) => number;
  toY: (y: number) => number;
}

function Axes({ window, xLabel, yLabel, xNames, plot, toX, toY }: AxesProps): ReactNode {
  const bottom = plot.y + plot.height;
  const figures = (value: number) => groupDigits(String(value).replace('-', '\u2212'));
  const alongX = xNames ?? ticksOf(window.x, plot.width / 80).map((x) => ({ x, text: figures(x) }));
  return (
    <g fontSize="11" fill={SOFT}>
      {ticksOf(window.y, plot.height / 56).map((y) => (
        <g key={y}>
          <line x1={plot.x} x2={plot.x + plot.width} y1={toY(y)} y2={toY(y)} stroke={RULE} strokeWidth="0.7" />
          <text x={plot.x - 7} y={toY(y) + 4} textAnchor="end">
            {figures(y)}
          </text>
        </g>
      ))}
      <path d={`M${plot.x} ${plot.y}V${bottom}H${plot.x + plot.width}`} fill="none" stroke={SOFT} strokeWidth="1" />
      {alongX.map(({ x, text }) => (
        <g key={x}>
          <line x1={toX(x)} x2={toX(x)} y1={bottom} y2={bottom + 4} stroke={SOFT} strokeWidth="1" />
          <text x={toX(x)} y={bottom + 17} textAnchor="middle">
            {text}
          </text>
        </g>
      ))}
      <text x={plot.x + plot.width / 2} y={bottom + 34} textAnchor="middle" fontSize="12">
        <SvgRuns runs={xLabel} />
      </text>
      <text x={6} y={14} fontSize="12">
        <SvgRuns runs={yLabel} />
      </text>
    </g>
  );
}
