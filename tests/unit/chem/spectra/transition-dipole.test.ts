import { expect, test } from 'vitest';
import { DIPOLE_SQUARE_PER_INTEGRAL, transitionDipole } from '#src/chem/spectra/transition-dipole.ts';

test('the constant follows from CODATA: 3 ε₀ h c ln 10 / (2π² N_A) in D² per dm³ mol⁻¹ cm⁻¹', () => {
  // CODATA 2018; h, c and N_A are exact.
  const [vacuumPermittivity, planck, light, avogadro] = [8.8541878128e-12, 6.62607015e-34, 299_792_458, 6.02214076e23];
  const debye = 1e-21 / light; // C m
  const perMole = 0.1; // m² mol⁻¹ of 1 dm³ mol⁻¹ cm⁻¹
  const square =
    (3 * vacuumPermittivity * planck * light * Math.LN10 * perMole) / (2 * Math.PI ** 2 * avogadro) / debye ** 2;
  expect(DIPOLE_SQUARE_PER_INTEGRAL).toBeCloseTo(square, 6);
});

test('a Gaussian of ε 1000 and 3000 cm⁻¹ at 10 000 cm⁻¹ has 1.71 D', () => {
  // By hand: 9.186e-3 · 1000 · 3000 · 1.0645 / 10 000 = 2.9335
  expect(transitionDipole((1000 * 3000 * 1.064467) / 10_000)).toBeCloseTo(Math.sqrt(2.9335), 3);
});

test('a refractive index lessens it by the root of n, and a negative integral has none', () => {
  expect(transitionDipole(300, 1.44)).toBeCloseTo(transitionDipole(300) / 1.2, 12);
  expect(transitionDipole(-1)).toBeNaN();
});
