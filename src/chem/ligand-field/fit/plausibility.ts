import { blockEnergies, blockMatrix, type CubicBlock, cubicBlocks } from '../cubic-blocks.ts';
import { irrepName } from '../levels.ts';
import { symmetricEigen } from '../symmetric-eigen.ts';
import type { Observation, Solution, Start } from './solutions.ts';
import { type Target, type TargetTable, targetEnergies, targetName } from './targets.ts';

/** How much a solution is to be believed: lower is better; the remarks say what speaks against it. */
export interface Plausibility {
  score: number;
  remarks: string[];
}

/**
 * Weights of what speaks against a solution, in units of one squared standard deviation; common practice, not
 * literature. A band maximum is taken as good to 150 cm⁻¹ and 2 %.
 */
const BAND = { floor: 150, share: 0.02 };
/** Nephelauxetic ratios of complexes of the first row lie mostly within 0.55 to 0.95. */
const BETA = { usual: 0.78, spread: 0.15 };
/** B of a complex in cm⁻¹ where the free ion's is not known. */
const B_USUAL = { usual: 650, spread: 250 };
/** f of Jørgensen's Δ = f·g, from iodide to cyanide. */
const FIELD = { usual: 1.1, spread: 0.3 };
const WRONG_GROUND = 50;
const FORBIDDEN = 4;
const TWO_ELECTRONS = 1.5;
const MISSING_BETWEEN = 2;
const MISSING_BELOW = 0.5;
const NOT_CONVERGED = 25;

/** What is usual for an ion: B of the free ion and Δ for f = 1 in the geometry, in cm⁻¹; null where no table tells. */
export interface Usual {
  freeIonB: number | null;
  delta: number | null;
}

/** How well a start promises, before it is followed. */
export function roughScore(
  { delta, B, nature, residuals }: Start,
  observations: readonly Observation[],
  usual: Usual,
): number {
  const both = nature === 'both';
  return misfit(residuals, observations) + unusualB(both ? B : null, usual) + unusualField(both ? delta : null, usual);
}

function misfit(residuals: readonly number[], observations: readonly Observation[]): number {
  return observations.reduce(
    (sum, { wavenumber }, band) => sum + residuals[band]! ** 2 / (BAND.floor ** 2 + (BAND.share * wavenumber) ** 2),
    0,
  );
}

function unusualB(B: number | null, { freeIonB }: Usual): number {
  if (B === null) return 0;
  return freeIonB === null
    ? ((B - B_USUAL.usual) / B_USUAL.spread) ** 2
    : ((B / freeIonB - BETA.usual) / BETA.spread) ** 2;
}

function unusualField(delta: number | null, usual: Usual): number {
  return delta === null || usual.delta === null ? 0 : ((delta / usual.delta - FIELD.usual) / FIELD.spread) ** 2;
}

export function plausibility(
  n: number,
  table: TargetTable,
  solution: Solution,
  observations: readonly Observation[],
  usual: Usual,
): Plausibility {
  const remarks: string[] = [];
  let score = 0;
  const against = (penalty: number, remark?: string): void => {
    score += penalty;
    if (remark) remarks.push(remark);
  };
  against(misfit(solution.residuals, observations));
  if (!solution.fit.converged) against(NOT_CONVERGED, 'The fit did not settle.');
  const { B, C, delta } = solution;
  against(unusualB(B, usual), B === null ? undefined : remarkOnB(B, usual.freeIonB));
  against(unusualField(delta, usual));
  // High-spin d⁵ has no spin-allowed band at all, so that its spin-forbidden ones show.
  if (table.targets.some(({ spinAllowed }) => spinAllowed)) {
    against(FORBIDDEN * solution.targets.filter(({ spinAllowed }) => !spinAllowed).length);
  }
  if (delta === null || B === null || C === null) return { score, remarks };

  const strengths = { delta: table.sign * delta, B, C };
  const lowest = lowestBlock(n, strengths);
  if (lowest !== table.ground.block) {
    const label = `${lowest.multiplicity}${irrepName(lowest, table.ground.label.endsWith('g') ? 'Oh' : 'Td')}`;
    against(WRONG_GROUND, `With these values the ground level would be ${label}, not ${table.ground.label}.`);
  }
  againstMissing(table, solution, observations, against);
  const jumps = promotions(table, solution.targets, strengths).filter((electrons) => electrons > 1.5).length;
  if (jumps > 0) against(TWO_ELECTRONS * jumps);
  return { score, remarks };
}

type Against = (penalty: number, remark?: string) => void;

function remarkOnB(B: number, freeIonB: number | null): string | undefined {
  if (freeIonB === null) return undefined;
  const beta = B / freeIonB;
  if (beta > 1) return `B exceeds that of the free ion (β = ${beta.toFixed(2)}).`;
  if (beta < BETA.usual - 3 * BETA.spread) return `B is unusually small for this ion (β = ${beta.toFixed(2)}).`;
  return undefined;
}

function lowestBlock(n: number, strengths: { delta: number; B: number; C: number }): CubicBlock {
  const lowest = cubicBlocks(n).map((block) => ({ block, energy: blockEnergies(block, strengths)[0]! }));
  return lowest.reduce((a, b) => (b.energy < a.energy ? b : a)).block;
}

/** Spin-allowed levels that should show among the bands and are not assigned. */
function againstMissing(
  table: TargetTable,
  solution: Solution,
  observations: readonly Observation[],
  against: Against,
): void {
  const { delta, B, C, targets } = solution;
  const free = table.targets.filter((target) => target.spinAllowed && !targets.includes(target));
  const energies = targetEnergies(table, free, { delta: delta ?? 0, B: B ?? 0, C: C ?? 0 });
  const wavenumbers = observations.map(({ wavenumber }) => wavenumber);
  const [first, last] = [Math.min(...wavenumbers), Math.max(...wavenumbers)];
  const [between, below]: [string[], string[]] = [[], []];
  free.forEach((target, i) => {
    const energy = energies[i]!.energy;
    const name = `${targetName(target, table)} at ${Math.round(energy)} cm⁻¹`;
    if (energy > first && energy < last) between.push(name);
    else if (energy > 0 && energy <= first) below.push(name);
  });
  if (between.length > 0) {
    against(MISSING_BETWEEN * between.length, `Expected between the bands and not assigned: ${between.join(', ')}.`);
  }
  if (below.length > 0) against(MISSING_BELOW * below.length, `Expected below the first band: ${below.join(', ')}.`);
}

/** Electrons by which each target differs from the ground in its main configuration. */
function promotions(
  { ground, sign }: TargetTable,
  targets: readonly Target[],
  strengths: { delta: number; B: number; C: number },
): number[] {
  const upper = (block: CubicBlock, root: number): number => {
    const { vectors } = symmetricEigen(blockMatrix(block, strengths));
    const size = block.upper.length;
    return block.upper.reduce((sum, electrons, i) => sum + electrons * vectors.data[i * size + root]! ** 2, 0);
  };
  const origin = upper(ground.block, 0);
  return targets.map(({ block, root }) => sign * (upper(block, root) - origin));
}
