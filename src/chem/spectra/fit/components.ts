import { areaFactor, type BandShape, componentAt } from './band-shapes.ts';
import type { FitComponent, FitState } from './fit-steps.ts';

type Drawn = Pick<FitComponent, 'wavenumber' | 'height' | 'fwhm' | 'lorentzian'>;

const logitOf = (share: number | null): number => (share === null ? 0 : Math.log(share / (1 - share)));
const parametersOf = ({ wavenumber, height, fwhm, lorentzian }: Drawn) => [
  wavenumber,
  height,
  Math.log(fwhm),
  logitOf(lorentzian),
];

/** A component on given wavenumbers (cm⁻¹), in the units of its height. */
export function componentValues(shape: BandShape, component: Drawn, x: ArrayLike<number>): Float64Array {
  const parameters = parametersOf(component);
  return Float64Array.from(x, (at) => componentAt(shape, at, parameters, 0));
}

/** What lies under the bands on given wavenumbers: the rising edge and the constant, where there are any. */
export function foundationValues({ edge, constant }: Pick<FitState, 'edge' | 'constant'>, x: ArrayLike<number>) {
  return Float64Array.from(
    x,
    (at) => (edge ? edge.height * Math.exp((at - edge.at) / edge.decay) : 0) + (constant ?? 0),
  );
}

/** The whole fitted curve on given wavenumbers. */
export function fittedValues(
  state: Pick<FitState, 'edge' | 'constant' | 'components' | 'settings'>,
  x: ArrayLike<number>,
): Float64Array {
  const sum = foundationValues(state, x);
  for (const component of state.components)
    componentValues(state.settings.shape, component, x).forEach((value, i) => {
      sum[i]! += value;
    });
  return sum;
}

/** ∫ of a component over all wavenumbers, in the units of its height times cm⁻¹. */
export function componentArea(shape: BandShape, { height, fwhm, lorentzian }: Drawn): number {
  return height * fwhm * areaFactor(shape, logitOf(lorentzian));
}
