/** |μ|² in D² of ∫ε/ν̄ dν̄ = 1 dm³ mol⁻¹ cm⁻¹: 3 ε₀ h c ln 10 / (2π² N_A), at refractive index 1. */
export const DIPOLE_SQUARE_PER_INTEGRAL = 9.186e-3;

/**
 * Transition dipole of a band in debye: |μ|²/D² = 9.186·10⁻³ (1/n) ∫ε/ν̄ dν̄.
 *
 * The factor 1/n is one of several corrections for the medium; without one n is 1, and the value is an upper bound.
 *
 * @param integral - ∫ε/ν̄ dν̄ in dm³ mol⁻¹ cm⁻¹; for a narrow band its area divided by its position
 * @param refractiveIndex - of the medium at the band
 * @returns |μ| in D; NaN for an integral below zero, which is no absorption
 * @see N. S. Hush, Prog. Inorg. Chem. 8 (1967) 391; the constant from CODATA 2018 (from memory)
 */
export function transitionDipole(integral: number, refractiveIndex = 1): number {
  return Math.sqrt((DIPOLE_SQUARE_PER_INTEGRAL * integral) / refractiveIndex);
}
