import { DomainError } from '../errors.ts';
import type { Matrix3 } from '../geometry/vector.ts';
import {
  blockMatrix,
  blockParents,
  CUBIC_FIELD,
  type CubicBlock,
  cubicBlocks,
  type Strengths,
} from './cubic-blocks.ts';
import { fieldLevels, fromLowest, type Level } from './field-levels.ts';
import { termLetter } from './free-ion.ts';
import { combine, type Matrix } from './matrix.ts';
import { type OverlapLigand, overlapField } from './overlap.ts';
import { cubicFieldSetting, overlapGroup } from './overlap-group.ts';
import { type SpinOrbitLevel, spinOrbitLevels } from './spin-orbit-levels.ts';
import { symmetricEigen } from './symmetric-eigen.ts';

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
  /** One-electron spin–orbit parameter ζ; 0 unless told. */
  zeta?: number | undefined;
  /** Trees' correction α L(L + 1); 0 unless told. */
  alpha?: number | undefined;
}

/** A level as told: with spin–orbit coupling or in a cubic field there is more to say of it. */
export interface ToldLevel extends Level {
  /** Share of each configuration without spin–orbit coupling, in a cubic field: `t2g3 eg0`, rising in the field. */
  configurations?: { configuration: string; share: number }[];
  symmetry?: SpinOrbitLevel['symmetry'];
  composition?: SpinOrbitLevel['composition'];
}

export interface Levels {
  /** Point group of the labels; null for ligands on one line. */
  group: string | null;
  /**
   * x, y and z of the labels as unit vectors in the frame of the ligands, as other axes can rename irreps; null for a
   * cubic field, whose labels do not hang on them, and without a group.
   */
  axes: Matrix3 | null;
  levels: ToldLevel[];
}

/**
 * All levels of dⁿ in a ligand field by complete configuration interaction, with spin–orbit coupling where ζ is told;
 * ascending.
 *
 * A cubic field labels every level in Oh or Td, an overlap field in the group of its ligands, about the axes told.
 * Levels that coincide but differ in spin or irrep stay apart. For ligands on one line group, irrep and label are null,
 * and levels of one spin that coincide are one entry. With ζ, labels are those of the double group after Bethe.
 *
 * @throws DomainError `out-of-range` (fields `n`, `delta`, `B`, `C`, `zeta`, `alpha`, `ligands`), `unsupported`
 *   (field `geometry`)
 */
export function levels({ n, field, B, C, zeta = 0, alpha = 0 }: LevelsRequest): Levels {
  requireStrength(B, 'B');
  requireStrength(C, 'C');
  for (const [name, value] of Object.entries({ zeta, alpha })) {
    if (!Number.isFinite(value)) throw new DomainError('out-of-range', `${name} must be a number, not ${value}.`, name);
  }
  const repulsion = { B, C, alpha };
  if (field.kind === 'overlap') {
    const matrix = overlapField(field.ligands);
    const setting = overlapGroup(field.ligands);
    return {
      group: setting?.group.symbol ?? null,
      axes: setting?.axes ?? null,
      levels:
        zeta === 0 ? fieldLevels(n, matrix, repulsion, setting) : spinOrbitLevels(n, matrix, repulsion, zeta, setting),
    };
  }
  requireStrength(field.delta, 'delta');
  const { group, sign } = cubicSetting(field.geometry);
  const delta = sign * field.delta;
  if (zeta !== 0) {
    const matrix = combine([[delta, CUBIC_FIELD]]);
    return { group, axes: null, levels: spinOrbitLevels(n, matrix, repulsion, zeta, cubicFieldSetting(group)) };
  }
  const found = cubicBlocks(n).flatMap((block) => cubicLevels(block, group, { delta, ...repulsion }));
  return { group, axes: null, levels: fromLowest(found) };
}

function cubicLevels(block: CubicBlock, group: 'Oh' | 'Td', strengths: Strengths): ToldLevel[] {
  const { B, C, alpha } = strengths;
  const parents = blockParents(block, B, C, alpha);
  const irrep = irrepName(block, group);
  const { values, vectors } = symmetricEigen(blockMatrix(block, strengths));
  return values.map((energy, k) => ({
    energy,
    degeneracy: block.multiplicity * block.dimension,
    multiplicity: block.multiplicity,
    irrep,
    label: `${block.multiplicity}${irrep}`,
    parent: parents[k] == null ? null : termLetter(parents[k]),
    configurations: configurationsOf(block, group, vectors, k),
  }));
}

function configurationsOf(
  { upper, electrons }: CubicBlock,
  group: 'Oh' | 'Td',
  vectors: Matrix,
  level: number,
): { configuration: string; share: number }[] {
  const g = group === 'Oh' ? 'g' : '';
  return [...new Set(upper)].map((m) => ({
    configuration: `t2${g}${electrons - m} e${g}${m}`,
    share: upper.reduce((sum, own, i) => (own === m ? sum + vectors.data[i * upper.length + level]! ** 2 : sum), 0),
  }));
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
