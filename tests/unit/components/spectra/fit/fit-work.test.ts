import { expect, test } from 'vitest';
import { FIRST_STATE, type FitState, type FitStep } from '#src/chem/spectra/fit/fit-steps.ts';
import { comparedRows } from '#src/components/spectra/fit/ComparedFits.tsx';
import { stepText } from '#src/components/spectra/fit/FitSteps.tsx';
import { isFull, made, NO_WORK, redone, stateOf, stepsOf, undone } from '#src/components/spectra/fit/fit-work.ts';

const state = (smoothing: number): FitState => ({ ...FIRST_STATE, smoothing });
const smooth = (halfWidth: number): FitStep => ({ operation: 'smooth', parameters: { halfWidth } });
const set = (component: number, parts: object): FitStep => ({ operation: 'set', parameters: { component, ...parts } });

test('nothing made is the first state', () => {
  expect(stateOf(NO_WORK)).toBe(FIRST_STATE);
  expect(undone(NO_WORK)).toEqual(NO_WORK);
});

test('steps are taken back and made again, and what is taken back is not stored', () => {
  const two = made(made(NO_WORK, smooth(100), state(100)), smooth(200), state(200));
  expect(stateOf(two).smoothing).toBe(200);
  const one = undone(two);
  expect([stateOf(one).smoothing, stepsOf(one)]).toEqual([100, [smooth(100)]]);
  expect(redone(one)).toEqual(two);
  expect(redone(two)).toEqual(two);
});

test('a new step after one taken back leaves nothing to make again', () => {
  const one = undone(made(made(NO_WORK, smooth(100), state(100)), smooth(200), state(200)));
  const other = made(one, smooth(300), state(300));
  expect(stepsOf(other)).toEqual([smooth(100), smooth(300)]);
  expect(redone(other)).toEqual(other);
});

test('a row of key strokes on one component is one step; on another, or after something else, it is not', () => {
  let work = made(NO_WORK, set(0, { wavenumber: 20_010 }), state(1), true);
  work = made(work, set(0, { wavenumber: 20_020 }), state(2), true);
  work = made(work, set(0, { height: 5 }), state(3), true);
  expect(stepsOf(work)).toEqual([set(0, { wavenumber: 20_020, height: 5 })]);
  expect(stateOf(work).smoothing).toBe(3);
  work = made(work, set(1, { height: 6 }), state(4), true);
  work = made(work, set(1, { height: 7 }), state(5)); // dragged: a step of its own
  expect(stepsOf(work)).toHaveLength(3);
});

test('a row of key strokes on an end of the range is one step', () => {
  const range = (from: number): FitStep => ({ operation: 'range', parameters: { from, to: null } });
  const work = made(made(NO_WORK, range(15_000), state(1), true), range(15_100), state(2), true);
  expect(stepsOf(work)).toEqual([range(15_100)]);
});

test('a fit is full at 200 steps', () => {
  let work = NO_WORK;
  for (let i = 0; i < 200; i++) work = made(work, smooth(i), state(i));
  expect([isFull(undone(work)), isFull(work)]).toEqual([false, true]);
});

test('numbers of bands are compared by how far they lie above the lowest', () => {
  const compared = [
    { count: 1, edge: false, aicc: 40 },
    { count: 2, edge: false, aicc: -60 },
    { count: 1, edge: true, aicc: -10 },
  ];
  expect(comparedRows(compared)).toEqual([
    { count: 1, without: 100, withEdge: 50 },
    { count: 2, without: 0, withEdge: null },
  ]);
});

test.each([
  [{ operation: 'range', parameters: { from: null, to: null } }, 'Fit the whole curve'],
  [{ operation: 'remove', parameters: { component: 0 } }, 'Remove component 1'],
  [{ operation: 'lock', parameters: { component: 1, part: 'fwhm', locked: true } }, 'Lock the width of component 2'],
] as [FitStep, string][])('a step in words: %j', (step, words) => {
  expect(stepText(step)).toBe(words);
});
