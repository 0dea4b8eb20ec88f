export { compareSymbols } from './print';
export { cautionContext, readFormula } from './read';
export type {
  Answers,
  CentreReading,
  CounterIon,
  EntityReading,
  LigandReading,
  Question,
  Reading,
  Solvate,
} from './types';
