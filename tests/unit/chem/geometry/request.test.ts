import { expect, test } from 'vitest';
import { DomainError } from '#src/chem/errors.ts';
import { enumerateIsomers, isomerRequest, type ReadLigand } from '#src/chem/geometry/index.ts';

const en: ReadLigand = { abbreviation: 'en', count: 2, donors: ['N', 'N'], denticity: 2 };
const gly: ReadLigand = { abbreviation: 'gly', count: 3, donors: ['N', 'O'], denticity: 2, bite: [[0, 1]] };
const chloride: ReadLigand = { abbreviation: 'Cl', count: 2, donors: ['Cl'], denticity: 1 };

test('monodentates keep their abbreviation, chelates show their donor atoms', () => {
  const request = isomerRequest('OC-6', [chloride, en]);
  const { isomers, count } = enumerateIsomers(request);
  expect(count).toBe(3);
  expect(isomers[0]).toMatchObject({
    descriptor: 'trans',
    sites: ['Cl', 'Cl', 'N', 'N', 'N', 'N'],
    pointGroup: 'D2h',
    donorSetGroup: 'D4h',
  });
});

test('an unsymmetric chelate has two donor kinds: [Co(gly)3] has fac and mer pairs', () => {
  const { isomers } = enumerateIsomers(isomerRequest('OC-6', [gly]));
  expect(isomers.map(({ descriptor, chirality }) => `${descriptor} ${chirality}`)).toEqual([
    'fac Λ',
    'fac Δ',
    'mer Λ',
    'mer Δ',
  ]);
});

test('like donor atoms of different chelates are kept apart by the ligand', () => {
  const bpy: ReadLigand = { abbreviation: 'bpy', count: 1, donors: ['N', 'N'], denticity: 2 };
  const { isomers } = enumerateIsomers(isomerRequest('OC-6', [en, bpy]));
  expect(new Set(isomers[0]!.sites)).toEqual(new Set(['N(en)', 'N(bpy)']));
  expect(isomers[0]!.donorSetGroup).toBe('C2v');
});

test('a hapto ligand takes one vertex', () => {
  const cp: ReadLigand = { abbreviation: 'Cp', count: 2, donors: ['C', 'C', 'C', 'C', 'C'], denticity: 1 };
  expect(enumerateIsomers(isomerRequest('L-2', [cp])).isomers[0]).toMatchObject({
    sites: ['Cp', 'Cp'],
    pointGroup: 'Dinfh',
  });
});

test('bite, span and plane are passed on', () => {
  const tacn: ReadLigand = {
    abbreviation: 'tacn',
    count: 1,
    donors: ['N', 'N', 'N'],
    denticity: 3,
    bite: [
      [0, 1],
      [1, 2],
      [0, 2],
    ],
  };
  const aqua: ReadLigand = { abbreviation: 'OH2', count: 3, donors: ['O'], denticity: 1 };
  expect(enumerateIsomers(isomerRequest('OC-6', [tacn, aqua])).isomers.map((i) => i.pointGroup)).toEqual(['C3v']);
  const terpy: ReadLigand = { abbreviation: 'terpy', count: 2, donors: ['N', 'N', 'N'], denticity: 3, span: 'mer' };
  expect(enumerateIsomers(isomerRequest('OC-6', [terpy])).isomers.map((i) => i.pointGroup)).toEqual(['D2d']);
  const salen: ReadLigand = { abbreviation: 'salen', count: 1, donors: ['O', 'N', 'N', 'O'], denticity: 4 };
  expect(isomerRequest('SP-4', [{ ...salen, planar: true }]).ligands[0]).toMatchObject({ planar: true });
});

test('a chelate whose donors do not match its denticity is refused', () => {
  expect(() => isomerRequest('OC-6', [{ ...en, donors: ['N'] }])).toThrow(DomainError);
});
