import type { IrrepCount, PointGroup } from './groups.ts';
import type { Term } from './term-label.ts';

export type Direction = 'x' | 'y' | 'z';
export const directions: readonly Direction[] = ['x', 'y', 'z'];

/** How a transition can be seen at all; `forbidden` when by none of these. */
export type Mechanism = 'allowed' | 'vibronic' | 'spin-forbidden' | 'spin-forbidden-vibronic' | 'forbidden';

/** Whether spin–orbit coupling in first order gives a spin-forbidden transition electric dipole intensity. */
export interface SpinOrbit {
  /** Null where the spin rule does not stand in the way, and the question does not arise. */
  allowed: boolean | null;
  steps: string[];
}

/** Irreps of the modes to try, and where they come from: the request, a plain skeleton, or nowhere. */
export interface Modes {
  irreps: string[];
  /** Polyhedral symbol of the plain skeleton; null when the modes were given, or there is none. */
  skeleton: string | null;
  given: boolean;
}

/** What the sentences are made of. */
export interface SelectionParts {
  group: PointGroup;
  from: Term;
  to: Term;
  product: readonly IrrepCount[];
  /** Irreps of x, y and z. */
  operators: Record<Direction, string>;
  dipole: Record<Direction, boolean>;
  vibronic: Record<Direction, readonly string[]>;
  magneticDipole: Record<Direction, boolean>;
  spinAllowed: boolean;
  laporteAllowed: boolean | null;
  mechanism: Mechanism;
  modes: Modes;
  spinOrbit: SpinOrbit;
}

/** A direct sum in words: `A1g + 2T2g`. */
export const sumText = (terms: readonly IrrepCount[]): string =>
  terms.map(({ irrep, count }) => `${count === 1 ? '' : count}${irrep}`).join(' + ');

const termText = ({ multiplicity, irrep }: Term): string => `${multiplicity}${irrep}`;

/**
 * First-order spin–orbit coupling mixes terms whose spins differ by one; its orbital part transforms as the rotations.
 * The spin-forbidden transition borrows dipole intensity where from ⊗ to ⊗ rotation ⊗ dipole holds the totally
 * symmetric irrep. (J. S. Griffith, The Theory of Transition-Metal Ions, 1961; from memory.)
 */
export function spinOrbitPart(
  group: string,
  from: Term,
  to: Term,
  meets: (operators: readonly string[]) => boolean,
  dipoles: Record<Direction, string>,
  rotations: Record<Direction, string>,
): SpinOrbit {
  const difference = Math.abs(from.multiplicity - to.multiplicity);
  if (difference === 0) {
    return { allowed: null, steps: ['The spin does not change, so the transition needs no spin–orbit coupling.'] };
  }
  if (difference !== 2) {
    const reason =
      difference % 2 === 1
        ? 'One multiplicity is odd and one even, which no transition within one number of electrons can join.'
        : 'Spin–orbit coupling in first order joins spins that differ by one, and these differ by more.';
    return { allowed: false, steps: [reason] };
  }
  const open = directions.filter((d) => directions.some((r) => meets([rotations[r], dipoles[d]])));
  const orbital = [...new Set(directions.map((d) => rotations[d]))].join(', ');
  return {
    allowed: open.length > 0,
    steps: [
      `In ${group} the orbital part of spin–orbit coupling transforms as the rotations: ${orbital}.`,
      open.length > 0
        ? `With it in first order, electric dipole intensity can be borrowed in ${open.join(', ')}.`
        : 'With it in first order, no polarisation gains electric dipole intensity unless a vibration helps too.',
    ],
  };
}

/** The argument, one sentence or two per step, without numbers. */
export function selectionSteps(parts: SelectionParts): string[] {
  const { group, from, to, spinAllowed, spinOrbit } = parts;
  return [
    `Both terms are labelled in ${group.symbol} (${group.setting}): ${termText(from)} to ${termText(to)}.`,
    spinAllowed
      ? `The spin multiplicity stays ${from.multiplicity}: spin-allowed.`
      : `The spin multiplicity changes from ${from.multiplicity} to ${to.multiplicity}: spin-forbidden.`,
    `In ${group.symbol}, ${from.irrep} ⊗ ${to.irrep} = ${sumText(parts.product)}.`,
    laporteStep(parts),
    ...dipoleSteps(parts),
    ...vibronicSteps(parts),
    magneticStep(parts),
    ...(spinAllowed ? [] : spinOrbit.steps),
    conclusions[parts.mechanism],
  ];
}

function laporteStep({ group, laporteAllowed }: SelectionParts): string {
  if (laporteAllowed === null)
    return `${group.symbol} has no centre of inversion, so the Laporte rule says nothing here.`;
  return laporteAllowed
    ? `In ${group.symbol} the parity changes between g and u: Laporte-allowed.`
    : `In ${group.symbol} both terms have the same parity, and the dipole is odd (u): Laporte-forbidden.`;
}

/** Directions that transform alike share a sentence. */
function together(operators: Record<Direction, string>): { irrep: string; members: Direction[] }[] {
  const irreps = [...new Set(directions.map((d) => operators[d]))];
  return irreps.map((irrep) => ({ irrep, members: directions.filter((d) => operators[d] === irrep) }));
}

function dipoleSteps({ group, operators, dipole }: SelectionParts): string[] {
  return together(operators).map(({ irrep, members }) => {
    const names = members.join(', ');
    const holds = dipole[members[0]!];
    return `In ${group.symbol} the dipole along ${names} is ${irrep}; the product of the terms ${holds ? 'holds' : 'does not hold'} it: ${names} ${holds ? 'allowed' : 'forbidden'}.`;
  });
}

function vibronicSteps({ group, operators, vibronic, modes }: SelectionParts): string[] {
  if (modes.irreps.length === 0 && !modes.given) {
    return [
      `No plain skeleton stands for ${group.symbol}; without a list of vibrations, vibronic intensity is not judged.`,
    ];
  }
  const source = modes.given ? 'the vibrations given' : `the vibrations of the plain ${modes.skeleton} skeleton`;
  return together(operators).map(({ members }) => {
    const lending = vibronic[members[0]!];
    const what = lending.length > 0 ? `those of ${lending.join(', ')} lend` : 'none lends';
    return `In ${group.symbol}, of ${source} ${what} intensity in ${members.join(', ')}.`;
  });
}

function magneticStep({ group, magneticDipole }: SelectionParts): string {
  const open = directions.filter((d) => magneticDipole[d]);
  return open.length > 0
    ? `In ${group.symbol} the orbital magnetic dipole is allowed for ${open.map((d) => `R${d}`).join(', ')}.`
    : `In ${group.symbol} the orbital magnetic dipole is forbidden.`;
}

const conclusions: Record<Mechanism, string> = {
  allowed: 'So the transition is allowed as an electric dipole transition.',
  vibronic: 'So the transition is forbidden in the still skeleton and gains intensity from vibrations.',
  'spin-forbidden': 'So only the spin rule forbids the transition.',
  'spin-forbidden-vibronic': 'So the transition is forbidden by spin, and without vibrations by the dipole as well.',
  forbidden: 'So no electric dipole mechanism judged here gives the transition intensity.',
};
