export { type Dilution, type DilutionLimits, type DilutionPlan, dilutionPlan, USUAL_LIMITS } from './dilution-plan.ts';
export { type Plan, type PlannedBand, type PlannedComplex, planBands } from './planned-bands.ts';
