/** f of 1 dm³ mol⁻¹ cm⁻²: 4 ε₀ m_e c² ln 10 / (N_A e²), at refractive index 1. */
export const OSCILLATOR_STRENGTH_PER_AREA = 4.319e-9;

/**
 * Oscillator strength of a band, f = 4.319·10⁻⁹ ∫ε dν̄ (refractive index 1).
 *
 * @param area - ∫ε dν̄ in dm³ mol⁻¹ cm⁻²
 * @see R. S. Mulliken, J. Chem. Phys. 7 (1939) 14 (from memory)
 */
export function oscillatorStrength(area: number): number {
  return OSCILLATOR_STRENGTH_PER_AREA * area;
}

/** ∫ε dν̄ of a Gaussian band by height and full width at half maximum in cm⁻¹: h·w·√(π / (4 ln 2)). */
export function gaussianArea(height: number, fwhm: number): number {
  return height * fwhm * Math.sqrt(Math.PI / (4 * Math.LN2));
}

/** ∫y dx by trapezoids over the points there are; a gap adds nothing. */
export function areaUnder(x: ArrayLike<number>, y: ArrayLike<number>): number {
  let area = 0;
  for (let i = 1; i < x.length; i++) {
    const piece = ((y[i]! + y[i - 1]!) / 2) * (x[i]! - x[i - 1]!);
    if (!Number.isNaN(piece)) area += piece;
  }
  return area;
}
