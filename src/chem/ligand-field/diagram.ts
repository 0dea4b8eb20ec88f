import { DomainError } from '../errors.ts';
import { blockEnergies, blockParents, type CubicBlock, cubicBlocks } from './cubic-blocks.ts';
import { termLetter } from './free-ion.ts';
import { type CubicGeometry, cubicSetting, irrepName, requireStrength } from './levels.ts';

export interface DiagramRequest {
  /** d electrons, 1 to 9. */
  n: number;
  geometry: CubicGeometry;
  /** C/B. */
  ratioCB: number;
  /** Largest Δ/B; 40 unless told. */
  max?: number | undefined;
  /** Points of each curve, from 0 to `max`; 101 unless told. */
  points?: number | undefined;
}

export interface Diagram {
  group: 'Oh' | 'Td';
  /** Δ/B. */
  x: number[];
  /**
   * (E − E of the ground level)/B. Curves of one label stand in rising order; `parent` is the letter of the free-ion
   * term that a curve starts from, null where that cannot be told.
   */
  curves: { label: string; parent: string | null; y: number[] }[];
  /** Ground level over 0 < Δ/B ≤ max, in order. */
  ground: { from: number; to: number; label: string }[];
  /** Δ/B at which the ground level changes, to 1e-3 or better. */
  crossings: { x: number; from: string; to: string }[];
}

/** More would be no finer on any screen, and holds up the asker. */
const MOST_POINTS = 2001;
/** Δ/B far beyond every known complex, and with it every crossing for a C/B that occurs. */
const LARGEST = 1000;
/** Δ/B by which the search for the ground level steps on: crossings of one diagram lie far wider apart. */
const STEP = 0.1;
const MOST_STEPS = 2000;
/** Width in Δ/B to which crossings are closed in; well within the 1e-3 told. */
const PRECISION = 1e-6;

interface LabelledBlock {
  label: string;
  block: CubicBlock;
}

/**
 * Energy-level diagram of dⁿ in a cubic field: E/B against Δ/B for one C/B, with the ground level and where it changes.
 *
 * @throws DomainError `out-of-range` (fields `n`, `ratioCB`, `max`, `points`), `unsupported` (field `geometry`)
 * @see Y. Tanabe, S. Sugano, J. Phys. Soc. Jpn. 9 (1954) 766
 */
export function diagram({ n, geometry, ratioCB, max = 40, points = 101 }: DiagramRequest): Diagram {
  requireStrength(ratioCB, 'ratioCB');
  if (!(max > 0 && max <= LARGEST)) {
    throw new DomainError('out-of-range', `max must be above 0 and at most ${LARGEST}, not ${max}.`, 'max');
  }
  if (!Number.isInteger(points) || points < 2 || points > MOST_POINTS) {
    throw new DomainError('out-of-range', `points must be a whole number from 2 to ${MOST_POINTS}.`, 'points');
  }
  const { group, sign } = cubicSetting(geometry);
  const blocks = cubicBlocks(n).map((block) => ({ block, label: `${block.multiplicity}${irrepName(block, group)}` }));
  const energiesAt = (block: CubicBlock, x: number) => blockEnergies(block, { delta: sign * x, B: 1, C: ratioCB });

  const x = Array.from({ length: points }, (_, i) => (max * i) / (points - 1));
  const tables = blocks.map(({ block }) => x.map((value) => energiesAt(block, value)));
  const lowest = x.map((_, i) => Math.min(...tables.map((table) => table[i]![0]!)));
  const curves = blocks.flatMap(({ label, block }, b) =>
    blockParents(block, 1, ratioCB).map((parent, root) => ({
      label,
      parent: parent === null ? null : termLetter(parent),
      y: tables[b]!.map((energies, i) => energies[root]! - lowest[i]!),
    })),
  );

  const crossings = groundCrossings(blocks, (block, value) => energiesAt(block, value)[0]!, max);
  const edges = [0, ...crossings.map((crossing) => crossing.x), max];
  const first = crossings[0]?.from ?? groundAt(blocks, (block) => energiesAt(block, max)[0]!).label;
  const labels = [first, ...crossings.map(({ to }) => to)];
  const ground = labels.map((label, i) => ({ from: edges[i]!, to: edges[i + 1]!, label }));
  return { group, x, curves, ground, crossings };
}

function groundAt(blocks: readonly LabelledBlock[], energy: (block: CubicBlock) => number): LabelledBlock {
  let best = blocks[0]!;
  let least = energy(best.block);
  for (const candidate of blocks.slice(1)) {
    const value = energy(candidate.block);
    if (value < least) [best, least] = [candidate, value];
  }
  return best;
}

function groundCrossings(
  blocks: readonly LabelledBlock[],
  lowestOf: (block: CubicBlock, x: number) => number,
  max: number,
): Diagram['crossings'] {
  const at = (x: number): LabelledBlock => groundAt(blocks, (block) => lowestOf(block, x));
  const steps = Math.min(MOST_STEPS, Math.max(1, Math.ceil(max / STEP)));
  const crossings: Diagram['crossings'] = [];
  // At 0 the levels of the ground term of the free ion coincide: what counts is the one that a weak field puts lowest.
  let left = Math.min(1e-3, max / steps / 10);
  let ground = at(left);
  for (let i = 1; i <= steps; i++) {
    const right = (max * i) / steps;
    const next = at(right);
    for (const { x, to } of changesBetween(at, { x: left, ground }, { x: right, ground: next })) {
      crossings.push({ x, from: ground.label, to: to.label });
      ground = to;
    }
    left = right;
  }
  return crossings;
}

interface Place {
  x: number;
  ground: LabelledBlock;
}

/** Halves the interval until every change of the ground level in it lies between near neighbours. */
function changesBetween(
  at: (x: number) => LabelledBlock,
  left: Place,
  right: Place,
): { x: number; to: LabelledBlock }[] {
  if (left.ground === right.ground) return [];
  const x = (left.x + right.x) / 2;
  if (right.x - left.x < PRECISION) return [{ x, to: right.ground }];
  const middle = { x, ground: at(x) };
  return [...changesBetween(at, left, middle), ...changesBetween(at, middle, right)];
}
