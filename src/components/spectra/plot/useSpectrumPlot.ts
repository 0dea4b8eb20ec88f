import { type RefObject, useEffect, useRef, useState } from 'react';
import uPlot from 'uplot';
import type { JoinedSeries } from './join-series.ts';
import { readTheme, watchTheme } from './theme.ts';
import type { PlotArea, PlotSeries } from './types.ts';
import { uplotOptions } from './uplot-options.ts';
import type { ViewWindow } from './view-window.ts';

interface Drawing {
  joined: JoinedSeries;
  series: readonly PlotSeries[];
  height: number;
  hasBands: boolean;
  fromZero: boolean;
  /** In the unit of the axis; null for all of it. */
  view: ViewWindow | null;
  /** Grid point under the data cursor; null for none. */
  index: number | null;
  onView: (view: ViewWindow) => void;
  onIndex: (index: number | null) => void;
  onPick: (index: number, y: number) => void;
}

/**
 * Keeps a canvas plot in an element: draws anew when data, size or theme change, follows window and cursor.
 *
 * @returns where the axes lie, for what is laid over them; null before the first drawing
 */
export function useSpectrumPlot(host: RefObject<HTMLDivElement | null>, drawing: Drawing): PlotArea | null {
  const [area, setArea] = useState<PlotArea | null>(null);
  const [generation, setGeneration] = useState(0);
  const plot = useRef<uPlot | null>(null);
  const latest = useRef(drawing);
  latest.current = drawing;
  const { joined, series, height, hasBands, fromZero, view, index } = drawing;

  // Canvas text keeps the font and the colours it was drawn with.
  useEffect(() => {
    const again = () => setGeneration((n) => n + 1);
    let alive = true;
    document.fonts.ready.then(() => alive && again());
    const unwatch = watchTheme(again);
    return () => {
      alive = false;
      unwatch();
    };
  }, []);

  useEffect(() => {
    const element = host.current;
    if (!element) return;
    const hooks = {
      draw: [(u: uPlot) => setArea((old) => keepIfSame(old, areaOf(u)))],
      setSelect: [(u: uPlot) => selected(u, latest.current.onView)],
      setCursor: [(u: uPlot) => latest.current.onIndex(u.cursor.idx ?? null)],
    };
    const width = Math.max(240, element.clientWidth);
    const options = uplotOptions({ width, height, series, theme: readTheme(element), hasBands, fromZero, hooks });
    const u = new uPlot(options, [joined.x, ...joined.y], element);
    plot.current = u;
    applyView(u, latest.current.view, joined.x);
    u.over.addEventListener('click', (event) => {
      if (u.cursor.idx !== null && u.cursor.idx !== undefined)
        latest.current.onPick(u.cursor.idx, u.posToVal(event.offsetY, 'y'));
    });
    const resizing = new ResizeObserver(() => {
      const next = Math.max(240, element.clientWidth);
      if (next !== u.width) u.setSize({ width: next, height });
    });
    resizing.observe(element);
    return () => {
      resizing.disconnect();
      u.destroy();
      plot.current = null;
    };
  }, [joined, series, height, hasBands, fromZero, generation, host]);

  useEffect(() => {
    if (plot.current) applyView(plot.current, view, joined.x);
  }, [view, joined]);

  useEffect(() => {
    const u = plot.current;
    if (!u || u.cursor.idx === index) return;
    const left = index === null ? -10 : u.valToPos(joined.x[index]!, 'x');
    u.setCursor({ left, top: index === null ? -10 : 0 }, false);
  }, [index, joined]);

  return area;
}

function applyView(u: uPlot, view: ViewWindow | null, x: readonly number[]) {
  const [min, max] = view ?? [x[0] ?? 0, x.at(-1) ?? 1];
  if (u.scales.x?.min !== min || u.scales.x?.max !== max) u.setScale('x', { min, max });
}

/** A window drawn with the pointer; a mere click draws none. */
function selected(u: uPlot, onView: (view: ViewWindow) => void) {
  const { left, width } = u.select;
  if (width < 4) return;
  onView([u.posToVal(left, 'x'), u.posToVal(left + width, 'x')]);
  u.setSelect({ left: 0, top: 0, width: 0, height: 0 }, false);
}

function areaOf(u: uPlot): PlotArea {
  const px = window.devicePixelRatio || 1;
  const { left, top, width, height } = u.bbox;
  return {
    left: left / px,
    top: top / px,
    width: width / px,
    height: height / px,
    x: [u.scales.x?.min ?? 0, u.scales.x?.max ?? 1],
    y: [u.scales.y?.min ?? 0, u.scales.y?.max ?? 1],
  };
}

function keepIfSame(old: PlotArea | null, next: PlotArea): PlotArea {
  return old && JSON.stringify(old) === JSON.stringify(next) ? old : next;
}
