import { expect, test } from 'vitest';
import { asAbsorbance, asKubelkaMunk, curveOf, quantitiesOf } from '#src/components/spectra/page/curves.ts';

const points = (yUnit: string, y: (number | null)[]) => ({
  xUnit: 'cm-1',
  yUnit,
  x: y.map((_, i) => i + 1),
  y,
  decimated: false,
});

test('log ε is taken back to ε, gaps stay gaps', () => {
  expect(curveOf(points('log-epsilon', [2, null, 3])).y).toEqual([100, null, 1000]);
});

// A = −log₁₀ T: IUPAC Gold Book, absorbance A00028 (from memory).
test('10 % transmittance is an absorbance of 1; where nothing passes there is a gap', () => {
  const { quantity, y } = asAbsorbance(curveOf(points('percent-transmittance', [100, 10, 0])));
  expect(quantity).toBe('absorbance');
  expect(y[0]).toBeCloseTo(0, 12);
  expect(y[1]).toBeCloseTo(1, 12);
  expect(y[2]).toBeNull();
  expect(asAbsorbance(curveOf(points('epsilon', [40]))).quantity).toBe('epsilon');
});

// F(R) = (1 − R)²/2R by hand: R = 0.5 gives 0.25; the same in per cent.
test('reflectance becomes the Kubelka–Munk function, by fraction and by per cent alike', () => {
  expect(asKubelkaMunk(curveOf(points('reflectance', [0.5]))).y[0]).toBeCloseTo(0.25, 12);
  expect(asKubelkaMunk(curveOf(points('percent-reflectance', [50]))).y[0]).toBeCloseTo(0.25, 12);
  expect(asKubelkaMunk(curveOf(points('reflectance', [1, 0]))).y).toEqual([0, null]);
});

test('ε comes first and brings log ε; nothing is offered that no curve has', () => {
  const absorbance = curveOf(points('absorbance', [1]));
  const epsilon = curveOf(points('epsilon', [1]));
  expect(quantitiesOf([absorbance, epsilon])).toEqual(['epsilon', 'log-epsilon', 'absorbance']);
  expect(quantitiesOf([absorbance])).toEqual(['absorbance']);
  expect(quantitiesOf([])).toEqual([]);
});
