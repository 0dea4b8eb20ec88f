import { describe, expect, test } from 'vitest';
import {
  colourOfSolution,
  complementaryColour,
  nameColour,
  srgbDecode,
  srgbEncode,
} from '../../../../src/chem/colour/index.ts';

const NM = Array.from({ length: 401 }, (_, i) => 780 - i);
const x = NM.map((nm) => 1e7 / nm);
const band = (height: number, centre: number, fwhm: number): number[] =>
  NM.map((nm) => height * Math.exp(-4 * Math.LN2 * ((nm - centre) / fwhm) ** 2));

// CIE 015 and IEC 61966-2-1, computed with the exact tables at 1 nm.
test.each([
  [1, 510, 90, [64.98, 43.56, 51.1], [255, 126, 185]],
  [1, 600, 120, [29.78, 30.5, 101.24], [0, 155, 255]],
  [1, 420, 80, [81.62, 96.08, 35.7], [254, 255, 131]],
  [0.5, 700, 150, [74.12, 86.33, 108.67], [193, 249, 255]],
])('A = %d at %d nm, %d nm wide', (height, centre, fwhm, XYZ, sRGB) => {
  const colour = colourOfSolution({ x, epsilon: band(height, centre, fwhm), concentration: 1, pathLength: 1 })!;
  for (const i of [0, 1, 2]) {
    expect(Math.abs(colour.XYZ[i]! - XYZ[i]!)).toBeLessThan(0.15); // 5 nm sums against 1 nm
    expect(Math.abs(colour.sRGB[i]! - sRGB[i]!)).toBeLessThanOrEqual(1);
  }
  expect(colour.hex).toMatch(/^#[0-9a-f]{6}$/);
});

describe('dilution and range', () => {
  const epsilon = band(2450, 525, 60);

  test('without a concentration the highest visible absorbance is 1', () => {
    const given = colourOfSolution({ x, epsilon, concentration: 1 / 2450, pathLength: 1 })!;
    expect(colourOfSolution({ x, epsilon })).toEqual(given);
    expect(colourOfSolution({ x, epsilon, pathLength: 2 })).toMatchObject({ concentration: 1 / 4900, hex: given.hex });
  });

  test('a band outside 400–700 nm does not set the dilution', () => {
    const infrared = epsilon.map((value, i) => value + (NM[i]! > 760 ? 1e5 : 0));
    expect(colourOfSolution({ x, epsilon: infrared })!.concentration).toBe(1 / 2450);
  });

  test('nothing absorbed is colourless', () => {
    expect(colourOfSolution({ x, epsilon: x.map(() => 0) })).toMatchObject({
      hex: '#ffffff',
      name: 'colourless',
      inGamut: true,
    });
  });

  test('too short a range, a wide gap and no points have no colour', () => {
    const part = (keep: (nm: number) => boolean) =>
      colourOfSolution({ x, epsilon: epsilon.map((value, i) => (keep(NM[i]!) ? value : Number.NaN)) });
    expect(part((nm) => nm > 410)).toBeNull();
    expect(part((nm) => nm < 690)).toBeNull();
    expect(part((nm) => nm < 500 || nm > 570)).toBeNull();
    expect(part((nm) => nm < 500 || nm > 540)).not.toBeNull();
    expect(part((nm) => nm >= 400 && nm <= 700)).not.toBeNull();
    expect(colourOfSolution({ x: [], epsilon: [] })).toBeNull();
  });

  test('a wrong call is refused', () => {
    expect(() => colourOfSolution({ x, epsilon, concentration: 0 })).toThrow(/concentration must be/);
    expect(() => colourOfSolution({ x, epsilon, pathLength: -1 })).toThrow(/pathLength must be/);
    expect(() => colourOfSolution({ x: [...x].reverse(), epsilon })).toThrow(/ascend/);
  });
});

test('encoding and decoding undo each other', () => {
  for (const value of [0, 0.001, 0.0031308, 0.2, 1]) expect(srgbDecode(srgbEncode(value))).toBeCloseTo(value, 6);
});

test('words: a single band, and computed colours', () => {
  expect(complementaryColour(700)).toEqual({ absorbed: 'red', seen: 'blue-green' });
  expect([complementaryColour(399), complementaryColour(751)]).toEqual([null, null]);
  expect(complementaryColour(750)).not.toBeNull();
  expect(() => complementaryColour(Number.NaN)).toThrow(/not a wavelength/);
  expect(nameColour([41.24, 21.26, 1.93])).toBe('red'); // primaries of IEC 61966-2-1
  expect(nameColour([35.76, 71.52, 11.92])).toBe('green');
  expect(nameColour([18.05, 7.22, 95.05])).toMatch(/blue|violet/);
  expect(nameColour([0, 0, 0])).toBe('black');
  expect(nameColour([20.52, 21.59, 23.51])).toBe('grey');
});
