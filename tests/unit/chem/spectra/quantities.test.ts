import { describe, expect, test } from 'vitest';
import {
  areaUnder,
  ascending,
  checkConditions,
  checkWavelengths,
  convertX,
  decimate,
  findSolvent,
  gaussianArea,
  guardCell,
  kubelkaMunk,
  molarAbsorptionCoefficient,
  molarAbsorptionWithUncertainty,
  OSCILLATOR_STRENGTH_PER_AREA,
  oscillatorStrength,
  pickBands,
  solvents,
  toAbsorbance,
  toWavenumber,
  writeCsv,
} from '../../../../src/chem/spectra/index.ts';
import { readText } from './bytes.ts';
import { random } from './random.ts';

describe('abscissae', () => {
  test('there and back over every unit', () => {
    for (const unit of ['nm', 'um', 'eV', 'THz'] as const) {
      const back = convertX(toWavenumber([0.5, 300, 1000], unit), 'cm-1', unit);
      for (const [i, value] of [0.5, 300, 1000].entries()) expect(back[i]).toBeCloseTo(value, 9);
    }
  });

  test('no wavelength of zero; a gap stays; nothing in, nothing out', () => {
    expect(Array.from(toWavenumber([0, -5, Number.NaN], 'nm'))).toEqual([Number.NaN, Number.NaN, Number.NaN]);
    expect(toWavenumber([], 'nm')).toHaveLength(0);
  });
});

describe('ordinates', () => {
  test('transmittance of zero or less has no absorbance', () => {
    expect(Array.from(toAbsorbance([1, 0.1, 0, -0.1], 'transmittance'))).toEqual([0, 1, Number.NaN, Number.NaN]);
    expect(Array.from(toAbsorbance([10], 'percent-transmittance'))).toEqual([1]);
    expect(() => toAbsorbance([1], 'epsilon')).toThrow(/cannot be turned into absorbance/);
  });

  test('ε keeps gaps and negative noise, and refuses a cell that is none', () => {
    const cell = { concentration: 0.01, pathLength: 2 };
    expect(Array.from(molarAbsorptionCoefficient([1, -0.002, Number.NaN], cell))).toEqual([50, -0.1, Number.NaN]);
    for (const bad of [0, -1, Number.NaN, Number.POSITIVE_INFINITY]) {
      expect(() => molarAbsorptionCoefficient([1], { ...cell, concentration: bad })).toThrow(/concentration must be/);
      expect(() => molarAbsorptionCoefficient([1], { ...cell, pathLength: bad })).toThrow(/pathLength must be/);
    }
  });

  test('uncertainties combine in quadrature (GUM 5.1.2; 3, 4 and 12 give 13)', () => {
    const { epsilon, uncertainty } = molarAbsorptionWithUncertainty(
      [1],
      { concentration: 0.01, pathLength: 1 },
      { concentration: 0.0003, pathLength: 0.04, absorbance: 0.12 },
    );
    expect(epsilon[0]).toBeCloseTo(100, 12);
    expect(uncertainty[0]).toBeCloseTo(13, 12);
  });

  test('Kubelka–Munk: R = 0.5 gives 0.25, by hand', () => {
    expect(Array.from(kubelkaMunk([0.5, 1, 0]))).toEqual([0.25, 0, Number.NaN]);
  });
});

describe('points', () => {
  test('ascending is stable and copies', () => {
    const x = Float64Array.of(3, 1, 2, 1);
    const sorted = ascending(x, Float64Array.of(30, 10, Number.NaN, 11));
    expect([Array.from(sorted.x), Array.from(sorted.y)]).toEqual([
      [1, 1, 2, 3],
      [10, 11, Number.NaN, 30],
    ]);
    expect(Array.from(x)).toEqual([3, 1, 2, 1]);
  });

  test('decimation keeps ends, extremes and gaps, and no more than asked', () => {
    const next = random(7);
    const y = Float64Array.from({ length: 10_000 }, () => next());
    y[1234] = 50;
    y[8765] = -50;
    y[5000] = Number.NaN;
    const x = Float64Array.from(y.keys());
    for (const max of [4, 5, 100, 999]) {
      const thin = decimate(x, y, max);
      expect(thin.x.length).toBeLessThanOrEqual(max);
      expect([thin.x[0], thin.x.at(-1)]).toEqual([0, 9999]);
      if (max < 100) continue;
      expect(Array.from(thin.x)).toEqual(expect.arrayContaining([1234, 5000, 8765]));
      expect(thin.y.some(Number.isNaN)).toBe(true);
      expect(Array.from(thin.x)).toEqual(Array.from(thin.x).sort((a, b) => a - b));
    }
    expect(decimate(x, y, 20_000).y).toEqual(y);
    expect(() => decimate(x, y, 3)).toThrow(/at least 4/);
  });
});

