export { cautionContext } from './entity-reading.ts';
export { compareSymbols } from './print.ts';
export { readFormula } from './read.ts';
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
