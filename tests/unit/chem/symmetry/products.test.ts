import { describe, expect, test } from 'vitest';
import { finiteSymbols } from '#src/chem/symmetry/generators.ts';
import {
  antisymmetricPower,
  directProduct,
  dOrbitals,
  findGroup,
  type IrrepCount,
  splitMomentum,
  splitTerm,
  symmetricPower,
} from '#src/chem/symmetry/index.ts';
import { linearCharacter } from '#src/chem/symmetry/linear-groups.ts';
import { INVERSION, rotation } from '#src/chem/symmetry/matrices.ts';
import { requireLinear } from '#src/chem/symmetry/products.ts';

const written = (terms: readonly IrrepCount[]): string =>
  terms.map(({ irrep, count }) => `${count === 1 ? '' : count}${irrep}`).join(' + ');
const all = [...finiteSymbols, 'Cinfv', 'Dinfh'];

describe.each(all)('%s', (symbol) => {
  const { irreps } = findGroup(symbol)!;
  const dimensionOf = (label: string): number =>
    irreps.find((irrep) => irrep.label === label)?.dimension ?? (label.startsWith('Sigma') ? 1 : 2);
  const size = (terms: readonly IrrepCount[]): number =>
    terms.reduce((total, { irrep, count }) => total + count * dimensionOf(irrep), 0);

  test('products close: dimensions multiply, order does not matter', () => {
    for (const a of irreps) {
      for (const b of irreps) {
        const product = directProduct(symbol, [a.label, b.label]);
        expect(size(product)).toBe(a.dimension * b.dimension);
        expect(product).toEqual(directProduct(symbol, [b.label, a.label]));
      }
    }
  });

  test('symmetric and antisymmetric squares share the square; cubes have their dimensions', () => {
    for (const { label, dimension: d } of irreps) {
      const [plus, minus] = [symmetricPower(symbol, label, 2), antisymmetricPower(symbol, label, 2)];
      expect(size(plus)).toBe((d * (d + 1)) / 2);
      const tally = new Map(plus.map(({ irrep, count }) => [irrep, count]));
      for (const { irrep, count } of minus) tally.set(irrep, (tally.get(irrep) ?? 0) + count);
      expect(tally).toEqual(new Map(directProduct(symbol, [label, label]).map(({ irrep, count }) => [irrep, count])));
      expect(size(symmetricPower(symbol, label, 3))).toBe((d * (d + 1) * (d + 2)) / 6);
      expect(size(antisymmetricPower(symbol, label, 3))).toBe(Math.max(0, (d * (d - 1) * (d - 2)) / 6));
    }
  });

  test('terms keep their 2L + 1 components', () => {
    for (let l = 0; l < 7; l++) expect(size(splitMomentum(symbol, l))).toBe(2 * l + 1);
  });

  test('d orbitals fill the irreps of a D term', () => {
    const whole = dOrbitals(symbol).map(({ irrep }) => irrep);
    const spread = splitTerm(symbol, '1D').map((term) => term.slice(1).toLowerCase());
    if (!whole.includes(null)) expect(new Set(whole)).toEqual(new Set(spread));
    expect(whole.filter((irrep) => irrep === null).length).toBe(0);
  });
});

test('a merged pair squares to 2A + E in C3 (api convention) and to 2A + 2B in S4', () => {
  expect(written(directProduct('C3', ['E', 'E']))).toBe('2A + E');
  expect(written(directProduct('S4', ['E', 'E']))).toBe('2A + 2B');
});

// G. Herzberg, Spectra of Diatomic Molecules, table of products of species; from memory.
test('linear groups', () => {
  expect(written(directProduct('Dinfh', ['Pi_u', 'Pi_u']))).toBe('Sigma_g+ + Sigma_g- + Delta_g');
  expect(written(directProduct('Cinfv', ['Pi', 'Delta']))).toBe('Pi + Phi');
  expect(written(directProduct('Dinfh', ['Sigma_g-', 'Sigma_u+']))).toBe('Sigma_u-');
  expect(written(antisymmetricPower('Dinfh', 'Pi_g', 2))).toBe('Sigma_g-');
  expect(splitTerm('Dinfh', '3F')).toEqual(['3Sigma_g-', '3Pi_g', '3Delta_g', '3Phi_g']);
  expect(splitTerm('Cinfv', '2D')).toEqual(['2Sigma+', '2Pi', '2Delta']);
});

test('linear characters agree with the functions: a D term under rotations, mirrors and C2', () => {
  const angle = 0.7;
  const turn = rotation([0, 0, 1], angle);
  const total = (m: typeof turn): number =>
    splitMomentum('Dinfh', 2).reduce(
      (sum, { irrep }) => sum + linearCharacter(requireLinear('Dinfh', irrep, ''), m),
      0,
    );
  expect(total(turn)).toBeCloseTo(1 + 2 * Math.cos(angle) + 2 * Math.cos(2 * angle), 12);
  expect(total(rotation([1, 0, 0], Math.PI))).toBeCloseTo(1, 12);
  expect(linearCharacter(requireLinear('Dinfh', 'Pi_u', ''), INVERSION)).toBe(-2);
});

test('refusals name the place', () => {
  expect(() => directProduct('Oh', ['T2'])).toThrowError(
    expect.objectContaining({ code: 'unknown-symbol', field: 'irreps' }),
  );
  expect(() => directProduct('X9', ['A'])).toThrowError(
    expect.objectContaining({ code: 'unknown-symbol', field: 'group' }),
  );
  expect(() => directProduct('Oh', [])).toThrowError(expect.objectContaining({ code: 'empty' }));
  expect(() => splitTerm('Oh', 'F')).toThrowError(expect.objectContaining({ code: 'unreadable', field: 'term' }));
});
