import { isLinear, type PermutingOperation, permutingOperations } from '../symmetry/permuting-operations.ts';
import { pointGroup } from '../symmetry/point-group.ts';
import { hullEdges } from './hull.ts';
import { polyhedra } from './polyhedra.ts';
import { dot, type Vector3 } from './vector.ts';

/** An ideal coordination polyhedron. */
export interface Geometry {
  /** IUPAC polyhedral symbol, such as `OC-6`. */
  symbol: string;
  /** Adjective for the screens: `octahedral`. */
  name: string;
  /** Noun: `octahedron`. */
  shape: string;
  coordinationNumber: number;
  /** Point group with all donors alike, in plain text: `Oh`. */
  group: string;
  /** Unit vectors from the metal; principal axis along z. */
  vertices: Vector3[];
  /** Edges of the polyhedron, pairs i < j. */
  edges: [number, number][];
  /** Pairs that a chelate ring may span: the edges. None in L-2. */
  chelateEdges: [number, number][];
}

/** All geometries, by rising coordination number. */
export const geometries: readonly Geometry[] = polyhedra.map(({ symbol, name, shape, vertices }) => {
  // Opposite donors share no edge, even where the flat hull of a T-shape or see-saw has a side through the metal.
  const edges = hullEdges(vertices).filter(([i, j]) => !areOpposite(vertices[i]!, vertices[j]!));
  const homoleptic = { colours: vertices.map(() => 0), links: [] };
  return {
    symbol,
    name,
    shape,
    coordinationNumber: vertices.length,
    group: pointGroup(permutingOperations(vertices), homoleptic, isLinear(vertices)),
    vertices,
    edges,
    chelateEdges: edges,
  };
});

const bySymbol = new Map(geometries.map((geometry) => [geometry.symbol, geometry]));
const operations = new Map<string, readonly PermutingOperation[]>();

/** The geometry with this polyhedral symbol, or null. */
export function findGeometry(symbol: string): Geometry | null {
  return bySymbol.get(symbol) ?? null;
}

/** Symmetry operations of the ideal polyhedron, found from its vertices. */
export function operationsOf(geometry: Geometry): readonly PermutingOperation[] {
  const known = operations.get(geometry.symbol) ?? permutingOperations(geometry.vertices);
  operations.set(geometry.symbol, known);
  return known;
}

/**
 * Pairs of vertices that face each other across the metal. Diagonals of the base of a square pyramid count, though
 * they make 151° and not 180°, as its donors are called trans too.
 */
export function transPairs(geometry: Geometry): [number, number][] {
  const limit = Math.cos((150 * Math.PI) / 180);
  const pairs: [number, number][] = [];
  geometry.vertices.forEach((a, i) => {
    geometry.vertices.forEach((b, j) => {
      if (i < j && dot(a, b) < limit) pairs.push([i, j]);
    });
  });
  return pairs;
}

function areOpposite(a: Vector3, b: Vector3): boolean {
  return dot(a, b) < -1 + 1e-9;
}
