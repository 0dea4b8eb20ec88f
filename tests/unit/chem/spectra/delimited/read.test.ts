import { describe, expect, test } from 'vitest';
import { readSpectrumFile } from '../../../../../src/chem/spectra/index.ts';
import { codes, readText, refusal } from '../bytes.ts';

const X = [400, 401, 402];
const Y = [0.123, 0.234, 0.345];

describe('dialects', () => {
  test.each([
    ['comma', 'Wavelength (nm),Abs\n400,0.123\n401,0.234\n402,0.345\n', ',', false],
    ['comma and blank', 'nm, A\n400, 0.123\n401, 0.234\n402, 0.345', ',', false],
    ['tab', 'Wavelength (nm)\tAbs\n400\t0.123\n401\t0.234\n402\t0.345', '\t', false],
    ['tab, decimal comma', 'Wavelength (nm)\tAbs\n400,0\t0,123\n401,0\t0,234\n402,0\t0,345', '\t', true],
    ['semicolon, decimal comma, "nm;A"', 'nm;A\r\n400;0,123\r\n401;0,234\r\n402;0,345\r\n', ';', true],
    ['semicolon, full stop', 'nm;A\n400;0.123\n401;0.234\n402;0.345', ';', false],
    ['bar', 'nm|A\n400|0.123\n401|0.234\n402|0.345', '|', false],
    ['runs of blanks', 'Wavelength (nm)   Absorbance\n  400   0.123\n  401   0.234\n  402   0.345', ' ', false],
    ['one blank, decimal comma', 'Wavelength (nm) Abs\n400,0 0,123\n401,0 0,234\n402,0 0,345', ' ', true],
    ['CR line ends', 'nm;A\r400;0,123\r401;0,234\r402;0,345\r', ';', true],
    ['byte order mark', '\ufeffnm,A\n400,0.123\n401,0.234\n402,0.345', ',', false],
    ['quotes', '"Wavelength (nm)","Abs"\n"400","0.123"\n"401","0.234"\n"402","0.345"', ',', false],
    ['exponents', 'nm,A\n4.00e2,1.23E-1\n401,2.34e-01\n402,345e-3', ',', false],
    ['comments and blank lines', '# invented\n\nnm,A\n400,0.123\n# pause\n\n401,0.234\n402,0.345\n\n', ',', false],
    ['whole line quoted key', 'Sample,invented\nnm,A\n400,0.123\n401,0.234\n402,0.345\n', ',', false],
  ])('%s', (_, text, delimiter, decimalComma) => {
    const blocks = readText(text);
    expect(blocks).toHaveLength(1);
    expect(blocks[0]).toMatchObject({
      xUnit: 'nm',
      yUnit: 'absorbance',
      format: 'delimited',
      kind: 'curve',
      points: 3,
    });
    expect(blocks[0]).toMatchObject({ x: X, y: Y, warnings: [], dialect: { delimiter, decimalComma, columns: 2 } });
  });

  test('Latin-1 and UTF-16', () => {
    const text = 'Wellenlänge (µm);A\n0,400;0,123\n0,401;0,234\n';
    const latin = Uint8Array.from(text, (sign) => sign.charCodeAt(0));
    expect(readSpectrumFile(latin)[0]).toMatchObject({ xUnit: 'um', xUnitText: 'Wellenlänge (µm)', x: [0.4, 0.401] });
    const wide = new Uint8Array(Uint16Array.from(`\ufeff${text}`, (sign) => sign.charCodeAt(0)).buffer);
    expect(readSpectrumFile(wide)[0]).toMatchObject({ xUnit: 'um', y: [0.123, 0.234] });
  });

  test('falling order stays as it is', () => {
    const [block] = readText('nm,A\n402,0.3\n401,0.2\n400,0.1');
    expect(block).toMatchObject({ x: [402, 401, 400], y: [0.3, 0.2, 0.1], warnings: [] });
  });
});

