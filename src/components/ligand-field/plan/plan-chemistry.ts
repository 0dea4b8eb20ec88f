/** The chemistry of a plan, fetched by the browser after the page is drawn. */
export { cautionsFor } from '#src/chem/cautions/index.ts';
export { chargeTransfer } from '#src/chem/charge-transfer/index.ts';
export { colourOfSolution } from '#src/chem/colour/index.ts';
export { DomainError } from '#src/chem/errors.ts';
export { dilutionPlan, planBands } from '#src/chem/planning/index.ts';
export { solvents } from '#src/chem/spectra/solvents.ts';
