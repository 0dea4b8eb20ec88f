import { expect, test } from 'vitest';
import { emptyConditions } from '#src/components/spectra/upload/conditions-draft.ts';
import {
  blockRange,
  blocksAtFirst,
  dialectText,
  flagsSoFar,
  isReady,
  missingUnits,
  previewCurve,
  previewSeries,
  type ReadBlock,
  toldOptions,
} from '#src/components/spectra/upload/reading.ts';
import { metadataOf } from '#src/components/spectra/upload/useUpload.ts';

const block = (part: Partial<ReadBlock> = {}): ReadBlock => ({
  title: 'invented',
  kind: 'curve',
  xUnit: 'nm',
  yUnit: 'absorbance',
  points: 3,
  x: [400, 500, 600],
  y: [0.2, null, 0.4],
  metadata: {},
  warnings: [],
  format: 'delimited',
  ...part,
});

test('a curve is drawn in rising wavenumber, gaps kept; without a unit it is not drawn', () => {
  const curve = previewCurve(block(), 'solution')!;
  expect(curve.quantity).toBe('absorbance');
  expect(curve.x.map(Math.round)).toEqual([16667, 20000, 25000]);
  expect(curve.y).toEqual([0.4, null, 0.2]);
  expect(previewCurve(block({ xUnit: null }), 'solution')).toBeNull();
});

// 1 eV = 8065.544 cm⁻¹ and 1 THz = 33.35641 cm⁻¹: CODATA 2018 (from memory).
test.each([
  ['eV', 2, 16131.09],
  ['THz', 600, 20013.85],
  ['um', 0.5, 20000],
  ['cm-1', 20000, 20000],
] as const)('an abscissa in %s is taken to cm⁻¹', (xUnit, x, wavenumber) => {
  expect(previewCurve(block({ xUnit, x: [x], y: [1] }), 'solution')!.x[0]).toBeCloseTo(wavenumber, 1);
});

test('log ε is drawn as ε, per cent transmittance as absorbance', () => {
  const log = previewSeries([block({ yUnit: 'log-epsilon', y: [1, 2, 3] })], [0], 'solution')!;
  expect(log.quantity).toBe('epsilon');
  expect(log.series[0]!.y).toEqual([1000, 100, 10]);
  const percent = previewSeries([block({ yUnit: 'percent-transmittance', y: [10, 100, 1] })], [0], 'solution')!;
  expect(percent.quantity).toBe('absorbance');
  expect(percent.series[0]!.y[2]).toBeCloseTo(1, 12);
});

test('chosen blocks of another quantity than the first are left out of the plot', () => {
  const blocks = [block(), block({ yUnit: 'emission' }), block({ title: 'third' })];
  expect(previewSeries(blocks, [0, 1, 2], 'solution')!.series.map(({ label }) => label)).toEqual(['invented', 'third']);
  expect(previewSeries(blocks, [], 'solution')).toBeNull();
});

test('every curve is taken at first, a table of peaks never', () => {
  expect(blocksAtFirst([block(), block({ kind: 'peaks' }), block()])).toEqual([0, 2]);
  expect(isReady(block({ kind: 'peaks' }))).toBe(false);
  expect(missingUnits(block({ yUnit: null }))).toEqual(['yUnit']);
});

test('the dialect is told in words', () => {
  const dialect = { delimiter: ';', decimalComma: true, headerLines: 1, columns: 2, columnNames: [] };
  expect(dialectText(dialect)).toBe('2 columns divided by semicolons, decimal comma, 1 line of head');
});

test('what the typed conditions say against the curve is told before anything is stored', () => {
  const draft = { ...emptyConditions, solvents: [{ name: 'acetone', percent: '' }] };
  // Acetone is not transparent below 330 nm (cut-offs as handbooks collect them).
  const codes = flagsSoFar(block({ x: [300, 400, 500], y: [2.5, 0.1, 0.1] }), draft).map(({ code }) => code);
  expect(codes).toEqual(['below-cutoff', 'absorbance-high', 'no-concentration']);
  expect(flagsSoFar(block(), { ...draft, technique: 'reflectance' })).toEqual([]);
});

test('the range is that of the numbers, in any order; an empty block has none', () => {
  expect(blockRange({ x: [600, 400, 500] })).toEqual([400, 600]);
  expect(blockRange({ x: [] })).toBeNull();
});

test('along with the file goes what was told; one title never names several spectra', () => {
  const draft = { ...emptyConditions, title: 'mine', lab: 'l1', preparation: '', synthetic: false };
  const options = toldOptions({ xUnit: 'nm', yUnit: undefined });
  expect(metadataOf(draft, 'ZF048609-D', options, { block: 1, isOnly: false })).toEqual({
    complex: 'ZF048609-D',
    lab: 'l1',
    technique: 'solution',
    visibility: 'programme',
    pathLength: 1,
    xUnit: 'nm',
    block: 1,
  });
  expect(metadataOf(draft, 'ZF048609-D', {}, { block: 0, isOnly: true }).title).toBe('mine');
});
