import { expect, test } from 'vitest';
import {
  chromaticity,
  colourMatching,
  colourOfSolution,
  complementaryColour,
  illuminantD65,
  srgbEncode,
  tristimulus,
  whiteD65,
  xyzToSrgb,
} from '../../src/chem/colour/index.ts';
import file from './colour.json';

// biome-ignore lint/suspicious/noExplicitAny: the records of a kind share fields that the file as a whole does not
type Loose = any;

function records(kind: string): Loose[] {
  const found = (file.records as Loose[]).filter((record) => record.kind === kind);
  if (found.length === 0) throw new Error(`no record of kind ${kind}`);
  return found;
}

function near(found: readonly number[], expected: readonly number[], tolerance: number, source: string): void {
  for (const [i, value] of expected.entries()) {
    expect(Math.abs(found[i]! - value), `${found} should be ${expected}: ${source}`).toBeLessThanOrEqual(tolerance);
  }
}

test.each(records('whitePoint'))('$id: white of $illuminant', ({ expect: published, tolerance, source }) => {
  near(whiteD65, published.XYZ, tolerance.XYZ, source);
  near(chromaticity(whiteD65), [published.x, published.y], tolerance.xy, source);
});

test.each(records('colourMatching'))('$id: observer at $wavelength_nm nm', (record) => {
  const { xbar, ybar, zbar } = record.expect;
  near(colourMatching(record.wavelength_nm), [xbar, ybar, zbar], record.tolerance.absolute, record.source);
});

test.each(records('spectrumLocus'))('$id: light of $wavelength_nm nm', (record) => {
  const { x, y } = record.expect;
  near(chromaticity(colourMatching(record.wavelength_nm)), [x, y], record.tolerance.absolute, record.source);
});

test.each(records('illuminantD65'))('$id: D65 at $wavelength_nm nm', (record) => {
  near([illuminantD65(record.wavelength_nm)], [record.expect], record.tolerance.absolute, record.source);
});

test.each(records('xyzToSrgb'))('$id: $note', ({ XYZ, expect: published, tolerance, source }) => {
  const { linear, sRGB, inGamut } = xyzToSrgb(XYZ);
  near(linear, published.linear, tolerance.linear, source);
  near(sRGB, published.srgb8, tolerance.srgb8, source);
  expect(inGamut, source).toBe(!published.outOfGamut);
});

test.each(records('transferFunction'))('$id: encoding', ({ linear, expect: published, tolerance, source }) => {
  near([srgbEncode(linear)], [published], tolerance.absolute, source);
});

/** Absorbance at a wavelength, by the formula of a record. */
function absorbanceOf(spectrum: Loose): (nm: number) => number {
  const gauss = (d: number, fwhm: number): number => spectrum.A * Math.exp(-4 * Math.LN2 * (d / fwhm) ** 2);
  switch (spectrum.type) {
    case 'constantAbsorbance':
      return () => spectrum.A;
    case 'gaussianWavelength':
      return (nm) => gauss(nm - spectrum.centre_nm, spectrum.fwhm_nm);
    case 'gaussianWavenumber':
      return (nm) => gauss(1e7 / nm - spectrum.centre_cm1, spectrum.fwhm_cm1);
    default:
      throw new Error(`unknown spectrum ${spectrum.type}`);
  }
}

test.each(records('absorbanceToColour'))('$id: $description', ({ spectrum, expect: published, tolerance, source }) => {
  const absorbance = absorbanceOf(spectrum);
  const wavelengths = Array.from({ length: 401 }, (_, i) => 780 - i);
  const colour = colourOfSolution({
    x: wavelengths.map((nm) => 1e7 / nm),
    epsilon: wavelengths.map(absorbance), // at 1 mol/L and 1 cm the absorbance itself
    concentration: 1,
    pathLength: 1,
  });
  near(colour!.XYZ, published.XYZ, tolerance.XYZ, source);
  near(colour!.xy, [published.x, published.y], tolerance.xy, source);
  near(colour!.sRGB, published.srgb8, tolerance.srgb8, source);
  expect(colour!.inGamut, source).toBe(!published.outOfGamut);
});

test.each(records('reflectanceToColour'))('$id: $description', (record) => {
  const { reflectance, expect: published, tolerance, publishedSrgb8, publishedTolerance, source } = record;
  const points = Object.entries<number>(reflectance).map(([nm, r]) => [Number(nm), r] as const);
  const at = (nm: number): number => {
    const next = points.findIndex(([other]) => other >= nm);
    if (next < 0) return points.at(-1)![1];
    const [b, rb] = points[next]!;
    const [a, ra] = points[Math.max(0, next - 1)]!;
    return b === a ? rb : ra + ((nm - a) / (b - a)) * (rb - ra);
  };
  const XYZ = tristimulus(at);
  near(XYZ, published.XYZ, tolerance.XYZ, source);
  const { sRGB } = xyzToSrgb(XYZ);
  near(sRGB, published.srgb8, tolerance.srgb8, source);
  near(sRGB, publishedSrgb8, publishedTolerance, source);
});

test.each(records('complementaryColour'))('$id: $absorbed_nm nm', ({ absorbed_nm, expect: published, source }) => {
  const middle = (absorbed_nm[0] + absorbed_nm[1]) / 2;
  for (const nm of [absorbed_nm[0], middle, absorbed_nm[1] - 0.1]) {
    expect(complementaryColour(nm), `${nm} nm: ${source}`).toEqual(published);
  }
});
