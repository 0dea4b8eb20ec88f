import { DomainError } from '../errors.ts';
import { findGroup, type IrrepCount, type PointGroup } from './groups.ts';
import { directProduct } from './products.ts';
import {
  type Direction,
  directions,
  type Mechanism,
  type Modes,
  type SpinOrbit,
  selectionSteps,
  spinOrbitPart,
} from './selection-steps.ts';
import { plainSkeleton } from './skeletons.ts';
import { readTerm, requireIrrep, type Term } from './term-label.ts';
import { vibrations as vibrationsOf } from './vibrations.ts';

/** A transition to be judged. */
export interface SelectionRequest {
  /** `Oh`, `Dinfh`. */
  group: string;
  /** Terms with their multiplicity: `2T2g`, `2Eg`. */
  from: string;
  to: string;
  /** Modes that may lend intensity; those of the group's plain skeleton when left out. */
  vibrations?: readonly IrrepCount[];
}

/** What symmetry says about a transition. */
export interface SelectionAnalysis {
  group: string;
  spinAllowed: boolean;
  /** Null in a group without a centre of inversion, where the rule has no meaning. */
  laporteAllowed: boolean | null;
  /** Direct product of the two terms. */
  product: IrrepCount[];
  /** Whether the electric dipole integral may differ from zero, per polarisation. */
  dipole: Record<Direction, boolean>;
  /** Irreps among the vibrations whose quantum makes that polarisation allowed. */
  vibronic: Record<Direction, string[]>;
  /** Whether the magnetic dipole integral may differ from zero, per component. */
  magneticDipole: Record<Direction, boolean>;
  spinOrbit: SpinOrbit;
  mechanism: Mechanism;
  /** The argument in numbered sentences, each in plain text. */
  steps: string[];
}

/**
 * Selection analysis of a transition between two terms.
 *
 * @throws DomainError `unknown-symbol` or `unreadable` on `group`, `from`, `to` or `vibrations`
 */
export function selectionAnalysis(request: SelectionRequest): SelectionAnalysis {
  const group = findGroup(request.group);
  if (!group) {
    throw new DomainError(
      'unknown-symbol',
      `No point group has the symbol “${request.group}”. Examples: Oh, D4h, C2v.`,
      'group',
    );
  }
  const from = readTerm(group.symbol, request.from, 'from');
  const to = readTerm(group.symbol, request.to, 'to');
  const modes = modesOf(group, request.vibrations);

  const product = directProduct(group.symbol, [from.irrep, to.irrep]);
  const operators = perDirection((d) => irrepWith(group, d));
  const rotations = perDirection((d) => irrepWith(group, `R${d}`));
  const dipole = perDirection((d) => meets(group, from, to, [operators[d]]));
  const vibronic = perDirection((d) => modes.irreps.filter((mode) => meets(group, from, to, [operators[d], mode])));
  const magneticDipole = perDirection((d) => meets(group, from, to, [rotations[d]]));
  const spinAllowed = from.multiplicity === to.multiplicity;
  const laporteAllowed = group.centrosymmetric ? product.some(({ irrep }) => isOdd(irrep)) : null;
  const mechanism = mechanismOf(spinAllowed, dipole, vibronic);
  const spinOrbit = spinOrbitPart(
    group.symbol,
    from,
    to,
    (extra) => meets(group, from, to, extra),
    operators,
    rotations,
  );
  const parts = {
    group,
    from,
    to,
    product,
    operators,
    dipole,
    vibronic,
    magneticDipole,
    spinAllowed,
    laporteAllowed,
    mechanism,
    modes,
    spinOrbit,
  };
  return {
    group: group.symbol,
    spinAllowed,
    laporteAllowed,
    product,
    dipole,
    vibronic,
    magneticDipole,
    spinOrbit,
    mechanism,
    steps: selectionSteps(parts).map((step, i) => `${i + 1}. ${step}`),
  };
}

function perDirection<T>(value: (direction: Direction) => T): Record<Direction, T> {
  return { x: value('x'), y: value('y'), z: value('z') };
}

const isOdd = (irrep: string): boolean => /(u|_u[+-]?)$/.test(irrep);

function irrepWith({ irreps }: PointGroup, name: string): string {
  return irreps.find(({ functions }) => functions.includes(name))!.label;
}

/** Whether the product of both terms and some operators holds the totally symmetric irrep. */
function meets({ symbol, irreps }: PointGroup, from: Term, to: Term, operators: readonly string[]): boolean {
  const symmetric = irreps[0]!.label;
  return directProduct(symbol, [from.irrep, to.irrep, ...operators]).some(({ irrep }) => irrep === symmetric);
}

function modesOf(group: PointGroup, given: readonly IrrepCount[] | undefined): Modes {
  if (given) {
    const present = given.filter(({ count }) => count > 0).map(({ irrep }) => irrep);
    for (const irrep of present) requireIrrep(group.symbol, irrep, 'vibrations');
    return { irreps: [...new Set(present)], skeleton: null, given: true };
  }
  const skeleton = plainSkeleton(group.symbol);
  if (!skeleton) return { irreps: [], skeleton: null, given: false };
  return {
    irreps: vibrationsOf(skeleton).vibrations.map(({ irrep }) => irrep),
    skeleton: skeleton.geometry,
    given: false,
  };
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
