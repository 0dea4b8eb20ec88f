import 'uplot/dist/uPlot.min.css';
import './spectrum-plot.css';
import { Minus, Plus, RotateCcw, Table2 } from 'lucide-react';
import { type KeyboardEvent, type ReactNode, useMemo, useRef, useState } from 'react';
import { Unit } from '../../notation/index.tsx';
import { formatNumber } from '../../notation/quantity.ts';
import { joinSeries, nearestIndex } from './join-series.ts';
import { PlotKey } from './PlotKey.tsx';
import { PlotOverlay } from './PlotOverlay.tsx';
import { PlotTable } from './PlotTable.tsx';
import type { PlotArea, PlotBand, PlotSeries } from './types.ts';
import { fromWavenumber, toWavenumber, X_FIGURES, X_TITLES, type XUnit, Y_TITLES, type YUnit } from './units.ts';
import { useSpectrumPlot } from './useSpectrumPlot.ts';
import { panned, type ViewWindow, zoomed } from './view-window.ts';

export type { PlotBand, PlotSeries } from './types.ts';
export type { XUnit, YUnit } from './units.ts';

export interface SpectrumPlotProps {
  series: readonly PlotSeries[];
  xUnit: XUnit;
  yUnit: YUnit;
  bands?: readonly PlotBand[];
  /** px */
  height?: number;
  /** What the plot shows, for a screen reader. */
  label?: string;
  /** A place chosen by click or Enter: cm⁻¹, and y as the axis shows it. */
  onPick?: (wavenumber: number, y: number) => void;
  /** What is laid over the axes, such as handles. */
  overlay?: (area: PlotArea) => ReactNode;
  /** What is drawn under the axes in line with them. */
  below?: (area: PlotArea) => ReactNode;
}

const NO_BANDS: readonly PlotBand[] = [];

/** Curves over one axis: zoom by drag, buttons or keys; a data cursor for pointer and keyboard; the same as a table. */
export function SpectrumPlot({
  series,
  xUnit,
  yUnit,
  bands = NO_BANDS,
  height = 320,
  label = 'Spectrum',
  onPick,
  overlay,
  below,
}: SpectrumPlotProps) {
  const host = useRef<HTMLDivElement>(null);
  // In cm⁻¹, so that window and cursor stay where they are when the unit changes.
  const [viewPerCm, setViewPerCm] = useState<ViewWindow | null>(null);
  const [cursorPerCm, setCursorPerCm] = useState<number | null>(null);
  const [asTable, setAsTable] = useState(false);

  const joined = useMemo(() => joinSeries(series, xUnit, yUnit), [series, xUnit, yUnit]);
  const convert = (view: ViewWindow, by: (v: number, unit: XUnit) => number): ViewWindow => {
    const [a, b] = [by(view[0], xUnit), by(view[1], xUnit)];
    return a < b ? [a, b] : [b, a];
  };
  const whole: ViewWindow = [joined.x[0] ?? 0, joined.x.at(-1) ?? 1];
  const view = useMemo(() => (viewPerCm ? convert(viewPerCm, fromWavenumber) : null), [viewPerCm, xUnit]);
  const setView = (next: ViewWindow | null) => setViewPerCm(next && convert(next, toWavenumber));
  const index =
    cursorPerCm === null || joined.x.length === 0 ? null : nearestIndex(joined.x, fromWavenumber(cursorPerCm, xUnit));
  const setIndex = (i: number | null) => setCursorPerCm(i === null ? null : toWavenumber(joined.x[i]!, xUnit));
  const centre = index === null ? undefined : joined.x[index];
  const zoom = (factor: number) => setView(zoomed(view, whole, factor, centre));

  const area = useSpectrumPlot(host, {
    joined,
    series,
    height,
    hasBands: bands.length > 0,
    fromZero: yUnit !== 'log-epsilon',
    view,
    index,
    onView: setView,
    onIndex: setIndex,
    onPick: (i, y) => onPick?.(toWavenumber(joined.x[i]!, xUnit), y),
  });

  const onKeyDown = (event: KeyboardEvent) => {
    const [from, to] = view ?? whole;
    const step = (share: number) => moveTo((centre ?? from) + share * (to - from));
    const moveTo = (x: number) => setIndex(nearestIndex(joined.x, Math.min(to, Math.max(from, x))));
    const actions: Record<string, () => void> = {
      ArrowRight: () => step(event.shiftKey ? 0.05 : 0.005),
      ArrowLeft: () => step(event.shiftKey ? -0.05 : -0.005),
      PageUp: () => setView(panned(view, whole, 0.25)),
      PageDown: () => setView(panned(view, whole, -0.25)),
      Home: () => moveTo(from),
      End: () => moveTo(to),
      '+': () => zoom(0.5),
      '-': () => zoom(2),
      '0': () => setView(null),
      Escape: () => setIndex(null),
      Enter: () =>
        index !== null && onPick?.(toWavenumber(joined.x[index]!, xUnit), joined.y[0]?.[index] ?? Number.NaN),
    };
    const action = actions[event.key];
    if (!action || joined.x.length === 0) return;
    event.preventDefault();
    action();
  };

  const spoken =
    index === null
      ? 'no point chosen'
      : readAloud(
          joined.x[index]!,
          xUnit,
          series.map((s, i) => [s.label, joined.y[i]?.[index]] as const),
        );

  return (
    <figure className="m-0">
      <div className="mb-1 flex flex-wrap items-center gap-x-4 gap-y-1">
        <span className="text-xs text-ink-soft">
          <AxisTitle {...Y_TITLES[yUnit]} />
        </span>
        <span className="num min-w-0 text-xs text-ink-soft">
          {index !== null && <Place wavenumber={cursorPerCm!} />}
        </span>
        <div className="no-print ml-auto flex items-center gap-1">
          <Tool name="Zoom in" onClick={() => zoom(0.5)} icon={<Plus size={15} />} />
          <Tool name="Zoom out" onClick={() => zoom(2)} disabled={view === null} icon={<Minus size={15} />} />
          <Tool name="Show all" onClick={() => setView(null)} disabled={view === null} icon={<RotateCcw size={14} />} />
          <Tool
            name="Show as table"
            pressed={asTable}
            onClick={() => setAsTable(!asTable)}
            icon={<Table2 size={15} />}
          />
        </div>
      </div>
      <div className="relative">
        <div
          role="slider"
          tabIndex={0}
          aria-label={`${label}: data cursor. Arrows move it, plus and minus zoom, 0 shows all.`}
          aria-valuemin={whole[0]}
          aria-valuemax={whole[1]}
          aria-valuenow={centre ?? whole[0]}
          aria-valuetext={spoken}
          onKeyDown={onKeyDown}
          className="relative"
          style={{ minHeight: height }}
        >
          <div ref={host} />
          {area && <PlotOverlay area={area} bands={bands} xUnit={xUnit} yUnit={yUnit} />}
        </div>
        {/* Outside the slider: what is in here has keys and names of its own. */}
        {area && overlay && (
          <div className="absolute inset-x-0 top-0" style={{ height: 0 }}>
            {overlay(area)}
          </div>
        )}
      </div>
      {area && below?.(area)}
      <figcaption className="mt-1 flex flex-wrap items-baseline justify-between gap-x-6 gap-y-1">
        <PlotKey series={series} joined={joined} index={index} />
        <span className="ml-auto text-xs text-ink-soft">
          <AxisTitle {...X_TITLES[xUnit]} />
        </span>
      </figcaption>
      {asTable && <PlotTable series={series} joined={joined} view={view} xUnit={xUnit} yUnit={yUnit} />}
    </figure>
  );
}

