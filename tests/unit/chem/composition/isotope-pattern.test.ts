import { IsotopicDistribution } from 'isotopic-distribution';
import { describe, expect, test } from 'vitest';
import { exactMass, type IsotopePeak, isotopePattern } from '#src/chem/composition/index.ts';
import { DomainError } from '#src/chem/errors.ts';
import { readFormula } from '#src/chem/formula/index.ts';

/** Shares and mean masses by whole mass number, of peaks above a share. */
function byMassNumber(peaks: readonly { mass: number; share: number }[], carriers = 1) {
  const bins = new Map<number, { mass: number; share: number }>();
  for (const { mass, share } of peaks) {
    const bin = Math.round(mass * carriers);
    const before = bins.get(bin) ?? { mass: 0, share: 0 };
    bins.set(bin, {
      mass: (before.mass * before.share + mass * share) / (before.share + share),
      share: before.share + share,
    });
  }
  return bins;
}

describe('isotope pattern', () => {
  // Shares by hand: 0.7576², 2 × 0.7576 × 0.2424, 0.2424²
  test('dichlorine', () => {
    const peaks = isotopePattern({ Cl: 2 });
    expect(peaks.map((p) => p.share)).toEqual(
      [0.7576 ** 2, 2 * 0.7576 * 0.2424, 0.2424 ** 2].map((x) => expect.closeTo(x, 9)),
    );
    expect(peaks[0]?.percent).toBe(100);
  });
  test('one atom gives its nuclides', () => {
    expect(isotopePattern({ Pt: 1 }, { threshold: 0 })).toHaveLength(6);
    expect(isotopePattern({ Au: 1 })).toMatchObject([{ share: 1, percent: 100 }]);
  });
  test('the lightest peak of CHNO is the exact mass; charge divides and takes electrons', () => {
    const composition = { C: 10, H: 8, N: 2 };
    expect(isotopePattern(composition)[0]?.mass).toBeCloseTo(exactMass(composition), 6);
    expect(isotopePattern(composition, { charge: 2 })[0]?.mass).toBeCloseTo(exactMass(composition, 2) / 2, 6);
    expect(isotopePattern(composition, { charge: -1 })[0]?.mass).toBeCloseTo(exactMass(composition, -1), 6);
  });
  test('all shares together are one when none is left out', () => {
    const peaks = isotopePattern(readFormula('[Ru(bpy)3]2+').composition, { threshold: 0 });
    expect(peaks.reduce((sum, p) => sum + p.share, 0)).toBeCloseTo(1, 7);
  });

  // An independent program over the same abundances (isotopic-distribution 3.6, MIT)
  test.each([
    ['C10H10Fe', 0],
    ['C30H24N6Ru', 2],
    ['C36H30Cl2P2Pd', 0],
    ['Cl14Mo6', -2],
    ['C44H28ClFeN4', 0],
    ['C33H24IrN3', 0],
    ['Cl6Pt', -2],
    ['C8H20B2Hg2Se2Sn', 0],
    ['O40PW12', -3],
  ])('%s, charge %i, as an independent program has it', (formula, charge) => {
    const composition = Object.fromEntries(
      [...formula.matchAll(/([A-Z][a-z]?)(\d*)/g)].map(([, symbol, n]) => [symbol!, Number(n || 1)]),
    );
    const sign = charge === 0 ? '' : `(${charge > 0 ? '+' : ''}${charge})`;
    const other = new IsotopicDistribution(`${formula}${sign}`, { fwhm: 0.01, minY: 1e-10 });
    const lines = other.getXY() as { x: number[]; y: number[] };
    const total = lines.y.reduce((a, b) => a + b, 0);
    const carriers = Math.max(1, Math.abs(charge));
    const theirs = byMassNumber(
      lines.x.map((mass, i) => ({ mass, share: lines.y[i]! / total })),
      carriers,
    );
    const ours = byMassNumber(isotopePattern(composition, { charge, threshold: 1e-6 }), carriers);
    for (const [bin, { mass, share }] of theirs) {
      if (share < 1e-3) continue;
      expect(ours.get(bin)?.share, `share at ${bin}`).toBeCloseTo(share, 5);
      expect(ours.get(bin)?.mass, `mass at ${bin}`).toBeCloseTo(mass, 3);
    }
  });

  test('threshold and width do what they say', () => {
    const composition = readFormula('[PtCl6]2-').composition;
    const percent = (peaks: IsotopePeak[]) => Math.min(...peaks.map((p) => p.percent));
    expect(percent(isotopePattern(composition, { threshold: 0.05 }))).toBeGreaterThanOrEqual(5);
    const coarse = isotopePattern(composition, { width: 0.3 });
    expect(new Set(coarse.map((p) => Math.round(p.mass))).size).toBe(coarse.length);
  });

  test.each([
    [{}, 'out-of-range'],
    [{ H: 0.5 }, 'out-of-range'],
    [{ H: -1 }, 'out-of-range'],
    [{ Tc: 1 }, 'unsupported'],
    [{ C: 5001 }, 'too-large'],
  ])('%o is refused: %s', (composition, code) => {
    expect(() => isotopePattern(composition)).toThrow(DomainError);
    try {
      isotopePattern(composition);
    } catch (error) {
      expect((error as DomainError).code).toBe(code);
    }
  });
});