describe('units in heads', () => {
  test.each([
    ['Wavelength (nm)', 'nm'],
    ['nm', 'nm'],
    ['λ / nm', 'nm'],
    ['Wavelength [µm]', 'um'],
    ['cm-1', 'cm-1'],
    ['Wavenumber (cm⁻¹)', 'cm-1'],
    ['ν̃/cm^-1', 'cm-1'],
    ['Energy (eV)', 'eV'],
    ['Frequency (THz)', 'THz'],
  ])('abscissa %s', (head, unit) => {
    expect(readText(`${head};A\n400;0,1\n401;0,2`)[0]!.xUnit).toBe(unit);
  });

  test.each([
    ['Abs', 'absorbance'],
    ['A', 'absorbance'],
    ['Absorbance (AU)', 'absorbance'],
    ['Sample 1 (Abs)', 'absorbance'],
    ['%T', 'percent-transmittance'],
    ['T (%)', 'percent-transmittance'],
    ['Transmittance (%)', 'percent-transmittance'],
    ['Transmittance', 'transmittance'],
    ['ε', 'epsilon'],
    ['ε / M-1 cm-1', 'epsilon'],
    ['ε (L mol⁻¹ cm⁻¹)', 'epsilon'],
    ['epsilon (dm3 mol-1 cm-1)', 'epsilon'],
    ['log ε', 'log-epsilon'],
    ['log ε (M-1 cm-1)', 'log-epsilon'],
    ['Δε (M-1 cm-1)', 'delta-epsilon'],
    ['%R', 'percent-reflectance'],
    ['F(R)', 'kubelka-munk'],
    ['Intensity (counts)', 'arbitrary'],
  ])('ordinate %s', (head, unit) => {
    expect(readText(`nm;${head}\n400;0,1\n401;0,2`)[0]).toMatchObject({ yUnit: unit, yUnitText: head });
  });

  test('a unit stated in a line of its own', () => {
    const [block] = readText('Sample: blue\nData mode: Abs\nX units: nm\n400\t0.1\n401\t0.2\n');
    expect(block).toMatchObject({ title: 'blue', xUnit: 'nm', yUnit: 'absorbance', warnings: [] });
    expect(block!.metadata).toMatchObject({ Sample: 'blue', 'Data mode': 'Abs' });
    expect(block!.dialect!.headerLines).toBe(3);
  });

  test('no unit is guessed: it is asked for, with what the numbers suggest', () => {
    const [block] = readText('400 0.1\n401 0.2\n402 0.3');
    expect(block).toMatchObject({ xUnit: null, yUnit: null, suggestedXUnit: 'nm' });
    expect(codes(block)).toEqual(['ask-x-unit', 'ask-y-unit']);
    expect(readText('Wavenumber Abs\n20000 0.1\n20100 0.2')[0]).toMatchObject({ xUnit: null, suggestedXUnit: 'cm-1' });
    const [answered] = readText('400 0.1\n401 0.2', { xUnit: 'nm', yUnit: 'absorbance' });
    expect(answered).toMatchObject({ xUnit: 'nm', yUnit: 'absorbance', warnings: [] });
  });
});

describe('several spectra', () => {
  test('samples side by side', () => {
    const blocks = readText('Wavelength (nm),blue,green,\n400,0.1,0.3,\n401,0.2,,\n402,0.3,0.5,\n', {
      yUnit: 'absorbance',
    });
    expect(blocks.map(({ title, y }) => [title, y])).toEqual([
      ['blue', [0.1, 0.2, 0.3]],
      ['green', [0.3, Number.NaN, 0.5]],
    ]);
  });

  test('names over quantities, an abscissa before each', () => {
    const text = 'blue,,green,\nWavelength (nm),Abs,Wavelength (nm),Abs\n400,0.1,500,0.3\n401,0.2,501,0.4\n402,0.3,,\n';
    const blocks = readText(text);
    expect(blocks.map(({ title, x, y }) => [title, x, y])).toEqual([
      ['blue', [400, 401, 402], [0.1, 0.2, 0.3]],
      ['green', [500, 501], [0.3, 0.4]],
    ]);
    expect(blocks[1]).toMatchObject({ xUnit: 'nm', yUnit: 'absorbance' });
  });

  test('A, B and C are names of samples, not quantities', () => {
    const blocks = readText('nm,A,B,C\n400,0.1,0.2,0.3\n401,0.1,0.2,0.3');
    expect(blocks.map(({ title, yUnit }) => [title, yUnit])).toEqual([
      ['A', null],
      ['B', null],
      ['C', null],
    ]);
  });

  test('columns that a person chooses', () => {
    const text = 'no,nm,A\n1,400,0.1\n2,401,0.2\n3,402,0.3';
    const [block] = readText(text, { columns: { x: 1, y: [2] } });
    expect(block).toMatchObject({ x: [400, 401, 402], y: [0.1, 0.2, 0.3], xUnit: 'nm', yUnit: 'absorbance' });
    expect(refusal(text, { columns: { x: 0, y: [3] } })).toMatchObject({ code: 'out-of-range', field: 'columns' });
  });

  test('tables one under the other', () => {
    const text = 'first\nnm,A\n400,0.1\n401,0.2\n\nsecond\nsee below\nnm,A\n400,0.3\n401,0.4\n';
    expect(readText(text).map(({ y }) => y)).toEqual([
      [0.1, 0.2],
      [0.3, 0.4],
    ]);
  });
});

