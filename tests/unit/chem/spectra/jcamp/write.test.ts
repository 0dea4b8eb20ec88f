import { describe, expect, test } from 'vitest';
import {
  readSpectrumFile,
  type SpectrumToWrite,
  writeJcamp,
  type XUnit,
  type YUnit,
} from '../../../../../src/chem/spectra/index.ts';
import { readText } from '../bytes.ts';
import { random } from '../random.ts';

const spectrum: SpectrumToWrite = {
  title: '[Ni(H2O)6]2+ in water, invented',
  xUnit: 'nm',
  yUnit: 'absorbance',
  x: [500, 499.5, 499, 498.5],
  y: [0.1234, 1e-7, Number.NaN, -0.002],
};

const read = (given: SpectrumToWrite) => readText(writeJcamp(given))[0]!;

describe('round trip', () => {
  test('an equal grid is written as XYDATA and comes back exactly', () => {
    expect(writeJcamp(spectrum)).toContain('##XYDATA= (X++(Y..Y))');
    const block = read(spectrum);
    expect(block).toMatchObject({ title: spectrum.title, kind: 'curve', xUnit: 'nm', yUnit: 'absorbance' });
    expect([block.x, block.y]).toEqual([spectrum.x, spectrum.y]);
    expect(block.warnings).toEqual([]);
  });

  test('uneven abscissae are written as XYPOINTS', () => {
    const uneven = { ...spectrum, xUnit: 'cm-1' as const, x: [20000, 20040.08016032064, 20080.3, 20100] };
    expect(writeJcamp(uneven)).toContain('##XYPOINTS= (XY..XY)');
    expect(read(uneven)).toMatchObject({ x: uneven.x, y: uneven.y, warnings: [] });
  });

  test('peaks', () => {
    const peaks = { ...spectrum, kind: 'peaks' as const, x: [17400.5, 24500], y: [75, 60] };
    expect(read(peaks)).toMatchObject({ kind: 'peaks', x: peaks.x, y: peaks.y, warnings: [] });
  });

  test.each([1, 2, 3, 4, 5, 6, 7, 8])('numbers drawn by seed %i, grids and not', (seed) => {
    const next = random(seed);
    const n = 1 + Math.floor(next() * 400);
    const step = [0.1, 0.5, 1, 2, 1 / 3, 0.05][seed % 6]!;
    const start = Math.round(next() * 3000) / 10 + 200;
    const x = Array.from({ length: n }, (_, i) =>
      seed % 2 ? Number((start + i * step).toPrecision(9)) : start + i * step * next(),
    );
    const y = x.map(() => (next() < 0.05 ? Number.NaN : (next() - 0.3) * 10 ** Math.floor(next() * 20 - 10)));
    const block = read({ ...spectrum, x, y });
    expect(block.x).toEqual(x);
    expect(block.y).toEqual(y);
    expect(block.warnings).toEqual([]);
  });

  test('every unit comes back', () => {
    const xUnits: XUnit[] = ['nm', 'um', 'cm-1', 'eV', 'THz'];
    const yUnits: YUnit[] = [
      ...(['absorbance', 'transmittance', 'percent-transmittance', 'epsilon', 'log-epsilon', 'kubelka-munk'] as const),
      ...(['reflectance', 'percent-reflectance', 'delta-epsilon', 'emission', 'arbitrary'] as const),
    ];
    for (const xUnit of xUnits) expect(read({ ...spectrum, xUnit }).xUnit).toBe(xUnit);
    for (const yUnit of yUnits) expect(read({ ...spectrum, yUnit }).yUnit).toBe(yUnit);
  });
});

describe('records', () => {
  const full: SpectrumToWrite = {
    ...spectrum,
    title: 'Δ-[Co(en)₃]³⁺ in H₂O ##END= $$ and a long, long title that runs well over the eighty columns of a line',
    origin: 'Blue laboratory\n##END=',
    solvent: 'water',
    solute: '[Ni(H2O)6]2+',
    concentration: 0.05,
    pathLength: 1,
    temperature: 298.15,
    bandwidth: 2,
    measuredAt: '2026-03-01T09:30:00Z',
  };

  test('known ones are there in their units, unknown ones are not', () => {
    const { metadata } = read(full);
    expect(metadata).toMatchObject({
      'JCAMP-DX': '5.01',
      'DATA CLASS': 'XYDATA',
      LONGDATE: '2026/03/01 09:30:00.0000 +0000',
      'SOLVENT NAME': 'water',
      CONCENTRATIONS: '(NCU)\n([Ni[H2O]6]2+, 0.05, mol/L)',
      PATHLENGTH: '1',
      TEMPERATURE: '25',
      RESOLUTION: '2',
      OWNER: 'not stated',
    });
    expect(Object.keys(read(spectrum).metadata)).not.toEqual(
      expect.arrayContaining(['SOLVENT NAME', 'CONCENTRATIONS', 'PATHLENGTH', 'TEMPERATURE', 'LONGDATE']),
    );
  });

  test('lines are ASCII and keep to 80 columns; no text can open a record', () => {
    const lines = writeJcamp(full).split('\r\n');
    expect(lines.every((line) => line.length <= 80 && /^[\x20-\x7e]*$/.test(line))).toBe(true);
    expect(lines.filter((line) => line.startsWith('##END'))).toEqual(['##END=']);
    expect(lines[0]).toMatch(/^##TITLE= Delta-\[Co\(en\)3\]3\+ in H2O # #END= \$ \$ and/);
    expect(read(full).y).toEqual(spectrum.y);
  });

  test('what cannot be a spectrum is refused', () => {
    expect(() => writeJcamp({ ...spectrum, x: [], y: [] })).toThrow(/without points/);
    expect(() => writeJcamp({ ...spectrum, x: [1] })).toThrow(/1 abscissae, but 4 ordinates/);
    expect(() => writeJcamp({ ...spectrum, x: [1, 2, Number.NaN, 4] })).toThrow(/abscissa 3/);
  });

  test('the bytes are read from a typed array', () => {
    const bytes = new TextEncoder().encode(
      writeJcamp({ ...spectrum, x: Float64Array.from([1, 2]), y: Float64Array.from([3, 4]) }),
    );
    expect(readSpectrumFile(bytes)[0]).toMatchObject({ x: [1, 2], y: [3, 4] });
  });
});
