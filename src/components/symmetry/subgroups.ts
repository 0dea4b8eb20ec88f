import { descend, groups } from '#src/chem/symmetry/index.ts';

const known = new Map<string, string[]>();

/** Proper subgroups of a group, from high to low; of a linear group those that keep its axis. */
export function subgroupsOf(symbol: string): string[] {
  const own = known.get(symbol) ?? find(symbol);
  known.set(symbol, own);
  return own;
}

function find(symbol: string): string[] {
  const order = groups.find((group) => group.symbol === symbol)?.order ?? null;
  return groups
    .filter(
      (other) =>
        other.symbol !== symbol &&
        (order === null || (other.order !== null && order % other.order === 0 && other.order < order)),
    )
    .filter((other) => isBelow(symbol, other.symbol))
    .sort((a, b) => (b.order ?? Number.POSITIVE_INFINITY) - (a.order ?? Number.POSITIVE_INFINITY))
    .map((other) => other.symbol);
}

function isBelow(symbol: string, other: string): boolean {
  try {
    descend(symbol, other, []);
    return true;
  } catch {
    return false; // no subgroup
  }
}
