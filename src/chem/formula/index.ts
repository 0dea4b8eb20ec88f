export { compareSymbols } from './print.ts';
export { cautionContext, readFormula } from './read.ts';
export type {
  Answers,
  CentreReading,
  CounterIon,
  EntityReading,
  IsotopeLabel,
  LigandReading,
  Question,
  Reading,
  Solvate,
} from './types.ts';
