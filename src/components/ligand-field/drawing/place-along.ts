/** A label that wants to stand at a place along a side of a plot. */
export interface SideLabel {
  /** Where its middle would best be, px. */
  at: number;
  /** How much of the side it takes, px. */
  size: number;
  /** Low ones stay when there is no room for all. */
  rank: number;
}

/**
 * Places labels along one side so that none lies on another, all lie between the ends, their order is kept and the sum
 * of the squared shifts is least.
 *
 * @returns the middle of each label in the order given; null where there was no room
 * @see isotonic regression by pooling adjacent violators
 */
export function placeAlong(
  labels: readonly SideLabel[],
  { from, to, gap = 2 }: { from: number; to: number; gap?: number },
): (number | null)[] {
  const chosen = thoseThatFit(labels, to - from, gap).sort((a, b) => labels[a]!.at - labels[b]!.at || a - b);
  const placed: (number | null)[] = labels.map(() => null);
  // Room that the labels before it need, so that all that is left to ask is a rising order.
  const offsets: number[] = [];
  let room = 0;
  for (const index of chosen) {
    const { size } = labels[index]!;
    offsets.push(room + size / 2);
    room += size + gap;
  }
  const free = to - from - (room - gap);
  const rising = isotonic(chosen.map((index, k) => labels[index]!.at - from - offsets[k]!));
  chosen.forEach((index, k) => {
    placed[index] = from + offsets[k]! + Math.min(Math.max(rising[k]!, 0), Math.max(free, 0));
  });
  return placed;
}

/** Indices of labels by rank, until the side is full. */
function thoseThatFit(labels: readonly SideLabel[], length: number, gap: number): number[] {
  const byRank = labels.map((_, i) => i).sort((a, b) => labels[a]!.rank - labels[b]!.rank || a - b);
  let used = -gap;
  return byRank.filter((index) => {
    const next = used + labels[index]!.size + gap;
    if (next > length) return false;
    used = next;
    return true;
  });
}

/** The rising sequence nearest to the values, by least squares. */
function isotonic(values: readonly number[]): number[] {
  const pools: { sum: number; count: number }[] = [];
  const mean = (pool: { sum: number; count: number }) => pool.sum / pool.count;
  for (const value of values) {
    pools.push({ sum: value, count: 1 });
    while (pools.length > 1 && mean(pools.at(-2)!) > mean(pools.at(-1)!)) {
      const last = pools.pop()!;
      const before = pools.at(-1)!;
      before.sum += last.sum;
      before.count += last.count;
    }
  }
  return pools.flatMap((pool) => Array.from({ length: pool.count }, () => mean(pool)));
}
