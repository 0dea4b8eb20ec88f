import type { ComponentPart, FitComponent } from '#src/chem/spectra/fit/fit-steps.ts';
import type { PlotArea } from '../plot/types.ts';

/** Parts of a component that a drag or a key sets. */
export type Parts = Partial<Record<ComponentPart, number>>;
type Handle = 'top' | 'side';

/** A place in the box of the axes (px from its left and top) in the units of the axes. */
export function placeAt(area: PlotArea, left: number, top: number): { wavenumber: number; y: number } {
  return {
    wavenumber: area.x[0] + (left / area.width) * (area.x[1] - area.x[0]),
    y: area.y[1] - (top / area.height) * (area.y[1] - area.y[0]),
  };
}

/** Where a place of the axes lies in their box, px. */
export function pixelsOf(area: PlotArea, wavenumber: number, y: number): { left: number; top: number } {
  return {
    left: ((wavenumber - area.x[0]) / (area.x[1] - area.x[0])) * area.width,
    top: ((area.y[1] - y) / (area.y[1] - area.y[0])) * area.height,
  };
}

/** Widths that one pixel can still show. */
const LEAST_PIXELS = 4;

/** What a handle dragged to a place means: the top position and height, a side the width. Locked parts stay. */
export function draggedTo(
  component: FitComponent,
  handle: Handle,
  place: { wavenumber: number; y: number },
  area: PlotArea,
): Parts {
  const least = (LEAST_PIXELS / area.width) * (area.x[1] - area.x[0]);
  const parts: Parts =
    handle === 'top'
      ? { wavenumber: Math.round(place.wavenumber), height: rounded(place.y) }
      : { fwhm: Math.round(Math.max(least, 2 * Math.abs(place.wavenumber - component.wavenumber))) };
  return free(component, parts);
}

/** Steps of a key: cm⁻¹, and shares of what the axis shows; ten times so much with Shift. */
const KEY_STEP = 10;
const KEY_SHARE = 0.005;

/** What an arrow key means on a handle; null for other keys. */
export function keyed(
  component: FitComponent,
  handle: Handle,
  { key, shiftKey }: { key: string; shiftKey: boolean },
  area: PlotArea,
): Parts | null {
  const [dx, dy] = { ArrowRight: [1, 0], ArrowLeft: [-1, 0], ArrowUp: [0, 1], ArrowDown: [0, -1] }[key] ?? [0, 0];
  if (dx === 0 && dy === 0) return null;
  const factor = shiftKey ? 10 : 1;
  const { wavenumber, height, fwhm } = component;
  if (handle === 'side')
    return free(component, { fwhm: Math.max(KEY_STEP, Math.round(fwhm) + ((dx || dy) as number) * KEY_STEP * factor) });
  const parts: Parts =
    dx === 0
      ? { height: rounded(height + (dy as number) * factor * KEY_SHARE * (area.y[1] - area.y[0])) }
      : { wavenumber: Math.round(wavenumber) + (dx as number) * KEY_STEP * factor };
  return free(component, parts);
}

const rounded = (height: number) => Number(height.toPrecision(5));

function free({ locked }: FitComponent, parts: Parts): Parts {
  return Object.fromEntries(Object.entries(parts).filter(([part]) => !locked[part as ComponentPart]));
}
