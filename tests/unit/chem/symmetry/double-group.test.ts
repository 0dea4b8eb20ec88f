import { describe, expect, test } from 'vitest';
import { type DoubleGroup, doubleGroup } from '#src/chem/symmetry/double-group.ts';
import {
  doubleProduct,
  reduceDouble,
  spinCharacters,
  spinOrbitComponents,
} from '#src/chem/symmetry/double-products.ts';
import { finiteGroup } from '#src/chem/symmetry/finite-group.ts';
import { finiteSymbols } from '#src/chem/symmetry/generators.ts';
import { multiplySpin, spinKey } from '#src/chem/symmetry/spin-rotation.ts';

const sum = (values: readonly number[]): number => values.reduce((a, b) => a + b, 0);
const inner = ({ classes, order }: DoubleGroup, a: readonly number[], b: readonly number[]): number =>
  sum(classes.map(({ size }, c) => size * a[c]! * b[c]!)) / order;

describe.each(finiteSymbols)('double group of %s', (symbol) => {
  const group = doubleGroup(symbol);
  const single = finiteGroup(symbol)!;

  test('has each operation twice, closes, and has as many irreps as classes', () => {
    expect(group.order).toBe(2 * single.order);
    const keys = new Set(group.elements.map(spinKey));
    expect(keys.size).toBe(group.order);
    const [a, b] = [group.elements[1]!, group.elements.at(-1)!];
    for (const g of group.elements) for (const h of [a, b]) expect(keys.has(spinKey(multiplySpin(g, h)))).toBe(true);
    expect(sum(group.classes.map(({ size }) => size))).toBe(group.order);
    expect(sum(group.irreps.map(({ pair }) => (pair ? 2 : 1)))).toBe(group.classes.length);
  });

  test('irreps are orthogonal and fill the order, half of it with spinors', () => {
    for (const [i, a] of group.irreps.entries()) {
      for (const [j, b] of group.irreps.entries()) {
        const norm = i === j ? (a.pair ? 2 : 1) : 0;
        expect(Math.abs(inner(group, a.characters, b.characters) - norm)).toBeLessThan(1e-12);
      }
    }
    const squares = (spinor: boolean): number =>
      sum(
        group.irreps
          .filter((irrep) => irrep.spinor === spinor)
          .map(({ dimension, pair }) => (pair ? dimension ** 2 / 2 : dimension ** 2)),
      );
    expect(squares(false)).toBe(single.order);
    expect(squares(true)).toBe(single.order);
  });

  test('labels of classes and irreps are their own, Bethe numbers run without gaps', () => {
    const unique = (labels: string[]): void => expect(new Set(labels).size).toBe(labels.length);
    unique(group.classes.map(({ label }) => label));
    unique(group.irreps.map(({ label }) => label));
    unique(group.irreps.map(({ bethe }) => bethe));
    const numbers = group.irreps.flatMap(({ bethe }) => bethe.split(','));
    for (const sign of ['+', '-', '']) {
      const own = numbers
        .filter((label) => label.replace(/^Γ\d+/, '') === sign)
        .map((label) => Number(/\d+/.exec(label)));
      expect(own.sort((a, b) => a - b)).toEqual(own.map((_, k) => k + 1));
    }
  });

  test('products of two irreps reduce to whole numbers that keep the dimension', () => {
    for (const a of group.irreps) {
      for (const b of group.irreps) {
        const terms = reduceDouble(
          group,
          a.characters.map((x, c) => x * b.characters[c]!),
        );
        expect(sum(terms.map(({ irrep, count }) => irrep.dimension * count))).toBe(a.dimension * b.dimension);
        expect(terms.every(({ irrep, count }) => count > 0 && irrep.spinor === (a.spinor !== b.spinor))).toBe(true);
      }
    }
  });
});

