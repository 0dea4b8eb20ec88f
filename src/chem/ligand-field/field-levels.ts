import { reduce } from '../symmetry/products.ts';
import { configurationSpace } from './configuration-space.ts';
import { type Matrix, product } from './matrix.ts';
import type { FieldSetting } from './overlap-group.ts';
import { type Repulsion, type SpinSpace, spinMatrix, spinSpaces } from './spin-spaces.ts';
import { symmetricEigen } from './symmetric-eigen.ts';
import { turnStates } from './turns.ts';

export interface Level {
  /** Above the lowest level, in the unit of the request. */
  energy: number;
  /** Spin components counted. */
  degeneracy: number;
  /** 2S + 1; null where spin–orbit coupling mixes spins. */
  multiplicity: number | null;
  /** Of the point group; with spin–orbit coupling of its double group, after Bethe: `Γ8+`. */
  irrep: string | null;
  /** Multiplicity with irrep: `4T1g`; with spin–orbit coupling the irrep alone. */
  label: string | null;
  /** Letter of the free-ion term it rises from, `F` in 4T1g(F); null where that cannot be told. */
  parent: string | null;
}

/** Levels of one spin nearer than this share of field and repulsion are one: angles come with few decimals. */
const COINCIDENT = 1e-6;

/** Energy difference up to which levels of this field and repulsion count as one. */
export function coincidence(field: Matrix, { B, C }: Repulsion): number {
  return COINCIDENT * (Math.max(...field.data.map(Math.abs)) + B + C);
}

/**
 * Levels of dⁿ in any one-electron field, a symmetric 5 × 5 matrix over z², x²−y², xy, xz, yz; ascending.
 *
 * @param setting - group of the field, for the labels; without it they are null
 * @throws DomainError `out-of-range` (field `n`)
 */
export function fieldLevels(
  n: number,
  field: Matrix,
  repulsion: Repulsion,
  setting: FieldSetting | null = null,
): Level[] {
  return fromLowest(fieldEnergies(n, field, repulsion, setting));
}

/** The same, with energies as they are: the field's own and the repulsion with Racah's A = 0. */
export function fieldEnergies(n: number, field: Matrix, repulsion: Repulsion, setting: FieldSetting | null): Level[] {
  const found = fieldStates(n, field, repulsion, setting).flatMap(({ space: { multiplicity }, groups }) =>
    groups.flatMap(({ energy, members, parts }) =>
      (parts ?? [{ irrep: null, dimension: members.length }]).map(({ irrep, dimension }) => ({
        energy,
        degeneracy: multiplicity * dimension,
        multiplicity,
        irrep,
        label: irrep === null ? null : `${multiplicity}${irrep}`,
        parent: null,
      })),
    ),
  );
  return rising(found);
}

/** The eigenstates of one spin. */
export interface FieldStates {
  space: SpinSpace;
  values: number[];
  /** Over the basis of the space, by column. */
  vectors: Matrix;
  /** States that coincide, with the irreps they form; null without a group, or in a field lower than its group. */
  groups: { energy: number; members: number[]; parts: { irrep: string; dimension: number }[] | null }[];
}

/** Eigenstates of dⁿ in a field, spin by spin. */
export function fieldStates(
  n: number,
  field: Matrix,
  repulsion: Repulsion,
  setting: FieldSetting | null,
): FieldStates[] {
  const tolerance = coincidence(field, repulsion);
  return spinSpaces(n).map((space) => {
    const { values, vectors } = symmetricEigen(spinMatrix(space, field, repulsion));
    const groups = groupsOf(values, tolerance);
    const characters = setting ? charactersOf(n, product(space.basis, vectors), groups, setting) : null;
    return {
      space,
      values,
      vectors,
      groups: groups.map((members, g) => ({
        energy: members.reduce((sum, i) => sum + values[i]!, 0) / members.length,
        members,
        parts: setting && characters ? irrepsOf(setting, characters[g]!, members.length) : null,
      })),
    };
  });
}

/** Levels with energies counted from the lowest, ascending. */
export function fromLowest<L extends Level>(found: readonly L[]): L[] {
  const lowest = Math.min(...found.map(({ energy }) => energy));
  return rising(found.map((level) => ({ ...level, energy: level.energy - lowest })));
}

function rising<L extends Level>(levels: readonly L[]): L[] {
  return [...levels].sort((a, b) => a.energy - b.energy || (b.multiplicity ?? 0) - (a.multiplicity ?? 0));
}

/** Indices of ascending values, parted where they lie apart. */
export function groupsOf(values: ArrayLike<number>, tolerance: number): number[][] {
  const groups: number[][] = [];
  for (let i = 0; i < values.length; i++) {
    if (i > 0 && values[i]! - values[i - 1]! <= tolerance) groups.at(-1)!.push(i);
    else groups.push([i]);
  }
  return groups;
}

/** Character of each group of states, by class: Σ ⟨state|turned state⟩ over its members. */
function charactersOf(n: number, states: Matrix, groups: readonly number[][], setting: FieldSetting): number[][] {
  const space = configurationSpace(n);
  const groupOf = new Int32Array(states.columns);
  for (const [g, members] of groups.entries()) for (const i of members) groupOf[i] = g;
  const known = new Map<string, Float64Array>();
  const byClass = setting.representatives.map((orbitals) => {
    // Operations that differ by inversion do the same to d orbitals.
    const key = orbitals.data.map((x) => Math.round(x * 1e6) || 0).join();
    const characters = known.get(key) ?? new Float64Array(groups.length);
    if (known.has(key)) return characters;
    known.set(key, characters);
    if (isIdentity(orbitals)) {
      for (const [g, members] of groups.entries()) characters[g] = members.length;
      return characters;
    }
    const turned = turnStates(space, orbitals, states).data;
    for (let at = 0; at < turned.length; at += states.columns) {
      for (let k = 0; k < states.columns; k++) {
        characters[groupOf[k]!] = characters[groupOf[k]!]! + states.data[at + k]! * turned[at + k]!;
      }
    }
    return characters;
  });
  return groups.map((_, g) => byClass.map((characters) => characters[g]!));
}

const isIdentity = ({ data }: Matrix): boolean => data.every((x, k) => Math.abs(x - (k % 6 === 0 ? 1 : 0)) < 1e-9);

/** The irreps of a level, each by itself; null where they do not add up, as in a field lower than its group. */
function irrepsOf(
  { group }: FieldSetting,
  characters: readonly number[],
  size: number,
): { irrep: string; dimension: number }[] | null {
  const parts = reduce(group, characters).flatMap(({ irrep, count }) => {
    const { dimension } = group.irreps.find(({ label }) => label === irrep)!;
    return Array.from({ length: Math.max(0, count) }, () => ({ irrep, dimension }));
  });
  return parts.reduce((sum, { dimension }) => sum + dimension, 0) === size ? parts : null;
}
