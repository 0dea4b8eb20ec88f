import { bandStyle } from '../../marks/band-classes.ts';
import { VisibleLight } from '../../marks/VisibleLight.tsx';
import { visibleRule } from '../../marks/visible-light.ts';
import { runsToText } from '../../notation/runs.ts';
import { SvgRuns } from '../../notation/SvgRuns.tsx';
import { parseTransition } from '../../notation/term.ts';
import { placeLabels } from './place-labels.ts';
import type { PlotArea, PlotBand } from './types.ts';
import { fromWavenumber, type XUnit, type YUnit } from './units.ts';

const TICK = 11;
const LINE = 17;

interface OverlayProps {
  area: PlotArea;
  bands: readonly PlotBand[];
  xUnit: XUnit;
  yUnit: YUnit;
}

/** What is laid over the canvas: band marks with their labels, and the rule of visible light under the axis. */
export function PlotOverlay({ area, bands, xUnit, yUnit }: OverlayProps) {
  const place = (x: number) => (x - area.x[0]) / (area.x[1] - area.x[0]);
  const marks = bands.flatMap((band) => {
    const share = place(fromWavenumber(band.wavenumber, xUnit));
    const value = yUnit === 'log-epsilon' ? Math.log10(band.height) : band.height;
    if (share < 0 || share > 1 || !Number.isFinite(value)) return [];
    const up = (value - area.y[0]) / (area.y[1] - area.y[0]);
    const runs = parseTransition(...ends(band.label));
    return [{ band, runs, x: share * area.width, y: Math.max(LINE + TICK, (1 - up) * area.height - 5) }];
  });
  const labels = placeLabels(
    marks.map(({ runs, x, y }) => ({ x, y: y - TICK - 5, width: 14 + runsToText(runs).length * 6.4 })),
    { width: area.width, lineHeight: LINE },
  );

  return (
    <>
      <svg
        className="pointer-events-none absolute overflow-visible"
        style={{ left: area.left, top: area.top }}
        width={area.width}
        height={area.height}
        aria-hidden="true"
      >
        {marks.map(({ band, x, y }, i) => (
          <path
            key={`${band.wavenumber} ${band.class}`}
            d={`M${x} ${y - TICK - 2}V${Math.min(y - TICK - 2, labels[i]!.y + 4)}`}
            stroke={bandStyle(band.class).colour}
            strokeWidth="0.8"
            opacity="0.5"
          />
        ))}
        {marks.map(({ band, runs, x, y }, i) => {
          const { colour, letter, stroke } = bandStyle(band.class);
          const label = labels[i]!;
          return (
            <g key={`${band.wavenumber} ${band.class}`} fill={colour} stroke="none">
              <BandTick x={x} y={y} colour={colour} stroke={stroke} />
              <text x={label.x} y={label.y} textAnchor="middle" fontSize="12.5" className="plot-label">
                <tspan fontWeight="600">{letter}</tspan>
                {runs.length > 0 && <tspan>{'\u2002'}</tspan>}
                <SvgRuns runs={runs} />
              </text>
            </g>
          );
        })}
      </svg>
      <div
        className="pointer-events-none absolute"
        style={{ left: area.left, width: area.width, top: area.top + area.height }}
      >
        <VisibleLight rule={visibleRule((nm) => place(fromWavenumber(1e7 / nm, xUnit)))} top={3} height={3} />
      </div>
    </>
  );
}

/** The two ends of `4A2g → 4T2g`; a text without an arrow is an upper state alone. */
function ends(label: string | undefined): [string | undefined, string | undefined] {
  const [from, to] = (label ?? '').split(/\s*(?:→|->)\s*/);
  return to === undefined ? [undefined, from || undefined] : [from, to];
}

function BandTick({
  x,
  y,
  colour,
  stroke,
}: {
  x: number;
  y: number;
  colour: string;
  stroke: ReturnType<typeof bandStyle>['stroke'];
}) {
  if (stroke.kind === 'hollow') {
    return <rect x={x - 1.7} y={y - TICK} width="3.4" height={TICK} fill="none" stroke={colour} />;
  }
  const d = stroke.kind === 'double' ? `M${x - 1.5} ${y}v${-TICK}M${x + 1.5} ${y}v${-TICK}` : `M${x} ${y}v${-TICK}`;
  const dash = stroke.kind === 'dashed' && stroke.dash ? stroke.dash : undefined;
  return <path d={d} stroke={colour} strokeWidth={stroke.kind === 'double' ? 1.2 : 2.4} strokeDasharray={dash} />;
}
