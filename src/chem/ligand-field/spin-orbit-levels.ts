import { reduceDouble } from '../symmetry/double-products.ts';
import { configurationSpace } from './configuration-space.ts';
import { coincidence, type FieldStates, fieldStates, fromLowest, groupsOf, type Level } from './field-levels.ts';
import { type HermitianEigen, hermitianEigen } from './hermitian-eigen.ts';
import { type Matrix, product, transpose } from './matrix.ts';
import type { FieldSetting } from './overlap-group.ts';
import { type CoupledSpace, coupledSpace } from './spin-coupling.ts';
import { type Repulsion, type SpinSpace, spinMatrix } from './spin-spaces.ts';
import { type ComplexMatrix, type DoubleSetting, type DoubleTurn, doubleSetting, turnOfSpin } from './spin-turns.ts';
import { turnStates } from './turns.ts';

/** A level under spin–orbit coupling. */
export interface SpinOrbitLevel extends Level {
  /** The irrep by the least j that holds it, `G3/2g`; for an even number of electrons as in the point group, `T2g`. */
  symmetry: string | null;
  /** Terms without spin–orbit coupling of which it is made, the largest share first; shares below 0.5 % are left out. */
  composition: { term: string; share: number }[];
}

const LEAST_SHARE = 0.005;
/** Rounding in the eigenvalues, as a share of the difference up to which levels of a typed field count as one. */
const FINE = 1e-3;

/**
 * Levels of dⁿ in a one-electron field with spin–orbit coupling ζ Σ l·s, in the whole space of all spins; ascending.
 *
 * Energies in the unit of the field. Irreps are those of the double group after Bethe; where a level holds several that
 * coincide, each is an entry. An odd number of electrons comes in Kramers pairs, and a pair of one irrep is one entry.
 *
 * @throws DomainError `out-of-range` (field `n`)
 */
export function spinOrbitLevels(
  n: number,
  field: Matrix,
  repulsion: Repulsion,
  zeta: number,
  setting: FieldSetting | null,
): SpinOrbitLevel[] {
  const space = coupledSpace(n);
  const states = fieldStates(n, field, repulsion, setting);
  const [re, im] = hamiltonian(space, field, repulsion, zeta);
  const eigen = hermitianEigen(re, im, space.size);
  const tolerance = coincidence(field, repulsion) + 1e-6 * Math.abs(zeta);
  const fine = groupsOf(eigen.values, FINE * tolerance);
  const double = setting ? doubleSetting(setting.group.symbol, setting.axes) : null;
  const characters = double ? charactersOf(n, space, eigen, fine, double) : fine.map(() => []);
  const found = whole(eigen.values, fine, characters, double, tolerance).flatMap(({ members, parts }) => {
    const energy = members.reduce((sum, k) => sum + eigen.values[k]!, 0) / members.length;
    const composition = compositionOf(space, states, eigen, members);
    return (parts ?? [{ irrep: null, symmetry: null, degeneracy: members.length }]).map((part) => ({
      energy,
      degeneracy: part.degeneracy,
      multiplicity: null,
      irrep: part.irrep,
      label: part.irrep,
      symmetry: part.symmetry,
      parent: null,
      composition,
    }));
  });
  return fromLowest(found);
}

/**
 * States that make up levels. Zero-field splittings are far smaller than what rounded angles do to degenerate levels, so
 * that states are parted finely wherever each part is whole irreps, and else only where they lie further apart.
 */
function whole(
  values: Float64Array,
  fine: readonly number[][],
  characters: readonly number[][],
  double: DoubleSetting | null,
  tolerance: number,
): { members: number[]; parts: Part[] | null }[] {
  if (!double) return groupsOf(values, tolerance).map((members) => ({ members, parts: null }));
  const lowest = fine.map(([first]) => values[first!]!);
  return groupsOf(lowest, tolerance).flatMap((together) => {
    const each = together.map((g) => ({ members: fine[g]!, parts: irrepsOf(double, characters[g]!, fine[g]!.length) }));
    if (each.every(({ parts }) => parts !== null)) return each;
    const members = together.flatMap((g) => fine[g]!);
    const sum = characters[together[0]!]!.map((_, c) => together.reduce((total, g) => total + characters[g]![c]!, 0));
    return [{ members, parts: irrepsOf(double, sum, members.length) }];
  });
}

function hamiltonian(
  { size, components, ...coupling }: CoupledSpace,
  field: Matrix,
  repulsion: Repulsion,
  zeta: number,
): [re: Float64Array, im: Float64Array] {
  const [re, im] = [coupling.re.map((x) => zeta * x), coupling.im.map((x) => zeta * x)];
  const matrices = new Map<SpinSpace, Matrix>();
  for (const { space, offset } of components) {
    const block = matrices.get(space) ?? spinMatrix(space, field, repulsion);
    matrices.set(space, block);
    for (let i = 0; i < block.rows; i++) {
      const at = (offset + i) * size + offset;
      for (let j = 0; j < block.rows; j++) re[at + j] = re[at + j]! + block.data[i * block.rows + j]!;
    }
  }
  return [re, im];
}

