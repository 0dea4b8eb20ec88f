import { covariance, type LeastSquares, leastSquares } from '../least-squares.ts';
import { combined, type MetricRow, metricOf } from './metric.ts';
import { SCAN, type Target, type TargetTable, targetEnergies } from './targets.ts';

/** The parameters of a cubic field that a set of bands bears. */
export type Parameter = 'delta' | 'B' | 'C';

export interface Observation {
  wavenumber: number;
  /** 1/u², relative to each other where uncertainties are not known. */
  weight: number;
  /** Whether the weight is that of an uncertainty told. */
  certain: boolean;
}

/** One least-squares solution for one assignment. */
export interface Solution {
  /** By band. */
  targets: Target[];
  /** Null where no band depends on it. */
  delta: number | null;
  B: number | null;
  C: number | null;
  fitted: Parameter[];
  fit: LeastSquares;
  /** Observed − calculated by band. */
  residuals: number[];
}

/** Where the search for a solution starts: the best B at one Δ/B. */
export interface Start {
  nature: Nature;
  targets: Target[];
  delta: number;
  B: number;
  /** Observed − calculated by band. */
  residuals: number[];
}

const LARGEST = { delta: 200_000, B: 5000, C: 50_000 } as const;
const LEAST = 1e-3;
/** Change over the scan, relative to the largest energy, below which a level counts as independent of the field. */
const CONSTANT = 1e-9;
/** C is taken as borne by the data when bands good to this share would tell it to the share after. */
const BAND_SHARE = 0.015;
const C_SHARE = 0.3;
/** C/B of every free ion known lies well within. */
const RATIOS: readonly [number, number] = [2, 8];

/**
 * Starting points for the assignments in which each free band ends on one of `chosen`, the order of the bands being that
 * of the levels, and each assigned band where it is assigned.
 *
 * For a given C/B all energies are B times a function of Δ/B, so that a scan over Δ/B, with the best B at each point,
 * finds every minimum.
 *
 * @param assigned - target of each band, null for the free ones
 * @param chosen - as many targets as there are free bands
 */
export function starts(
  table: TargetTable,
  observations: readonly Observation[],
  assigned: readonly (number | null)[],
  chosen: readonly number[],
): Start[] {
  const all = [...assigned.filter((t) => t !== null), ...chosen];
  const nature = natureOf(table, all);
  if (nature === 'both') return observations.length < 2 ? [] : minima(table, observations, assigned, chosen);
  const places = inOrder(table.energies, 0, assigned, chosen, ranksOf(observations, assigned));
  const targets = places.map((t) => table.targets[t]!);
  const fieldAlone = nature === 'field alone';
  const begin = { nature, targets, delta: fieldAlone ? observations[0]!.wavenumber : LEAST, B: fieldAlone ? 1 : 800 };
  const { residuals } = refine(table, observations, begin, [fieldAlone ? 'delta' : 'B']);
  return [{ ...begin, residuals }];
}

/**
 * The least-squares solution from a start, by the damped Gauss–Newton method.
 *
 * @param mayFreeC - whether C may be fitted by itself where the bands bear it
 */
export function solutionFrom(
  table: TargetTable,
  observations: readonly Observation[],
  start: Start,
  mayFreeC: boolean,
): Solution {
  if (start.nature === 'field alone') return { ...refine(table, observations, start, ['delta']), B: null, C: null };
  const names: Parameter[] = start.nature === 'both' ? ['delta', 'B'] : ['B'];
  const tied = refine(table, observations, start, names);
  const freed =
    mayFreeC && observations.length > names.length
      ? refine(table, observations, { ...start, delta: tied.delta ?? LEAST, B: tied.B ?? 1 }, [...names, 'C'])
      : null;
  const best = freed && bearsC(freed, observations) ? freed : tied;
  return start.nature === 'both' ? best : { ...best, delta: null };
}

type Nature = 'field alone' | 'repulsion alone' | 'both';

function natureOf({ energies }: TargetTable, all: readonly number[]): Nature {
  const varies = (of: (energy: number, i: number) => number) =>
    all.some((t) => {
      const values = Array.from(energies[t]!, of);
      return Math.max(...values) - Math.min(...values) > CONSTANT * Math.max(...values.map(Math.abs), 1);
    });
  if (!varies((energy) => energy)) return 'repulsion alone';
  return varies((energy, i) => energy / SCAN[i]!) ? 'both' : 'field alone';
}

/** Targets by band at one point of the scan: free bands take the chosen ones in rising order. */
function inOrder(
  energies: readonly Float64Array[],
  point: number,
  assigned: readonly (number | null)[],
  chosen: readonly number[],
  ranks: readonly number[],
): number[] {
  const rising = [...chosen].sort((a, b) => energies[a]![point]! - energies[b]![point]!);
  return assigned.map((target, band) => target ?? rising[ranks[band]!]!);
}

