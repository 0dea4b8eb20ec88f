import { expect, test } from 'vitest';
import { FIRST_STATE, type FitComponent, type FitState } from '#src/chem/spectra/fit/fit-steps.ts';
import { newBand } from '#src/components/spectra/bands/band-list.ts';
import { takeOver } from '#src/components/spectra/fit/take-over.ts';

const component = (wavenumber: number, error: number | null): FitComponent => ({
  wavenumber,
  height: 40.123456,
  fwhm: 3600.04,
  lorentzian: null,
  shoulder: false,
  locked: { wavenumber: false, height: false, fwhm: false },
  errors: error === null ? null : { wavenumber: error, height: 0.1, fwhm: 20, area: 900, oscillatorStrength: 4e-6 },
});
const state: FitState = {
  ...FIRST_STATE,
  range: { from: 15_000, to: 33_000 },
  components: [component(21_550.04, 12), component(28_500, null)],
};
const band = (wavenumber: number) =>
  newBand(`at ${wavenumber}`, 'epsilon', { wavenumber, height: 38, fwhm: null, shoulder: false, found: 'picked' });
const assigned = { ...band(21_200), id: 'b1', class: 'd-d' as const, from: '4A2g', to: '4T2g', reason: 'by the book' };

test('a band that stays within the width keeps id, key and assignment, and becomes a fitted one', () => {
  const { list } = takeOver([assigned], state, 'epsilon', () => 'new');
  expect(list[0]).toEqual({
    ...assigned,
    wavenumber: 21_550,
    height: 40.1235,
    fwhm: 3600,
    shoulder: false,
    found: 'fitted',
  });
  expect(list[1]).toMatchObject({ key: 'new', class: 'unassigned', wavenumber: 28_500, found: 'fitted' });
});

test('a band farther away than half the width hands nothing on', () => {
  const far = { ...assigned, wavenumber: 19_700 };
  const { list } = takeOver([far], state, 'epsilon', () => 'new');
  expect(list.map(({ class: kind }) => kind)).toEqual(['unassigned', 'unassigned']);
});

test('of two bands under one component the nearer one hands its assignment on; the other is gone', () => {
  const { list } = takeOver([band(21_000), { ...assigned, wavenumber: 21_600 }], state, 'epsilon', () => 'new');
  expect(list).toHaveLength(2);
  expect(list[0]!.id).toBe('b1');
});

test('bands outside the range stay as they are', () => {
  const outside = band(38_000);
  const { list } = takeOver([outside], state, 'epsilon', () => 'new');
  expect(list).toContain(outside);
  expect(list).toHaveLength(3);
});

test('what is stored of each component are the numbers of its band, its area and its error', () => {
  const { list, components } = takeOver([], state, 'epsilon', () => 'new');
  expect(components.map(({ wavenumber }) => wavenumber)).toEqual(list.map(({ wavenumber }) => wavenumber));
  expect(components.map(({ error }) => error)).toEqual([12, null]);
  expect(components[0]!.area).toBeCloseTo(40.1235 * 3600 * 1.064467, 0); // area of a Gaussian
});
