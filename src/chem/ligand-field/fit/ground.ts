import { DomainError } from '../../errors.ts';
import { BlockSweep } from '../block-sweep.ts';
import { type CubicBlock, cubicBlocks } from '../cubic-blocks.ts';
import { groundLevels } from '../ground-crossings.ts';
import { type CubicGeometry, cubicSetting, irrepName } from '../levels.ts';

export type FitSpin = 'high' | 'low';

/** A ground level that bands are counted from. */
export interface Ground {
  /** Null where the ion has one spin state only. */
  spin: FitSpin | null;
  block: CubicBlock;
  label: string;
}

/** Δ/B up to which a field may pair the spins; no complex comes near. */
const STRONGEST = 200;

/**
 * The ground levels that dⁿ can have in a geometry, high spin first: that of a weak field, and that of a strong one where
 * its spin is lower.
 *
 * @throws DomainError `unsupported` (field `spin`) where a low spin is asked for that does not exist, (`geometry`),
 *   `out-of-range` (`n`)
 */
export function possibleGrounds(
  n: number,
  geometry: CubicGeometry,
  spin: FitSpin | undefined,
  ratioCB: number,
): Ground[] {
  const { group, sign } = cubicSetting(geometry);
  const blocks = cubicBlocks(n);
  const { first, changes } = groundLevels(
    blocks.map((block) => new BlockSweep(block, sign, 1, ratioCB)),
    STRONGEST,
  );
  const weak = blocks[first]!;
  const strong = blocks[changes.at(-1)?.to ?? first]!;
  const paired = strong.multiplicity < weak.multiplicity;
  if (spin === 'low' && !paired) {
    throw new DomainError(
      'unsupported',
      `d${n} in ${geometry} has no low-spin state: leave the spin out, or say high.`,
      'spin',
    );
  }
  const as = (block: CubicBlock, name: FitSpin): Ground => ({
    spin: paired ? name : null,
    block,
    label: `${block.multiplicity}${irrepName(block, group)}`,
  });
  const all = paired ? [as(weak, 'high'), as(strong, 'low')] : [as(weak, 'high')];
  return spin && paired ? all.filter((ground) => ground.spin === spin) : all;
}
