import { DomainError } from '../errors.ts';
import type { Matrix3 } from '../geometry/vector.ts';
import { blockEnergies, blockParents, type CubicBlock, cubicBlocks } from './cubic-blocks.ts';
import { fieldLevels, fromLowest, type Level } from './field-levels.ts';
import { termLetter } from './free-ion.ts';
import { type OverlapLigand, overlapField } from './overlap.ts';
import { overlapGroup } from './overlap-group.ts';

export type CubicGeometry = 'OC-6' | 'T-4' | 'CU-8';

export const CUBIC_GEOMETRIES: readonly CubicGeometry[] = ['OC-6', 'T-4', 'CU-8'];

export type Field =
  | { kind: 'cubic'; geometry: CubicGeometry; delta: number }
  | { kind: 'overlap'; ligands: readonly OverlapLigand[] };

export interface LevelsRequest {
  /** d electrons, 1 to 9. */
  n: number;
  /** Δ of that geometry, or overlap parameters, in cm⁻¹ (any one unit serves). */
  field: Field;
  /** Racah parameters in the unit of the field. */
  B: number;
  C: number;
}

export interface Levels {
  /** Point group of the labels; null for ligands on one line. */
  group: string | null;
  /**
   * x, y and z of the labels as unit vectors in the frame of the ligands, as other axes can rename irreps; null for a
   * cubic field, whose labels do not hang on them, and without a group.
   */
  axes: Matrix3 | null;
  levels: Level[];
}

/**
 * All levels of dⁿ in a ligand field without spin–orbit coupling, by complete configuration interaction; ascending.
 *
 * A cubic field labels every level in Oh or Td, an overlap field in the group of its ligands, about the axes told.
 * Levels that coincide but differ in spin or irrep stay apart. For ligands on one line group, irrep and label are null,
 * and levels of one spin that coincide are one entry.
 *
 * @throws DomainError `out-of-range` (fields `n`, `delta`, `B`, `C`, `ligands`), `unsupported` (field `geometry`)
 */
export function levels({ n, field, B, C }: LevelsRequest): Levels {
  requireStrength(B, 'B');
  requireStrength(C, 'C');
  if (field.kind === 'overlap') {
    const matrix = overlapField(field.ligands);
    const setting = overlapGroup(field.ligands);
    return {
      group: setting?.group.symbol ?? null,
      axes: setting?.axes ?? null,
      levels: fieldLevels(n, matrix, B, C, setting),
    };
  }
  requireStrength(field.delta, 'delta');
  const { group, sign } = cubicSetting(field.geometry);
  const strengths = { delta: sign * field.delta, B, C };
  const found = cubicBlocks(n).flatMap((block) => {
    const parents = blockParents(block, B, C);
    const irrep = irrepName(block, group);
    return blockEnergies(block, strengths).map((energy, i) => ({
      energy,
      degeneracy: block.multiplicity * block.dimension,
      multiplicity: block.multiplicity,
      irrep,
      label: `${block.multiplicity}${irrep}`,
      parent: parents[i] == null ? null : termLetter(parents[i]),
    }));
  });
  return { group, axes: null, levels: fromLowest(found) };
}

/** Group in which a cubic field labels its levels, and the sign of Δ with e above t2. */
export function cubicSetting(geometry: CubicGeometry): { group: 'Oh' | 'Td'; sign: 1 | -1 } {
  if (!CUBIC_GEOMETRIES.includes(geometry)) {
    throw new DomainError('unsupported', `A cubic field is that of OC-6, T-4 or CU-8, not of ${geometry}.`, 'geometry');
  }
  return { group: geometry === 'T-4' ? 'Td' : 'Oh', sign: geometry === 'OC-6' ? 1 : -1 };
}

/** Name of a block's irrep; states of d electrons are even where there is a centre. */
export function irrepName(block: CubicBlock, group: 'Oh' | 'Td'): string {
  return group === 'Oh' ? `${block.irrep}g` : block.irrep;
}

export function requireStrength(value: number, field: string): void {
  if (!Number.isFinite(value) || value < 0) {
    throw new DomainError('out-of-range', `${field} must be a number, 0 or more, not ${value}.`, field);
  }
}
