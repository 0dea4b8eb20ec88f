import { DomainError } from '../errors.ts';
import type { Geometry } from './catalogue.ts';
import type { LigandKind } from './ligand-slot.ts';
import { type Placement, placedLinks, placementsOf } from './placements.ts';

/** All ligands set down: what stands at each vertex, and which vertices are joined. */
export interface Arrangement {
  /** Number of the donor kind at each vertex; donors of different ligand kinds differ. */
  colours: number[];
  /** Which ligand stands at each vertex, numbered through all kinds. */
  owners: number[];
  links: [number, number][];
}

/** Nodes that the search may visit; eight different monodentates stay below, nine do not. */
const MAX_NODES = 200_000;

/** Donor kinds of all ligands as numbers: rare monodentates lowest, so that they come to stand on the first vertices. */
export function donorColours(kinds: readonly LigandKind[]): { labels: string[]; colourOf: number[][] } {
  const order = kinds.map((_, k) => k).sort((a, b) => rank(kinds[a]!) - rank(kinds[b]!) || a - b);
  const labels: string[] = [];
  const colourOf: number[][] = kinds.map(() => []);
  for (const k of order) {
    const first = labels.length;
    const distinct = [...new Set(kinds[k]!.pattern)];
    labels.push(...distinct);
    colourOf[k] = kinds[k]!.pattern.map((label) => first + distinct.indexOf(label));
  }
  return { labels, colourOf };
}

const rank = ({ pattern, count }: LigandKind): number => pattern.length * 10 + count;

/**
 * Every way of setting down all ligands; ligands of one kind are not told apart.
 *
 * The lowest empty vertex is always filled next, so that each way is met once.
 *
 * @throws {DomainError} `too-large` beyond a fixed number of nodes
 */
export function arrangements(geometry: Geometry, kinds: readonly LigandKind[]): Arrangement[] {
  const { colourOf } = donorColours(kinds);
  const firstOwner = kinds.map((_, k) => kinds.slice(0, k).reduce((sum, { count }) => sum + count, 0));
  const left = kinds.map(({ count }) => count);
  const covering = geometry.vertices.map((): Placement[] => []);
  for (const placement of kinds.flatMap((_, k) => placementsOf(geometry, kinds, k))) {
    covering[Math.min(...placement.vertices)]!.push(placement);
  }
  const colours: number[] = geometry.vertices.map(() => -1);
  const owners = [...colours];
  const links: [number, number][] = [];
  const found: Arrangement[] = [];
  let nodes = 0;

  const fill = (): void => {
    if (++nodes > MAX_NODES) throw new DomainError('too-large', 'too many arrangements to enumerate', 'ligands');
    const vertex = colours.indexOf(-1);
    if (vertex < 0) {
      found.push({ colours: [...colours], owners: [...owners], links: [...links] });
      return;
    }
    for (const { kind, vertices } of covering[vertex]!) {
      if (left[kind] === 0 || vertices.some((v) => colours[v] !== -1)) continue;
      const ligand = kinds[kind]!;
      const owner = firstOwner[kind]! + ligand.count - left[kind]!;
      vertices.forEach((v, donor) => {
        colours[v] = colourOf[kind]![donor]!;
        owners[v] = owner;
      });
      links.push(...placedLinks(ligand, vertices));
      left[kind]!--;
      fill();
      left[kind]!++;
      links.length -= ligand.links.length;
      for (const v of vertices) colours[v] = -1;
    }
  };
  fill();
  return found;
}

/** The arrangement after an operation that takes vertex i to vertex `permutation[i]`. */
export function moved({ colours, owners, links }: Arrangement, permutation: readonly number[]): Arrangement {
  const image: Arrangement = { colours: [], owners: [], links: [] };
  permutation.forEach((target, i) => {
    image.colours[target] = colours[i]!;
    image.owners[target] = owners[i]!;
  });
  image.links = links.map(([i, j]) => {
    const [a, b] = [permutation[i]!, permutation[j]!];
    return a < b ? [a, b] : [b, a];
  });
  return image;
}

/** The same for arrangements with the same donor kinds and links at the same vertices. */
export function arrangementKey({ colours, links }: Arrangement): string {
  const joined = links.map(([i, j]) => `${i}${j}`).sort();
  return String.fromCharCode(...colours.map((colour) => 48 + colour)) + joined.join(' ');
}
