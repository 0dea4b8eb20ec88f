import { describe, expect, test } from 'vitest';
import { codes, jcamp, readText, refusal } from '../bytes.ts';

// The worked example of section 1.5 of our notes on McDonald & Wilks 1988 (own numbers, decoded alike by two programs).
const X = [400, 405, 410, 415, 420, 425, 430, 435];
const Y = [50, 50, 50, 50, 62, 74, 74, -3];
const FORMS: [string, string][] = [
  ['AFFN', '400 50 50 50 50 62 74 74 -3'],
  ['PAC', '400+50+50+50+50+62+74+74-3'],
  ['SQZ', '400E0E0E0E0F2G4G4c'],
  ['SQZ+DUP', '400E0VF2G4Tc'],
  ['DIF', '400E0%%%J2J2%p7\n435c'],
  ['DIFDUP', '400E0%UJ2T%p7\n435c'],
];
const [AFFN] = FORMS[0]!.slice(1) as [string];

describe('ordinate forms', () => {
  test.each(FORMS)('%s decodes to the worked example', (_, table) => {
    const [block] = readText(jcamp(table));
    expect(block).toMatchObject({
      kind: 'curve',
      xUnit: 'nm',
      yUnit: 'absorbance',
      points: 8,
      title: 'worked example',
    });
    expect(block!.x).toEqual(X);
    expect(block!.y).toEqual(Y);
    expect(block!.warnings).toEqual([]);
  });

  test('an exponent needs a sign: 600E5 is 600 and then 55, 6E+02 is a number', () => {
    const [plain] = readText(jcamp('600E5', { FIRSTX: '600', LASTX: '600', NPOINTS: '1', FIRSTY: '55' }));
    expect([plain!.x, plain!.y]).toEqual([[600], [55]]); // SQZ: E opens with a 5, then comes the digit 5
    const [signed] = readText(jcamp('6E+02 5E-1', { FIRSTX: '600', LASTX: '600', NPOINTS: '1', FIRSTY: '0.5' }));
    expect([signed!.x, signed!.y]).toEqual([[600], [0.5]]);
  });

  test('a repeat count of two digits, the first item counted', () => {
    const [block] = readText(jcamp('400A0S4', { LASTX: '465', NPOINTS: '14', FIRSTY: '10' }));
    expect(block!.y).toEqual(Array(14).fill(10));
  });

  test('a repeat after a difference repeats the difference', () => {
    const [block] = readText(jcamp('400A0J0U\n415D0', { LASTX: '415', NPOINTS: '4', FIRSTY: '10' }));
    expect(block!.y).toEqual([10, 20, 30, 40]);
  });

  test('an absolute item inside a difference line starts anew, and a line ended so has no check', () => {
    const [block] = readText(jcamp('400A0J0B5\n415C0C1', { LASTX: '420', NPOINTS: '5', FIRSTY: '10' }));
    expect(block!.y).toEqual([10, 20, 25, 30, 31]);
  });

  test('a missing ordinate keeps its place', () => {
    const [block] = readText(jcamp('400 50 ? 50 50 62 74 ? -3'));
    expect(block!.y).toEqual([50, Number.NaN, 50, 50, 62, 74, Number.NaN, -3]);
    expect(block!.x).toEqual(X);
  });

  test('factors apply to both axes; the grid comes from FIRSTX and LASTX', () => {
    const [block] = readText(
      jcamp('4000 50 62', { XFACTOR: '0.1', YFACTOR: '0.5', LASTX: '400.1', NPOINTS: '2', FIRSTY: '25' }),
    );
    expect([block!.x, block!.y]).toEqual([
      [400, 400.1],
      [25, 31],
    ]);
  });

  test('comments, tabs, blank lines and falling abscissae', () => {
    const table = '435\t-3 74 $$ a note 99\n$$ a whole line 12\n\n425 74 62 50\n410 50 50 50';
    const [block] = readText(jcamp(table, { FIRSTX: '435', LASTX: '400', FIRSTY: '-3' }));
    expect(block!.x).toEqual([...X].reverse());
    expect(block!.y).toEqual([...Y].reverse());
    expect(block!.metadata.TITLE).toBe('worked example');
  });
});

