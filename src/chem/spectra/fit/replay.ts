import { DomainError } from '../../errors.ts';
import { subtractBaseline } from '../baseline.ts';
import { pickBands } from '../pick-bands.ts';
import { smooth } from '../smooth.ts';
import { type BandFit, fitBands } from './fit-bands.ts';
import { COMPONENT_PARTS, FIRST_STATE, type FitComponent, type FitState, type FitStep } from './fit-steps.ts';

/** The curve that steps work on: ascending wavenumbers in cm⁻¹, NaN for a gap. It never changes. */
export interface FitCurve {
  x: ArrayLike<number>;
  y: ArrayLike<number>;
  /** Whether bands may be negative, as in circular dichroism. */
  signed: boolean;
}

/** Fits of more components are not made. */
const MOST_COMPONENTS = 20;

/**
 * The state after a list of steps. Nothing in it depends on anything but curve and steps, so that the same steps give
 * the same numbers to whoever replays them.
 *
 * @throws {DomainError} for a step that cannot be made
 */
export const replay = (curve: FitCurve, steps: readonly FitStep[], from: FitState = FIRST_STATE): FitState =>
  steps.reduce((state, step) => applyStep(curve, state, step), from);

/** The curve as it is fitted: smoothed, its base line taken off, within the range. */
export function treated(
  { x, y }: FitCurve,
  { range, smoothing, baseline }: Pick<FitState, 'range' | 'smoothing' | 'baseline'>,
): { x: Float64Array; y: Float64Array } {
  const smoothed = smoothing > 0 ? smooth(x, y, smoothing) : { x: Float64Array.from(x), y: Float64Array.from(y) };
  const values = baseline ? subtractBaseline(smoothed.x, smoothed.y, baseline) : smoothed.y;
  const inside = Array.from(smoothed.x.keys()).filter(
    (i) => smoothed.x[i]! >= (range.from ?? -Infinity) && smoothed.x[i]! <= (range.to ?? Infinity),
  );
  return { x: Float64Array.from(inside, (i) => smoothed.x[i]!), y: Float64Array.from(inside, (i) => values[i]!) };
}

/**
 * The state after one step more.
 *
 * @throws {DomainError} `out-of-range` for a component that is not there or a width that is none
 */
export function applyStep(curve: FitCurve, state: FitState, step: FitStep): FitState {
  switch (step.operation) {
    case 'range':
      return checked(curve, stale({ ...state, range: step.parameters }));
    case 'smooth':
      return checked(curve, stale({ ...state, smoothing: step.parameters.halfWidth }));
    case 'baseline':
      return checked(curve, stale({ ...state, baseline: step.parameters.baseline }));
    case 'settings':
      return withSettings(state, step.parameters);
    case 'pick':
      return { ...stale(state), edge: null, constant: null, compared: [], components: picked(curve, state) };
    case 'find':
      return found(curve, state);
    case 'refine':
      return refined(curve, state);
    case 'add': {
      if (state.components.length >= MOST_COMPONENTS)
        throw new DomainError('too-large', `A fit has at most ${MOST_COMPONENTS} components`, 'components');
      const lorentzian = state.settings.shape === 'voigt' ? 0.5 : null;
      return stale({ ...state, components: [...state.components, fresh({ ...step.parameters, lorentzian })] });
    }
    case 'remove':
      require(state, step.parameters.component);
      return stale({ ...state, components: state.components.filter((_, i) => i !== step.parameters.component) });
    case 'set': {
      const { component, ...parts } = step.parameters;
      if (parts.fwhm !== undefined && !(parts.fwhm > 0))
        throw new DomainError('out-of-range', 'A width is above 0 cm⁻¹', 'fwhm');
      const told = Object.fromEntries(COMPONENT_PARTS.flatMap((p) => (parts[p] === undefined ? [] : [[p, parts[p]]])));
      return stale(changed(state, component, told));
    }
    case 'lock': {
      const { component, part, locked } = step.parameters;
      return changed(state, component, { locked: { ...require(state, component).locked, [part]: locked } });
    }
  }
}

