export { type Correlation, type CorrelationRequest, correlation, type GeometryPath } from './correlation.ts';
export { D_ORBITALS, type DOrbital } from './d-orbitals.ts';
export { type Diagram, type DiagramRequest, diagram } from './diagram.ts';
export { fieldLevels, type Level } from './field-levels.ts';
export type { FitCandidate } from './fit/candidate.ts';
export { type Fit, type FitRequest, fit } from './fit/fit.ts';
export {
  type FittedComplex,
  fitOverlap,
  type OverlapFit,
  type OverlapFitRequest,
} from './fit/fit-overlap.ts';
export type { FitSpin } from './fit/ground.ts';
export { type FreeIonTerm, freeIonTerms, hundGround, termLetter } from './free-ion.ts';
export { flattening, type LigandStrength, tetragonalPath, trigonalTwist } from './geometry-paths.ts';
export {
  estimateBeta,
  estimateDelta,
  type IonFactors,
  ionFactors,
  JORGENSEN_SOURCE,
  type LigandFactors,
  ligandFactors,
  type OctahedralComplex,
} from './jorgensen.ts';
export {
  CUBIC_GEOMETRIES,
  type CubicGeometry,
  type Field,
  type Levels,
  type LevelsRequest,
  levels,
  type ToldLevel,
} from './levels.ts';
export { type OrgelDiagram, type OrgelRequest, orgelDiagram } from './orgel.ts';
export { type OrbitalEnergy, type OverlapLigand, orbitalEnergies, overlapField } from './overlap.ts';
export { type FreeIonRacah, freeIonRacah } from './racah-b.ts';
export { SPECTROCHEMICAL_SERIES } from './spectrochemical-series.ts';
export type { SpinOrbitLevel } from './spin-orbit-levels.ts';
export { tetragonalField } from './tetragonal.ts';
