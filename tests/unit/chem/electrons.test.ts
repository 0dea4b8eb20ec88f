import { describe, expect, test } from 'vitest';
import { dElectronCount, spinChoices, spinOnlyMoment } from '#src/chem/electrons.ts';

const terms = (geometry: 'OC-6' | 'T-4', spin: string) =>
  Array.from({ length: 11 }, (_, n) => {
    const choices = spinChoices(n, geometry);
    return (choices.find((c) => c.spin === spin) ?? choices[0])?.groundTerm?.label;
  });

describe('d-electron count', () => {
  test('group less oxidation state', () => {
    expect(dElectronCount('Cr', 3)).toBe(3);
    expect(dElectronCount('Ni', 0)).toBe(10);
    expect(dElectronCount('Ru', 2.5)).toBe(5.5);
  });
  test('none beyond 0 to 10, nor without a group', () => {
    expect(dElectronCount('Fe', 9)).toBeNull();
    expect(dElectronCount('Ni', -1)).toBeNull();
    expect(dElectronCount('Eu', 3)).toBeNull();
  });
});

describe('spin states', () => {
  // Ground terms of the Tanabe–Sugano diagrams; F. A. Cotton, Chemical Applications of Group Theory (from memory).
  test('octahedral high spin', () => {
    expect(terms('OC-6', 'high')).toEqual([
      '1A1g',
      '2T2g',
      '3T1g',
      '4A2g',
      '5Eg',
      '6A1g',
      '5T2g',
      '4T1g',
      '3A2g',
      '2Eg',
      '1A1g',
    ]);
  });
  test('octahedral low spin, d4 to d7', () => {
    expect(terms('OC-6', 'low').slice(4, 8)).toEqual(['3T1g', '2T2g', '1A1g', '2Eg']);
  });
  test('tetrahedral high spin', () => {
    expect(terms('T-4', 'high')).toEqual(['1A1', '2E', '3A2', '4T1', '5T2', '6A1', '5E', '4A2', '3T1', '2T2', '1A1']);
  });
  test('there is a choice in the octahedron for d4 to d7, in the tetrahedron for d3 to d6', () => {
    const choices = (g: 'OC-6' | 'T-4') =>
      Array.from({ length: 11 }, (_, n) => n).filter((n) => spinChoices(n, g).length > 1);
    expect(choices('OC-6')).toEqual([4, 5, 6, 7]);
    expect(choices('T-4')).toEqual([3, 4, 5, 6]);
  });
  test('a square plane has no cubic term, and d8 pairs up', () => {
    const [low, high] = spinChoices(8, 'SP-4');
    expect(low).toMatchObject({ spin: 'low', unpaired: 0, groundTerm: null, lfseInDelta: null });
    expect(high).toMatchObject({ spin: 'high', unpaired: 2 });
    expect(spinChoices(6, 'SP-4').map((c) => c.unpaired)).toEqual([0, 2, 4]);
  });
  test('no spin states without a whole count', () => {
    expect(spinChoices(null, 'OC-6')).toEqual([]);
    expect(spinChoices(5.5, 'OC-6')).toEqual([]);
    expect(spinChoices(11, 'OC-6')).toEqual([]);
    expect(spinOnlyMoment(0)).toBe(0);
  });
});
