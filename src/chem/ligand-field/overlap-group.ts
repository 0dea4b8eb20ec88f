import type { Vector3 } from '../geometry/vector.ts';
import { embeddings } from '../symmetry/embedding.ts';
import { type FiniteGroup, finiteGroup } from '../symmetry/finite-group.ts';
import { isLinear, permutingOperations } from '../symmetry/permuting-operations.ts';
import { schoenflies } from '../symmetry/point-group.ts';
import { rotateOrbitals } from './d-orbitals.ts';
import { combine, type Matrix, within } from './matrix.ts';
import { type OverlapLigand, overlapField } from './overlap.ts';

/** The group that labels the levels of an overlap field. */
export interface FieldSetting {
  group: FiniteGroup;
  /** What one operation of each class does to the d orbitals, in the order of the table. */
  representatives: Matrix[];
}

/** Share of the strongest field by which two ligands that count as alike may differ. */
const ALIKE = 1e-5;

/**
 * The point group of ligands with their overlap parameters (anisotropic π included), set so that its axes keep to those
 * of the ligands' own frame where they can.
 *
 * @returns null where all ligands lie on one line, and for a group that has no table
 */
export function overlapGroup(ligands: readonly OverlapLigand[]): FieldSetting | null {
  const points = ligands.map(direction);
  if (isLinear(points)) return null;
  const fields = ligands.map((ligand) => overlapField([ligand]));
  const largest = Math.max(...fields.flatMap(({ data }) => [...data].map(Math.abs)));
  const kept = permutingOperations(points).filter(({ matrix, permutation }) => {
    const back = rotateOrbitals(matrix);
    return permutation.every((image, i) => {
      // The field of ligand i is that of its image, seen in the frame turned back.
      const seen = within(back, fields[image]!);
      return combine([
        [1, seen],
        [-1, fields[i]!],
      ]).data.every((difference) => Math.abs(difference) <= ALIKE * largest);
    });
  });
  const matrices = kept.map(({ matrix }) => matrix);
  const group = finiteGroup(schoenflies(matrices));
  const setting = group && embeddings(group, matrices)[0];
  if (!group || !setting) return null;
  return {
    group,
    representatives: group.classes.map(({ representative }) =>
      rotateOrbitals(setting.images[group.operations.indexOf(representative)]!),
    ),
  };
}

function direction({ theta, phi }: OverlapLigand): Vector3 {
  const [t, p] = [(theta * Math.PI) / 180, (phi * Math.PI) / 180];
  return [Math.sin(t) * Math.cos(p), Math.sin(t) * Math.sin(p), Math.cos(t)];
}
