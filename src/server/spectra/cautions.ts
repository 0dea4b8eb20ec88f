import type { SpectrumRecord } from '#src/contracts/spectra.ts';
import type { complexes, spectra } from '#src/db/schema/index.ts';
import type { SolventShare } from './conditions.ts';

/** What the rules for cautions look at. */
export interface CautionContext {
  complex: typeof complexes.$inferSelect;
  spectrum: typeof spectra.$inferSelect;
  solvents: readonly SolventShare[];
}

/** The usual cautions for this composition, measured in this way. None means that no rule matched, never "safe". */
export function cautionsOf(_context: CautionContext): SpectrumRecord['cautions'] {
  return [];
}
