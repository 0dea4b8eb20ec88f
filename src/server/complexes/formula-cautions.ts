import { NO_CAUTION_COMPUTED } from '../../chem/cautions/index.ts';
import { DomainError } from '../../chem/errors.ts';
import { readFormula } from '../../chem/formula/index.ts';
import type { ComplexRecord } from '../../contracts/complexes.ts';

/**
 * Usual cautions for a stored formula. One that this release can no longer read says that none was computed, since
 * silence would read as safe.
 */
export function formulaCautions(formula: string, answers: Record<string, string> = {}): ComplexRecord['cautions'] {
  try {
    return readFormula(formula, answers).cautions;
  } catch (error) {
    if (!(error instanceof DomainError)) throw error;
    return [{ id: 'none-computed', detail: NO_CAUTION_COMPUTED, codes: [], source: error.message }];
  }
}
