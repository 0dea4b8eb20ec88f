import type { Baseline } from '../baseline.ts';
import type { BandShape } from './band-shapes.ts';
import type { BandFit, FittedErrors } from './fit-bands.ts';

/** The parts of a component that can be set and locked. */
export type ComponentPart = 'wavenumber' | 'height' | 'fwhm';
export const COMPONENT_PARTS: readonly ComponentPart[] = ['wavenumber', 'height', 'fwhm'];

/** How a fit is made; null is for the criterion to decide. */
export interface FitSettings {
  shape: BandShape;
  /** Bands to be found. */
  count: number | null;
  /** A charge-transfer edge at the upper end. */
  edge: boolean | null;
  constant: boolean;
}

/** A step of a fit. Components count from 0 in the order that the step before left; wavenumbers and widths in cm⁻¹. */
export type FitStep =
  | { operation: 'range'; parameters: { from: number | null; to: number | null } }
  | { operation: 'smooth'; parameters: { halfWidth: number } }
  | { operation: 'baseline'; parameters: { baseline: Baseline | null } }
  | { operation: 'settings'; parameters: FitSettings }
  /** Components where the curve has maxima, and minima of its second derivative. */
  | { operation: 'pick'; parameters: Record<string, never> }
  /** A fit from nothing. */
  | { operation: 'find'; parameters: Record<string, never> }
  /** A fit that begins with the components there are; locked parts stay. */
  | { operation: 'refine'; parameters: Record<string, never> }
  | { operation: 'add'; parameters: { wavenumber: number; height: number; fwhm: number } }
  | { operation: 'remove'; parameters: { component: number } }
  | {
      operation: 'set';
      parameters: {
        component: number;
        wavenumber?: number | undefined;
        height?: number | undefined;
        fwhm?: number | undefined;
      };
    }
  | { operation: 'lock'; parameters: { component: number; part: ComponentPart; locked: boolean } };

export interface FitComponent {
  wavenumber: number;
  height: number;
  fwhm: number;
  /** Lorentzian share of a `voigt`; null for other shapes. */
  lorentzian: number | null;
  shoulder: boolean;
  locked: Record<ComponentPart, boolean>;
  /** Standard errors of the fit; null as long as it was not fitted since it was last touched. */
  errors: FittedErrors | null;
}

/** What a fit has come to after some steps. */
export interface FitState {
  range: { from: number | null; to: number | null };
  /** Half the stretch over which a parabola is laid; 0 for none. */
  smoothing: number;
  baseline: Baseline | null;
  settings: FitSettings;
  components: FitComponent[];
  edge: BandFit['edge'];
  constant: number | null;
  compared: BandFit['compared'];
  /** Null as long as nothing was fitted since the last change. */
  rms: number | null;
  converged: boolean | null;
}

export const FIRST_STATE: FitState = {
  range: { from: null, to: null },
  smoothing: 0,
  baseline: null,
  settings: { shape: 'gaussian', count: null, edge: null, constant: false },
  components: [],
  edge: null,
  constant: null,
  compared: [],
  rms: null,
  converged: null,
};
