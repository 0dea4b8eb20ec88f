import { reduce } from '../symmetry/products.ts';
import { type ConfigurationSpace, configurationSpace, oneElectron } from './configuration-space.ts';
import { combine, identity, type Matrix, pickColumns, product, within } from './matrix.ts';
import type { FieldSetting } from './overlap-group.ts';
import { quantumNumber, splitBy } from './subspaces.ts';
import { symmetricEigen } from './symmetric-eigen.ts';
import { turnOfSpace } from './turns.ts';

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

/** Levels of one spin nearer than this share of field and repulsion are one: angles come with few decimals. */
const COINCIDENT = 1e-6;

/**
 * Levels of dⁿ in any one-electron field, a symmetric 5 × 5 matrix over z², x²−y², xy, xz, yz; ascending.
 *
 * @param setting - group of the field, for the labels; without it they are null
 * @throws DomainError `out-of-range` (field `n`)
 */
export function fieldLevels(
  n: number,
  field: Matrix,
  B: number,
  C: number,
  setting: FieldSetting | null = null,
): Level[] {
  const space = configurationSpace(n);
  const tolerance = COINCIDENT * (Math.max(...field.data.map(Math.abs)) + B + C);
  const hamiltonian = combine([
    [1, oneElectron(field, space.substitutions)],
    [B, space.B],
    [C, space.C],
  ]);
  const turns = setting?.representatives.map((orbitals) => turnOfSpace(space, orbitals)) ?? [];
  const found = spinSpaces(space).flatMap(({ multiplicity, basis }) => {
    const { values, vectors } = symmetricEigen(within(basis, hamiltonian));
    const states = product(basis, vectors);
    const turned = turns.map((turn) => product(turn, states));
    return groupsOf(values, tolerance).flatMap((members) => {
      const energy = members.reduce((sum, i) => sum + values[i]!, 0) / members.length;
      const characters = turned.map((images) => overlapSum(states, images, members));
      const parts = setting ? irrepsOf(setting, characters, members.length) : null;
      return (parts ?? [{ irrep: null, dimension: members.length }]).map(({ irrep, dimension }) => ({
        energy,
        degeneracy: multiplicity * dimension,
        multiplicity,
        irrep,
        label: irrep === null ? null : `${multiplicity}${irrep}`,
        parent: null,
      }));
    });
  });
  return fromLowest(found);
}

/** Levels with energies counted from the lowest, ascending. */
export function fromLowest(found: readonly Level[]): Level[] {
  const lowest = Math.min(...found.map(({ energy }) => energy));
  return found
    .map((level) => ({ ...level, energy: level.energy - lowest }))
    .sort((a, b) => a.energy - b.energy || b.multiplicity - a.multiplicity);
}

/** Indices of ascending values, parted where they lie apart. */
function groupsOf(values: readonly number[], tolerance: number): number[][] {
  const starts = values.flatMap((e, i) => (i === 0 || e - values[i - 1]! > tolerance ? [i] : []));
  return starts.map((start, k) => {
    const end = starts[k + 1] ?? values.length;
    return Array.from({ length: end - start }, (_, i) => start + i);
  });
}

/** Σ ⟨state|turned state⟩ over the members: the character of the level. */
function overlapSum(states: Matrix, images: Matrix, members: readonly number[]): number {
  const [a, b] = [pickColumns(states, members).data, pickColumns(images, members).data];
  return a.reduce((sum, x, i) => sum + x * b[i]!, 0);
}

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

const spins = new Map<number, { multiplicity: number; basis: Matrix }[]>();

/** The space of dⁿ by spin, built once for each n. */
function spinSpaces(space: ConfigurationSpace): { multiplicity: number; basis: Matrix }[] {
  const spaces =
    spins.get(space.n) ??
    splitBy(space.spinSquared, identity(space.size)).map(({ value, basis }) => ({
      multiplicity: Math.round(2 * quantumNumber(value)) + 1,
      basis,
    }));
  spins.set(space.n, spaces);
  return spaces;
}
