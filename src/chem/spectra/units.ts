import { DomainError } from '../errors.ts';
import type { XUnit } from './types.ts';

// CODATA 2018 and 2022: exact since the SI of 2019.
const PLANCK = 6.62607015e-34; // J s
const LIGHT = 299_792_458; // m/s
const CHARGE = 1.602176634e-19; // C
const AVOGADRO = 6.02214076e23; // 1/mol
const BOLTZMANN = 1.380649e-23; // J/K
const JOULE_PER_WAVENUMBER = PLANCK * LIGHT * 100;

/** Units of a photon's energy that `convertEnergy` knows, beside those of an abscissa. */
export type EnergyUnit = XUnit | 'meV' | 'Hz' | 'J' | 'J mol-1' | 'kJ mol-1' | 'kcal mol-1' | 'K';

/** Units in which a value grows with the photon's energy: how many of them make 1 cm⁻¹. */
const PER_WAVENUMBER: Record<Exclude<EnergyUnit, 'nm' | 'um'>, number> = {
  'cm-1': 1,
  eV: JOULE_PER_WAVENUMBER / CHARGE,
  meV: (1e3 * JOULE_PER_WAVENUMBER) / CHARGE,
  THz: LIGHT * 1e-10,
  Hz: LIGHT * 100,
  J: JOULE_PER_WAVENUMBER,
  'J mol-1': JOULE_PER_WAVENUMBER * AVOGADRO,
  'kJ mol-1': (JOULE_PER_WAVENUMBER * AVOGADRO) / 1e3,
  'kcal mol-1': (JOULE_PER_WAVENUMBER * AVOGADRO) / 4184,
  K: JOULE_PER_WAVENUMBER / BOLTZMANN,
};

/** Units of wavelength: the product of wavelength and wavenumber in cm⁻¹. */
const RECIPROCAL = { nm: 1e7, um: 1e4 } as const;

/**
 * Photon energy of one unit in another, by E = hc/λ = hν; wavelengths are those in vacuum.
 *
 * @param value - one energy or wavelength in `from`; NaN stays NaN, and zero as a wavelength gives NaN
 * @returns the same in `to`
 * @throws {DomainError} `unsupported` for a unit that is not known
 * @see CODATA 2018 (h, c, e, N_A and k are exact)
 */
export function convertEnergy(value: number, from: EnergyUnit, to: EnergyUnit): number {
  if (from === to) return value;
  return fromWavenumber(intoWavenumber(value, from), to);
}

function intoWavenumber(value: number, from: EnergyUnit): number {
  if (from === 'nm' || from === 'um') return value > 0 ? RECIPROCAL[from] / value : Number.NaN;
  return value / factorOf(from);
}

function fromWavenumber(wavenumber: number, to: EnergyUnit): number {
  if (to === 'nm' || to === 'um') return wavenumber > 0 ? RECIPROCAL[to] / wavenumber : Number.NaN;
  return wavenumber * factorOf(to);
}

function factorOf(unit: Exclude<EnergyUnit, 'nm' | 'um'>): number {
  const factor = PER_WAVENUMBER[unit];
  if (factor === undefined) throw new DomainError('unsupported', `${unit} is not a unit of energy known here`, 'xUnit');
  return factor;
}

/**
 * Abscissae of one unit in another, in the order given.
 *
 * @param x - n abscissae in `from`
 * @returns n abscissae in `to`; a wavelength of zero or less has no energy and gives NaN
 */
export function convertX(x: ArrayLike<number>, from: XUnit, to: XUnit): Float64Array {
  return Float64Array.from(x, (value) => convertEnergy(value, from, to));
}

/** Abscissae in cm⁻¹, in the order given (see `convertX`). */
export function toWavenumber(x: ArrayLike<number>, unit: XUnit): Float64Array {
  return convertX(x, unit, 'cm-1');
}

/**
 * Width in cm⁻¹ of an interval between two wavelengths in nm. A width in nm has no factor of its own into cm⁻¹:
 * 10 nm are 392 cm⁻¹ at 505 nm and 99 cm⁻¹ at 1005 nm.
 */
export function wavenumberInterval(oneNm: number, otherNm: number): number {
  return Math.abs(convertEnergy(oneNm, 'nm', 'cm-1') - convertEnergy(otherNm, 'nm', 'cm-1'));
}
