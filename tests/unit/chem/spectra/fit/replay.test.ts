import { describe, expect, test } from 'vitest';
import { DomainError } from '#src/chem/errors.ts';
import { componentArea, fittedValues } from '#src/chem/spectra/fit/components.ts';
import { FIRST_STATE, type FitStep } from '#src/chem/spectra/fit/fit-steps.ts';
import { applyStep, type FitCurve, replay, treated } from '#src/chem/spectra/fit/replay.ts';

const gaussian = (x: number, at: number, height: number, fwhm: number) =>
  height * Math.exp(-4 * Math.LN2 * ((x - at) / fwhm) ** 2);
const x = Float64Array.from({ length: 300 }, (_, i) => 14_000 + (20_000 * i) / 299);
const bumps = (v: number) => gaussian(v, 21_500, 40, 3600) + gaussian(v, 28_500, 33, 4100);
// A chirp in place of noise, so that errors are not nought.
const curve: FitCurve = { x, y: x.map((v, i) => bumps(v) + 0.05 * Math.sin(i * i)), signed: false };
const find: FitStep = { operation: 'find', parameters: {} };
const refine: FitStep = { operation: 'refine', parameters: {} };

const steps: FitStep[] = [
  { operation: 'range', parameters: { from: 15_000, to: 33_000 } },
  { operation: 'smooth', parameters: { halfWidth: 300 } },
  { operation: 'baseline', parameters: { baseline: { kind: 'line', from: 15_500, to: 33_800 } } },
  { operation: 'settings', parameters: { shape: 'gaussian', count: 2, edge: false, constant: false } },
  find,
  { operation: 'set', parameters: { component: 0, wavenumber: 21_700 } },
  { operation: 'lock', parameters: { component: 0, part: 'wavenumber', locked: true } },
  refine,
];

test('the same steps on the same curve give the same numbers, also after they went through JSON', () => {
  const once = replay(curve, steps);
  expect(replay(curve, JSON.parse(JSON.stringify(steps)))).toEqual(once);
  expect(once.components).toHaveLength(2);
});

test('step by step, from a state that went through JSON, it is the same as at once', () => {
  const half = JSON.parse(JSON.stringify(replay(curve, steps.slice(0, 5))));
  expect(replay(curve, steps.slice(5), half)).toEqual(replay(curve, steps));
});

test('the points are as they were', () => {
  const before = Float64Array.from(curve.y);
  replay(curve, steps);
  expect(curve.y).toEqual(before);
});

test('a locked part stays to the last digit, and has no error', () => {
  const [first] = replay(curve, steps).components;
  expect(first!.wavenumber).toBe(21_700);
  expect(first!.locked.wavenumber).toBe(true);
  expect(first!.errors!.wavenumber).toBe(0);
  expect(first!.errors!.height).toBeGreaterThan(0);
});

test('locks follow their component where a fit puts the components into another order', () => {
  const state = replay(curve, [
    { operation: 'settings', parameters: { shape: 'gaussian', count: null, edge: false, constant: false } },
    { operation: 'add', parameters: { wavenumber: 28_500, height: 30, fwhm: 4000 } },
    { operation: 'lock', parameters: { component: 0, part: 'wavenumber', locked: true } },
    { operation: 'add', parameters: { wavenumber: 21_000, height: 30, fwhm: 4000 } },
    refine,
  ]);
  expect(state.components.map(({ locked }) => locked.wavenumber)).toEqual([false, true]);
  expect(state.components[1]!.wavenumber).toBe(28_500);
});

test('a touched fit tells no errors until it is fitted again', () => {
  const fitted = applyStep(curve, FIRST_STATE, find);
  expect(fitted.rms).toBeLessThan(0.1);
  const touched = applyStep(curve, fitted, { operation: 'set', parameters: { component: 0, height: 20 } });
  expect([touched.rms, touched.components[0]!.errors]).toEqual([null, null]);
  expect(applyStep(curve, touched, refine).components[0]!.height).toBeCloseTo(40, 0);
});

test('bands are picked by maxima of the treated curve, and can be refined', () => {
  const clean = { ...curve, y: x.map(bumps) };
  const picked = applyStep(clean, FIRST_STATE, { operation: 'pick', parameters: {} });
  expect(picked.components.map(({ wavenumber }) => Math.round(wavenumber / 500) * 500)).toEqual([21_500, 28_500]);
  expect(applyStep(clean, picked, refine).components[1]!.fwhm).toBeCloseTo(4100, -2);
});

test('bands of circular dichroism keep their signs', () => {
  const y = x.map((v) => gaussian(v, 20_000, 2, 2500) - gaussian(v, 26_000, 1.5, 3000));
  const signed = { x, y, signed: true };
  const { components } = replay(signed, [
    { operation: 'settings', parameters: { shape: 'gaussian', count: null, edge: false, constant: false } },
    { operation: 'pick', parameters: {} },
    refine,
  ]);
  expect(components.map(({ height }) => Number(height.toFixed(2)))).toEqual([2, -1.5]);
});

test('the drawn sum is what was fitted: its distance from the treated curve is the rms', () => {
  const state = replay(curve, steps);
  const { x: at, y } = treated(curve, state);
  const values = fittedValues(state, at);
  const rms = Math.sqrt(y.reduce((sum, value, i) => sum + (value - values[i]!) ** 2, 0) / y.length);
  expect(rms).toBeCloseTo(state.rms!, 8);
});

test('an area is that of its shape', () => {
  const one = { wavenumber: 20_000, height: 2, fwhm: 1000 };
  expect(componentArea('gaussian', { ...one, lorentzian: null })).toBeCloseTo(2128.93, 1); // 1.064467 · 2000
  expect(componentArea('lorentzian', { ...one, lorentzian: null })).toBeCloseTo(1000 * Math.PI, 6); // π h w / 2
});

describe('refusals', () => {
  const wrong: [string, FitStep][] = [
    ['a component that is not there', { operation: 'remove', parameters: { component: 3 } }],
    ['a refinement of nothing', refine],
    ['a range without points', { operation: 'range', parameters: { from: 1, to: 2 } }],
  ];
  test.each(wrong)('%s', (_, step) => {
    expect(() => applyStep(curve, FIRST_STATE, step)).toThrow(DomainError);
  });
});
