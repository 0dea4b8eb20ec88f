import { describe, expect, test } from 'vitest';
import { DomainError } from '#src/chem/errors.ts';
import { areaFactor, componentAt } from '#src/chem/spectra/fit/band-shapes.ts';
import { combinedPositionError, fitBands } from '#src/chem/spectra/fit/fit-bands.ts';

interface Known {
  at: number;
  height: number;
  fwhm: number;
}
/** cm⁻¹ */
const grid = (from: number, to: number, points: number) =>
  Float64Array.from({ length: points }, (_, i) => from + ((to - from) * i) / (points - 1));
const gaussian = (x: number, { at, height, fwhm }: Known) => height * Math.exp(-4 * Math.LN2 * ((x - at) / fwhm) ** 2);
const sum = (x: ArrayLike<number>, bands: readonly Known[]) =>
  Float64Array.from(x, (v) => bands.reduce((total, band) => total + gaussian(v, band), 0));

/** Seeded noise: mulberry32 and Box–Muller. */
function noise(seed: number): () => number {
  let a = seed;
  const uniform = () => {
    a = (a + 0x6d2b79f5) | 0;
    let t = Math.imul(a ^ (a >>> 15), 1 | a);
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t;
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
  return () => Math.sqrt(-2 * Math.log(1 - uniform())) * Math.cos(2 * Math.PI * uniform());
}

const nickelLike: Known[] = [
  { at: 8500, height: 2, fwhm: 1700 },
  { at: 13_800, height: 2.1, fwhm: 2600 },
  { at: 25_300, height: 5.2, fwhm: 3400 },
];

test('bands without noise come back exactly, and their number is found', () => {
  const x = grid(6000, 32_000, 400);
  const { bands, rms, converged, edge } = fitBands(x, sum(x, nickelLike));
  expect(converged).toBe(true);
  expect(edge).toBeNull();
  expect(bands).toHaveLength(3);
  bands.forEach((band, i) => {
    expect(band.wavenumber).toBeCloseTo(nickelLike[i]!.at, 1);
    expect(band.height).toBeCloseTo(nickelLike[i]!.height, 4);
    expect(band.fwhm).toBeCloseTo(nickelLike[i]!.fwhm, 0);
    expect(band.shoulder).toBe(false);
  });
  expect(rms).toBeLessThan(1e-3);
});

test('height × width × 1.0645 × 4.319e-9 is the oscillator strength of a Gaussian', () => {
  const x = grid(14_000, 32_000, 300);
  const [band] = fitBands(x, sum(x, [{ at: 22_000, height: 14_600, fwhm: 3000 }]), { count: 1 }).bands;
  expect(band!.oscillatorStrength).toBeCloseTo(0.2014, 3); // checks/chargetransfer.json cf-004
  expect(areaFactor('gaussian')).toBeCloseTo(1.064467, 6); // cf-002
});

test('a shoulder is told from a maximum', () => {
  const known = [
    { at: 17_400, height: 2.6, fwhm: 3000 },
    { at: 20_300, height: 5, fwhm: 3600 },
  ];
  const x = grid(12_000, 28_000, 300);
  const { bands } = fitBands(x, sum(x, known));
  expect(bands.map(({ shoulder }) => shoulder)).toEqual([true, false]);
  expect(bands[0]!.wavenumber).toBeCloseTo(17_400, 0);
});

test('a charge-transfer edge is found and kept apart from the bands', () => {
  const x = grid(12_000, 34_000, 400);
  const bands = [
    { at: 17_400, height: 13, fwhm: 2500 },
    { at: 24_600, height: 15, fwhm: 3000 },
  ];
  const y = Float64Array.from(sum(x, bands), (v, i) => v + 60 * Math.exp((x[i]! - 34_000) / 1100));
  const fit = fitBands(x, y);
  expect(fit.edge?.decay).toBeCloseTo(1100, 0);
  expect(fit.bands.map(({ wavenumber }) => Math.round(wavenumber))).toEqual([17_400, 24_600]);
  expect(fitBands(x, y, { edge: true, count: 2 }).bands).toHaveLength(2);
});

test('noise alone holds no band', () => {
  const random = noise(11);
  const x = grid(12_000, 30_000, 400);
  expect(
    fitBands(
      x,
      Float64Array.from(x, () => 0.01 * random()),
    ).bands,
  ).toEqual([]);
});

test('order and gaps of the points do not matter; the residual keeps both', () => {
  const x = grid(12_000, 30_000, 200);
  const y = sum(x, [{ at: 20_000, height: 50, fwhm: 3000 }]);
  const backwards = { x: Float64Array.from(x).reverse(), y: Float64Array.from(y).reverse() };
  backwards.y[7] = Number.NaN;
  const fit = fitBands(backwards.x, backwards.y);
  expect(fit.bands[0]!.wavenumber).toBeCloseTo(20_000, 2);
  expect(fit.residual).toHaveLength(200);
  expect(fit.residual[7]).toBeNaN();
  expect(fit.residual[100]).toBeCloseTo(0, 4);
});

test('locked parts stay, and the number of components that a person laid is kept', () => {
  const x = grid(12_000, 28_000, 200);
  const y = sum(x, [{ at: 20_000, height: 50, fwhm: 3000 }]);
  const start = [{ wavenumber: 19_000, height: 40, fwhm: 2500, locked: { wavenumber: true } }];
  const { bands, compared } = fitBands(x, y, { start });
  expect(bands).toHaveLength(1);
  expect(bands[0]!.wavenumber).toBe(19_000);
  expect(bands[0]!.errors.wavenumber).toBe(0);
  expect(compared).toHaveLength(1);
});

test('circular dichroism has bands of both signs', () => {
  const x = grid(14_000, 28_000, 300);
  const known = [
    { at: 18_500, height: 1.8, fwhm: 2200 },
    { at: 23_000, height: -0.6, fwhm: 2500 },
  ];
  const { bands } = fitBands(x, sum(x, known), { signed: true });
  expect(bands.map(({ height }) => Math.round(height * 10) / 10)).toEqual([1.8, -0.6]);
});

test.each(['lorentzian', 'voigt'] as const)('%s bands come back', (shape) => {
  const x = grid(14_000, 30_000, 400);
  const p = Float64Array.from([21_000, 3, Math.log(1500), 0.3]);
  const y = Float64Array.from(x, (v) => componentAt(shape, v, p, 0));
  const [band] = fitBands(x, y, { shape, count: 1, edge: false }).bands;
  expect(band!.wavenumber).toBeCloseTo(21_000, 1);
  expect(band!.fwhm).toBeCloseTo(1500, 0);
  if (shape === 'voigt') expect(band!.lorentzian).toBeCloseTo(1 / (1 + Math.exp(-0.3)), 3);
});

test.each(['gaussian', 'lorentzian', 'voigt'] as const)('derivatives of %s agree with differences', (shape) => {
  const p = Float64Array.from([20_000, 5, Math.log(2500), 0.4]);
  const gradient = new Float64Array(4);
  componentAt(shape, 21_200, p, 0, gradient);
  const steps = [1e-2, 1e-5, 1e-5, 1e-5];
  for (let k = 0; k < (shape === 'voigt' ? 4 : 3); k++) {
    const [up, down] = [Float64Array.from(p), Float64Array.from(p)];
    up[k]! += steps[k]!;
    down[k]! -= steps[k]!;
    const difference = (componentAt(shape, 21_200, up, 0) - componentAt(shape, 21_200, down, 0)) / (2 * steps[k]!);
    expect(gradient[k]! / difference).toBeCloseTo(1, 5);
  }
});

describe('noisy synthetic spectra, 100 seeded trials each', () => {
  const cases: [string, Known[]][] = [
    [
      'two bands apart',
      [
        { at: 17_400, height: 13, fwhm: 2500 },
        { at: 24_600, height: 15, fwhm: 3000 },
      ],
    ],
    [
      'two that overlap',
      [
        { at: 18_000, height: 10, fwhm: 3000 },
        { at: 20_500, height: 14, fwhm: 3000 },
      ],
    ],
    [
      'a weak one on the foot of a strong one',
      [
        { at: 16_000, height: 2, fwhm: 2000 },
        { at: 21_000, height: 20, fwhm: 4000 },
      ],
    ],
  ];
  test.each(cases)(
    '%s: known values within 3 standard errors, errors as large as the scatter',
    (_, known) => {
      const x = grid(12_000, 30_000, 240);
      const clean = sum(x, known);
      let rightCount = 0;
      let within = 0;
      const trials: { value: number; error: number }[][] = known.flatMap(() => [[], [], []]);
      for (let trial = 0; trial < 100; trial++) {
        const random = noise(1000 + trial);
        const { bands } = fitBands(
          x,
          Float64Array.from(clean, (v) => v + 0.1 * random()),
          { edge: false },
        );
        if (bands.length !== known.length) continue;
        rightCount++;
        bands.forEach(({ wavenumber, height, fwhm, errors }, i) => {
          const pairs = [
            { value: wavenumber, error: errors.wavenumber!, wanted: known[i]!.at },
            { value: height, error: errors.height!, wanted: known[i]!.height },
            { value: fwhm, error: errors.fwhm!, wanted: known[i]!.fwhm },
          ];
          pairs.forEach((pair, k) => {
            trials[3 * i + k]!.push(pair);
            if (Math.abs(pair.value - pair.wanted) <= 3 * pair.error) within++;
          });
        });
      }
      expect(rightCount).toBeGreaterThanOrEqual(99);
      expect(within / (rightCount * 3 * known.length)).toBeGreaterThanOrEqual(0.99);
      for (const list of trials) {
        const mean = list.reduce((total, { value }) => total + value, 0) / list.length;
        const scatter = Math.sqrt(
          list.reduce((total, { value }) => total + (value - mean) ** 2, 0) / (list.length - 1),
        );
        const typical = list.reduce((total, { error }) => total + error, 0) / list.length;
        expect(typical / scatter).toBeGreaterThan(0.5);
        expect(typical / scatter).toBeLessThan(2);
      }
    },
    120_000,
  );
});

test('fit, wavelength check and bandwidth combine at the band', () => {
  // 0.3 nm at 20 000 cm⁻¹ are 12 cm⁻¹, a tenth of 2 nm 8 cm⁻¹: √(5² + 12² + 8²)
  expect(combinedPositionError(20_000, 5, { wavelengthCheck: 0.3, bandwidth: 2 })).toBeCloseTo(
    Math.hypot(5, 12, 8),
    10,
  );
});

test('refusals', () => {
  const x = grid(12_000, 30_000, 50);
  expect(() => fitBands(x.subarray(0, 5), x.subarray(0, 5))).toThrow(DomainError);
  expect(() => fitBands(x, x, { count: 2.5 })).toThrow(/whole number/);
  expect(() => fitBands(x, x, { start: [{ wavenumber: 1, height: 1, fwhm: 0 }] })).toThrow(/width/);
});
