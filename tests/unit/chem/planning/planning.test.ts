import { describe, expect, test } from 'vitest';
import { usualEpsilon } from '#src/chem/assignment/usual-epsilon.ts';
import { dilutionPlan, planBands, USUAL_LIMITS } from '#src/chem/planning/index.ts';

const hexaaqua = (element: string, oxidationState: number) =>
  ({
    element,
    oxidationState,
    geometry: 'OC-6',
    donors: [{ abbreviation: 'H2O', count: 6 }],
    centrosymmetric: true,
  }) as const;

describe('bands to be expected', () => {
  test('hexaaquanickel(II): three spin-allowed bands near those observed', () => {
    const plan = planBands(hexaaqua('Ni', 2));
    // Observed 8500, 13 800, 25 300 cm⁻¹ (F. A. Cotton, G. Wilkinson, Advanced Inorganic Chemistry; from memory)
    const allowed = plan.bands.filter(({ kind, spinAllowed }) => kind === 'd-d' && spinAllowed);
    expect(allowed.map(({ to }) => to)).toEqual(['3T2g', '3T1g(F)', '3T1g(P)']);
    [8500, 13_800, 25_300].forEach((observed, i) => {
      expect(Math.abs(allowed[i]!.wavenumber / observed - 1)).toBeLessThan(0.1);
    });
    expect(plan.delta).toBe(8700); // f·g = 1.00 × 8700
    expect(plan.B).toBe(906); // (1 − 1.0 × 0.12) × 1030
    expect(plan.ground).toBe('3A2g');
  });

  test('tris(ethane-1,2-diamine)cobalt(III) comes out low-spin and its bands stronger without a centre', () => {
    const plan = planBands({
      element: 'Co',
      oxidationState: 3,
      geometry: 'OC-6',
      donors: [{ abbreviation: 'en', count: 6 }],
      centrosymmetric: false,
    });
    expect(plan.spin).toBe('low');
    expect(plan.ground).toBe('1A1g');
    const [first, second] = plan.bands.filter(({ spinAllowed, kind }) => spinAllowed && kind === 'd-d');
    // Observed 21 400 and 29 500 cm⁻¹, ε 88 and 78 (same source)
    expect([first!.to, second!.to]).toEqual(['1T1g', '1T2g']);
    expect(Math.abs(first!.wavenumber / 21_400 - 1)).toBeLessThan(0.1);
    expect(first!.epsilon.from).toBeLessThan(88);
    expect(first!.epsilon.to).toBeGreaterThan(88);
  });

  test('a tetrahedron has 4/9 of the octahedron’s Δ and strong bands', () => {
    const plan = planBands({
      element: 'Co',
      oxidationState: 2,
      geometry: 'T-4',
      donors: [{ abbreviation: 'Cl', count: 4 }],
      centrosymmetric: false,
    });
    expect(plan.delta).toBe(Math.round((0.78 * 9000 * 4) / 9));
    expect(plan.bands.filter(({ kind, spinAllowed }) => kind === 'd-d' && spinAllowed)).toHaveLength(3);
    expect(plan.bands.some(({ kind, to }) => kind === 'LMCT' && to === 'Cl')).toBe(true);
  });

  test('where the tables end, the plan says what to give; given values are taken', () => {
    const unknown = { ...hexaaqua('Ti', 3) };
    const plan = planBands(unknown);
    expect(plan.bands.filter(({ kind }) => kind === 'd-d')).toEqual([]);
    expect(plan.reasons.join(' ')).toContain('Give Δ');
    const given = planBands({ ...unknown, delta: 20_300 });
    expect(given.bands.map(({ to, wavenumber }) => [to, wavenumber])).toContainEqual(['2Eg', 20_300]);
  });

  test('d⁰ and d¹⁰ have no d–d band', () => {
    const tetroxo = { ...hexaaqua('Mn', 7), geometry: 'T-4', donors: [{ abbreviation: 'O', count: 4 }] } as const;
    expect(planBands(tetroxo).bands.map(({ kind }) => kind)).toEqual(['LMCT']);
    expect(planBands(hexaaqua('Zn', 2)).bands).toEqual([]);
  });

  test('donors that do not fill the geometry are refused', () => {
    expect(() => planBands({ ...hexaaqua('Ni', 2), donors: [{ abbreviation: 'H2O', count: 5 }] })).toThrow(
      /6 donor atoms, not 5/,
    );
  });
});

describe('dilutions', () => {
  const band = (wavenumber: number, typical: number) => ({
    wavenumber,
    epsilon: { from: typical / 3, to: typical * 3, typical },
  });
  test('bands of like strength share a solution; a far stronger one needs its own', () => {
    const { dilutions, outOfReach } = dilutionPlan([band(17_000, 20), band(24_000, 50), band(40_000, 15_000)]);
    expect(dilutions).toHaveLength(2);
    expect(outOfReach).toEqual([]);
    for (const { bands } of dilutions)
      for (const { absorbance } of bands) {
        expect(absorbance).toBeGreaterThanOrEqual(0.19); // two figures of the concentration
        expect(absorbance).toBeLessThanOrEqual(1.02);
      }
  });
  test('a weak band gets a long cell, and one too weak is told', () => {
    const [weak] = dilutionPlan([band(18_800, 0.7)]).dilutions;
    expect(weak!.path).toBeGreaterThan(1);
    expect(weak!.concentration).toBeLessThanOrEqual(USUAL_LIMITS.highest);
    expect(dilutionPlan([band(18_800, 0.015)]).outOfReach[0]!.reason).toContain('Too weak');
  });
  test('no bands, no solutions', () => expect(dilutionPlan([])).toEqual({ dilutions: [], outOfReach: [] }));
});

// Shriver & Atkins, 5th ed., ch. 20; limits as in checks/chargetransfer.json cc-001 to cc-005
test.each([
  [{ kind: 'd-d', spinAllowed: false, site: 'centrosymmetric', period: 4 }, 0.001, 1],
  [{ kind: 'd-d', spinAllowed: true, site: 'centrosymmetric', period: 4 }, 1, 100],
  [{ kind: 'd-d', spinAllowed: true, site: 'tetrahedral', period: 4 }, 100, 1000],
  [{ kind: 'charge-transfer', spinAllowed: true, site: 'acentric', period: 4 }, 1000, 50_000],
] as const)('usual ε of %o', (facts, from, to) => {
  expect(usualEpsilon(facts)).toMatchObject({ from, to });
});
test('spin-forbidden bands of 5d ions reach hundreds', () => {
  expect(
    usualEpsilon({ kind: 'd-d', spinAllowed: false, site: 'centrosymmetric', period: 6 }).to,
  ).toBeGreaterThanOrEqual(300);
});
