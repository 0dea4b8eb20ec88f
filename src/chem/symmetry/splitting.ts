import { DomainError } from '../errors.ts';
import { dFunctions, irrepOf } from './functions.ts';
import { type IrrepCount, requireFinite } from './groups.ts';
import { linearSplitting, linearSymbols } from './linear-groups.ts';
import { negative, operationKind } from './matrices.ts';
import { count, reduce } from './products.ts';

const LETTERS = 'SPDFGHIKLMNOQ';

/**
 * Irreps of a group that a term of angular momentum L and even parity falls into.
 *
 * The character of a rotation by φ is the sum of cos mφ for m from −L to L, and an even function does not see
 * inversion.
 *
 * @throws DomainError `unknown-symbol`
 */
export function splitMomentum(symbol: string, l: number): IrrepCount[] {
  if (linearSymbols.includes(symbol)) return count(linearSplitting(symbol, l));
  const group = requireFinite(symbol, 'group');
  const characters = group.classes.map(({ representative }) => {
    const { proper } = operationKind(representative);
    const { angle } = operationKind(proper ? representative : negative(representative));
    return Array.from({ length: 2 * l + 1 }, (_, k) => Math.cos((k - l) * angle)).reduce((a, b) => a + b, 0);
  });
  return reduce(group, characters);
}

/**
 * Splits a free-ion term of d electrons, which is even, in a field of some symmetry.
 *
 * @param term - spin multiplicity and letter, such as `3F`
 * @returns one label per term with the multiplicity before it, repeated ones repeated: `3A2g`, `3T1g`, `3T2g`
 * @throws DomainError `unreadable` on `term`, `unknown-symbol` on `group`
 */
export function splitTerm(symbol: string, term: string): string[] {
  const [, multiplicity, letter = ''] = /^([1-9]\d?)([A-Z])$/.exec(term.trim()) ?? [];
  const l = letter ? LETTERS.indexOf(letter) : -1;
  if (!multiplicity || l < 0) {
    throw new DomainError(
      'unreadable',
      `“${term}” is not a free-ion term. Write the multiplicity and a letter: 3F.`,
      'term',
    );
  }
  return splitMomentum(symbol, l).flatMap(({ irrep, count: times }) =>
    Array.from({ length: times }, () => `${multiplicity}${irrep}`),
  );
}

/**
 * Irreps of the five d orbitals, in lower case as orbitals are.
 *
 * @returns `irrep` is null where a low symmetry spreads an orbital over several irreps
 * @throws DomainError `unknown-symbol`
 */
export function dOrbitals(symbol: string): { orbital: string; irrep: string | null }[] {
  if (linearSymbols.includes(symbol)) {
    const g = symbol === 'Dinfh' ? '_g' : '';
    const labels: Record<string, string> = {
      z2: `sigma${g}+`,
      'x2-y2': `delta${g}`,
      xy: `delta${g}`,
      xz: `pi${g}`,
      yz: `pi${g}`,
    };
    return dFunctions.map(({ name }) => ({ orbital: name, irrep: labels[name]! }));
  }
  const group = requireFinite(symbol, 'group');
  const classes = group.operations.map((m) => group.classOfMatrix(m)!);
  const irreps = group.irreps.map((irrep) => ({ ...irrep, characters: classes.map((c) => irrep.characters[c]!) }));
  return dFunctions.map((form) => ({
    orbital: form.name,
    irrep: group.irreps[irrepOf(form, group.operations, irreps)]?.label.toLowerCase() ?? null,
  }));
}
