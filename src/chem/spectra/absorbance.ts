import { DomainError } from '../errors.ts';
import type { YUnit } from './types.ts';

/** What turns absorbance into a molar quantity: concentration in mol dm⁻³, path length in cm. */
export interface CellConditions {
  concentration: number;
  pathLength: number;
}

/** Standard uncertainties (k = 1) of the cell's two numbers, in the units of the numbers themselves. */
export interface CellUncertainty {
  concentration?: number;
  pathLength?: number;
  /** Standard uncertainty of each absorbance, dimensionless. */
  absorbance?: number;
}

/**
 * Decadic absorbance of each point: A = −log₁₀ T.
 *
 * @param y - n ordinates in `unit`
 * @returns n absorbances; a transmittance of zero or less has none and gives NaN, as NaN does
 * @throws {DomainError} `unsupported` for a quantity that is no measure of what a cell transmits
 * @see IUPAC Green Book, 3rd ed., section 2.7 (from memory)
 */
export function toAbsorbance(y: ArrayLike<number>, unit: YUnit): Float64Array {
  switch (unit) {
    case 'absorbance':
      return Float64Array.from(y);
    case 'transmittance':
      return Float64Array.from(y, absorbanceOf);
    case 'percent-transmittance':
      return Float64Array.from(y, (percent) => absorbanceOf(percent / 100));
    default:
      throw new DomainError('unsupported', `${unit} cannot be turned into absorbance`, 'yUnit');
  }
}

function absorbanceOf(transmittance: number): number {
  return transmittance > 0 ? 0 - Math.log10(transmittance) : Number.NaN;
}

/**
 * Molar (decadic) absorption coefficient of each point of a trace: ε = A / (c·l).
 *
 * Holds for one absorbing species in the linear range, after the solvent
 * baseline has been subtracted. Negative values are baseline noise and are kept.
 *
 * @param absorbance - n decadic absorbances, dimensionless, any order
 * @param cell - concentration in mol dm⁻³ and path length in cm, for the whole trace
 * @returns n values in dm³ mol⁻¹ cm⁻¹ (= 0.1 m² mol⁻¹), in the order given; NaN stays NaN
 * @throws {DomainError} `out-of-range` when c or l is not a finite number above zero
 * @see IUPAC, Pure Appl. Chem. 79 (2007) 293, p. 371; doi:10.1351/goldbook.M03972
 */
export function molarAbsorptionCoefficient(absorbance: ArrayLike<number>, cell: CellConditions): Float64Array {
  const scale = requireCell(cell);
  return Float64Array.from(absorbance, (a) => a / scale);
}

/**
 * ε of each point with its standard uncertainty, combined in quadrature:
 * u²(ε) = (u(A) / (c·l))² + ε² ((u(c)/c)² + (u(l)/l)²).
 *
 * @param uncertainty - standard uncertainties (k = 1); one left out counts as zero
 * @returns ε and u in dm³ mol⁻¹ cm⁻¹, n values each; NaN stays NaN
 * @throws {DomainError} `out-of-range` when c or l is not above zero, or an uncertainty is below zero
 * @see JCGM 100:2008 (GUM), section 5.1.2
 */
export function molarAbsorptionWithUncertainty(
  absorbance: ArrayLike<number>,
  cell: CellConditions,
  uncertainty: CellUncertainty,
): { epsilon: Float64Array; uncertainty: Float64Array } {
  const scale = requireCell(cell);
  const { concentration = 0, pathLength = 0, absorbance: ofReading = 0 } = uncertainty;
  requireNotNegative('concentrationUncertainty', concentration);
  requireNotNegative('pathLengthUncertainty', pathLength);
  requireNotNegative('absorbanceUncertainty', ofReading);
  const relative = Math.hypot(concentration / cell.concentration, pathLength / cell.pathLength);
  const epsilon = molarAbsorptionCoefficient(absorbance, cell);
  return { epsilon, uncertainty: epsilon.map((value) => Math.hypot(ofReading / scale, value * relative)) };
}

/** Amount concentration in mol dm⁻³ of a mass concentration in g dm⁻³, by the molar mass in g mol⁻¹. */
export function amountConcentration(massConcentration: number, molarMass: number): number {
  requirePositive('molarMass', molarMass);
  return massConcentration / molarMass;
}

/**
 * ε from the specific absorbance A(1 %, 1 cm), that of a solution of 1 g per 100 mL: ε = A · M / 10.
 *
 * @param molarMass - in g mol⁻¹
 * @returns ε in dm³ mol⁻¹ cm⁻¹
 * @see Ph. Eur. 2.2.25 (from memory)
 */
export function epsilonFromSpecificAbsorbance(specificAbsorbance: number, molarMass: number): number {
  requirePositive('molarMass', molarMass);
  return (specificAbsorbance * molarMass) / 10;
}

/** Specific absorbance A(1 %, 1 cm) of a reading at a mass concentration in g dm⁻³ and a path in cm. */
export function specificAbsorbance(absorbance: number, massConcentration: number, pathLength: number): number {
  requirePositive('massConcentration', massConcentration);
  requirePositive('pathLength', pathLength);
  return (absorbance * 10) / (massConcentration * pathLength);
}

/**
 * Kubelka–Munk function of diffuse reflectance: F(R∞) = (1 − R∞)² / (2 R∞).
 *
 * @param reflectance - n reflectances as fractions of the white standard
 * @returns n values; a reflectance of zero or less gives NaN
 * @see P. Kubelka, F. Munk, Z. Tech. Phys. 12 (1931) 593 (from memory)
 */
export function kubelkaMunk(reflectance: ArrayLike<number>): Float64Array {
  return Float64Array.from(reflectance, (r) => (r > 0 ? (1 - r) ** 2 / (2 * r) : Number.NaN));
}

function requireCell({ concentration, pathLength }: CellConditions): number {
  requirePositive('concentration', concentration);
  requirePositive('pathLength', pathLength);
  return concentration * pathLength;
}

function requirePositive(field: string, value: number): void {
  if (Number.isFinite(value) && value > 0) return;
  throw new DomainError('out-of-range', `${field} must be a number above zero; ${value} is not`, field);
}

function requireNotNegative(field: string, value: number): void {
  if (Number.isFinite(value) && value >= 0) return;
  throw new DomainError('out-of-range', `${field} must be zero or above; ${value} is not`, field);
}
