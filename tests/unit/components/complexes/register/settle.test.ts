import { describe, expect, test } from 'vitest';
import * as chemistry from '#src/components/complexes/register/chemistry.ts';
import { isomerCards, pickValue } from '#src/components/complexes/register/isomer-cards.ts';
import { attemptReading, besideEntity, ligandText, soleEntity } from '#src/components/complexes/register/reading.ts';
import { type Choices, settle, settledInput, subjectOf } from '#src/components/complexes/register/settle.ts';
import { siteLetters } from '#src/components/complexes/register/site-letters.ts';

function entityOf(formula: string) {
  const entity = soleEntity(chemistry.readFormula(formula));
  if (!entity) throw new Error(`${formula} holds no single entity`);
  return entity;
}
const settled = (formula: string, choices: Omit<Choices, 'of'> = {}) => {
  const entity = entityOf(formula);
  return settle(chemistry, entity, { ...choices, of: subjectOf(entity) });
};

describe('an attempt', () => {
  test('at nothing is no refusal', () => {
    expect(attemptReading(chemistry.readFormula, '  ', [])).toEqual({ kind: 'empty' });
  });

  test('that is refused tells the place in the text', () => {
    expect(attemptReading(chemistry.readFormula, '[Co(', [])).toMatchObject({ kind: 'refused', position: 3 });
  });
});

describe('what follows from a formula alone', () => {
  test('the usual geometry, and no isomer where there are several', () => {
    const { geometry, list, pick, isomer } = settled('[Co(en)2Cl2]+');
    expect(geometry).toBe('OC-6');
    // cis and trans of [Co(en)2Cl2]+, the cis form as a pair: A. Werner, Ber. 44 (1911) 1887, and any textbook.
    expect([list?.count, list?.enantiomericPairs]).toEqual([3, 1]);
    expect([pick, isomer]).toEqual([null, null]);
  });

  test('the isomer its prefix names', () => {
    expect(settled('trans-[CoCl2(en)2]+').isomer?.pointGroup).toBe('D2h');
    expect(settled('cis-[CoCl2(en)2]+')).toMatchObject({ chirality: 'rac', pick: { rac: true } });
  });

  test('of the one form of a tris-chelate, the pair of mirror images; of a stated hand, that hand', () => {
    expect(settled('[Cr(ox)3]3-')).toMatchObject({ chirality: 'rac' });
    const lambda = settled('Λ-[Co(en)3]3+');
    expect([lambda.chirality, lambda.pick?.rac]).toEqual(['Λ', false]);
  });

  test('the ground term where only one spin state is possible', () => {
    // d³ in an octahedron: 4A2g (common practice).
    expect(settled('[Cr(H2O)6]3+')).toMatchObject({ groundTerm: { label: '4A2g', group: 'Oh' }, spinState: null });
    expect(settled('[Co(NH3)6]3+').groundTerm).toBeNull();
  });
});

describe('a choice', () => {
  test('is sent by the number of the isomer', () => {
    const { list } = settled('[Co(en)2Cl2]+');
    const index = list!.isomers.findIndex(({ chirality }) => chirality === 'Δ');
    const hand = settled('[Co(en)2Cl2]+', { isomer: { index, rac: false } });
    expect(hand.chirality).toBe('Δ');
    expect(settledInput(hand)).toEqual({ geometry: 'OC-6', isomer: index, spinState: null });
    const pair = settled('[Co(en)2Cl2]+', { isomer: { index, rac: true } });
    expect(settledInput(pair)).toEqual({ geometry: 'OC-6', isomer: index, chirality: 'rac', spinState: null });
  });

  test('not to state anything is one', () => {
    expect(settledInput(settled('trans-[CoCl2(en)2]+', { isomer: null })).isomer).toBeNull();
    expect(settledInput(settled('[Cr(ox)3]3-', { geometry: null }))).toMatchObject({ geometry: null, isomer: null });
  });

  test('made for another entity, or for a polyhedron it has not, is not kept', () => {
    const entity = entityOf('[Cr(ox)3]3-');
    expect(settle(chemistry, entity, { of: 'another', geometry: 'TPR-6' }).geometry).toBe('OC-6');
    expect(settled('[Cr(ox)3]3-', { geometry: 'SP-4' }).geometry).toBe('OC-6');
  });

  test('of a spin state settles the ground term', () => {
    // Low-spin d⁶ in an octahedron: 1A1g (common practice).
    expect(settled('[Co(NH3)6]3+', { spinState: 'low' }).groundTerm?.label).toBe('1A1g');
    expect(settled('[Co(NH3)6]3+', { spinState: 'crossover' }).groundTerm).toBeNull();
  });
});

test('an entity of several centres has no geometry to choose', () => {
  expect(settled('Cr2O7 2-')).toMatchObject({ geometry: null, list: null, isomer: null, spins: [] });
});

test('the cards of a list: achiral forms, then the pair and its hands', () => {
  const { list } = settled('[Co(en)2Cl2]+');
  const cards = isomerCards(list!);
  expect(cards.map(({ title }) => title)).toEqual(['trans', 'cis, rac', 'cis, Λ', 'cis, Δ']);
  expect(new Set(cards.map(({ value }) => value)).size).toBe(4);
  expect(pickValue(null)).toBe('none');
});

test('hands that have no name are offered as a pair only', () => {
  const { list } = settled('[Co(NH3)(H2O)ClBrI(py)]');
  // MABCDEF: 30 stereoisomers, 15 pairs (Burnside; common practice).
  expect([list?.count, isomerCards(list!).length]).toEqual([30, 15]);
});

test('donors are lettered by atom, with primes where two ligands bring the same', () => {
  const { ligands } = entityOf('[Co(NH3)3(py)3]3+');
  const { letters, key } = siteLetters(['NH3', 'NH3', 'NH3', 'py', 'py', 'py'], ligands);
  expect(letters).toEqual(['N', 'N', 'N', 'N′', 'N′', 'N′']);
  expect(key).toEqual([
    { letter: 'N', ligand: 'NH3' },
    { letter: 'N′', ligand: 'py' },
  ]);
  expect(siteLetters(['Cl', 'N'], entityOf('[Co(en)2Cl2]+').ligands)).toEqual({ letters: ['Cl', 'N'], key: [] });
});

test.each([
  [{ abbreviation: 'Cl', charge: -1 }, 'Cl^-'],
  [{ abbreviation: 'ox', charge: -2 }, 'ox^2-'],
  [{ abbreviation: 'NO', charge: 1 }, 'NO^+'],
  [{ abbreviation: 'en', charge: 0 }, 'en'],
  [{ abbreviation: 'L', charge: null }, 'L'],
])('a ligand with its charge: %o', (ligand, text) => expect(ligandText(ligand)).toBe(text));

test('what belongs to the preparation, in words', () => {
  const beside = (formula: string) => besideEntity(chemistry.readFormula(formula));
  expect(beside('[Co(en)2Cl2]Cl·0.5H2O')).toBe('the counter-ion and water of crystallisation');
  expect(beside('[Co(NH3)6]Cl3')).toBe('the counter-ion');
  expect(beside('[Cr(H2O)6]3+')).toBe('');
});
