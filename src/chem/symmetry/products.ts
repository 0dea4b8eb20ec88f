import { DomainError } from '../errors.ts';
import type { FiniteGroup, FiniteIrrep } from './finite-group.ts';
import { type IrrepCount, requireFinite } from './groups.ts';
import {
  type LinearIrrep,
  linearLabel,
  linearPower,
  linearProduct,
  linearRank,
  linearSymbols,
  readLinearLabel,
} from './linear-groups.ts';

/** Most factors in one direct product. */
export const MOST_FACTORS = 12;

/**
 * Reduces a representation of a finite group.
 *
 * @param characters - real characters by class
 * @returns irreps that occur, in the order of the table
 */
export function reduce(group: FiniteGroup, characters: readonly number[]): IrrepCount[] {
  const inner = (a: readonly number[], b: readonly number[]): number =>
    group.classes.reduce((sum, { size }, c) => sum + size * a[c]! * b[c]!, 0);
  return group.irreps
    .map(({ label, characters: own }) => ({
      irrep: label,
      count: Math.round(inner(characters, own) / inner(own, own)),
    }))
    .filter(({ count }) => count !== 0);
}

/**
 * The irrep with this label.
 *
 * @throws DomainError `unknown-symbol` on `field`
 */
export function irrepOfGroup(group: FiniteGroup, label: string, field: string): FiniteIrrep {
  const found = group.irreps.find((irrep) => irrep.label === label);
  if (found) return found;
  const labels = group.irreps.map((irrep) => irrep.label).join(', ');
  throw new DomainError('unknown-symbol', `${group.symbol} has no irrep “${label}”. It has ${labels}.`, field);
}

/**
 * Reduces the direct product of irreps of one group.
 *
 * @param symbol - a group of the list, linear ones too
 * @param irreps - one to twelve labels
 * @throws DomainError `unknown-symbol`, `empty` or `too-large`
 */
export function directProduct(symbol: string, irreps: readonly string[]): IrrepCount[] {
  if (irreps.length === 0) throw new DomainError('empty', 'A direct product needs at least one irrep.', 'irreps');
  if (irreps.length > MOST_FACTORS) {
    throw new DomainError('too-large', `At most ${MOST_FACTORS} irreps can be multiplied at once.`, 'irreps');
  }
  if (linearSymbols.includes(symbol)) return linearDirectProduct(symbol, irreps);
  const group = requireFinite(symbol, 'group');
  const factors = irreps.map((label) => irrepOfGroup(group, label, 'irreps').characters);
  return reduce(
    group,
    group.classes.map((_, c) => factors.reduce((product, row) => product * row[c]!, 1)),
  );
}

/** Reduces the symmetric square or cube of an irrep. Errors as `directProduct`. */
export function symmetricPower(symbol: string, irrep: string, power: 2 | 3): IrrepCount[] {
  return powerOf(symbol, irrep, power, true);
}

/** Reduces the antisymmetric square or cube of an irrep; an empty sum where it vanishes. Errors as `directProduct`. */
export function antisymmetricPower(symbol: string, irrep: string, power: 2 | 3): IrrepCount[] {
  return powerOf(symbol, irrep, power, false);
}

function powerOf(symbol: string, irrep: string, power: 2 | 3, symmetric: boolean): IrrepCount[] {
  if (linearSymbols.includes(symbol))
    return count(linearPower(requireLinear(symbol, irrep, 'irrep'), power, symmetric));
  const group = requireFinite(symbol, 'group');
  const { characters } = irrepOfGroup(group, irrep, 'irrep');
  const [squares, cubes] = [group.powerClass(2), group.powerClass(3)];
  const sign = symmetric ? 1 : -1;
  return reduce(
    group,
    characters.map((x, c) => {
      const [second, third] = [characters[squares[c]!]!, characters[cubes[c]!]!];
      return power === 2 ? (x ** 2 + sign * second) / 2 : (x ** 3 + sign * 3 * x * second + 2 * third) / 6;
    }),
  );
}

/**
 * The irrep of a linear group with this label.
 *
 * @throws DomainError `unknown-symbol` on `field`
 */
export function requireLinear(symbol: string, label: string, field: string): LinearIrrep {
  const irrep = readLinearLabel(symbol, label);
  if (irrep) return irrep;
  const example = symbol === 'Dinfh' ? 'Sigma_g+, Pi_u, Delta_g' : 'Sigma+, Pi, Delta';
  throw new DomainError('unknown-symbol', `${symbol} has no irrep “${label}”. Examples: ${example}.`, field);
}

function linearDirectProduct(symbol: string, irreps: readonly string[]): IrrepCount[] {
  const [first, ...rest] = irreps.map((label) => requireLinear(symbol, label, 'irreps'));
  return count(rest.reduce((sum, factor) => sum.flatMap((term) => linearProduct(term, factor)), [first!]));
}

/** Collects equal irreps of a linear group. */
export function count(irreps: readonly LinearIrrep[]): IrrepCount[] {
  const tally = new Map<string, number>();
  for (const irrep of [...irreps].sort((a, b) => linearRank(a) - linearRank(b))) {
    tally.set(linearLabel(irrep), (tally.get(linearLabel(irrep)) ?? 0) + 1);
  }
  return [...tally].map(([irrep, times]) => ({ irrep, count: times }));
}
