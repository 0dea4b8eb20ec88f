import { expect, test } from 'vitest';
import type { FitComponent } from '#src/chem/spectra/fit/fit-steps.ts';
import { draggedTo, keyed, pixelsOf, placeAt } from '#src/components/spectra/fit/drag.ts';

// 600 px for 30 000 cm⁻¹, 300 px for 60 units of height.
const area = { left: 40, top: 10, width: 600, height: 300, x: [10_000, 40_000], y: [0, 60] } as const;
const free = { wavenumber: false, height: false, fwhm: false };
const component: FitComponent = {
  wavenumber: 20_000,
  height: 30,
  fwhm: 3000,
  lorentzian: null,
  shoulder: false,
  locked: free,
  errors: null,
};

test('pixels and places of the axes are each other’s way back', () => {
  expect(placeAt(area, 200, 150)).toEqual({ wavenumber: 20_000, y: 30 });
  expect(pixelsOf(area, 20_000, 30)).toEqual({ left: 200, top: 150 });
});

test('the top takes position and height along, a side the width on both sides', () => {
  const place = { wavenumber: 22_000.4, y: 41.23456 };
  expect(draggedTo(component, 'top', place, area)).toEqual({ wavenumber: 22_000, height: 41.235 });
  expect(draggedTo(component, 'side', place, area)).toEqual({ fwhm: 4001 });
  expect(draggedTo(component, 'side', { wavenumber: 18_000, y: 0 }, area)).toEqual({ fwhm: 4000 });
});

test('a width never falls below what can be taken hold of', () => {
  expect(draggedTo(component, 'side', { wavenumber: 20_000, y: 0 }, area)).toEqual({ fwhm: 200 });
});

test('locked parts stay where they are', () => {
  const locked = { ...component, locked: { wavenumber: true, height: false, fwhm: true } };
  expect(draggedTo(locked, 'top', { wavenumber: 25_000, y: 10 }, area)).toEqual({ height: 10 });
  expect(draggedTo(locked, 'side', { wavenumber: 25_000, y: 10 }, area)).toEqual({});
  expect(keyed(locked, 'top', { key: 'ArrowLeft', shiftKey: false }, area)).toEqual({});
});

test.each([
  ['top', 'ArrowRight', false, { wavenumber: 20_010 }],
  ['top', 'ArrowLeft', true, { wavenumber: 19_900 }],
  ['top', 'ArrowUp', false, { height: 30.3 }],
  ['top', 'ArrowDown', true, { height: 27 }],
  ['side', 'ArrowRight', false, { fwhm: 3010 }],
  ['side', 'ArrowDown', true, { fwhm: 2900 }],
  ['top', 'Enter', false, null],
] as const)('on the %s, %s (Shift %s) means %j', (handle, key, shiftKey, parts) => {
  expect(keyed(component, handle, { key, shiftKey }, area)).toEqual(parts);
});