// G. F. Koster, J. O. Dimmock, R. G. Wheeler, H. Statz, Properties of the Thirty-Two Point Groups, 1963: tables of
// O, Td, D4, D3; J. S. Griffith, The Theory of Transition-Metal Ions, 1961, for j in O. From memory.
describe('printed values', () => {
  const bethe = (symbol: string): string =>
    doubleGroup(symbol)
      .irreps.map(({ bethe: number, label }) => `${number}=${label}`)
      .join(' ');
  const ofMomentum = (symbol: string, multiplicity: number): string => {
    const group = doubleGroup(symbol);
    return reduceDouble(group, spinCharacters(group, multiplicity))
      .map(({ irrep, count }) => `${count > 1 ? count : ''}${irrep.bethe}`)
      .join(' ');
  };
  const product = (symbol: string, ...irreps: string[]): string =>
    doubleProduct(symbol, irreps)
      .map(({ irrep, count }) => `${count > 1 ? count : ''}${irrep}`)
      .join(' ');

  test('numbers after Bethe', () => {
    expect(bethe('O')).toBe('Γ1=A1 Γ2=A2 Γ3=E Γ4=T1 Γ5=T2 Γ6=E1/2 Γ7=E5/2 Γ8=G3/2');
    expect(bethe('Td')).toBe('Γ1=A1 Γ2=A2 Γ3=E Γ4=T1 Γ5=T2 Γ6=E1/2 Γ7=E5/2 Γ8=G3/2');
    expect(bethe('D4')).toBe('Γ1=A1 Γ2=A2 Γ3=B1 Γ4=B2 Γ5=E Γ6=E1/2 Γ7=E3/2');
    expect(bethe('D3')).toBe('Γ1=A1 Γ2=A2 Γ3=E Γ4=E1/2 Γ5,Γ6=E3/2');
    expect(bethe('Oh')).toContain('Γ8+=G3/2g');
    expect(bethe('D4h')).toContain('Γ7-=E3/2u');
    expect(bethe('D6')).toContain('Γ7=E1/2 Γ9=E3/2 Γ8=E5/2');
  });

  test('half-integer j in O, and in D4', () => {
    expect(ofMomentum('O', 2)).toBe('Γ6');
    expect(ofMomentum('O', 4)).toBe('Γ8');
    expect(ofMomentum('O', 6)).toBe('Γ7 Γ8');
    expect(ofMomentum('O', 8)).toBe('Γ6 Γ7 Γ8');
    expect(ofMomentum('O', 10)).toBe('Γ6 2Γ8');
    expect(ofMomentum('D4', 4)).toBe('Γ6 Γ7');
    expect(ofMomentum('D3', 4)).toBe('Γ4 Γ5,Γ6');
  });

  test('products', () => {
    expect(product('O', 'Γ6', 'Γ6')).toBe('Γ1 Γ4');
    expect(product('O', 'Γ6', 'Γ7')).toBe('Γ2 Γ5');
    expect(product('O', 'Γ6', 'Γ8')).toBe('Γ3 Γ4 Γ5');
    expect(product('O', 'Γ8', 'Γ8')).toBe('Γ1 Γ2 Γ3 2Γ4 2Γ5');
    expect(product('D4', 'Γ6', 'Γ7')).toBe('Γ3 Γ4 Γ5');
    expect(product('Oh', 'E1/2g', 'G3/2u')).toBe('Eu T1u T2u');
  });

  test('characters of Γ6 and Γ7 of O under C4 are √2 and −√2, of Γ8 zero', () => {
    const { classes, irreps } = doubleGroup('O');
    const fourfold = classes.findIndex(({ label }) => label === 'C4');
    const at = (label: string): number => irreps.find(({ bethe: number }) => number === label)!.characters[fourfold]!;
    expect(at('Γ6')).toBeCloseTo(Math.SQRT2, 12);
    expect(at('Γ7')).toBeCloseTo(-Math.SQRT2, 12);
    expect(at('Γ8')).toBeCloseTo(0, 12);
  });

  test('components of terms: 2T2g of d¹, 4A2g, 5T2g', () => {
    const components = (term: { multiplicity: number; irrep: string }): string =>
      spinOrbitComponents('Oh', term)
        .map(({ irrep, count }) => `${count > 1 ? count : ''}${irrep.bethe}`)
        .join(' ');
    expect(components({ multiplicity: 2, irrep: 'T2g' })).toBe('Γ7+ Γ8+');
    expect(components({ multiplicity: 4, irrep: 'A2g' })).toBe('Γ8+');
    expect(components({ multiplicity: 5, irrep: 'T2g' })).toBe('Γ1+ Γ3+ 2Γ4+ 2Γ5+');
  });
});

test('a label that is none is refused with the list', () => {
  expect(() => doubleProduct('D3', ['Γ7'])).toThrowError(
    expect.objectContaining({ code: 'unknown-symbol', field: 'irreps', message: expect.stringContaining('Γ5,Γ6') }),
  );
});
