import { dot, type Matrix3, type Vector3 } from '../geometry/vector.ts';
import { type Embedding, embeddings } from '../symmetry/embedding.ts';
import { type FiniteGroup, finiteGroup } from '../symmetry/finite-group.ts';
import { IDENTITY } from '../symmetry/matrices.ts';
import { isLinear, permutingOperations } from '../symmetry/permuting-operations.ts';
import { schoenflies } from '../symmetry/point-group.ts';
import { rotateOrbitals } from './d-orbitals.ts';
import { combine, type Matrix, within } from './matrix.ts';
import { type OverlapLigand, overlapField } from './overlap.ts';

/** The group that labels the levels of an overlap field. */
export interface FieldSetting {
  group: FiniteGroup;
  /** Rows: x, y and z of the labels, in the frame of the ligands. */
  axes: Matrix3;
  /** What one operation of each class does to the d orbitals, in the order of the table. */
  representatives: Matrix[];
}

/** Share of the strongest field by which two ligands that count as alike may differ. */
const ALIKE = 1e-5;

/**
 * The point group of ligands with their overlap parameters (anisotropic π included). Its z keeps to that of the
 * ligands' own frame where it can; the plane xz, then x, go through as many ligands as they can, so that in D4h and
 * C4v the ligands stand on x and y; else the frame's own axes stay.
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
  const setting = group && bestSetting(embeddings(group, matrices), points);
  if (!group || !setting) return null;
  return {
    group,
    axes: setting.frame.map((axis) => axis.map((x) => (Math.abs(x) < 1e-12 ? 0 : x))) as Matrix3,
    representatives: group.classes.map(({ representative }) =>
      rotateOrbitals(setting.images[group.operations.indexOf(representative)]!),
    ),
  };
}

function direction({ theta, phi }: OverlapLigand): Vector3 {
  const [t, p] = [(theta * Math.PI) / 180, (phi * Math.PI) / 180];
  return [Math.sin(t) * Math.cos(p), Math.sin(t) * Math.sin(p), Math.cos(t)];
}

function bestSetting(settings: readonly Embedding[], points: readonly Vector3[]): Embedding | undefined {
  const z = settings[0]?.frame[2];
  const isZero = (value: number): boolean => Math.abs(value) < 1e-4;
  const score = ({ frame: [x, y] }: Embedding): number =>
    points.reduce((sum, p) => sum + (isZero(dot(p, y)) ? 10 : 0) + (isZero(Math.abs(dot(p, x)) - 1) ? 1 : 0), 0);
  return settings
    .filter(({ frame }) => z && isZero(dot(frame[2], z) - 1))
    .reduce<Embedding | undefined>((best, other) => (!best || score(other) > score(best) ? other : best), undefined);
}

const cubic = new Map<string, FieldSetting>();

/** The group of a cubic field with its axes along x, y and z. */
export function cubicFieldSetting(symbol: 'Oh' | 'Td'): FieldSetting {
  const group = finiteGroup(symbol)!;
  const setting = cubic.get(symbol) ?? {
    group,
    axes: IDENTITY,
    representatives: group.classes.map(({ representative }) => rotateOrbitals(representative)),
  };
  cubic.set(symbol, setting);
  return setting;
}
