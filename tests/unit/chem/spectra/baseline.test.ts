import { expect, test } from 'vitest';
import { DomainError } from '#src/chem/errors.ts';
import { quietPlaces, subtractBaseline } from '#src/chem/spectra/baseline.ts';

const x = Float64Array.from({ length: 301 }, (_, i) => 10_000 + 100 * i);
const band = (v: number) => 50 * Math.exp(-(((v - 25_000) / 1500) ** 2));

test('a straight line under a band is taken off', () => {
  const y = x.map((v) => band(v) + 2 + v / 10_000);
  const flat = subtractBaseline(x, y, { kind: 'line', from: 12_000, to: 38_000 });
  flat.forEach((value, i) => {
    expect(value).toBeCloseTo(band(x[i]!), 6);
  });
});

test('scattering that grows as ν̄⁴ is taken off but for the curvature within an anchor', () => {
  const y = x.map((v) => band(v) + 1 + 5 * (v / 40_000) ** 4);
  const flat = subtractBaseline(x, y, { kind: 'scattering', from: 12_000, to: 38_000 });
  flat.forEach((value, i) => {
    expect(value).toBeCloseTo(band(x[i]!), 2);
  });
});

test('a base line may go through the lowest points of both halves, whatever rises at the end', () => {
  const y = x.map(
    (v) => band(v) + 2 * ((v - 14_000) / 1000) ** 2 * (v < 14_000 ? 1 : 0) + 80 * Math.exp((v - 40_000) / 900),
  );
  y[60] = Number.NaN;
  const places = quietPlaces(x, y)!;
  expect(places.from).toBeGreaterThan(13_000);
  expect(places.from).toBeLessThan(18_000);
  expect(places.to).toBeGreaterThan(28_000);
  expect(places.to).toBeLessThan(35_000);
  expect(quietPlaces([1, 2], [Number.NaN, 1])).toBeNull();
});

test('a gap stays a gap', () => {
  const y = x.map((_, i) => (i === 150 ? Number.NaN : 1));
  expect(subtractBaseline(x, y, { kind: 'line', from: 12_000, to: 38_000 })[150]).toBeNaN();
});

test.each([
  { from: 12_000, to: 12_000 },
  { from: 1000, to: 38_000 },
])('a base line from $from to $to is refused', (places) => {
  const y = x.map(() => 1);
  expect(() => subtractBaseline(x, y, { kind: 'line', ...places })).toThrow(DomainError);
});
