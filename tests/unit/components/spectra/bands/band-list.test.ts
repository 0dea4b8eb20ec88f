import { expect, test } from 'vitest';
import {
  bandAt,
  bandInputs,
  draftOf,
  heightAt,
  heightQuantity,
  holds,
  newBand,
  pickable,
  sameBands,
  step,
  undo,
} from '#src/components/spectra/bands/band-list.ts';
import type { BandRecord } from '#src/contracts/spectra.ts';

/** Two invented Gaussian bands, at 20 000 and 30 000 cm⁻¹. */
const x = Array.from({ length: 301 }, (_, i) => 10_000 + 100 * i);
const y = x.map((v) => 40 * Math.exp(-(((v - 20_000) / 2000) ** 2)) + 30 * Math.exp(-(((v - 30_000) / 2000) ** 2)));
const curve = { quantity: 'epsilon' as const, x, y };
const candidates = pickable(curve);

test('a click near a maximum takes the maximum, its height and its width', () => {
  const band = bandAt(curve, candidates, 20_700)!;
  expect(band.wavenumber).toBeCloseTo(20_000, -1);
  expect(band.height).toBeCloseTo(40, 0);
  // Full width of a Gaussian exp(−(x/w)²) at half height: 2w√ln 2, by hand 3330 cm⁻¹.
  expect(band.fwhm).toBeCloseTo(2 * 2000 * Math.sqrt(Math.LN2), -2);
  expect(band).toMatchObject({ shoulder: false, found: 'picked' });
});

test('a click far from every maximum takes the curve there, as a shoulder; outside the curve there is nothing', () => {
  const band = bandAt(curve, candidates, 25_050)!;
  expect(band).toMatchObject({ wavenumber: 25_050, shoulder: true, fwhm: null });
  expect(bandAt(curve, candidates, 5_000)).toBeNull();
  expect(bandAt({ ...curve, y: x.map(() => null) }, [], 25_050)).toBeNull();
});

test('the height between two points lies on the line between them, and a gap has none', () => {
  const line = { quantity: 'epsilon' as const, x: [10, 20, 30], y: [1, 3, null] };
  expect(heightAt(line, 15)).toBe(2);
  expect(heightAt(line, 20)).toBe(3);
  expect(heightAt(line, 25)).toBeNull();
  expect(heightAt(line, 40)).toBeNull();
});

const record = {
  id: 'b1',
  wavenumber: 20_000,
  height: 40,
  quantity: 'epsilon',
  fwhm: null,
  shoulder: false,
  found: 'picked',
  assignment: { class: 'd-d', centre: 0, to: '4T2g' },
} as unknown as BandRecord;

test('a band that was not touched is sent as it stands, with its id and without empty texts', () => {
  expect(bandInputs([draftOf(record)])).toEqual([
    {
      id: 'b1',
      wavenumber: 20_000,
      height: 40,
      quantity: 'epsilon',
      fwhm: null,
      shoulder: false,
      found: 'picked',
      assignment: { class: 'd-d', centre: 0, to: '4T2g' },
    },
  ]);
});

test('each step keeps the list in rising wavenumber and can be taken back', () => {
  const at = (wavenumber: number) =>
    newBand(String(wavenumber), 'epsilon', { wavenumber, height: 1, fwhm: null, shoulder: false, found: 'typed' });
  const start = { list: [at(30_000)], past: [] };
  const added = step(start, [...start.list, at(20_000)]);
  expect(added.list.map(({ wavenumber }) => wavenumber)).toEqual([20_000, 30_000]);
  expect(sameBands(undo(added).list, start.list)).toBe(true);
  expect(sameBands(added.list, start.list)).toBe(false);
  expect(undo(start)).toEqual(start);
});

test('heights are told in quantities the record knows, never in transmittance', () => {
  expect(heightQuantity('absorbance')).toBe('absorbance');
  expect(heightQuantity('percent-transmittance')).toBeNull();
});

test('a band next to another is the same one', () => {
  expect(holds([{ wavenumber: 20_000 }], 20_100)).toBe(true);
  expect(holds([{ wavenumber: 20_000 }], 20_200)).toBe(false);
});
