export * from './absorbance.ts';
export { ABSORBANCE_LIMIT, checkConditions, type Flag, type MeasuredCurve, type SolventGiven } from './conditions.ts';
export { componentArea } from './fit/components.ts';
export {
  type BandFit,
  combinedPositionError,
  type FitOptions,
  type FittedBand,
  fitBands,
} from './fit/fit-bands.ts';
export { type SpectrumToWrite, writeJcamp } from './jcamp/write.ts';
export * from './oscillator-strength.ts';
export { type PickedBand, type PickOptions, pickBands } from './pick-bands.ts';
export { ascending, type Curve, decimate } from './points.ts';
export { readSpectrumFile } from './read.ts';
export { type SpectralSimilarity, spectralSimilarity } from './similarity.ts';
export { findSolvent, type Solvent, solvents } from './solvents.ts';
export * from './transition-dipole.ts';
export * from './types.ts';
export { isAbscissaLabel, xUnitFromText, xUnitNames, yUnitFromText, yUnitNames } from './unit-names.ts';
export { convertEnergy, convertX, type EnergyUnit, toWavenumber, wavenumberInterval } from './units.ts';
export * from './wavelength-check.ts';
export { guardCell, writeCsv } from './write-csv.ts';
