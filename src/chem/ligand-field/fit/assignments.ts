import type { FitRequest } from './fit.ts';
import { roughScore, type Usual } from './plausibility.ts';
import { type Observation, type Solution, type Start, solutionFrom, starts } from './solutions.ts';
import { readTargets, SCAN, type TargetTable } from './targets.ts';

/** Choices of levels that one request may try; the lowest levels come first. */
const MOST_CHOICES = 800;
/** Starting points that are followed, the most promising ones. */
const MOST_STARTS = 40;
/** Δ/B of known complexes, over which levels are ordered by how low they come. */
const USUAL: readonly [number, number] = [4, 60];

/**
 * The least-squares solutions of all sensible assignments: written terms stand, free bands end on levels of the ground's
 * spin, no level twice, in the order of the levels; then on levels whose spin differs by one as well.
 */
export function assignments(
  table: TargetTable,
  bands: FitRequest['bands'],
  observations: readonly Observation[],
  usual: Usual,
  mayFreeC: boolean,
): Solution[] {
  const written = bands.flatMap(({ wavenumber, to }, place) => (to === undefined ? [] : [{ place, wavenumber, to }]));
  const read = readTargets(table, written);
  const assigned = bands.map((_, place) => read.get(place) ?? null);
  const free = assigned.filter((target) => target === null).length;
  const solve = (pool: readonly number[]): Solution[] =>
    promising(
      choices(lowestFirst(table, pool, free), free).flatMap((chosen) => starts(table, observations, assigned, chosen)),
      observations,
      usual,
    ).map((start) => solutionFrom(table, observations, start, mayFreeC));
  if (free === 0) return solve([]);

  const taken = new Set(read.values());
  const open = distinct(
    table,
    [...table.targets.keys()].filter((t) => !taken.has(t)),
  );
  const { multiplicity } = table.ground.block;
  const allowed = open.filter((t) => table.targets[t]!.spinAllowed);
  const near = open.filter((t) => Math.abs(table.targets[t]!.block.multiplicity - multiplicity) <= 2);
  return [...solve(allowed), ...(near.length > allowed.length ? solve(near) : [])];
}

/** The starts that are worth following. */
function promising(all: readonly Start[], observations: readonly Observation[], usual: Usual): Start[] {
  if (all.length <= MOST_STARTS) return [...all];
  return all
    .map((start) => ({ start, score: roughScore(start, observations, usual) }))
    .sort((a, b) => a.score - b.score)
    .slice(0, MOST_STARTS)
    .map(({ start }) => start);
}

/** Of levels that coincide at every field, such as 4A1 and the lowest 4E of d⁵, the first stands for all. */
function distinct({ energies }: TargetTable, open: readonly number[]): number[] {
  return open.filter(
    (t, i) =>
      !open
        .slice(0, i)
        .some((before) => SCAN.every((_, k) => Math.abs(energies[t]![k]! - energies[before]![k]!) < 1e-7)),
  );
}

/** As many of the levels, the lowest first, as leave no more choices than may be tried. */
function lowestFirst({ energies }: TargetTable, pool: readonly number[], free: number): number[] {
  const depth = (t: number): number =>
    Math.min(...SCAN.map((x, i) => (x >= USUAL[0] && x <= USUAL[1] ? energies[t]![i]! : Number.POSITIVE_INFINITY)));
  const sorted = [...pool].sort((a, b) => depth(a) - depth(b));
  let size = sorted.length;
  while (size > free && binomial(size, free) > MOST_CHOICES) size--;
  return sorted.slice(0, size);
}

const binomial = (n: number, k: number): number => (k === 0 ? 1 : (binomial(n - 1, k - 1) * n) / k);

function choices(pool: readonly number[], count: number): number[][] {
  if (count === 0) return [[]];
  return pool.flatMap((first, i) => choices(pool.slice(i + 1), count - 1).map((rest) => [first, ...rest]));
}
