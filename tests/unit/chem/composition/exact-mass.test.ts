import { elementsAndIsotopes } from 'chemical-elements';
import { describe, expect, test } from 'vitest';
import { exactMass, labelledMolarMass, nuclidesOf } from '#src/chem/composition/index.ts';
import { elements } from '#src/chem/elements.ts';

describe('nuclides', () => {
  const natural = elements.filter((e) => nuclidesOf(e.symbol).some((n) => n.abundance > 0));

  test('every element up to uranium has a composition but those of short-lived nuclides alone', () => {
    const missing = elements.filter((e) => e.number <= 92 && !natural.includes(e)).map((e) => e.symbol);
    expect(missing).toEqual(['Tc', 'Pm', 'Po', 'At', 'Rn', 'Fr', 'Ra', 'Ac']);
  });

  test.each(natural.map((e) => [e.symbol, e] as const))(
    '%s: abundances sum to one and give the standard weight',
    (symbol, e) => {
      const nuclides = nuclidesOf(symbol);
      expect(nuclides.reduce((sum, n) => sum + n.abundance, 0)).toBeCloseTo(1, 4);
      // Standard weights are not reckoned from this table and are rounded to five figures: S and Se lie 1.5e-4 off.
      const mean = nuclides.reduce((sum, n) => sum + n.mass * n.abundance, 0);
      expect(Math.abs(mean / e.weight - 1)).toBeLessThan(1.6e-4);
    },
  );

  test('they are those of the package they were taken from', () => {
    for (const { symbol, isotopes } of elementsAndIsotopes) {
      for (const n of nuclidesOf(symbol)) {
        const same = isotopes.find((i) => i.nominal === n.massNumber);
        expect([n.mass, n.abundance], `${n.massNumber}${symbol}`).toEqual([same?.mass, same?.abundance ?? 0]);
      }
    }
  });
});

describe('exact mass', () => {
  test.each([
    // By hand from AME2012 masses: 55.93493633 + 10 × 12 + 10 × 1.00782503223
    ['ferrocene', { C: 10, H: 10, Fe: 1 }, 0, 186.01318665],
    // 12 + 15.99491462, less nothing
    ['CO', { C: 1, O: 1 }, 0, 27.99491462],
    // One electron less: 1.00782503223 − 0.00054857990907
    ['H+', { H: 1 }, 1, 1.00727645232],
  ])('%s', (_, composition, charge, mass) => expect(exactMass(composition, charge)).toBeCloseTo(mass, 6));

  test('none without a natural composition; nothing weighs nothing', () => {
    expect(exactMass({ Tc: 1, O: 4 }, -1)).toBeNaN();
    expect(exactMass({ Xq: 1 })).toBeNaN();
    expect(exactMass({})).toBe(0);
  });
});

describe('mass of a labelled compound', () => {
  // 2 × 2.01410177812 + 15.999
  test('heavy water', () =>
    expect(labelledMolarMass({ H: 2, O: 1 }, [{ element: 'H', massNumber: 2, count: 2 }])).toBeCloseTo(20.0272, 4));
  test('no label leaves the molar mass', () => expect(labelledMolarMass({ H: 2, O: 1 }, [])).toBeCloseTo(18.015, 3));
  test('an unknown nuclide and more labels than atoms have none', () => {
    expect(labelledMolarMass({ H: 2 }, [{ element: 'H', massNumber: 7, count: 1 }])).toBeNaN();
    expect(labelledMolarMass({ H: 2 }, [{ element: 'H', massNumber: 2, count: 3 }])).toBeNaN();
  });
});
