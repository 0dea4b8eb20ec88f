/** Shape of a band on the wavenumber axis. */
export type BandShape = 'gaussian' | 'lorentzian' | 'voigt';

/**
 * Parameters of a component in the fit: position in cm⁻¹, height, natural logarithm of the full width at half height
 * in cm⁻¹ (so that no step makes it negative) and, for `voigt`, the Lorentzian share as a logit.
 */
export const PARAMETERS_OF: Record<BandShape, number> = { gaussian: 3, lorentzian: 3, voigt: 4 };

const FOUR_LN2 = 4 * Math.LN2;

const share = (logit: number): number => 1 / (1 + Math.exp(-logit));

/**
 * Value of a component, and its derivatives into `gradient` from `at` on.
 *
 * `voigt` is the pseudo-Voigt sum of a Gaussian and a Lorentzian of one width, which follows the convolution within
 * about 1 % of the height.
 *
 * @see G. K. Wertheim et al., Rev. Sci. Instrum. 45 (1974) 1369 (pseudo-Voigt; from memory)
 */
export function componentAt(
  shape: BandShape,
  x: number,
  p: ArrayLike<number>,
  from: number,
  gradient?: Float64Array,
  at = 0,
): number {
  const height = p[from + 1]!;
  const width = Math.exp(p[from + 2]!);
  const t = (x - p[from]!) / width;
  const gauss = Math.exp(-FOUR_LN2 * t * t);
  const lorentz = 1 / (1 + 4 * t * t);
  const eta = shape === 'voigt' ? share(p[from + 3]!) : shape === 'lorentzian' ? 1 : 0;
  const profile = (1 - eta) * gauss + eta * lorentz;
  if (gradient) {
    // d profile / dt
    const slope = (1 - eta) * -2 * FOUR_LN2 * t * gauss + eta * -8 * t * lorentz * lorentz;
    gradient[at] = (height * -slope) / width;
    gradient[at + 1] = profile;
    gradient[at + 2] = height * -slope * t;
    if (shape === 'voigt') gradient[at + 3] = height * (lorentz - gauss) * eta * (1 - eta);
  }
  return height * profile;
}

/** ∫ of a component over all wavenumbers: height × width × a factor of the shape. */
export function areaFactor(shape: BandShape, logit = 0): number {
  const gaussian = Math.sqrt(Math.PI / FOUR_LN2);
  if (shape === 'gaussian') return gaussian;
  const eta = shape === 'voigt' ? share(logit) : 1;
  return (1 - eta) * gaussian + (eta * Math.PI) / 2;
}

/** The Lorentzian share 0 … 1 that a logit stands for. */
export const lorentzianShare = share;
