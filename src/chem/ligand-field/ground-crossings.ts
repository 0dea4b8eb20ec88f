import type { BlockSweep } from './block-sweep.ts';

/** A change of the ground level from one block to another, by their places in the list. */
export interface GroundChange {
  x: number;
  from: number;
  to: number;
}

/** The ground level from just above 0 to `max`. */
export interface GroundLevels {
  first: number;
  changes: GroundChange[];
}

/** Width in Δ/B to which crossings are closed in. */
const PRECISION = 1e-6;
/** Share of the range below which a ground level of both ends is that of all between. */
const NARROW = 1e-4;
/** Energies in B that are told apart. */
const APART = 1e-9;

interface Place {
  x: number;
  /** Lowest energy of each block that is still in question; others stay out of the account. */
  energies: Float64Array;
  ground: number;
  slope: number;
}

/**
 * Which block holds the ground level over 0 < x ≤ max, and where that changes.
 *
 * The lowest level of a block is concave in x: it runs above its chords and below its tangents. Between two points a
 * block can therefore be left out whose chord stays above a tangent of the ground level, and two blocks whose slopes
 * there keep apart cross once: no change is overlooked, however wide the steps.
 */
export function groundLevels(sweeps: readonly BlockSweep[], max: number): GroundLevels {
  const search = new Search(sweeps, max);
  // At 0 the levels of the ground term of the free ion coincide: what counts is the one that a weak field puts lowest.
  const all = [...sweeps.keys()];
  const left = search.at(Math.min(1e-3, max / 1000), all);
  return { first: left.ground, changes: search.between(left, search.at(max, all), all) };
}

class Search {
  readonly #values: Float64Array;

  constructor(
    readonly sweeps: readonly BlockSweep[],
    readonly max: number,
  ) {
    this.#values = new Float64Array(Math.max(...sweeps.map(({ size }) => size)));
  }

  at(x: number, blocks: readonly number[]): Place {
    const energies = new Float64Array(this.sweeps.length);
    let ground = blocks[0]!;
    for (const b of blocks) {
      this.sweeps[b]!.energies(x, this.#values);
      energies[b] = this.#values[0]!;
      if (energies[b]! < energies[ground]! - APART) ground = b;
    }
    return { x, energies, ground, slope: this.sweeps[ground]!.lowest(x).slope };
  }

  between(left: Place, right: Place, blocks: readonly number[]): GroundChange[] {
    const same = left.ground === right.ground;
    const width = right.x - left.x;
    if (same && width < NARROW * this.max) return [];
    if (width < PRECISION) return [{ x: left.x + width / 2, from: left.ground, to: right.ground }];
    const open = blocks.filter((b) => b === left.ground || b === right.ground || mayBeGround(b, left, right));
    if (same && open.length === 1) return [];
    if (!same && open.length === 2 && this.#crossOnce(left, right)) {
      return [{ x: this.#crossing(left, right), from: left.ground, to: right.ground }];
    }
    const middle = this.at(left.x + width / 2, open);
    return [...this.between(left, middle, open), ...this.between(middle, right, open)];
  }

  /** Slopes of concave levels fall: if the old ground is steeper at the end than the new one at the start, they part. */
  #crossOnce(left: Place, right: Place): boolean {
    return this.sweeps[left.ground]!.lowest(right.x).slope > this.sweeps[right.ground]!.lowest(left.x).slope;
  }

  /** Newton's steps on the difference of the two levels, within the bracket. */
  #crossing(left: Place, right: Place): number {
    let [low, high] = [left.x, right.x];
    let x = (low + high) / 2;
    while (high - low > PRECISION * 1e-3) {
      const [before, after] = [this.sweeps[left.ground]!.lowest(x), this.sweeps[right.ground]!.lowest(x)];
      const difference = before.energy - after.energy;
      if (difference < 0) low = x;
      else high = x;
      const step = difference / (before.slope - after.slope);
      const next = x - step;
      if (Math.abs(step) < PRECISION * 1e-3) return next;
      x = next > low && next < high ? next : (low + high) / 2;
    }
    return x;
  }
}

/** Whether the chord of a block comes below both tangents of the ground level somewhere between two places. */
function mayBeGround(block: number, left: Place, right: Place): boolean {
  const width = right.x - left.x;
  const [a, b] = [left.energies[left.ground]!, right.energies[right.ground]!];
  const bend = left.slope - right.slope;
  // The tangents meet here; without a bend they are one line, and the ends tell all.
  const at = bend > 1e-12 ? Math.min(width, Math.max(0, (b - a - right.slope * width) / bend)) : 0;
  const upper = Math.min(a + left.slope * at, b + right.slope * (at - width));
  const chord = left.energies[block]! + ((right.energies[block]! - left.energies[block]!) * at) / width;
  return chord < upper + APART;
}
