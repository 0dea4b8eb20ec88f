import { findGroup, type IrrepCount, type PointGroup } from './groups.ts';
import { directProduct } from './products.ts';
import { type SpinOrbit, spinOrbitMixing } from './spin-orbit.ts';
import type { Term } from './term-label.ts';

export type Direction = 'x' | 'y' | 'z';
export const directions: readonly Direction[] = ['x', 'y', 'z'];

/** How a transition can be seen at all; `forbidden` when by none of these. */
export type Mechanism = 'allowed' | 'vibronic' | 'spin-forbidden' | 'spin-forbidden-vibronic' | 'forbidden';

/** What symmetry says about a transition between two terms of one group. */
export interface SelectionRules {
  spinAllowed: boolean;
  /** Null in a group without a centre of inversion, where the rule has no meaning. */
  laporteAllowed: boolean | null;
  /** Direct product of the two terms. */
  product: IrrepCount[];
  /** Irreps of x, y and z. */
  operators: Record<Direction, string>;
  /** Whether the electric dipole integral may differ from zero, per polarisation. */
  dipole: Record<Direction, boolean>;
  /** Irreps among the vibrations whose quantum makes that polarisation allowed. */
  vibronic: Record<Direction, string[]>;
  /** Whether the magnetic dipole integral may differ from zero, per component. */
  magneticDipole: Record<Direction, boolean>;
  spinOrbit: SpinOrbit;
  mechanism: Mechanism;
}

/**
 * Applies every selection rule to a transition.
 *
 * @param modes - irreps of the vibrations that may lend intensity
 */
export function selectionRules(group: PointGroup, from: Term, to: Term, modes: readonly string[]): SelectionRules {
  const product = directProduct(group.symbol, [from.irrep, to.irrep]);
  const operators = perDirection((d) => irrepWith(group, d));
  const rotations = perDirection((d) => irrepWith(group, `R${d}`));
  const meets = (factors: readonly string[]): boolean => holdsSymmetric(group, [from.irrep, to.irrep, ...factors]);
  const dipole = perDirection((d) => meets([operators[d]]));
  const vibronic = perDirection((d) => modes.filter((mode) => meets([operators[d], mode])));
  const spinAllowed = from.multiplicity === to.multiplicity;
  return {
    spinAllowed,
    laporteAllowed: group.centrosymmetric ? product.some(({ irrep }) => isOdd(irrep)) : null,
    product,
    operators,
    dipole,
    vibronic,
    magneticDipole: perDirection((d) => meets([rotations[d]])),
    spinOrbit: spinOrbitMixing({ group: group.symbol, from, to, operators, modes }),
    mechanism: mechanismOf(spinAllowed, dipole, vibronic),
  };
}

/** Whether the dipole along x, y and z of a group joins two of its irreps. */
export function dipoleBetween(symbol: string, from: string, to: string): Record<Direction, boolean> {
  const group = findGroup(symbol)!;
  return perDirection((d) => holdsSymmetric(group, [from, to, irrepWith(group, d)]));
}

export function perDirection<T>(value: (direction: Direction) => T): Record<Direction, T> {
  return { x: value('x'), y: value('y'), z: value('z') };
}

const isOdd = (irrep: string): boolean => /(u|_u[+-]?)$/.test(irrep);

function irrepWith({ irreps }: PointGroup, name: string): string {
  return irreps.find(({ functions }) => functions.includes(name))!.label;
}

function holdsSymmetric({ symbol, irreps }: PointGroup, factors: readonly string[]): boolean {
  return directProduct(symbol, factors).some(({ irrep }) => irrep === irreps[0]!.label);
}

function mechanismOf(
  spinAllowed: boolean,
  dipole: Record<Direction, boolean>,
  vibronic: Record<Direction, readonly string[]>,
): Mechanism {
  if (directions.some((d) => dipole[d])) return spinAllowed ? 'allowed' : 'spin-forbidden';
  if (directions.some((d) => vibronic[d].length > 0)) return spinAllowed ? 'vibronic' : 'spin-forbidden-vibronic';
  return 'forbidden';
}