describe('gaps and oddities', () => {
  test('empty cells, words for no number and cells cut short are gaps', () => {
    const [block] = readText('nm,A\n399,OVER\n400,0.1\n401,\n402,NaN\n403\n404,0.5');
    expect(block!.x).toEqual([399, 400, 401, 402, 403, 404]);
    expect(block!.y).toEqual([Number.NaN, 0.1, Number.NaN, Number.NaN, Number.NaN, 0.5]);
    expect(codes(block)).toEqual(['short-line']);
  });

  test.each([
    ['repeated-x', 'nm,A\n400,0.1\n401,0.2\n401,0.3\n402,0.4', 4],
    ['unsorted', 'nm,A\n400,0.1\n402,0.2\n401,0.3\n403,0.4', 4],
    ['trailing-text', 'nm,A\n400,0.1\n401,0.2 ,lamp change\n402,0.4', 3],
  ])('%s is told with its line', (code, text, line) => {
    const [block] = readText(text);
    expect(block!.warnings).toEqual([expect.objectContaining({ code, line })]);
  });

  test('text below the table is told', () => {
    const [block] = readText('nm,A\n400,0.1\n401,0.2\nInstrument: invented\nLamp: 12\n');
    expect(codes(block)).toEqual(['text-below']);
  });
});

describe('refusals', () => {
  test.each([
    ['', 'empty', /no text/],
    ['a letter\nto a friend\n', 'unreadable', /no table was found/],
    ['nm,A\n400,0.1\n', 'unreadable', /no table was found/],
    ['400\n401\n402\n', 'unreadable', /no table was found/],
    ['nm,A\n400,0,123\n401,0,234\n402,0,345\n', 'ambiguous', /commas/],
  ])('%j', (text, code, message) => {
    const error = refusal(text);
    expect(error).toMatchObject({ code, field: 'file' });
    expect(error.message).toMatch(message);
  });

  test('damage in the middle of a table, with its line', () => {
    const error = refusal('nm,A\n400,0.1\n401,0.2\n4#2;0.3\n403,0.4\n404,0.5');
    expect(error).toMatchObject({ code: 'unreadable', position: 4 });
    expect(error.message).toMatch(/take the line out/);
  });

  test.each([
    ['a workbook', [0x50, 0x4b, 0x03, 0x04, 1, 2]],
    ['a picture', [0x89, 0x50, 0x4e, 0x47]],
    ['bytes', [1, 2, 3, 0, 4, 5, 0, 0, 9]],
  ])('%s', (_, bytes) => {
    expect(() => readSpectrumFile(Uint8Array.from(bytes))).toThrow(/export the spectrum as JCAMP-DX or CSV/);
  });

  test('too many columns', () => {
    const row = Array.from({ length: 66 }, (_, i) => i + 0.5).join(',');
    expect(refusal(`${row}\n${row.replace('0.5', '1.5')}\n`)).toMatchObject({ code: 'too-large' });
  });
});
