import { describe, expect, test } from 'vitest';
import { acceptorLevel } from '#src/chem/charge-transfer/acceptor-level.ts';
import { chargeTransfer, lmctTrend, spinPairingInD } from '#src/chem/charge-transfer/index.ts';
import type { DomainError } from '#src/chem/errors.ts';
import { findLigand } from '#src/chem/ligands/index.ts';

describe('spin pairing', () => {
  // C. K. Jørgensen's list for one more electron in t2g: 0, −2/3, −4/3, 2, 4/3, 2/3 D (from memory)
  const spins = [0, 1, 2, 3, 2, 1, 0];
  test.each([0, 1, 2, 3, 4, 5])('t2g%i takes another electron', (q) => {
    const change = spinPairingInD(q + 1, spins[q + 1]!) - spinPairingInD(q, spins[q]!);
    expect(change).toBeCloseTo([0, -2 / 3, -4 / 3, 2, 4 / 3, 2 / 3][q]!, 12);
  });
  test('the average over all states of a shell is zero: one electron, one hole, none', () => {
    for (const [q, unpaired] of [
      [0, 0],
      [1, 1],
      [9, 1],
      [10, 0],
    ] as const)
      expect(spinPairingInD(q, unpaired)).toBeCloseTo(0, 12);
  });
});

describe('where the electron goes', () => {
  test.each([
    [0, 'OC-6', null, 't2g', false],
    [3, 'OC-6', null, 't2g', false],
    [5, 'OC-6', 'high', 't2g', false],
    [6, 'OC-6', 'low', 'eg', true],
    [8, 'OC-6', null, 'eg', true],
    [9, 'OC-6', null, 'eg', true],
    [0, 'T-4', null, 'e', false],
    [7, 'T-4', 'high', 't2', false],
    // Tetrahedra are high-spin (common practice): e2 t2^3 of tetrachloridoferrate(III) takes the electron in e.
    [5, 'T-4', null, 'e', false],
    [8, 'SP-4', 'low', 'x2-y2', false],
  ] as const)('d%i in %s (%s) into %s', (n, geometry, spin, orbital, raisedByField) => {
    expect(acceptorLevel(n, geometry, spin)).toMatchObject({ orbital, raisedByField });
  });
  test('d10 takes none', () => expect(acceptorLevel(10, 'T-4', null)).toBeNull());
  test('a half-filled level pairs the newcomer, an empty place does not', () => {
    expect(acceptorLevel(3, 'OC-6', null)).toMatchObject({ unpairedBefore: 3, unpairedAfter: 2 });
    expect(acceptorLevel(2, 'OC-6', null)).toMatchObject({ unpairedBefore: 2, unpairedAfter: 3 });
    expect(acceptorLevel(6, 'OC-6', 'low')).toMatchObject({ unpairedBefore: 0, unpairedAfter: 1 });
  });
});

describe('what is asked', () => {
  const chromium = { element: 'Cr', oxidationState: 3, geometry: 'OC-6' };
  test('terms add up to the wavenumber, and B brings the spin pairing', () => {
    const [band] = chargeTransfer({ ...chromium, ligands: ['Cl'], B: 600 }).lmct;
    // D = 7/6 (5/2 · 600 + 4 · 600) = 4550 cm⁻¹; t2g3 → t2g4 costs 2 D
    expect(band!.terms).toEqual({ electronegativity: 36_000, field: 0, spinPairing: 9100 });
    expect(band!.wavenumber).toBe(45_100);
  });
  test('a ligand named twice, or by formula, is told once; ligands come by rising energy', () => {
    const { lmct, mlct } = chargeTransfer({ ...chromium, ligands: ['Cl', 'NH3', 'Cl', 'Br', 'H3N'] });
    expect(lmct.map(({ ligand }) => ligand)).toEqual(['Br', 'Cl', 'NH3']);
    expect(mlct).toHaveLength(3);
  });
  test('ligands without a value are named', () => {
    const { lmct, reasons } = chargeTransfer({ ...chromium, ligands: ['en', 'Cl'] });
    expect(lmct).toHaveLength(1);
    expect(reasons.at(-1)).toContain('en');
  });
  test('an ion or geometry without a value is said so, and MLCT is judged all the same', () => {
    const manganese = chargeTransfer({ element: 'Mn', oxidationState: 1, geometry: 'OC-6', ligands: ['CO'] });
    expect(manganese.lmct).toEqual([]);
    expect(manganese.reasons[0]).toContain('No optical electronegativity');
    expect(manganese.mlct[0]!.plausible).toBe(true);
    expect(chargeTransfer({ ...chromium, geometry: 'TPR-6', ligands: ['Cl'] }).reasons[0]).toContain('TPR-6');
  });
  test('refusals name the place', () => {
    const refused = (request: Partial<Parameters<typeof chargeTransfer>[0]>) => {
      try {
        chargeTransfer({ ...chromium, ligands: ['Cl'], ...request });
      } catch (error) {
        return error as DomainError;
      }
      throw new Error('not refused');
    };
    expect(refused({ ligands: ['Cl', 'byp'] })).toMatchObject({
      field: 'ligands/1',
      message: expect.stringContaining('bpy'),
    });
    expect(refused({ oxidationState: 8 })).toMatchObject({ field: 'oxidationState' });
  });
});

test('a trend has a line an ion and a point a ligand that has a value', () => {
  const lines = lmctTrend(
    [
      { element: 'Cr', oxidationState: 3 },
      { element: 'Xx', oxidationState: 3 },
    ],
    ['Cl', 'Br', 'en'].map((name) => findLigand(name)!),
    'OC-6',
  );
  expect(lines).toEqual([
    {
      ion: { element: 'Cr', oxidationState: 3 },
      points: [
        { ligand: 'Cl', wavenumber: 36_000 },
        { ligand: 'Br', wavenumber: 30_000 },
      ],
    },
  ]);
});
