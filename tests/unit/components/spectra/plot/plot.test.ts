import { expect, test } from 'vitest';
import { joinSeries, nearestIndex, spreadIndices } from '#src/components/spectra/plot/join-series.ts';
import { placeLabels } from '#src/components/spectra/plot/place-labels.ts';
import { fromWavenumber, toWavenumber } from '#src/components/spectra/plot/units.ts';
import { verticalRange } from '#src/components/spectra/plot/uplot-options.ts';
import { panned, zoomed } from '#src/components/spectra/plot/view-window.ts';

test('traces with grids of their own share the union; between its points each is interpolated', () => {
  const joined = joinSeries(
    [
      { x: [10, 20, 30], y: [1, 2, 3] },
      { x: [15, 25], y: [10, 20] },
    ],
    'cm-1',
    'epsilon',
  );
  expect(joined.x).toEqual([10, 15, 20, 25, 30]);
  expect(joined.y[0]).toEqual([1, 1.5, 2, 2.5, 3]);
});

test('no trace is carried beyond its ends or across a gap', () => {
  const joined = joinSeries(
    [
      { x: [10, 20, 30, 40], y: [1, null, 3, 4] },
      { x: [15, 35], y: [10, 20] },
    ],
    'cm-1',
    'epsilon',
  );
  expect(joined.x).toEqual([10, 15, 20, 30, 35, 40]);
  expect(joined.y[0]).toEqual([1, null, null, 3, 3.5, 4]);
  expect(joined.y[1]).toEqual([null, 10, 12.5, 17.5, 20, null]);
});

test('NaN is a gap as null is', () => {
  expect(joinSeries([{ x: [1, 2], y: [Number.NaN, 2] }], 'cm-1', 'epsilon').y).toEqual([[null, 2]]);
});

test('wavelengths ascend too, with their values', () => {
  const { x, y } = joinSeries([{ x: [10_000, 20_000, 25_000], y: [1, 2, 3] }], 'nm', 'epsilon');
  expect(x).toEqual([400, 500, 1000]);
  expect(y).toEqual([[3, 2, 1]]);
});

test('log ε of what is not above zero is a gap', () => {
  expect(joinSeries([{ x: [1, 2, 3, 4], y: [100, 0, -2, 1000] }], 'cm-1', 'log-epsilon').y).toEqual([
    [2, null, null, 3],
  ]);
});

test('no traces and empty traces give an empty grid', () => {
  expect(joinSeries([], 'nm', 'epsilon')).toEqual({ x: [], y: [] });
  expect(joinSeries([{ x: [], y: [] }], 'nm', 'epsilon')).toEqual({ x: [], y: [[]] });
});

test('a grid far finer than the screen is thinned and keeps its ends', () => {
  const x = Array.from({ length: 50_000 }, (_, i) => i + 1);
  const joined = joinSeries([{ x, y: x }], 'cm-1', 'epsilon');
  expect(joined.x.length).toBeLessThan(13_000);
  expect([joined.x[0], joined.x.at(-1)]).toEqual([1, 50_000]);
});

test('units of the axis turn into each other and back', () => {
  expect(fromWavenumber(20_000, 'nm')).toBe(500);
  // 1 eV = 8065.544 cm⁻¹ (CODATA 2018)
  expect(fromWavenumber(8065.543937, 'eV')).toBeCloseTo(1, 9);
  for (const unit of ['nm', 'cm-1', 'eV'] as const) {
    expect(toWavenumber(fromWavenumber(17_400, unit), unit)).toBeCloseTo(17_400, 6);
  }
});

test('the nearest point is found at both ends and between', () => {
  expect([-5, 14, 16, 99].map((at) => nearestIndex([0, 10, 20], at))).toEqual([0, 1, 2, 2]);
  expect(nearestIndex([], 1)).toBe(-1);
});

test('rows of the table hold both ends', () => {
  expect(spreadIndices(3, 10)).toEqual([0, 1, 2]);
  expect(spreadIndices(101, 5)).toEqual([0, 25, 50, 75, 100]);
});

test('zooming keeps the point under the cursor and stays inside the axis; far enough out is everything', () => {
  expect(zoomed(null, [0, 100], 0.5)).toEqual([25, 75]);
  expect(zoomed([25, 75], [0, 100], 0.5, 25)).toEqual([25, 50]);
  expect(zoomed([0, 40], [0, 100], 2, 40)).toEqual([0, 80]);
  expect(zoomed([25, 75], [0, 100], 2)).toBeNull();
});

test('panning stops at the ends', () => {
  expect(panned([20, 40], [0, 100], 0.5)).toEqual([30, 50]);
  expect(panned([80, 100], [0, 100], 0.5)).toEqual([80, 100]);
  expect(panned(null, [0, 100], 0.5)).toBeNull();
});

test('labels that would lie on each other are lifted, and kept between the sides', () => {
  const area = { width: 300, lineHeight: 16 };
  const [a, b, c] = placeLabels(
    [
      { x: 100, y: 90, width: 60 },
      { x: 120, y: 90, width: 60 },
      { x: 299, y: 90, width: 60 },
    ],
    area,
  );
  expect(a).toEqual({ x: 100, y: 90 });
  expect(b).toEqual({ x: 120, y: 74 });
  expect(c).toEqual({ x: 270, y: 90 });
});

test('the vertical axis shows nought, except for log ε, and leaves room for labels', () => {
  expect(verticalRange([5, 50], { hasBands: false, fromZero: true })[0]).toBe(0);
  expect(verticalRange([-1, 50], { hasBands: false, fromZero: true })[0]).toBeLessThan(-1);
  expect(verticalRange([1, 4], { hasBands: false, fromZero: false })[0]).toBeGreaterThan(0);
  expect(verticalRange([-7, 4], { hasBands: false, fromZero: false })[0]).toBeGreaterThan(-2.5);
  expect(verticalRange([0, 50], { hasBands: true, fromZero: true })[1]).toBeGreaterThan(60);
  expect(verticalRange([null, null], { hasBands: false, fromZero: true })).toEqual([0, 1]);
});
