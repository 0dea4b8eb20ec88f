import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { fitSolvate, judgeAnalysis, massPercentages } from '#src/chem/composition/index.ts';
import { addCompositions } from '#src/chem/elements.ts';
import { DomainError } from '#src/chem/errors.ts';
import { readFormula } from '#src/chem/formula/index.ts';

const codeOf = (act: () => unknown) => {
  try {
    act();
  } catch (error) {
    if (error instanceof DomainError) return error.code;
    throw error;
  }
  return null;
};

describe('mass percentages', () => {
  // By hand, CIAAW 2021 weights: 100 × 12.011 / 44.009
  test('carbon dioxide', () => expect(massPercentages({ C: 1, O: 2 }).C).toBeCloseTo(27.292, 3));
  test('they sum to 100', () => {
    const all = Object.values(massPercentages(readFormula('[Ru(bpy)3]Cl2·6H2O').composition));
    expect(all.reduce((a, b) => a + b, 0)).toBeCloseTo(100, 10);
  });
});

describe('judgement', () => {
  const { composition } = readFormula('[Ru(bpy)3](PF6)2');
  const calculated = massPercentages(composition);

  test('0.40 is accepted, 0.41 is not', () => {
    const at = (shift: number) => judgeAnalysis(composition, { C: calculated.C! + shift, H: calculated.H! });
    expect(at(0.4)).toMatchObject({ agrees: true, elements: [{ element: 'C', within: true }, { element: 'H' }] });
    expect(at(-0.41)).toMatchObject({ agrees: false, elements: [{ within: false }, { within: true }] });
    expect(at(0.4).rms).toBeCloseTo(0.4 / Math.SQRT2, 6);
  });
  test('an element that is not in the formula counts as none calculated', () =>
    expect(judgeAnalysis(composition, { Cl: 0.2 }).elements[0]).toMatchObject({ calculated: 0, within: true }));

  test.each([
    [{}, 'empty'],
    [{ Xq: 1 }, 'unknown-symbol'],
    [{ C: -1 }, 'out-of-range'],
    [{ C: Number.NaN }, 'out-of-range'],
    [{ C: 70, N: 40 }, 'out-of-range'],
  ])('%o is refused: %s', (found, code) => expect(codeOf(() => judgeAnalysis(composition, found))).toBe(code));
});

describe('which hydrate fits', () => {
  test('the one the numbers were made from, for every count in halves', () => {
    const { composition } = readFormula('[Ni(en)3]Cl2');
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 24 }), (halves) => {
        const wet = addCompositions([
          { composition, count: 1 },
          { composition: { H: 2, O: 1 }, count: halves / 2 },
        ]);
        const { C, H, N } = massPercentages(wet);
        const round = (x: number | undefined) => Math.round((x ?? 0) * 100) / 100;
        const [best] = fitSolvate(composition, { C: round(C), H: round(H), N: round(N) });
        expect(best).toMatchObject({ count: halves / 2, agrees: true });
      }),
      { seed: 20_260_131, numRuns: 25 },
    );
  });

  test('all 25 counts, best first; where none fits, none agrees', () => {
    const { composition } = readFormula('[Cu(phen)2]ClO4');
    const fits = fitSolvate(composition, { C: 20, H: 1, N: 30 });
    expect(fits).toHaveLength(25);
    expect(fits.some((f) => f.agrees)).toBe(false);
    expect(fits.map((f) => f.rms)).toEqual(fits.map((f) => f.rms).sort((a, b) => a - b));
  });

  test('other solvents', () => {
    const { composition } = readFormula('[Cu(phen)2]ClO4');
    const wet = readFormula('[Cu(phen)2]ClO4·1.5CH2Cl2');
    const { C, H, N } = massPercentages(wet.composition);
    const [best] = fitSolvate(composition, { C: C!, H: H!, N: N! }, { C: 1, H: 2, Cl: 2 });
    expect(best?.count).toBe(1.5);
    expect(best?.molarMass).toBeCloseTo(wet.molarMass, 9);
  });
});
