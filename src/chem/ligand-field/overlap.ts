import { DomainError } from '../errors.ts';
import { type Matrix3, multiply } from '../geometry/vector.ts';
import { D_ORBITALS, type DOrbital, rotateOrbitals } from './d-orbitals.ts';
import { type Matrix, pickColumns, zeros } from './matrix.ts';
import { symmetricEigen } from './symmetric-eigen.ts';

/**
 * A ligand of the angular overlap model: where it stands (degrees, θ from z, φ from x) and what it does to a d orbital
 * that points at it, in any unit of energy. Either one `ePi` for both π directions, or `ePiX` (local xz) and `ePiY`
 * (local yz), turned by `psi` about the bond.
 */
export interface OverlapLigand {
  theta: number;
  phi: number;
  eSigma: number;
  ePi?: number | undefined;
  ePiX?: number | undefined;
  ePiY?: number | undefined;
  /** Degrees; 0 unless told. */
  psi?: number | undefined;
  /** Mixing of the metal's s into its d orbitals by the σ bond, 0 or more; 0 unless told. */
  eDs?: number | undefined;
}

export interface OrbitalEnergy {
  energy: number;
  /** Share of each d orbital, 0 to 1. */
  composition: Record<DOrbital, number>;
}

const turnZ = (angle: number): Matrix3 => {
  const [c, s] = [Math.cos((angle * Math.PI) / 180), Math.sin((angle * Math.PI) / 180)];
  return [
    [c, -s, 0],
    [s, c, 0],
    [0, 0, 1],
  ];
};

const turnY = (angle: number): Matrix3 => {
  const [c, s] = [Math.cos((angle * Math.PI) / 180), Math.sin((angle * Math.PI) / 180)];
  return [
    [c, 0, s],
    [0, 1, 0],
    [-s, 0, c],
  ];
};

/**
 * One-electron field of the ligands in the basis z², x²−y², xy, xz, yz; 5 × 5, symmetric, unit of the parameters.
 *
 * Ligand frame Rz(φ)·Ry(θ)·Rz(ψ). No δ overlap. The mixing of s and d lowers the field by
 * u uᵀ, u being the sum over the ligands of √eDs times the d orbital that points at them: in a square plane z² by 4 eDs.
 *
 * @throws DomainError `out-of-range` where a number is missing or not finite, or there is no ligand (field `ligands`)
 * @see L. G. Vanquickenborne, A. Ceulemans, Inorg. Chem. 20 (1981) 796, for eDs (from memory)
 * @see C. E. Schäffer, C. K. Jørgensen, Mol. Phys. 9 (1965) 401; E. Larsen, G. N. La Mar, J. Chem. Educ. 51 (1974) 633 (from memory)
 */
export function overlapField(ligands: readonly OverlapLigand[]): Matrix {
  if (ligands.length === 0) throw new DomainError('out-of-range', 'Give at least one ligand.', 'ligands');
  const field = zeros(5);
  const mixing = new Float64Array(5);
  ligands.forEach((ligand, index) => {
    const { theta, phi, psi = 0, eSigma, eDs = 0 } = ligand;
    const ePiX = ligand.ePiX ?? ligand.ePi ?? 0;
    const ePiY = ligand.ePiY ?? ligand.ePi ?? 0;
    if (![theta, phi, psi, eSigma, ePiX, ePiY, eDs].every(Number.isFinite)) {
      throw new DomainError('out-of-range', `Ligand ${index + 1} needs finite angles and parameters.`, 'ligands');
    }
    if (eDs < 0) throw new DomainError('out-of-range', `eDs of ligand ${index + 1} must be 0 or more.`, 'ligands');
    const local = rotateOrbitals(multiply(multiply(turnZ(phi), turnY(theta)), turnZ(psi)));
    const strengths: [DOrbital, number][] = [
      ['z2', eSigma],
      ['xz', ePiX],
      ['yz', ePiY],
    ];
    for (const [orbital, strength] of strengths) addProjection(field, local, D_ORBITALS.indexOf(orbital), strength);
    for (let a = 0; a < 5; a++) mixing[a]! += Math.sqrt(eDs) * local.data[a * 5 + D_ORBITALS.indexOf('z2')]!;
  });
  for (let a = 0; a < 5; a++) for (let b = 0; b < 5; b++) field.data[a * 5 + b]! -= mixing[a]! * mixing[b]!;
  return field;
}

function addProjection(field: Matrix, local: Matrix, column: number, strength: number): void {
  for (let a = 0; a < 5; a++) {
    for (let b = 0; b < 5; b++) {
      field.data[a * 5 + b]! += strength * local.data[a * 5 + column]! * local.data[b * 5 + column]!;
    }
  }
}

/** Eigenvalues of a field over the d orbitals, ascending, with what each orbital is made of. */
export function orbitalEnergies(field: Matrix): OrbitalEnergy[] {
  const { values, vectors } = symmetricEigen(field);
  return values.map((energy, i) => {
    const { data } = pickColumns(vectors, [i]);
    const shares = D_ORBITALS.map((orbital, a) => [orbital, data[a]! ** 2] as const);
    return { energy, composition: Object.fromEntries(shares) as Record<DOrbital, number> };
  });
}