/** Rank of each free band among the free ones by wavenumber. */
function ranksOf(observations: readonly Observation[], assigned: readonly (number | null)[]): number[] {
  return observations.map(
    ({ wavenumber }, band) =>
      observations.filter(
        (other, b) =>
          assigned[b] === null && (other.wavenumber < wavenumber || (other.wavenumber === wavenumber && b < band)),
      ).length,
  );
}

function minima(
  { energies, targets }: TargetTable,
  observations: readonly Observation[],
  assigned: readonly (number | null)[],
  chosen: readonly number[],
): Start[] {
  const ranks = ranksOf(observations, assigned);
  const observed = observations.map(({ wavenumber }) => wavenumber);
  let key = '';
  let metric: MetricRow[] = [];
  const points = SCAN.map((x, i) => {
    const places = inOrder(energies, i, assigned, chosen, ranks);
    const values = places.map((t) => energies[t]![i]!);
    if (`${places}` !== key) {
      key = `${places}`;
      metric = metricOf(
        places.map((t) => targets[t]!),
        observations,
      );
    }
    if (values.some((f) => f <= 0)) return { x, key, places, B: 0, rest: Number.POSITIVE_INFINITY };
    let [fy, ff, yy] = [0, 0, 0];
    for (const row of metric) {
      const [f, y] = [combined(row, values), combined(row, observed)];
      fy += row.weight * f * y;
      ff += row.weight * f * f;
      yy += row.weight * y * y;
    }
    return { x, key, places, B: Math.max(0, fy / ff), rest: yy - (fy * fy) / ff };
  });
  const rest = (i: number): number => points[i]?.rest ?? Number.POSITIVE_INFINITY;
  // Where the order of the levels changes, another assignment begins, which has a minimum of its own at the edge.
  return [...points.entries()]
    .filter(
      ([i, point]) =>
        Number.isFinite(point.rest) &&
        point.B > 0 &&
        (point.rest <= rest(i - 1) || point.key !== points[i - 1]?.key) &&
        (point.rest < rest(i + 1) || point.key !== points[i + 1]?.key),
    )
    .map(([i, { x, B, places }]) => ({
      nature: 'both',
      targets: places.map((t) => targets[t]!),
      delta: x * B,
      B,
      residuals: places.map((t, band) => observed[band]! - B * energies[t]![i]!),
    }));
}

/** Fits the parameters named; the others stay as they are, C tied to B unless it is fitted. */
function refine(
  table: TargetTable,
  observations: readonly Observation[],
  { targets, delta, B }: Pick<Start, 'targets' | 'delta' | 'B'>,
  fitted: Parameter[],
): Solution {
  const start = { delta, B, C: table.ratioCB * B };
  const freeC = fitted.includes('C');
  const metric = metricOf(targets, observations);
  const observed = observations.map(({ wavenumber }) => wavenumber);
  const read = (p: readonly number[]) => {
    const at = (name: Parameter): number => (fitted.includes(name) ? p[fitted.indexOf(name)]! : start[name]);
    return { delta: at('delta'), B: at('B'), C: freeC ? at('C') : table.ratioCB * at('B') };
  };
  const fit = leastSquares({
    observed: metric.map((row) => combined(row, observed)),
    weights: metric.map(({ weight }) => weight),
    start: fitted.map((name) => start[name]),
    lower: fitted.map(() => LEAST),
    upper: fitted.map((name) => LARGEST[name]),
    model: (p) => {
      const levels = targetEnergies(table, targets, read(p));
      const by: Record<Parameter, number[]> = {
        delta: levels.map(({ gradient }) => gradient[0]),
        B: levels.map(({ gradient }) => gradient[1] + (freeC ? 0 : table.ratioCB * gradient[2])),
        C: levels.map(({ gradient }) => gradient[2]),
      };
      const energies = levels.map(({ energy }) => energy);
      return {
        values: metric.map((row) => combined(row, energies)),
        gradients: metric.map((row) => fitted.map((name) => combined(row, by[name]))),
      };
    },
  });
  const strengths = read(fit.parameters);
  const energies = targetEnergies(table, targets, strengths).map(({ energy }) => energy);
  return { targets, ...strengths, fitted, fit, residuals: observed.map((y, band) => y - energies[band]!) };
}

function bearsC({ B, C, fit, fitted, targets }: Solution, observations: readonly Observation[]): boolean {
  if (!B || !C || !fit.converged || C / B < RATIOS[0] || C / B > RATIOS[1]) return false;
  // The rows of the fit's own metric mix bands; as good as the least certain band of each.
  const weights = metricOf(targets, observations).map(({ parts }) =>
    Math.min(...parts.map(({ band }) => 1 / (BAND_SHARE * observations[band]!.wavenumber) ** 2)),
  );
  const spread = covariance(fit.gradients, weights);
  const at = fitted.indexOf('C');
  return spread !== null && Math.sqrt(spread[at]![at]!) <= C_SHARE * C;
}
