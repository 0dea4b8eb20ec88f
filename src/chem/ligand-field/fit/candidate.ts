import { covariance } from '../least-squares.ts';
import type { FreeIonRacah } from '../racah-b.ts';
import type { FitRequest } from './fit.ts';
import type { FitSpin } from './ground.ts';
import { metricOf } from './metric.ts';
import type { Plausibility } from './plausibility.ts';
import type { Observation, Solution } from './solutions.ts';
import { type TargetTable, targetName } from './targets.ts';

export interface FitCandidate {
  /** Δ of the geometry, B and C in cm⁻¹; null where no band depends on it. */
  delta: number | null;
  B: number | null;
  C: number | null;
  /** Standard errors; null where they cannot be told, and for a C that is tied to B. */
  errors: { delta: number | null; B: number | null; C: number | null };
  /** Correlation coefficients of what was fitted. */
  correlation: { deltaB: number | null; deltaC: number | null; BC: number | null };
  /** Nephelauxetic ratio: B over the free ion's, whose table is named. */
  beta: number | null;
  freeIon: { B: number; source: string } | null;
  /** `level`: place of the level among those of its term above the ground, from 1. */
  assignments: { wavenumber: number; to: string; level: number; calculated: number; residual: number }[];
  /** Root of the mean square of the residuals, cm⁻¹. */
  rms: number;
  ground: string;
  spin: FitSpin | null;
  /** C/B of the values told, and where it comes from. */
  ratioCB: number | null;
  ratioSource: 'given' | 'free ion' | 'assumed' | 'fitted';
  /** Bands less fitted parameters. */
  degreesOfFreedom: number;
  converged: boolean;
  /** By which candidates are ranked, in squared standard deviations: residuals, unusual values, missing bands; low is good. */
  score: number;
  /** What speaks against the candidate. */
  remarks: string[];
}

/** A solution as it is told. */
export function candidateOf(
  { bands }: FitRequest,
  table: TargetTable,
  { delta, B, C, fitted, fit: result, residuals, targets: ends }: Solution,
  observations: readonly Observation[],
  { score, remarks }: Plausibility,
  freeIon: FreeIonRacah | null,
  ratioSource: FitCandidate['ratioSource'],
): FitCandidate {
  const { ground, ratioCB } = table;
  const degreesOfFreedom = bands.length - fitted.length;
  const spread = spreadOf(bands, ends, observations, result, degreesOfFreedom);
  const variance = (name: Solution['fitted'][number], other = name): number | null => {
    const [i, j] = [fitted.indexOf(name), fitted.indexOf(other)];
    return spread && i >= 0 && j >= 0 ? spread.covariance[i]![j]! : null;
  };
  const error = (name: Solution['fitted'][number]): number | null => {
    const value = variance(name);
    return value === null || !spread?.absolute ? null : Math.sqrt(value);
  };
  const correlation = (a: Solution['fitted'][number], b: Solution['fitted'][number]): number | null => {
    const [ab, aa, bb] = [variance(a, b), variance(a), variance(b)];
    return ab === null || !aa || !bb ? null : ab / Math.sqrt(aa * bb);
  };
  return {
    delta,
    B,
    C,
    errors: { delta: error('delta'), B: error('B'), C: error('C') },
    correlation: { deltaB: correlation('delta', 'B'), deltaC: correlation('delta', 'C'), BC: correlation('B', 'C') },
    beta: B === null || freeIon === null ? null : B / freeIon.B,
    freeIon: freeIon && { B: freeIon.B, source: freeIon.source },
    assignments: bands.map(({ wavenumber }, i) => ({
      wavenumber,
      to: targetName(ends[i]!, table),
      level: table.targets.filter((t) => t.term === ends[i]!.term && t.root <= ends[i]!.root).length,
      calculated: wavenumber - residuals[i]!,
      residual: residuals[i]!,
    })),
    rms: Math.sqrt(residuals.reduce((sum, r) => sum + r * r, 0) / bands.length),
    ground: ground.label,
    spin: ground.spin,
    ratioCB: B === null || C === null ? null : fitted.includes('C') ? C / B : ratioCB,
    ratioSource: fitted.includes('C') ? 'fitted' : ratioSource,
    degreesOfFreedom,
    converged: result.converged,
    score,
    remarks,
  };
}

interface Spread {
  covariance: number[][];
  /** Whether its scale is known, from residuals or from uncertainties. */
  absolute: boolean;
}

/** Scaled by the residuals where there are more bands than parameters; else by the uncertainties, if all are told. */
function spreadOf(
  bands: FitRequest['bands'],
  targets: Solution['targets'],
  observations: readonly Observation[],
  { gradients, sum }: Solution['fit'],
  degreesOfFreedom: number,
): Spread | null {
  const unscaled = covariance(
    gradients,
    metricOf(targets, observations).map(({ weight }) => weight),
  );
  if (!unscaled) return null;
  if (degreesOfFreedom <= 0) {
    return { covariance: unscaled, absolute: bands.every(({ uncertainty }) => uncertainty !== undefined) };
  }
  const scale = sum / degreesOfFreedom;
  return { covariance: unscaled.map((row) => row.map((x) => x * scale)), absolute: true };
}
