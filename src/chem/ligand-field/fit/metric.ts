import type { Observation } from './solutions.ts';
import type { Target } from './targets.ts';

/** One weighted combination of the bands, whose square enters the sum. */
export interface MetricRow {
  weight: number;
  /** Coefficient by band; together the rows are orthonormal. */
  parts: readonly { band: number; factor: number }[];
}

/** Weight of the differences within a whole block relative to its sum: five times less certain. */
const DIFFERENCES = 0.04;

/**
 * What the least squares count. Bands count by their uncertainties; where those are not told, alike.
 *
 * But where the bands show every level of one spin and irrep and none of them has an uncertainty, their sum counts more
 * than their differences: it is the trace of the block, in which configuration interaction and what the model leaves out
 * of it cancel. For d³ and d⁸ this is the rule of the textbooks, Δ = ν₁ and 15B = ν₂ + ν₃ − 3ν₁.
 *
 * @see E. König, Struct. Bonding 9 (1971) 175, for the ways to B and what each leans on (from memory)
 */
export function metricOf(targets: readonly Target[], observations: readonly Observation[]): MetricRow[] {
  const rows: MetricRow[] = [];
  const done = new Set<number>();
  for (const [band, { block }] of targets.entries()) {
    if (done.has(band)) continue;
    const family = [...targets.keys()].filter((other) => targets[other]!.block === block);
    const whole = block.upper.length > 1 && family.length === block.upper.length;
    const members = whole && family.every((b) => !observations[b]!.certain) ? family : [band];
    for (const member of members) done.add(member);
    rows.push(...contrasts(members, observations[band]!.weight));
  }
  return rows;
}

/** Mean and Helmert's contrasts of some bands of one weight, orthonormal. */
function contrasts(bands: readonly number[], weight: number): MetricRow[] {
  const mean = { weight, parts: bands.map((band) => ({ band, factor: 1 / Math.sqrt(bands.length) })) };
  const others = bands.slice(1).map((last, i) => {
    const norm = Math.sqrt((i + 1) * (i + 2));
    const before = bands.slice(0, i + 1).map((band) => ({ band, factor: 1 / norm }));
    return { weight: weight * DIFFERENCES, parts: [...before, { band: last, factor: -(i + 1) / norm }] };
  });
  return [mean, ...others];
}

/** The combination of some values by band. */
export function combined({ parts }: MetricRow, values: readonly number[]): number {
  let sum = 0;
  for (const { band, factor } of parts) sum += factor * values[band]!;
  return sum;
}
