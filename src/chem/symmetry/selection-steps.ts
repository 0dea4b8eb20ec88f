import type { ExpectedEpsilon } from './expected-epsilon.ts';
import type { IrrepCount, PointGroup } from './groups.ts';
import type { LowerGroup } from './lower-groups.ts';
import { type Direction, directions, type Mechanism, type SelectionRules } from './selection-rules.ts';
import type { Term } from './term-label.ts';

/** Irreps of the modes to try, and where they come from: the request, a plain skeleton, or nowhere. */
export interface Modes {
  irreps: string[];
  /** The skeleton in words: a polyhedral symbol, with the sites of an actual one; null when there is none. */
  skeleton: string | null;
  /** Whether the request named them, or a skeleton. */
  given: boolean;
}

/** What the sentences are made of. */
export interface SelectionParts {
  group: PointGroup;
  from: Term;
  to: Term;
  modes: Modes;
  rules: SelectionRules;
  epsilon: ExpectedEpsilon;
  lower: readonly LowerGroup[];
}

/** A direct sum in words: `A1g + 2T2g`. */
export const sumText = (terms: readonly IrrepCount[]): string =>
  terms.map(({ irrep, count }) => `${count === 1 ? '' : count}${irrep}`).join(' + ');

const termText = ({ multiplicity, irrep }: Term): string => `${multiplicity}${irrep}`;

/** The argument, one sentence or two per step, without numbers. */
export function selectionSteps(parts: SelectionParts): string[] {
  const { group, from, to, lower, epsilon } = parts;
  const { spinAllowed, spinOrbit, product, mechanism } = parts.rules;
  return [
    `Both terms are labelled in ${group.symbol} (${group.setting}): ${termText(from)} to ${termText(to)}.`,
    spinAllowed
      ? `The spin multiplicity stays ${from.multiplicity}: spin-allowed.`
      : `The spin multiplicity changes from ${from.multiplicity} to ${to.multiplicity}: spin-forbidden.`,
    `In ${group.symbol}, ${from.irrep} ⊗ ${to.irrep} = ${sumText(product)}.`,
    laporteStep(parts),
    ...dipoleSteps(parts),
    ...vibronicSteps(parts),
    magneticStep(parts),
    ...(spinAllowed ? [] : spinOrbit.steps),
    ...(lower.length > 0 ? [lowerStep(group, lower)] : []),
    `${conclusions[mechanism]} ${epsilonText(epsilon)}`,
  ];
}

function laporteStep({ group, rules: { laporteAllowed } }: SelectionParts): string {
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

function dipoleSteps({ group, rules: { operators, dipole } }: SelectionParts): string[] {
  return together(operators).map(({ irrep, members }) => {
    const names = members.join(', ');
    const holds = dipole[members[0]!];
    return `In ${group.symbol} the dipole along ${names} is ${irrep}; the product of the terms ${holds ? 'holds' : 'does not hold'} it: ${names} ${holds ? 'allowed' : 'forbidden'}.`;
  });
}

function vibronicSteps({ group, modes, rules: { operators, vibronic } }: SelectionParts): string[] {
  if (modes.irreps.length === 0 && !modes.given) {
    return [
      `No plain skeleton stands for ${group.symbol}; without a list of vibrations, vibronic intensity is not judged.`,
    ];
  }
  const plain = `the vibrations of the plain ${modes.skeleton} skeleton`;
  const actual = modes.skeleton ? `the vibrations of the skeleton ${modes.skeleton}` : 'the vibrations given';
  const source = modes.given ? actual : plain;
  return together(operators).map(({ members }) => {
    const lending = vibronic[members[0]!];
    const what = lending.length > 0 ? `those of ${lending.join(', ')} lend` : 'none lends';
    return `In ${group.symbol}, of ${source} ${what} intensity in ${members.join(', ')}.`;
  });
}

function magneticStep({ group, rules: { magneticDipole } }: SelectionParts): string {
  const open = directions.filter((d) => magneticDipole[d]);
  return open.length > 0
    ? `In ${group.symbol} the orbital magnetic dipole is allowed for ${open.map((d) => `R${d}`).join(', ')}.`
    : `In ${group.symbol} the orbital magnetic dipole is forbidden.`;
}

/** The highest groups that open it; what opens in one of them opens below it as well. */
function lowerStep(group: PointGroup, lower: readonly LowerGroup[]): string {
  const first = [...new Set(lower.map(({ group: symbol }) => symbol))].slice(0, 4);
  const more = new Set(lower.map(({ group: symbol }) => symbol)).size - first.length;
  const named = lower.find(({ group: symbol }) => symbol === first[0])!;
  const along = directions.filter((d) => named.dipole[d]).join(', ');
  const others = more > 0 ? ` and ${more} more` : '';
  return `Where the symmetry falls from ${group.symbol} to ${first.join(', ')}${others}, a polarisation opens: in ${named.group} along ${along} (${named.from.join(', ')} to ${named.to.join(', ')}).`;
}

const epsilonText = ({ from, to, basis }: ExpectedEpsilon): string =>
  `Expected order of ε: ${from === 0 ? `below ${to}` : `${from} to ${to}`} dm³ mol⁻¹ cm⁻¹ (${basis}).`;

const conclusions: Record<Mechanism, string> = {
  allowed: 'So the transition is allowed as an electric dipole transition.',
  vibronic: 'So the transition is forbidden in the still skeleton and gains intensity from vibrations.',
  'spin-forbidden': 'So only the spin rule forbids the transition.',
  'spin-forbidden-vibronic': 'So the transition is forbidden by spin, and without vibrations by the dipole as well.',
  forbidden: 'So no electric dipole mechanism judged here gives the transition intensity.',
};