describe('checks that refuse', () => {
  test.each([
    ['NPOINTS too high', AFFN, { NPOINTS: '9' }, /NPOINTS is 9.*8 ordinates/],
    ['NPOINTS too low', AFFN, { NPOINTS: '7', LASTX: '430' }, /NPOINTS is 7.*8 ordinates/],
    ['cut off', '400 50 50', { END: null }, /cut off/],
    ['no NPOINTS and no END', AFFN, { NPOINTS: null, END: null }, /may be cut off/],
    ['FIRSTX equals LASTX', AFFN, { LASTX: '400' }, /both 400/],
    ['a letter that is no ordinate', '400 50 50 50 & 62 74 74 -3', {}, /is no ordinate/],
    ['a line without an abscissa', 'text 50', {}, /must open with a number/],
    ['a difference after a gap', '400E0?J2', {}, /follows a missing ordinate/],
    ['no ordinates', '', {}, /no ordinates/],
    ['a factor of zero', AFFN, { YFACTOR: '0' }, /must not be zero/],
    ['a record that is no number', AFFN, { FIRSTX: 'abc' }, /FIRSTX must be a number/],
    ['a declared size beyond bounds', AFFN, { NPOINTS: '2000000' }, /up to 1000000/],
  ])('%s', (_, table, changes, message) => {
    expect(refusal(jcamp(table, changes)).message).toMatch(message);
  });

  test('a failed Y-check, with the line of the table', () => {
    const error = refusal(jcamp('400E0%%%J2J2%p7\n435d'));
    expect(error).toMatchObject({ code: 'unreadable', field: 'file', position: 16 });
    expect(error.message).toMatch(/Y-check/);
  });

  test('an abscissa off by a step, and a doubled line', () => {
    expect(refusal(jcamp('400 50 50 50 50\n425 62 74 74 -3')).message).toMatch(/opens at 425.*420/);
    const doubled = '400 50 50\n400 50 50\n410 62 74 74 -3';
    expect(refusal(jcamp(doubled)).message).toMatch(/doubled line/);
  });

  test('a repeat count without bound', () => {
    expect(refusal(jcamp('400A0S99999999', { NPOINTS: '1000' }))).toMatchObject({ code: 'too-large' });
  });
});

describe('checks that warn', () => {
  test.each([
    ['x-check', '400 50 50 50 50\n423 62 74 74 -3', {}],
    ['firsty', AFFN, { FIRSTY: '51' }],
    ['maxy', AFFN, { MAXY: '75' }],
    ['miny', AFFN, { MINY: '-4' }],
    ['deltax', AFFN, { DELTAX: '-5' }],
    ['missing-end', AFFN, { END: null }],
    ['xfactor-missing', AFFN, { XFACTOR: null }],
    ['npoints-missing', AFFN, { NPOINTS: null }],
    ['npoints-counts-checks', '400E0%%%J2J2%p7\n435c', { NPOINTS: '9' }],
    ['lastx-missing', AFFN, { LASTX: null, DELTAX: '5' }],
    ['firstx-missing', AFFN, { FIRSTX: null }],
    ['first-last-swapped', AFFN, { FIRSTX: '435', LASTX: '400' }],
    ['ask-x-unit', AFFN, { XUNITS: 'FURLONGS' }],
    ['ask-y-unit', AFFN, { YUNITS: null }],
    ['ask-transmittance', AFFN, { YUNITS: 'TRANSMITTANCE' }],
  ])('%s, and the points stay right', (code, table, changes) => {
    const [block] = readText(jcamp(table, changes));
    expect(codes(block)).toEqual([code]);
    expect(block!.x).toEqual(X);
    expect(block!.y).toEqual(Y);
  });

  test('stated values within the rounding of their digits raise nothing', () => {
    const changes = { YFACTOR: '0.001', FIRSTY: '0.05', MAXY: '0.07', MINY: '-0.003', DELTAX: '5.0' };
    expect(codes(readText(jcamp(AFFN, changes))[0])).toEqual([]);
  });

  test('abscissae rounded to whole numbers on a fine grid are no damage', () => {
    const [block] = readText(jcamp('400 1 2 3\n400 4 5 6', { LASTX: '400.5', NPOINTS: '6', FIRSTY: '1' }));
    expect(block!.x).toEqual([400, 400.1, 400.2, 400.3, 400.4, 400.5]);
  });

  test('a transmittance above 1.5 has no unit until a person gives one', () => {
    const file = jcamp(AFFN, { YUNITS: 'TRANSMITTANCE' });
    expect(readText(file)[0]).toMatchObject({
      yUnit: null,
      yUnitText: 'TRANSMITTANCE',
      suggestedYUnit: 'percent-transmittance',
    });
    const [answered] = readText(file, { yUnit: 'percent-transmittance' });
    expect(answered).toMatchObject({ yUnit: 'percent-transmittance', warnings: [] });
  });
});

