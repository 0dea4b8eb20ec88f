import { doubleGroup } from './double-group.ts';
import { type DoubleCount, reduceDouble, spinCharacters, spinOrbitComponents } from './double-products.ts';
import { findGroup } from './groups.ts';
import { linearSymbols } from './linear-groups.ts';
import { directProduct } from './products.ts';
import { type Direction, directions, perDirection } from './selection-rules.ts';
import type { Term } from './term-label.ts';

/** What spin–orbit coupling does for a spin-forbidden transition. */
export interface SpinOrbit {
  /** Whether some component gains electric dipole intensity; null where the spin rule does not stand in the way. */
  allowed: boolean | null;
  /** By polarisation; null as `allowed`. */
  dipole: Record<Direction, boolean> | null;
  /** Irreps among the vibrations a quantum of which opens a polarisation that is closed without; null as `allowed`. */
  vibronic: Record<Direction, string[]> | null;
  /** How many times spin–orbit coupling must act to join the two spins: each time changes the spin by one at most. */
  order: number | null;
  /** Components of both terms in the double group, by Bethe's numbers: `Γ7+ + Γ8+`; null in a linear group. */
  components: { from: string; to: string } | null;
  steps: string[];
}

/** Irreps that the answer hangs on. */
export interface SpinOrbitQuestion {
  group: string;
  from: Term;
  to: Term;
  /** Irreps of x, y and z. */
  operators: Record<Direction, string>;
  /** Irreps of the vibrations. */
  modes: readonly string[];
}

const none = (text: string, allowed: boolean | null): SpinOrbit => ({
  allowed,
  dipole: null,
  vibronic: null,
  order: null,
  components: null,
  steps: [text],
});

/**
 * Whether spin–orbit coupling lends a spin-forbidden transition intensity.
 *
 * In the double group spin and orbit are one: each term becomes spin ⊗ orbital, and the transition between two
 * components follows the same rule as without spin.
 *
 * @see J. S. Griffith, The Theory of Transition-Metal Ions, 1961 (from memory)
 */
export function spinOrbitMixing({ group: symbol, from, to, operators, modes }: SpinOrbitQuestion): SpinOrbit {
  const difference = Math.abs(from.multiplicity - to.multiplicity);
  if (difference === 0) return none('The spin does not change, so the transition needs no spin–orbit coupling.', null);
  if (difference % 2 === 1) {
    return none(
      'One multiplicity is odd and one even, which no transition within one number of electrons can join.',
      false,
    );
  }
  if (linearSymbols.includes(symbol))
    return linearMixing({ group: symbol, from, to, operators, modes }, difference / 2);
  const group = doubleGroup(symbol);
  const [start, end] = [spinOrbitComponents(symbol, from), spinOrbitComponents(symbol, to)];
  const character = (terms: readonly DoubleCount[]): number[] =>
    group.classes.map((_, c) => terms.reduce((sum, { irrep, count }) => sum + count * irrep.characters[c]!, 0));
  const [before, after] = [character(start), character(end)];
  const rowOf = (label: string): number[] => group.irreps.find((irrep) => irrep.label === label)!.characters;
  const opens = (labels: readonly string[]): boolean => {
    const rows = labels.map(rowOf);
    const product = before.map((x, c) => rows.reduce((value, row) => value * row[c]!, x * after[c]!));
    return reduceDouble(group, product)[0]?.irrep === group.irreps[0];
  };
  const dipole = perDirection((d) => opens([operators[d]]));
  const vibronic = perDirection((d) => (dipole[d] ? [] : modes.filter((mode) => opens([operators[d], mode]))));
  const order = difference / 2;
  const components = { from: componentText(start), to: componentText(end) };
  const spins = [from, to].map(({ multiplicity }) =>
    componentText(reduceDouble(group, spinCharacters(group, multiplicity))),
  );
  return {
    allowed: directions.some((d) => dipole[d]),
    dipole,
    vibronic,
    order,
    components,
    steps: [
      `In the double group of ${symbol} the spins transform as ${spins[0]} (S = ${spinText(from)}) and ${spins[1]} (S = ${spinText(to)}).`,
      `With its orbital part ${from.irrep}, the first term becomes ${components.from}; with ${to.irrep}, the second ${components.to}.`,
      outcome(symbol, dipole, vibronic),
      order === 1
        ? 'The spins differ by one, so that spin–orbit coupling in first order mixes in terms of the other spin.'
        : `The spins differ by ${order}, so that spin–orbit coupling must act ${order} times: what it lends is small.`,
    ],
  };
}

/** On a line, for coupling in first order: its orbital part transforms as the rotations. */
function linearMixing({ group, from, to, operators }: SpinOrbitQuestion, order: number): SpinOrbit {
  if (order > 1) {
    return none(
      'The spins differ by more than one, so that spin–orbit coupling in first order does not join them.',
      false,
    );
  }
  const { irreps } = findGroup(group)!;
  const rotations = irreps.filter(({ functions }) => functions.some((name) => name.startsWith('R')));
  const dipole = perDirection((d) =>
    rotations.some(({ label }) =>
      directProduct(group, [from.irrep, to.irrep, label, operators[d]]).some(({ irrep }) => irrep === irreps[0]!.label),
    ),
  );
  const open = directions.filter((d) => dipole[d]);
  const names = rotations.map(({ label }) => label).join(', ');
  return {
    allowed: open.length > 0,
    dipole,
    vibronic: null,
    order,
    components: null,
    steps: [
      `In ${group} the orbital part of spin–orbit coupling transforms as the rotations: ${names}.`,
      open.length > 0
        ? `With it in first order, electric dipole intensity can be borrowed in ${open.join(', ')}.`
        : 'With it in first order, no polarisation gains electric dipole intensity unless a vibration helps too.',
    ],
  };
}

/** `Γ7+ + 2Γ8+`. */
export const componentText = (terms: readonly DoubleCount[]): string =>
  terms
    .map(({ irrep, count }) => `${count === 1 ? '' : count}${irrep.pair ? `(${irrep.bethe})` : irrep.bethe}`)
    .join(' + ');

const spinText = ({ multiplicity }: Term): string =>
  multiplicity % 2 === 1 ? `${(multiplicity - 1) / 2}` : `${multiplicity - 1}/2`;

function outcome(symbol: string, dipole: Record<Direction, boolean>, vibronic: Record<Direction, string[]>): string {
  const open = directions.filter((d) => dipole[d]);
  if (open.length > 0) {
    return `In the double group of ${symbol}, components of the two are joined by the dipole along ${open.join(', ')}.`;
  }
  const helped = [...new Set(directions.flatMap((d) => vibronic[d]))];
  const nothing = `In the double group of ${symbol}, the dipole joins no components of the two`;
  return helped.length > 0 ? `${nothing} unless a quantum of ${helped.join(', ')} helps.` : `${nothing}.`;
}
