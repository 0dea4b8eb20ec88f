import { describe, expect, test } from 'vitest';
import { estimateBeta, estimateDelta, freeIonRacah, ligandFactors } from '#src/chem/ligand-field/index.ts';
import { findLigand } from '#src/chem/ligands/index.ts';

const chromium = { element: 'Cr', oxidationState: 3 };

describe('estimates after Jørgensen', () => {
  test('mixed ligands count by the rule of average environment', () => {
    const donors = [
      { abbreviation: 'NH3', count: 5 },
      { abbreviation: 'Cl', count: 1 },
    ];
    expect(estimateDelta({ ...chromium, donors })).toBeCloseTo(17_400 * ((5 * 1.25 + 0.78) / 6), 6);
    expect(estimateBeta({ ...chromium, donors })).toBeCloseTo(1 - 0.21 * ((5 * 1.4 + 2) / 6), 9);
  });

  test('what the table lacks gives no estimate', () => {
    expect(estimateDelta({ ...chromium, donors: [{ abbreviation: 'PPh3', count: 6 }] })).toBeNull();
    expect(estimateBeta({ ...chromium, donors: [{ abbreviation: 'py', count: 6 }] })).toBeNull();
    expect(estimateDelta({ element: 'Zr', oxidationState: 4, donors: [{ abbreviation: 'F', count: 6 }] })).toBeNull();
    expect(ligandFactors('toString')).toBeNull();
    expect(freeIonRacah('constructor', 1)).toBeNull();
    expect(freeIonRacah('Cr', 6)).toBeNull();
  });

  test('four donors are refused, as the factors are those of octahedra', () => {
    expect(() => estimateDelta({ ...chromium, donors: [{ abbreviation: 'Cl', count: 4 }] })).toThrow(
      /six donor atoms, not 4/,
    );
  });

  test.each([
    'Br',
    'SCN',
    'N3',
    'dmso',
    'acetone',
    'dmf',
    'ox',
    'tu',
    'NCSe',
    'gly',
    'SO3',
    'MeCN',
    'py',
    'diars',
    'NO2',
  ])('%s is an abbreviation of the register', (abbreviation) => {
    expect(ligandFactors(abbreviation)).not.toBeNull();
    expect(findLigand(abbreviation)?.abbreviation).toBe(abbreviation);
  });
});
