import { DomainError } from '../errors.ts';
import { findGeometry, operationsOf } from '../geometry/catalogue.ts';
import type { Matrix3, Vector3 } from '../geometry/vector.ts';
import { apply, determinant, dot, length, subtract, trace } from '../geometry/vector.ts';
import { type Embedding, embeddings } from './embedding.ts';
import type { FiniteGroup } from './finite-group.ts';
import { type IrrepCount, requireFinite } from './groups.ts';
import { linearVibrations } from './linear-vibrations.ts';
import { isLinear } from './permuting-operations.ts';
import { pointGroup, stabiliser } from './point-group.ts';
import { reduce } from './products.ts';

/** A skeleton of metal and donor atoms. */
export interface Skeleton {
  /** Polyhedral symbol: `OC-6`. */
  geometry: string;
  /** Kind of each donor, in the order of the polyhedron's vertices; only equality matters. */
  sites: readonly string[];
  /** Pairs of donors, by index, that a chelate ring joins; the rings lower the group and add no atoms. */
  links?: readonly (readonly [number, number])[];
}

/** Normal modes of one irrep. */
export interface Vibration extends IrrepCount {
  /** Moves the dipole moment: a fundamental shows in the infrared. */
  infrared: boolean;
  /** Changes the polarisability: a fundamental shows in the Raman spectrum. */
  raman: boolean;
}

/** Modes of a skeleton, sorted by irrep. */
export interface SkeletonVibrations {
  group: string;
  /** All 3N displacements. */
  total: IrrepCount[];
  /** Without translations and rotations. */
  vibrations: Vibration[];
  /** Stretches of the bonds from metal to donor; these are among the vibrations. */
  stretches: IrrepCount[];
  /** Which axes the labels hang on. */
  axes: string;
}

/**
 * Normal modes of the skeleton of a complex: metal and donor atoms alone.
 *
 * Where the labels leave a choice of axes, x (or the plane xz) goes through as many donors as it can, so that in D4h
 * and C4v the ligands stand on x and y.
 *
 * @throws DomainError `unknown-symbol` on `geometry`, `out-of-range` on `sites` or `links`
 */
export function vibrations({ geometry: symbol, sites, links = [] }: Skeleton): SkeletonVibrations {
  const geometry = findGeometry(symbol);
  if (!geometry) throw new DomainError('unknown-symbol', `No geometry has the symbol “${symbol}”.`, 'geometry');
  const { vertices, coordinationNumber: n } = geometry;
  if (sites.length !== n) {
    throw new DomainError('out-of-range', `${symbol} has ${n} sites; ${sites.length} were given.`, 'sites');
  }
  if (links.some((pair) => pair.some((i) => !Number.isInteger(i) || i < 0 || i >= n))) {
    throw new DomainError('out-of-range', `A link joins two sites, numbered 0 to ${n - 1}.`, 'links');
  }
  const points = { colours: sites, links };
  const linear = isLinear(vertices);
  const group = pointGroup(operationsOf(geometry), points, linear);
  if (linear) return linearVibrations(group, n + 1);
  const matrices = stabiliser(operationsOf(geometry), points).map(({ matrix }) => matrix);
  return finiteVibrations(requireFinite(group, 'geometry'), matrices, vertices);
}

function finiteVibrations(
  group: FiniteGroup,
  matrices: readonly Matrix3[],
  vertices: readonly Vector3[],
): SkeletonVibrations {
  const { frame, images } = bestSetting(group, matrices, vertices);
  const operations = group.classes.map(({ representative }) => images[group.operations.indexOf(representative)]!);
  const stays = operations.map((m) => vertices.filter((v) => length(subtract(apply(m, v), v)) < 1e-4).length);
  const vector = operations.map(trace);
  const axial = operations.map((m) => trace(m) * Math.sign(determinant(m)));
  // Γ(3N): each atom that stays put gives the character of a vector, and the metal always stays.
  const all = vector.map((x, c) => x * (stays[c]! + 1));
  const squares = group.powerClass(2);
  const quadratic = vector.map((x, c) => (x * x + vector[squares[c]!]!) / 2);
  const [polar, tensor] = [vector, quadratic].map((row) => new Set(reduce(group, row).map(({ irrep }) => irrep)));
  return {
    group: group.symbol,
    total: reduce(group, all),
    vibrations: reduce(
      group,
      all.map((x, c) => x - vector[c]! - axial[c]!),
    ).map((term) => ({
      ...term,
      infrared: polar!.has(term.irrep),
      raman: tensor!.has(term.irrep),
    })),
    stretches: reduce(group, stays),
    axes: axesText(frame, vertices),
  };
}

/** The setting whose plane xz holds the most donors, then whose x does; the polyhedron's own axes win a tie. */
function bestSetting(group: FiniteGroup, matrices: readonly Matrix3[], vertices: readonly Vector3[]): Embedding {
  const score = ({ frame: [x, y] }: Embedding): number =>
    vertices.reduce((sum, v) => sum + (Math.abs(dot(v, y)) < 1e-4 ? 10 : 0) + (onAxis(v, x) ? 1 : 0), 0);
  return embeddings(group, matrices).reduce((best, other) => (score(other) > score(best) ? other : best));
}

const onAxis = (v: Vector3, axis: Vector3): boolean => Math.abs(Math.abs(dot(v, axis)) - length(v)) < 1e-4;

function axesText([x, y, z]: Matrix3, vertices: readonly Vector3[]): string {
  const on = (axis: Vector3): string => `${vertices.filter((v) => onAxis(v, axis)).length}`;
  return `Donors on the axes of the labels: ${on(x)} on x, ${on(y)} on y, ${on(z)} on z.`;
}
