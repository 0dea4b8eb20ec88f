import { DomainError } from '../errors.ts';
import type { Geometry } from './catalogue.ts';
import type { LigandKind } from './ligand-slot.ts';
import { cross, dot, length, normalise, subtract, type Vector3 } from './vector.ts';

/** One ligand set down on a polyhedron. */
export interface Placement {
  /** Index into the list of ligand kinds. */
  kind: number;
  /** Vertex of each donor, in the order of the pattern. */
  vertices: number[];
}

/** Steps that setting down one ligand may take. */
const MAX_STEPS = 100_000;
/** Farthest that the plane of a meridional ligand passes from the metal, in bond lengths. */
const PLANE_OFFSET = 0.3;

/**
 * Every way of setting down one ligand on the empty polyhedron, linked donors on vertices that share an edge. Ways
 * that differ only in the direction in which a symmetric ligand is read are one.
 *
 * @throws {DomainError} `too-large` beyond a fixed number of steps
 */
export function placementsOf(geometry: Geometry, kinds: readonly LigandKind[], kind: number): Placement[] {
  const ligand = kinds[kind]!;
  const adjacent = adjacency(geometry);
  const found = new Map<string, Placement>();
  let steps = 0;

  const extend = (vertices: number[]): void => {
    if (++steps > MAX_STEPS) throw new DomainError('too-large', 'a ligand has too many ways to be placed', 'ligands');
    const donor = vertices.length;
    if (donor === ligand.pattern.length) {
      const shaped = spanFits(ligand, vertices, adjacent) && planeFits(ligand, vertices, geometry.vertices);
      if (shaped) found.set(placementKey(ligand, vertices), { kind, vertices });
      return;
    }
    const anchors = ligand.links.flatMap(([a, b]) => (b === donor && a < donor ? [vertices[a]!] : []));
    for (let vertex = 0; vertex < geometry.coordinationNumber; vertex++) {
      const free = !vertices.includes(vertex) && anchors.every((anchor) => adjacent[anchor]![vertex]);
      if (free) extend([...vertices, vertex]);
    }
  };
  extend([]);
  return [...found.values()];
}

/** Chelate links of a placement as pairs of vertices i < j. */
export function placedLinks(ligand: LigandKind, vertices: readonly number[]): [number, number][] {
  return ligand.links.map(([a, b]) => {
    const [i, j] = [vertices[a]!, vertices[b]!];
    return i < j ? [i, j] : [j, i];
  });
}

/** The same for placements that put the same donor kinds and links on the same vertices. */
export function placementKey(ligand: LigandKind, vertices: readonly number[]): string {
  const donors = vertices.map((vertex, k) => `${vertex}${ligand.pattern[k]}`).sort();
  return JSON.stringify([donors, placedLinks(ligand, vertices).map(String).sort()]);
}

function adjacency(geometry: Geometry): boolean[][] {
  const table = geometry.vertices.map(() => geometry.vertices.map(() => false));
  for (const [i, j] of geometry.chelateEdges) {
    table[i]![j] = true;
    table[j]![i] = true;
  }
  return table;
}

function spanFits({ span }: LigandKind, vertices: readonly number[], adjacent: readonly boolean[][]): boolean {
  if (span === 'either') return true;
  return adjacent[vertices[0]!]![vertices.at(-1)!] === (span === 'fac');
}

/** Four or more donors of a planar ligand lie in a plane; three always do, so theirs must also pass the metal. */
function planeFits({ planar }: LigandKind, vertices: readonly number[], points: readonly Vector3[]): boolean {
  if (!planar || vertices.length < 3) return true;
  const [a, b, c, ...rest] = vertices.map((vertex) => points[vertex]!);
  const normal = normalise(cross(subtract(b!, a!), subtract(c!, a!)));
  if (!Number.isFinite(length(normal))) return true;
  if (rest.length === 0) return Math.abs(dot(normal, a!)) < PLANE_OFFSET;
  return rest.every((point) => Math.abs(dot(normal, subtract(point, a!))) < 1e-6);
}
