import { DomainError } from '../errors.ts';
import { configurationSpace, oneElectron } from './configuration-space.ts';
import { blockEnergies, blockParents, type CubicBlock, cubicBlocks } from './cubic-blocks.ts';
import { termLetter } from './free-ion.ts';
import { combine, identity, type Matrix, within } from './matrix.ts';
import { type OverlapLigand, overlapField } from './overlap.ts';
import { quantumNumber, splitBy } from './subspaces.ts';
import { symmetricEigenvalues } from './symmetric-eigen.ts';

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

export interface Level {
  /** Above the lowest level, in the unit of the request. */
  energy: number;
  /** Spin components counted. */
  degeneracy: number;
  /** 2S + 1. */
  multiplicity: number;
  irrep: string | null;
  /** Multiplicity with irrep: `4T1g`. */
  label: string | null;
  /** Letter of the free-ion term it rises from, `F` in 4T1g(F); null where that cannot be told. */
  parent: string | null;
}

export interface Levels {
  group: 'Oh' | 'Td' | null;
  levels: Level[];
}

/** Levels of one spin nearer than this share of field and repulsion are one: angles come with few decimals. */
const COINCIDENT = 1e-6;

/**
 * All levels of dⁿ in a ligand field without spin–orbit coupling, by complete configuration interaction; ascending.
 *
 * A cubic field labels every level in Oh or Td; levels that coincide but differ in spin or irrep stay apart. An overlap
 * field tells multiplicity and degeneracy; group, irrep and label are null, and levels of one spin that coincide by
 * accident are one entry.
 *
 * @throws DomainError `out-of-range` (fields `n`, `delta`, `B`, `C`, `ligands`), `unsupported` (field `geometry`)
 */
export function levels({ n, field, B, C }: LevelsRequest): Levels {
  requireStrength(B, 'B');
  requireStrength(C, 'C');
  if (field.kind === 'overlap') return { group: null, levels: fieldLevels(n, overlapField(field.ligands), B, C) };
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
  return { group, levels: fromLowest(found) };
}

/**
 * Levels of dⁿ in any one-electron field, a symmetric 5 × 5 matrix over z², x²−y², xy, xz, yz, without labels.
 *
 * @throws DomainError `out-of-range` (field `n`)
 */
export function fieldLevels(n: number, field: Matrix, B: number, C: number): Level[] {
  const space = configurationSpace(n);
  const tolerance = COINCIDENT * (Math.max(...field.data.map(Math.abs)) + B + C);
  const hamiltonian = combine([
    [1, oneElectron(field, space.substitutions)],
    [B, space.B],
    [C, space.C],
  ]);
  const found = spinSpaces(n).flatMap(({ multiplicity, basis }) => {
    const energies = symmetricEigenvalues(within(basis, hamiltonian));
    const starts = energies.flatMap((e, i) => (i === 0 || e - energies[i - 1]! > tolerance ? [i] : []));
    const groups = starts.map((start, k) => energies.slice(start, starts[k + 1]));
    return groups.map((group) => ({
      energy: group.reduce((sum, energy) => sum + energy, 0) / group.length,
      degeneracy: multiplicity * group.length,
      multiplicity,
      irrep: null,
      label: null,
      parent: null,
    }));
  });
  return fromLowest(found);
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

function fromLowest(found: Level[]): Level[] {
  const lowest = Math.min(...found.map(({ energy }) => energy));
  return found
    .map((level) => ({ ...level, energy: level.energy - lowest }))
    .sort((a, b) => a.energy - b.energy || b.multiplicity - a.multiplicity);
}

const spins = new Map<number, { multiplicity: number; basis: Matrix }[]>();

/** The space of dⁿ by spin, built once for each n. */
function spinSpaces(n: number): { multiplicity: number; basis: Matrix }[] {
  const space = configurationSpace(n);
  const spaces =
    spins.get(n) ??
    splitBy(space.spinSquared, identity(space.size)).map(({ value, basis }) => ({
      multiplicity: Math.round(2 * quantumNumber(value)) + 1,
      basis,
    }));
  spins.set(n, spaces);
  return spaces;
}
