import { expect, test } from 'vitest';
import { longDescriptor, prefixedFormula } from '#src/components/complexes/prefixed-formula.ts';
import { centreSentence, hasInversion, relativesOf } from '#src/components/complexes/register/label-facts.ts';
import type { ComplexSummary } from '#src/contracts/complexes.ts';

// Which point groups hold i: character tables, e.g. P. W. Atkins et al., Tables for Group Theory (Oxford, 1970); from memory.
test.each(['Ci', 'C2h', 'C4h', 'C6h', 'D2h', 'D4h', 'D6h', 'D3d', 'D5d', 'S6', 'Th', 'Oh', 'Ih', 'Dinfh'])(
  '%s holds the inversion',
  (group) => expect(hasInversion(group)).toBe(true),
);
test.each(['C1', 'Cs', 'C2', 'C3v', 'C3h', 'D3', 'D3h', 'D5h', 'D2d', 'D4d', 'S4', 'S8', 'T', 'Td', 'O', 'I', 'Cinfv'])(
  '%s does not',
  (group) => expect(hasInversion(group)).toBe(false),
);

test('the centre is told with what it means, and not where there is no d–d band or no group', () => {
  expect(centreSentence('Oh', 3)).toBe('yes: d–d bands are Laporte-forbidden');
  expect(centreSentence('Td', 7)).toBe('no: the Laporte rule does not bar d–d bands');
  expect(centreSentence('Td', 0)).toBe('no; d⁰ has no d–d bands');
  expect(centreSentence(null, 3)).toBeNull();
});

const record = (accession: string, more: object) =>
  ({
    accession,
    formula: '[CoCl2(en)2]+',
    centres: [{ geometry: 'OC-6' }],
    isomer: { descriptor: null, chirality: null },
    pointGroup: null,
    ...more,
  }) as unknown as ComplexSummary;

test('the same record comes first, siblings are told by what they differ in, other formulae are left out', () => {
  const items = [
    record('A', {}),
    record('B', { isomer: { descriptor: 'trans', chirality: null }, pointGroup: 'D2h' }),
    record('C', { isomer: { descriptor: 'cis', chirality: 'Λ' }, pointGroup: 'C2' }),
    record('D', { centres: [{ geometry: null }] }),
    record('E', { formula: '[CoCl2(en)2(H2O)]+' }),
  ];
  const isomer = { descriptor: 'trans', pointGroup: 'D2h' } as never;
  const found = relativesOf(items, '[CoCl2(en)2]+', { geometry: 'OC-6', isomer, chirality: null }, () => 'octahedral');
  expect(found.map(({ accession, same, what }) => [accession, same, what])).toEqual([
    ['B', true, 'the trans isomer'],
    ['A', false, 'isomer not stated'],
    ['C', false, 'the Λ-cis isomer'],
    ['D', false, 'geometry not stated, isomer not stated'],
  ]);
});

test('the racemate and an unstated hand are one record; a stated hand is another', () => {
  const items = [record('A', { isomer: { descriptor: null, chirality: null }, pointGroup: 'D3' })];
  const same = (chirality: string | null) =>
    relativesOf(
      items,
      '[CoCl2(en)2]+',
      { geometry: 'OC-6', isomer: { descriptor: null, pointGroup: 'D3' } as never, chirality },
      String,
    )[0]?.same;
  expect([same('rac'), same(null), same('Δ')]).toEqual([true, true, false]);
});

test('prefixes stand before the formula; long descriptors stand beside it', () => {
  expect(prefixedFormula('[X]', { descriptor: 'cis', chirality: 'Δ' })).toBe('Δ-cis-[X]');
  expect(prefixedFormula('[X]', { descriptor: null, chirality: 'rac' })).toBe('rac-[X]');
  const long = { descriptor: 'trans: Br–Cl, H2O–I', chirality: null };
  expect([prefixedFormula('[X]', long), longDescriptor(long)]).toEqual(['[X]', 'trans: Br–Cl, H2O–I']);
  expect(longDescriptor({ descriptor: 'sym-fac', chirality: null })).toBeNull();
});