describe('decimal comma', () => {
  const table = '400,0 0,050 0,050\n410,0 0,062';
  const head = { LASTX: '410', NPOINTS: '3', FIRSTY: '0,050' };

  test('is read where NPOINTS and FIRSTY confirm it', () => {
    const [block] = readText(jcamp(table, head));
    expect([block!.x, block!.y]).toEqual([
      [400, 405, 410],
      [0.05, 0.05, 0.062],
    ]);
    expect(codes(block)).toEqual(['decimal-comma']);
  });

  test('is refused without FIRSTY, against it, or beside a full stop', () => {
    const doubts: Record<string, string | null>[] = [
      { FIRSTY: null },
      { FIRSTY: '0,070' },
      { YFACTOR: '0.5', FIRSTY: '0,025' },
    ];
    for (const changes of doubts) {
      expect(refusal(jcamp(table, { ...head, ...changes })).message).toMatch(/commas/);
    }
  });

  test('commas between whole numbers stay separators', () => {
    const [block] = readText(jcamp('400,50,50,50,50,62,74,74,-3'));
    expect(block!.y).toEqual(Y);
    expect(block!.warnings).toEqual([]);
  });
});

describe('other tables', () => {
  const pairs = { FIRSTX: '400', LASTX: '420', NPOINTS: '3', FIRSTY: '0.1' };

  test.each([['400, 0.1; 410, 0.2; 420, ?'], ['400 0.1\n410 0.2\n420 ?'], ['400,0.1 410,0.2 420,?']])(
    'XYPOINTS: %j',
    (table) => {
      const [block] = readText(jcamp(table, pairs, 'XYPOINTS= (XY..XY)'));
      expect(block).toMatchObject({ kind: 'curve', x: [400, 410, 420], y: [0.1, 0.2, Number.NaN], warnings: [] });
    },
  );

  test('XYPOINTS with a decimal comma', () => {
    const [block] = readText(
      jcamp('400,5 0,1\n410,5 0,2\n420,5 0,3', { ...pairs, FIRSTY: '0,1' }, 'XYPOINTS= (XY..XY)'),
    );
    expect(block).toMatchObject({ x: [400.5, 410.5, 420.5], y: [0.1, 0.2, 0.3] });
    expect(codes(block)).toEqual(['decimal-comma']);
  });

  test('XYPOINTS: a count that does not agree, half a pair and a word are refused', () => {
    expect(refusal(jcamp('400 0.1\n410 0.2', pairs, 'XYPOINTS= (XY..XY)')).message).toMatch(/NPOINTS is 3.*2 points/);
    expect(refusal(jcamp('400 0.1\n410', pairs, 'XYPOINTS= (XY..XY)')).message).toMatch(/1 of 2 numbers/);
    expect(refusal(jcamp('400 0.1\n410 abc', pairs, 'XYPOINTS= (XY..XY)'))).toMatchObject({
      code: 'unreadable',
      position: 16,
    });
  });

  test('PEAK TABLE, also with widths', () => {
    const head = { FIRSTX: null, LASTX: null, FIRSTY: null, XFACTOR: null, YFACTOR: null, NPOINTS: '2' };
    const [peaks] = readText(jcamp('17400, 75\n24500, 60', { ...head, XUNITS: '1/CM' }, 'PEAK TABLE= (XY..XY)'));
    expect(peaks).toMatchObject({ kind: 'peaks', xUnit: 'cm-1', x: [17400, 24500], y: [75, 60], warnings: [] });
    const [wide] = readText(jcamp('17400, 75, 3000; 24500, 60, 3500', head, 'PEAK TABLE= (XYW..XYW)'));
    expect(wide).toMatchObject({ x: [17400, 24500], y: [75, 60] });
  });

  test('PEAK ASSIGNMENTS keep their texts', () => {
    const head = { FIRSTX: null, LASTX: null, FIRSTY: null, NPOINTS: '2', XUNITS: '1/CM' };
    const table = '(17400, 75, <4A2g -> 4T2g>)\n(24500, 60,\n <4A2g -> 4T1g(F)>)';
    const [block] = readText(jcamp(table, head, 'PEAK ASSIGNMENTS= (XYA)'));
    expect(block).toMatchObject({ kind: 'peaks', x: [17400, 24500], y: [75, 60] });
    expect(block!.labels).toEqual(['4A2g -> 4T2g', '4A2g -> 4T1g(F)']);
  });

  test('NTUPLES pages', () => {
    const file = `##TITLE= kinetics
##JCAMP-DX= 5.00
##DATA TYPE= UV/VIS SPECTRUM
##DATA CLASS= NTUPLES
##NTUPLES= UV/VIS SPECTRUM
##VAR_NAME= WAVELENGTH, ABSORBANCE, TIME
##SYMBOL= X, Y, T
##VAR_TYPE= INDEPENDENT, DEPENDENT, PAGE
##VAR_FORM= AFFN, ASDF, AFFN
##VAR_DIM= 3, 3, 2
##UNITS= NANOMETERS, ABSORBANCE, SECONDS
##FIRST= 400, , 0
##LAST= 410, , 600
##FACTOR= 1, 0.001, 1
##PAGE= T=0
##NPOINTS= 3
##DATA TABLE= (X++(Y..Y)), XYDATA
400A0J0J0
410C0
##PAGE= T=600
##DATA TABLE= (XY..XY), XYDATA
400, 11; 405, 21; 410, 31
##END NTUPLES= UV/VIS SPECTRUM
##END=
`;
    const blocks = readText(file);
    expect(blocks.map(({ title }) => title)).toEqual(['kinetics, T=0', 'kinetics, T=600']);
    expect(blocks[0]).toMatchObject({ x: [400, 405, 410], y: [0.01, 0.02, 0.03], xUnit: 'nm', yUnit: 'absorbance' });
    expect(blocks[1]).toMatchObject({ x: [400, 405, 410], y: [0.011, 0.021, 0.031] });
    expect(readText(file, { block: 1 })).toEqual([blocks[1]]);
    expect(refusal(file, { block: 2 })).toMatchObject({ code: 'out-of-range', field: 'block' });
  });
});

