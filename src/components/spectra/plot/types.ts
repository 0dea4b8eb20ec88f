import type { Trace } from './join-series.ts';

/** One curve: x ascending in cm⁻¹, y in the quantity of the plot (ε also for log ε), null for a gap. */
export interface PlotSeries extends Trace {
  id: string;
  label: string;
  /** A CSS colour or `var(--…)`; without one, the next of the plot's own. */
  colour?: string | undefined;
  /** Lengths of strokes and gaps in px. */
  dash?: number[] | undefined;
}

/** A band marked over the curves. */
export interface PlotBand {
  /** cm⁻¹ */
  wavenumber: number;
  /** In the quantity of the curves; ε also for log ε. */
  height: number;
  class: string;
  /** A transition in plain text, such as `4A2g → 4T2g`. */
  label?: string | undefined;
}

/** Where the axes lie in the box of the plot, in px, and what they span in their own units. */
export interface PlotArea {
  left: number;
  top: number;
  width: number;
  height: number;
  x: readonly [number, number];
  y: readonly [number, number];
}
