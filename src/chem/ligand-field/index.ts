export { D_ORBITALS, type DOrbital } from './d-orbitals.ts';
export { type Diagram, type DiagramRequest, diagram } from './diagram.ts';
export { fieldLevels, type Level } from './field-levels.ts';
export { type Fit, type FitCandidate, type FitRequest, fit } from './fit/fit.ts';
export type { FitSpin } from './fit/ground.ts';
export { type FreeIonTerm, freeIonTerms, hundGround, termLetter } from './free-ion.ts';
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
} from './levels.ts';
export { type OrbitalEnergy, type OverlapLigand, orbitalEnergies, overlapField } from './overlap.ts';
export { type FreeIonRacah, freeIonRacah } from './racah-b.ts';
export { tetragonalField } from './tetragonal.ts';
