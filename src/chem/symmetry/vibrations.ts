import { DomainError } from '../errors.ts';
import { findGeometry, operationsOf } from '../geometry/catalogue.ts';
import type { Embedding } from './embedding.ts';
import { type IrrepCount, requireFinite } from './groups.ts';
import { linearVibrations } from './linear-vibrations.ts';
import { modesOfAtoms } from './modes-of-atoms.ts';
import { isLinear } from './permuting-operations.ts';
import { pointGroup, stabiliser } from './point-group.ts';

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
  /** Stretches of the bonds, in a skeleton those from metal to donor; these are among the vibrations. */
  stretches: IrrepCount[];
  /** The vibrations that are left: changes of angles. Null where the bonds close so many rings that none are left. */
  bends: IrrepCount[] | null;
  /** Irreps of the atoms as such, which the operations permute. */
  permutation: IrrepCount[];
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
export function vibrations(skeleton: Skeleton): SkeletonVibrations {
  return skeletonModes(skeleton).modes;
}

/**
 * Normal modes with the setting of the group in the frame of the polyhedron; null for a line, which has no such
 * setting. Errors as `vibrations`.
 */
export function skeletonModes({ geometry: symbol, sites, links = [] }: Skeleton): {
  modes: SkeletonVibrations;
  setting: Embedding | null;
} {
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
  if (linear) return { modes: linearVibrations(group, n + 1), setting: null };
  const matrices = stabiliser(operationsOf(geometry), points).map(({ matrix }) => matrix);
  return modesOfAtoms(requireFinite(group, 'geometry'), matrices, {
    positions: [[0, 0, 0], ...vertices],
    bonds: vertices.map((_, i) => [0, i + 1]),
    guides: vertices,
  });
}