describe('bands', () => {
  const x = Array.from({ length: 1400 }, (_, i) => 1e7 / (900 - i * 0.45)); // 900 to 270 nm
  const gauss = (centre: number, height: number, fwhm: number) => (v: number) =>
    height * Math.exp(-4 * Math.LN2 * ((v - centre) / fwhm) ** 2);

  test('two bands apart: position, height and width of the Gaussians they are made of', () => {
    const [a, b] = [gauss(17400, 13, 2600), gauss(24600, 15, 3000)];
    const bands = pickBands(
      x,
      x.map((v) => a(v) + b(v)),
    );
    expect(bands).toHaveLength(2);
    for (const [i, [centre, height, fwhm]] of [
      [17400, 13, 2600],
      [24600, 15, 3000],
    ].entries()) {
      expect(Math.abs(bands[i]!.wavenumber - centre!)).toBeLessThan(30);
      expect(Math.abs(bands[i]!.height / height! - 1)).toBeLessThan(0.02);
      expect(Math.abs(bands[i]!.fwhm! / fwhm! - 1)).toBeLessThan(0.03);
      expect(bands[i]!.shoulder).toBe(false);
    }
  });

  test('a bulge without a maximum is a shoulder', () => {
    const [a, b] = [gauss(20000, 100, 3000), gauss(23000, 40, 3000)];
    const bands = pickBands(
      x,
      x.map((v) => a(v) + b(v)),
    );
    expect(bands.map(({ shoulder }) => shoulder)).toEqual([false, true]);
    expect(Math.abs(bands[1]!.wavenumber - 23000)).toBeLessThan(700);
  });

  test('noise alone and a flat line have no bands; few points neither', () => {
    const next = random(3);
    const noise = x.map(() => next() + next() + next() - 1.5);
    expect(pickBands(x, noise)).toEqual([]);
    expect(
      pickBands(
        x,
        x.map(() => 0.3),
      ),
    ).toEqual([]);
    expect(pickBands([1, 2, 3], [1, 2, 1])).toEqual([]);
    expect(pickBands([], [])).toEqual([]);
  });

  test('one band in noise is found once', () => {
    const next = random(5);
    const a = gauss(19000, 1, 3000);
    const bands = pickBands(
      x,
      x.map((v) => a(v) + 0.01 * (next() - 0.5)),
    );
    expect(bands).toHaveLength(1);
    expect(Math.abs(bands[0]!.wavenumber - 19000)).toBeLessThan(100);
  });

  test('oscillator strength of a Gaussian from its area', () => {
    // f = 4.6e-9 ε_max Δν is the usual shorthand for a Gaussian (from memory): 4.319e-9 × 1.0645 = 4.60e-9.
    expect(oscillatorStrength(gaussianArea(100, 3000)) / (100 * 3000)).toBeCloseTo(4.6e-9, 11);
    expect(OSCILLATOR_STRENGTH_PER_AREA).toBe(4.319e-9);
    const a = gauss(20000, 100, 2000);
    expect(Math.abs(areaUnder(x, x.map(a)) / gaussianArea(100, 2000) - 1)).toBeLessThan(1e-4);
  });
});

describe('conditions', () => {
  const well = {
    x: [20000, 25000, 30000],
    absorbance: [0.1, 0.5, 0.2],
    solvent: 'water',
    concentration: 0.01,
    pathLength: 1,
  };
  const found = (changes: object): string[] => checkConditions({ ...well, ...changes }).map(({ code }) => code);

  test('a good measurement raises nothing', () => expect(found({})).toEqual([]));

  test.each([
    [{ solvent: 'acetone', x: [20000, 25000, 31000] }, ['below-cutoff']], // 330 nm is 30303 cm-1
    [{ solvent: 'acetone', x: [20000, 25000, 31000], absorbance: [0.1, 0.5, Number.NaN] }, []],
    [{ solvent: [{ name: 'water' }, { name: 'Me2CO' }], x: [20000, 25000, 31000] }, ['below-cutoff']],
    [{ solvent: 'unobtainium oil' }, ['unknown-solvent']],
    [{ solvent: null }, ['no-solvent']],
    [{ absorbance: [0.1, 2.5, 0.2] }, ['absorbance-high']],
    [{ absorbance: [0.1, 2.5, 0.2], absorbanceLimit: 3 }, []],
    [{ absorbance: [1.5, 1.5, 1.5, 1.5, 1.5, 0.2], x: [1, 2, 3, 4, 5, 6] }, ['saturated']],
    [{ absorbance: [0.1, -0.1, 0.2] }, ['negative-absorbance']],
    [{ concentration: null }, ['no-concentration']],
    [{ pathLength: undefined }, ['no-path-length']],
    [{ concentration: null, pathLength: null, yUnit: 'epsilon', absorbance: [1, 5000, 3] }, []],
  ])('%j', (changes, expected) => expect(found(changes)).toEqual(expected));

  test('solvents by any name, each name once', () => {
    expect(findSolvent(' d m s o ')?.name).toBe('dimethyl sulfoxide');
    expect(findSolvent('CH₂Cl₂')?.cutoffNm).toBe(233);
    expect(findSolvent('')).toBeNull();
    for (const solvent of solvents) {
      for (const name of [solvent.name, ...solvent.synonyms]) expect(findSolvent(name), name).toBe(solvent);
    }
  });

  test('wavelength checks refuse what is none', () => {
    expect(() => checkWavelengths([])).toThrow(/at least one band/);
    expect(() => checkWavelengths([{ certified: 0, found: 1 }])).toThrow(/above zero/);
  });
});

describe('CSV', () => {
  test('every digit comes back, gaps as empty cells', () => {
    const spectrum = {
      x: [400.1, 401.2, 402.3],
      y: [0.1 + 0.2, Number.NaN, -1e-9],
      xUnit: 'nm',
      yUnit: 'absorbance',
    } as const;
    const text = writeCsv(spectrum);
    expect(text.split('\r\n')[0]).toBe('Wavelength (nm),Absorbance');
    expect(readText(text)[0]).toMatchObject(spectrum);
  });

  test('no text cell opens as a formula', () => {
    for (const text of ['=1+1', '+1', '-1', '@x', '\tx', ' =1']) expect(guardCell(text)).toBe(`'${text}`);
    expect(guardCell('[Ni(H2O)6]2+')).toBe('[Ni(H2O)6]2+');
    const text = writeCsv({ x: [1], y: [2], xUnit: 'nm', yUnit: 'epsilon', yName: '=cmd("x")' });
    expect(text).toContain(`"'=cmd(""x"") (epsilon`);
  });
});
