import { expect, test } from 'vitest';
import { spectralSimilarity } from '#src/chem/spectra/similarity.ts';

const grid = (from: number, to: number, n: number) =>
  Float64Array.from({ length: n }, (_, i) => from + ((to - from) * i) / (n - 1));
const curve = (x: Float64Array, f: (x: number) => number) => ({ x, y: Float64Array.from(x, f) });
const band =
  (at: number, height = 1) =>
  (x: number) =>
    height * Math.exp(-(((x - at) / 1500) ** 2));

test('curves of one shape are alike whatever their heights, grids and ends', () => {
  const a = curve(grid(12_000, 30_000, 181), band(20_000));
  const b = curve(grid(14_000, 36_000, 500), band(20_000, 37));
  const { cosine, angle, from, to } = spectralSimilarity(a, b)!;
  expect(cosine).toBeGreaterThan(0.9999);
  expect(angle).toBeLessThan(1);
  expect([from, to]).toEqual([14_000, 30_000]);
});

test('bands that do not meet share nothing; opposite signs are opposite', () => {
  const x = grid(10_000, 40_000, 301);
  expect(spectralSimilarity(curve(x, band(15_000)), curve(x, band(32_000)))!.cosine).toBeCloseTo(0, 6);
  expect(spectralSimilarity(curve(x, band(20_000)), curve(x, band(20_000, -2)))!.angle).toBeCloseTo(180, 4);
});

test('two half-overlapping Gaussians of one width have the cosine exp(−d²/2w²)', () => {
  const x = grid(0, 40_000, 4001);
  // ∫g(x)g(x − d) / ∫g² = exp(−d²/(2w²)) for g = exp(−(x/w)²): here d = w = 1500
  expect(spectralSimilarity(curve(x, band(19_000)), curve(x, band(20_500)))!.cosine).toBeCloseTo(Math.exp(-0.5), 3);
});

test('gaps are left out for both, and too small an overlap or a curve of zeros is no comparison', () => {
  const a = curve(grid(12_000, 30_000, 181), band(20_000));
  const broken = { x: a.x, y: Float64Array.from(a.y, (v, i) => (i > 60 && i < 90 ? Number.NaN : v)) };
  expect(spectralSimilarity(a, broken)!.cosine).toBeCloseTo(1, 10);
  expect(spectralSimilarity(a, curve(grid(28_000, 46_000, 181), band(30_000)))).toBeNull();
  expect(
    spectralSimilarity(
      a,
      curve(a.x, () => 0),
    ),
  ).toBeNull();
  expect(spectralSimilarity(a, { x: [], y: [] })).toBeNull();
});
