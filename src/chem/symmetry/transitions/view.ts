import { findGeometry } from '../../geometry/catalogue.ts';
import { descend } from '../descent.ts';
import { finiteGroup } from '../finite-group.ts';
import type { IrrepCount } from '../groups.ts';
import { reduce } from '../products.ts';
import { type Skeleton, skeletonModes } from '../vibrations.ts';

/** A group to judge transitions in, with what irreps of the ideal polyhedron become in it. */
export interface View {
  group: string;
  /** The axes of its labels, in words. */
  axes: string;
  /** Irreps of the vibrations of metal and donors. */
  modes: string[];
  descent: (irrep: string) => IrrepCount[];
}

/** The view of a skeleton as its sites and rings are: the subgroup lies where they put it. */
export function viewOfSkeleton(skeleton: Skeleton): View {
  const parent = findGeometry(skeleton.geometry)!.group;
  const { modes, setting } = skeletonModes(skeleton);
  const [over, own] = [finiteGroup(parent), finiteGroup(modes.group)];
  const fusion =
    over &&
    own &&
    setting &&
    own.classes.map(({ representative }) =>
      over.classOfMatrix(setting.images[own.operations.indexOf(representative)]!),
    );
  const placed = fusion && !fusion.includes(null) ? (fusion as number[]) : null;
  return {
    group: modes.group,
    axes: modes.axes,
    modes: modes.vibrations.map(({ irrep }) => irrep),
    descent: (irrep) => {
      const row = over?.irreps.find(({ label }) => label === irrep)?.characters;
      if (!own || !placed || !row) return descend(parent, modes.group, [irrep]).maps[0]!.terms;
      return reduce(
        own,
        placed.map((c) => row[c]!),
      );
    },
  };
}

/**
 * The view of a group chosen for analysis, by the usual way in which it lies in the polyhedron's.
 *
 * @throws DomainError `unsupported` when it is no subgroup, `unknown-symbol`
 */
export function viewOfGroup(geometry: string, group: string): View {
  const { vertices, group: parent } = findGeometry(geometry)!;
  const ideal = skeletonModes({ geometry, sites: vertices.map(() => 'A') }).modes;
  const descent = (irrep: string): IrrepCount[] => descend(parent, group, [irrep]).maps[0]!.terms;
  const { along, choices } = descend(parent, group, []);
  const modes = ideal.vibrations.flatMap(({ irrep }) => descent(irrep).map((term) => term.irrep));
  return {
    group,
    axes:
      choices.length > 1 ? `${group} lies in ${parent} through ${along}.` : `${group} lies in ${parent} in one way.`,
    modes: [...new Set(modes)],
    descent,
  };
}
