import { DomainError } from '../errors.ts';
import { BlockSweep } from './block-sweep.ts';
import { blockParents, cubicBlocks } from './cubic-blocks.ts';
import { termLetter } from './free-ion.ts';
import { groundLevels } from './ground-crossings.ts';
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
  /**
   * What energies are counted from: the ground level at each point (`ground`, unless told), or the ground term of the
   * free ion (`absolute`), the centre of gravity of the orbitals staying at 0.
   */
  view?: 'ground' | 'absolute' | undefined;
}

export interface Diagram {
  group: 'Oh' | 'Td';
  /** Δ/B. */
  x: number[];
  /**
   * E/B, counted from what the view tells. Curves of one label stand in rising order; `parent` is the letter of the free-ion
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
/**
 * Energy-level diagram of dⁿ in a cubic field: E/B against Δ/B for one C/B, with the ground level and where it changes.
 *
 * @throws DomainError `out-of-range` (fields `n`, `ratioCB`, `max`, `points`), `unsupported` (field `geometry`)
 * @see Y. Tanabe, S. Sugano, J. Phys. Soc. Jpn. 9 (1954) 766
 */
export function diagram({ n, geometry, ratioCB, max = 40, points = 101, view = 'ground' }: DiagramRequest): Diagram {
  requireStrength(ratioCB, 'ratioCB');
  if (!(max > 0 && max <= LARGEST)) {
    throw new DomainError('out-of-range', `max must be above 0 and at most ${LARGEST}, not ${max}.`, 'max');
  }
  if (!Number.isInteger(points) || points < 2 || points > MOST_POINTS) {
    throw new DomainError('out-of-range', `points must be a whole number from 2 to ${MOST_POINTS}.`, 'points');
  }
  const { group, sign } = cubicSetting(geometry);
  const blocks = cubicBlocks(n);
  const labels = blocks.map((block) => `${block.multiplicity}${irrepName(block, group)}`);
  const sweeps = blocks.map((block) => new BlockSweep(block, sign, 1, ratioCB));
  const x = Array.from({ length: points }, (_, i) => (max * i) / (points - 1));
  const tables = sweeps.map((sweep) => tabulate(sweep, x));

  const { first, changes } = groundLevels(sweeps, max);
  const crossings = changes.map((change) => ({ x: change.x, from: labels[change.from]!, to: labels[change.to]! }));
  const edges = [0, ...changes.map((change) => change.x), max];
  const ground = [first, ...changes.map(({ to }) => to)].map((block, i) => ({
    from: edges[i]!,
    to: edges[i + 1]!,
    label: labels[block]!,
  }));

  const origin = view === 'absolute' ? freeIonGround(tables, points) : lowestOf(tables, points);
  const curves = blocks.flatMap((block, b) =>
    blockParents(block, 1, ratioCB).map((parent, root) => ({
      label: labels[b]!,
      parent: parent === null ? null : termLetter(parent),
      y: column(tables[b]!, root, block.field.rows, origin),
    })),
  );
  return { group, x, curves, ground, crossings };
}

/** Energies of a block: one row per point. */
function tabulate(sweep: BlockSweep, x: readonly number[]): Float64Array {
  const table = new Float64Array(x.length * sweep.size);
  const values = new Float64Array(sweep.size);
  for (let i = 0; i < x.length; i++) {
    sweep.energies(x[i]!, values);
    table.set(values, i * sweep.size);
  }
  return table;
}

function lowestOf(tables: readonly Float64Array[], points: number): Float64Array {
  const lowest = new Float64Array(points).fill(Number.POSITIVE_INFINITY);
  for (const table of tables) {
    const size = table.length / points;
    for (let i = 0; i < points; i++) if (table[i * size]! < lowest[i]!) lowest[i] = table[i * size]!;
  }
  return lowest;
}

/** The lowest term without field, at every point: the view that lets curves fall and rise as they do. */
function freeIonGround(tables: readonly Float64Array[], points: number): Float64Array {
  return new Float64Array(points).fill(Math.min(...tables.map((table) => table[0]!)));
}

function column(table: Float64Array, root: number, size: number, origin: Float64Array): number[] {
  const y = new Array<number>(origin.length);
  for (let i = 0; i < origin.length; i++) y[i] = table[i * size + root]! - origin[i]!;
  return y;
}