function require({ components }: FitState, component: number): FitComponent {
  const one = components[component];
  if (!one) throw new DomainError('out-of-range', `There is no component ${component + 1}`, 'component');
  return one;
}

function changed(state: FitState, component: number, part: Partial<FitComponent>): FitState {
  require(state, component);
  return { ...state, components: state.components.map((one, i) => (i === component ? { ...one, ...part } : one)) };
}

/** Numbers that told of a fit tell of it no longer. */
const stale = (state: FitState): FitState => ({
  ...state,
  rms: null,
  converged: null,
  components: state.components.map((one) => ({ ...one, errors: null })),
});

/** Refuses a treatment that leaves nothing to fit while it is chosen, not later. */
function checked(curve: FitCurve, state: FitState): FitState {
  if (treated(curve, state).x.length < 8)
    throw new DomainError('out-of-range', 'Between these wavenumbers lie fewer than 8 points', 'range');
  return state;
}

function withSettings(state: FitState, settings: FitState['settings']): FitState {
  const lorentzian = settings.shape === 'voigt' ? 0.5 : null;
  const components =
    settings.shape === state.settings.shape
      ? state.components
      : state.components.map((one) => ({ ...one, lorentzian }));
  return stale({
    ...state,
    settings,
    components,
    edge: settings.edge === false ? null : state.edge,
    constant: settings.constant ? state.constant : null,
  });
}

const fresh = (part: Pick<FitComponent, 'wavenumber' | 'height' | 'fwhm' | 'lorentzian'>): FitComponent => ({
  ...part,
  shoulder: false,
  locked: { wavenumber: false, height: false, fwhm: false },
  errors: null,
});

function picked(curve: FitCurve, state: FitState): FitComponent[] {
  const { x, y } = treated(curve, state);
  const lorentzian = state.settings.shape === 'voigt' ? 0.5 : null;
  const width = (x[x.length - 1] ?? 0) - (x[0] ?? 0);
  const count = state.settings.count ?? MOST_COMPONENTS;
  return (curve.signed ? [1, -1] : [1])
    .flatMap((sign) =>
      pickBands(
        x,
        y.map((value) => sign * value),
        { count },
      ).map((band) => ({
        ...fresh({
          wavenumber: band.wavenumber,
          height: sign * band.height,
          fwhm: band.fwhm ?? width / 10,
          lorentzian,
        }),
        shoulder: band.shoulder,
      })),
    )
    .sort((a, b) => Math.abs(b.height) - Math.abs(a.height))
    .slice(0, count)
    .sort((a, b) => a.wavenumber - b.wavenumber);
}

function found(curve: FitCurve, state: FitState): FitState {
  const { x, y } = treated(curve, state);
  const { shape, constant, count, edge } = state.settings;
  const fit = fitBands(x, y, {
    shape,
    constant,
    signed: curve.signed,
    count: count ?? undefined,
    edge: edge ?? undefined,
  });
  return withFit(state, fit, fit.compared, (band) => ({ ...fresh(band), shoulder: band.shoulder }));
}

function refined(curve: FitCurve, state: FitState): FitState {
  if (state.components.length === 0)
    throw new DomainError('empty', 'There is no component to begin with', 'components');
  const { x, y } = treated(curve, state);
  const { shape, constant, edge } = state.settings;
  const fit = fitBands(x, y, {
    shape,
    constant,
    signed: curve.signed,
    // Left to the criterion, the edge stays as the search before has found it.
    edge: edge ?? state.edge !== null,
    start: state.components,
  });
  return withFit(state, fit, state.compared, (band) => ({
    ...fresh(band),
    shoulder: band.shoulder,
    locked: state.components[band.component]!.locked,
  }));
}

function withFit(
  state: FitState,
  fit: BandFit,
  compared: FitState['compared'],
  describe: (band: BandFit['bands'][number]) => FitComponent,
): FitState {
  const { edge, constant, rms, converged } = fit;
  const components = fit.bands.map((band) => ({ ...describe(band), errors: band.errors }));
  return { ...state, components, edge, constant, rms, converged, compared };
}
