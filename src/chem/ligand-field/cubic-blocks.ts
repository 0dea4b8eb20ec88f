import { type ConfigurationSpace, configurationSpace, oneElectron } from './configuration-space.ts';
import { CUBIC_IRREPS, CUBIC_ROTATIONS, type CubicIrrep, IRREP_DIMENSION } from './cubic-group.ts';
import { besideEachOther, combine, diagonal, fromRows, type Matrix, within } from './matrix.ts';
import { quantumNumber, rangeOf, splitBy } from './subspaces.ts';
import { symmetricEigen, symmetricEigenvalues } from './symmetric-eigen.ts';
import { turnOfSpace } from './turns.ts';

/**
 * All levels of one spin and one irrep of a cubic field. Its matrix is Δ·field + B·B + C·C, each eigenvalue one level
 * of `dimension` orbital and `multiplicity` spin components.
 */
export interface CubicBlock {
  multiplicity: number;
  /** Irrep of O, or of Td: no `g`. */
  irrep: CubicIrrep;
  dimension: number;
  /** All d electrons. */
  electrons: number;
  /** Electrons in e of each basis state, rising: the rows are states of one configuration t2^(n−m) e^m. */
  upper: number[];
  /** Field per unit of Δ, e above t2, centre of gravity of the orbitals at 0; diagonal. */
  field: Matrix;
  B: Matrix;
  C: Matrix;
  /** Square of the total orbital angular momentum, by which roots are traced to free-ion terms. */
  orbitalSquared: Matrix;
}

/**
 * Strengths of the field and of the repulsion in one unit of energy. `delta` < 0: t2 above e. `alpha` is Trees'
 * correction, α·L(L + 1), 0 unless told.
 */
export interface Strengths {
  delta: number;
  B: number;
  C: number;
  alpha?: number | undefined;
}

/** One electron in the cubic field per unit of Δ: e at 3Δ/5, t2 at −2Δ/5, in the order of the orbitals. */
export const CUBIC_FIELD = fromRows(
  [0.6, 0.6, -0.4, -0.4, -0.4].map((energy, i, all) => all.map((_, j) => (i === j ? energy : 0))),
);

const known = new Map<number, readonly CubicBlock[]>();

/**
 * The dⁿ problem of a cubic field in blocks of one spin and irrep, at most ten rows each; built once for each n.
 *
 * Of every irrep one row is kept, by projection with the 24 rotations acting on the determinants.
 *
 * @param n - whole number 1 to 9
 * @throws DomainError `out-of-range` (field `n`)
 * @see Y. Tanabe, S. Sugano, J. Phys. Soc. Jpn. 9 (1954) 753, for the matrices of d² to d⁸ (another basis, same eigenvalues)
 */
export function cubicBlocks(n: number): readonly CubicBlock[] {
  const blocks = known.get(n) ?? build(configurationSpace(n));
  known.set(n, blocks);
  return blocks;
}

/** Energies of a block's levels, ascending. */
export function blockEnergies(block: CubicBlock, strengths: Strengths): number[] {
  return symmetricEigenvalues(blockMatrix(block, strengths));
}

/** Matrix of a block at these strengths. */
export function blockMatrix(block: CubicBlock, { delta, B, C, alpha = 0 }: Strengths): Matrix {
  return combine([
    [delta, block.field],
    [B, block.B],
    [C, block.C],
    [alpha, block.orbitalSquared],
  ]);
}

/**
 * L of the free-ion terms from which the levels of a block rise, in the order of its levels: roots of one spin and
 * irrep never cross. Null where terms of different L coincide in the free ion.
 */
export function blockParents(block: CubicBlock, B: number, C: number, alpha = 0): (number | null)[] {
  const { values, vectors } = symmetricEigen(blockMatrix(block, { delta: 0, B, C, alpha }));
  const tolerance = 1e-9 * (B + C);
  const momenta = within(vectors, block.orbitalSquared);
  return values.map((value) => {
    // Within a group of coincident terms the eigenvectors are arbitrary: L counts only if all of it shares one.
    const group = [...values.keys()].filter((i) => Math.abs(values[i]! - value) <= tolerance);
    const squares = group.map((i) => momenta.data[i * momenta.columns + i]!);
    const angular = quantumNumber(squares[0]!);
    return squares.every((square) => Math.abs(square - angular * (angular + 1)) < 1e-6) ? angular : null;
  });
}

function build(space: ConfigurationSpace): CubicBlock[] {
  const field = oneElectron(CUBIC_FIELD, space.substitutions);
  const turns = CUBIC_ROTATIONS.map(({ orbitals }) => turnOfSpace(space, orbitals));
  const blocks = CUBIC_IRREPS.flatMap((irrep) => {
    // Configuration by configuration, so that the field is diagonal and the shares of an eigenvector are their weights.
    const parts = splitBy(field, rangeOf(rowProjector(turns, irrep))).flatMap(({ value, basis }) =>
      splitBy(space.spinSquared, basis).map((part) => ({ ...part, upper: Math.round(value + 0.4 * space.n) })),
    );
    const spins = [...new Set(parts.map(({ value }) => multiplicityOf(value)))];
    return spins.map((multiplicity) => {
      const own = parts.filter(({ value }) => multiplicityOf(value) === multiplicity);
      const basis = besideEachOther(own.map((part) => part.basis));
      const upper = own.flatMap((part) => Array.from({ length: part.basis.columns }, () => part.upper));
      return {
        multiplicity,
        irrep,
        dimension: IRREP_DIMENSION[irrep],
        electrons: space.n,
        upper,
        field: diagonal(upper.map((electrons) => electrons - 0.4 * space.n)),
        B: within(basis, space.B),
        C: within(basis, space.C),
        orbitalSquared: within(basis, space.orbitalSquared),
      };
    });
  });
  return blocks.sort((a, b) => b.multiplicity - a.multiplicity);
}

const multiplicityOf = (spinSquared: number): number => Math.round(2 * quantumNumber(spinSquared)) + 1;

/** (d/24) Σ_R D(R)₁₁ R over the rotations R: the states that transform as the chosen row of the irrep. */
function rowProjector(turns: readonly Matrix[], irrep: CubicIrrep): Matrix {
  const weight = IRREP_DIMENSION[irrep] / turns.length;
  return combine(turns.map((turn, r) => [weight * CUBIC_ROTATIONS[r]!.row[irrep], turn] as const));
}