/** A place on the axis in all three units. */
function Place({ wavenumber }: { wavenumber: number }) {
  return (
    <>
      {formatNumber(Math.round(wavenumber), 5)} <Unit unit="cm-1" /> · {formatNumber(1e7 / wavenumber)} nm ·{' '}
      {formatNumber(fromWavenumber(wavenumber, 'eV'))} eV
    </>
  );
}

/** An axis by name and unit, divided by a solidus (quantity calculus, ISO 80000-1); a logarithm is of that quotient. */
function AxisTitle({ name, unit }: { name: string; unit: string }) {
  if (!unit) return <i>{name}</i>;
  const quantity = name.replace(/^log /, '');
  const isLog = quantity !== name;
  return (
    <>
      {isLog && 'log('}
      {quantity} / <Unit unit={unit} />
      {isLog && ')'}
    </>
  );
}

interface ToolProps {
  name: string;
  icon: ReactNode;
  onClick: () => void;
  disabled?: boolean;
  pressed?: boolean;
}

function Tool({ name, icon, onClick, disabled = false, pressed }: ToolProps) {
  return (
    <button
      type="button"
      aria-label={name}
      title={name}
      aria-pressed={pressed}
      disabled={disabled}
      onClick={onClick}
      className="grid size-7 place-items-center rounded border border-hairline text-ink-soft hover:border-zaffre hover:text-zaffre disabled:pointer-events-none disabled:opacity-45 aria-pressed:bg-zaffre-wash aria-pressed:text-zaffre"
    >
      {icon}
    </button>
  );
}

function readAloud(x: number, unit: XUnit, values: readonly (readonly [string, number | null | undefined])[]): string {
  const parts = values.map(([label, y]) => `${label} ${formatNumber(y, 3)}`);
  return `${formatNumber(x, X_FIGURES[unit])} ${unit === 'cm-1' ? 'per centimetre' : unit}: ${parts.join(', ')}`;
}
