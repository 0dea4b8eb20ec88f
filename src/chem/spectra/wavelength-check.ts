import { DomainError } from '../errors.ts';

/** A reference band and where an instrument found it, nm. */
export interface ReferenceReading {
  certified: number;
  found: number;
}

/**
 * Absorption bands of holmium oxide, 40 g/L in 10 % perchloric acid, at 1 nm bandwidth, in nm. Positions shift with
 * the bandwidth, most at 385.7, 451.3 and 640.5 nm.
 *
 * @see J. C. Travis et al., J. Phys. Chem. Ref. Data 34 (2005) 41 (from memory)
 */
export const holmiumOxideBands: readonly number[] = [
  ...[241.13, 249.87, 278.1, 287.18, 333.44, 345.47, 361.31],
  ...[385.66, 416.28, 451.3, 467.83, 485.29, 536.64, 640.52],
];

/** The result of a wavelength check: errors found − certified in nm, in the order given, and the largest in size. */
export interface WavelengthCheck {
  errors: number[];
  largestError: number;
}

/**
 * Wavelength errors of an instrument by a reference material.
 *
 * @throws {DomainError} `empty` without a reading, `out-of-range` when one is not a wavelength
 */
export function checkWavelengths(readings: readonly ReferenceReading[]): WavelengthCheck {
  if (readings.length === 0) throw new DomainError('empty', 'a wavelength check needs at least one band', 'readings');
  const errors = readings.map(({ certified, found }) => {
    if (certified > 0 && found > 0) return found - certified;
    throw new DomainError('out-of-range', `${certified} and ${found} nm must both be above zero`, 'readings');
  });
  return { errors, largestError: Math.max(...errors.map(Math.abs)) };
}

/** Whether every error of a check is within a tolerance in nm. */
export function isWithin({ largestError }: WavelengthCheck, tolerance: number): boolean {
  return largestError <= tolerance + 1e-9;
}
