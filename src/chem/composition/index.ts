export { ATOMIC_WEIGHTS_EDITION, hillFormula, molarMass } from '../elements.ts';
export {
  ACCEPTED_DIFFERENCE,
  type AnalysedElement,
  type AnalysisJudgement,
  fitSolvate,
  judgeAnalysis,
  massPercentages,
  type Percentages,
  type SolvateFit,
} from './elemental-analysis.ts';
export { ELECTRON_MASS, exactMass } from './exact-mass.ts';
export { type IsotopePeak, isotopePattern, type PatternOptions } from './isotope-pattern.ts';
export { type Label, labelledMolarMass } from './labelled-mass.ts';
export { ABUNDANCES_EDITION, type Nuclide, nuclidesOf } from './nuclides.ts';