/** Shares of the terms in a level, summed over its states. */
function compositionOf(
  { size, components }: CoupledSpace,
  states: readonly FieldStates[],
  { re, im }: HermitianEigen,
  members: readonly number[],
): SpinOrbitLevel['composition'] {
  const shares = new Map<string, number>();
  for (const { space, offset } of components) {
    const { vectors, groups } = states.find((other) => other.space === space)!;
    const rows = vectors.rows;
    const names = new Array<string>(rows).fill('');
    for (const { members: own, parts } of groups) {
      const irreps = parts ? [...new Set(parts.map(({ irrep }) => irrep))].join('+') : '';
      for (const k of own) names[k] = `${space.multiplicity}${irreps}`;
    }
    for (const member of members) {
      const at = member * size + offset;
      const [a, b] = [new Float64Array(rows), new Float64Array(rows)];
      for (let i = 0; i < rows; i++) {
        const x = re[at + i]!;
        const y = im[at + i]!;
        if (x === 0 && y === 0) continue;
        for (let k = 0; k < rows; k++) {
          const v = vectors.data[i * rows + k]!;
          a[k] = a[k]! + v * x;
          b[k] = b[k]! + v * y;
        }
      }
      for (let k = 0; k < rows; k++) {
        const share = (a[k]! ** 2 + b[k]! ** 2) / members.length;
        shares.set(names[k]!, (shares.get(names[k]!) ?? 0) + share);
      }
    }
  }
  return [...shares]
    .map(([term, share]) => ({ term, share }))
    .filter(({ share }) => share >= LEAST_SHARE)
    .sort((a, b) => b.share - a.share);
}

/** Character of each level by class of the double group. */
function charactersOf(
  n: number,
  space: CoupledSpace,
  eigen: HermitianEigen,
  groups: readonly number[][],
  { turns }: DoubleSetting,
): number[][] {
  const known: { turn: DoubleTurn['turn']; characters: number[] }[] = [];
  const byClass = turns.map((turn) => {
    // A full turn more changes the sign for an odd number of electrons, and nothing else does.
    for (const { turn: other, characters } of known) {
      const along = other.reduce((sum, x, i) => sum + x * turn.turn[i]!, 0);
      if (along > 1 - 1e-9) return characters;
      if (along < -1 + 1e-9) return characters.map((x) => (n % 2 === 1 ? -x : x));
    }
    const characters = traces(n, space, eigen, groups, turn);
    known.push({ turn: turn.turn, characters });
    return characters;
  });
  return groups.map((_, g) => byClass.map((characters) => characters[g]!));
}

/** Re Σ ⟨state|turned state⟩ over the members of each group. */
function traces(
  n: number,
  { size, components }: CoupledSpace,
  { re, im }: HermitianEigen,
  groups: readonly number[][],
  { turn, orbitals }: DoubleTurn,
): number[] {
  const spaces = [...new Set(components.map(({ space }) => space))].map((space) => ({
    space,
    offsets: components.filter((component) => component.space === space).map(({ offset }) => offset),
    orbital: product(transpose(space.basis), turnStates(configurationSpace(n), orbitals, space.basis)),
    spin: turnOfSpin(space.multiplicity, turn),
  }));
  return groups.map((members) =>
    members.reduce((sum, member) => {
      const at = member * size;
      return sum + spaces.reduce((part, own) => part + overlap(re, im, at, own), 0);
    }, 0),
  );
}

interface TurnedSpace {
  offsets: readonly number[];
  orbital: Matrix;
  spin: ComplexMatrix;
}

/** Re Σ conj(c[M′, i]) D[M′, M] U[i, j] c[M, j]. */
function overlap(re: Float64Array, im: Float64Array, at: number, { offsets, orbital, spin }: TurnedSpace): number {
  const [rows, count] = [orbital.rows, offsets.length];
  let sum = 0;
  for (let m = 0; m < count; m++) {
    const from = at + offsets[m]!;
    for (let i = 0; i < rows; i++) {
      let x = 0;
      let y = 0;
      for (let j = 0; j < rows; j++) {
        const u = orbital.data[i * rows + j]!;
        x += u * re[from + j]!;
        y += u * im[from + j]!;
      }
      for (let to = 0; to < count; to++) {
        const dr = spin.re[to * count + m]!;
        const di = spin.im[to * count + m]!;
        const cr = re[at + offsets[to]! + i]!;
        const ci = im[at + offsets[to]! + i]!;
        sum += cr * (dr * x - di * y) + ci * (dr * y + di * x);
      }
    }
  }
  return sum;
}

/** Characters of a level that are off by more are not those of whole irreps. */
const UNWHOLE = 0.05;

interface Part {
  irrep: string;
  symmetry: string;
  degeneracy: number;
}

/** The irreps of a level, each by itself; null where they do not add up, as in a field lower than its group. */
function irrepsOf({ group }: DoubleSetting, characters: readonly number[], size: number): Part[] | null {
  const counts = reduceDouble(group, characters);
  const parts = counts.flatMap(({ irrep, count }) => {
    // Time reversal doubles a half-integer irrep of one dimension: Kramers.
    const doubled = irrep.spinor && irrep.dimension === 1;
    const part = { irrep: irrep.bethe, symmetry: irrep.label, degeneracy: doubled ? 2 : irrep.dimension };
    return Array.from({ length: Math.max(0, doubled ? Math.round(count / 2) : count) }, () => part);
  });
  const told = group.classes.map((_, c) =>
    counts.reduce((sum, { irrep, count }) => sum + count * irrep.characters[c]!, 0),
  );
  const whole = characters.every((x, c) => Math.abs(x - told[c]!) < UNWHOLE);
  return whole && parts.reduce((sum, { degeneracy }) => sum + degeneracy, 0) === size ? parts : null;
}