describe('several blocks', () => {
  const one = jcamp(AFFN);
  const other = jcamp(AFFN, { TITLE: 'second' });
  const link = (count: number, inner: string, end = '##END=\n'): string =>
    `##TITLE= set\n##JCAMP-DX= 5.01\n##DATA TYPE= LINK\n##BLOCKS= ${count}\n##SOLVENT NAME= water\n${inner}${end}`;

  test.each([2, 3])('a linked file that counts %i', (count) => {
    const blocks = readText(link(count, one + other));
    expect(blocks.map(({ title, warnings }) => [title, warnings])).toEqual([
      ['worked example', []],
      ['second', []],
    ]);
    expect(blocks[0]!.metadata['SOLVENT NAME']).toBe('water');
  });

  test('a linked file with a block missing is refused where its end is, too', () => {
    expect(refusal(link(4, one + other, '')).message).toMatch(/BLOCKS is 4, but 2.*cut off/);
    expect(codes(readText(link(4, one + other))[0])).toEqual(['block-count']);
  });

  test('blocks one after the other, the first without END', () => {
    const blocks = readText(jcamp(AFFN, { END: null }) + other);
    expect(blocks.map(codes)).toEqual([['missing-end'], []]);
  });

  test('more than 64 are refused', () => {
    expect(refusal(one.repeat(65))).toMatchObject({ code: 'too-large' });
    expect(readText(one.repeat(64))).toHaveLength(64);
  });
});

describe('spelling', () => {
  test('labels in any case, with blanks, dashes and underscores', () => {
    const file = jcamp(AFFN)
      .replace('##XUNITS', '##x-units')
      .replace('##DATA TYPE', '##Data_Type')
      .replace('##XYDATA', '##xy data');
    expect(readText(file)[0]).toMatchObject({ xUnit: 'nm', y: Y });
    expect(readText(file)[0]!.metadata['DATA TYPE']).toBe('UV/VIS SPECTRUM');
  });

  test.each([
    ['nanometers', 'nm'],
    ['NM', 'nm'],
    ['1/CM', 'cm-1'],
    ['cm-1', 'cm-1'],
    ['MICROMETERS', 'um'],
    ['microns', 'um'],
  ])('XUNITS %s', (text, unit) => {
    expect(readText(jcamp(AFFN, { XUNITS: text }))[0]).toMatchObject({ xUnit: unit, xUnitText: text });
  });

  test.each([
    ['ABS', 'absorbance'],
    ['%T', 'percent-transmittance'],
    ['PERCENT TRANSMITTANCE', 'percent-transmittance'],
    ['MOLAR ABSORPTIVITY', 'epsilon'],
    ['M-1CM-1', 'epsilon'],
    ['LOG E', 'log-epsilon'],
    ['KUBELKA-MUNK', 'kubelka-munk'],
    ['ARBITRARY UNITS', 'arbitrary'],
  ])('YUNITS %s', (text, unit) => {
    expect(readText(jcamp(AFFN, { YUNITS: text }))[0]!.yUnit).toBe(unit);
  });

  test('Latin-1 text, CR line ends and unknown records', () => {
    const text = jcamp(AFFN, { TITLE: 'café', $LAMP: 'xenon' }).replaceAll('\n', '\r');
    const bytes = Uint8Array.from(text, (sign) => sign.charCodeAt(0));
    const latin = new TextDecoder('latin1').decode(bytes);
    const [block] = readText(latin);
    expect(block!.title).toBe('café');
    expect(block!.metadata.$LAMP).toBe('xenon');
    expect(block!.y).toEqual(Y);
  });

  test('records without a table are refused', () => {
    expect(refusal('##TITLE= x\n##END=\n').message).toMatch(/no table of data/);
  });
});
