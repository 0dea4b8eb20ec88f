import { expect, test } from 'vitest';
import { spinChoices } from '#src/chem/electrons.ts';
import { readFormula } from '#src/chem/formula/index.ts';
import { isomersOf } from '#src/chem/geometry/index.ts';
import { editDifferences, editDraft, editPatch, presentPick } from '#src/components/complexes/page/edit-form.ts';
import { overlayBands, shownAtFirst } from '#src/components/complexes/page/overlay.ts';
import { emptyPreparation, preparationInput } from '#src/components/complexes/page/preparation-form.ts';
import { centreKinds, historyText, visibilityText } from '#src/components/complexes/page/specimen.ts';
import { type Settled, settle } from '#src/components/complexes/register/settle.ts';
import type { ComplexRecord } from '#src/contracts/complexes.ts';
import type { BandRecord, SpectrumSummary } from '#src/contracts/spectra.ts';

const entity = readFormula('[CoCl2(en)2]+').entities[0]!;
const { list } = isomersOf(entity, 'OC-6')!;
const settledBy = (choices: object): Settled =>
  settle({ isomersOf, spinChoices }, entity, { of: `${entity.identity} `, geometry: 'OC-6', ...choices } as never);

const trans = list.isomers.findIndex(({ descriptor }) => descriptor === 'trans');
const record = (index: number | null, chirality: string | null = null): ComplexRecord =>
  ({
    notes: 'first',
    visibility: 'programme',
    embargoUntil: null,
    lab: { id: '1', name: 'North Quay' },
    centres: [{ element: 'Co', geometry: 'OC-6', spinState: 'low' }],
    isomer:
      index === null
        ? { descriptor: null, chirality: null, sites: null, chelates: null }
        : { ...list.isomers[index]!, chirality },
  }) as unknown as ComplexRecord;

test('the isomer of a record is found in the list by its sites, the pair where no hand is told', () => {
  expect(presentPick(record(trans), list)).toEqual({ index: trans, rac: false });
  const cis = list.isomers.findIndex(({ chirality }) => chirality === 'Δ');
  expect(presentPick(record(cis, 'Δ'), list)).toEqual({ index: cis, rac: false });
  expect(presentPick(record(cis, 'rac'), list)?.rac).toBe(true);
  expect(presentPick(record(null), list)).toBeNull();
});

test('an edit that was not touched changes nothing', () => {
  const complex = record(trans);
  const settled = settledBy({ isomer: presentPick(complex, list), spinState: 'low' });
  expect(editPatch(complex, editDraft(complex), settled)).toEqual({});
  expect(editPatch(complex, { ...editDraft(complex), choices: { of: '' } }, settled)).toEqual({});
});

test('a patch names the isomer by its place, and the pair of mirror images as rac', () => {
  const complex = record(trans);
  const cis = list.isomers.findIndex(({ chiral }) => chiral);
  const draft = { ...editDraft(complex), notes: ' ', choices: { of: '' } };
  const settled = settledBy({ isomer: { index: cis, rac: true }, spinState: 'low' });
  expect(editPatch(complex, draft, settled)).toEqual({ isomer: cis, chirality: 'rac', notes: null });
  const unstated = settledBy({ isomer: null, spinState: 'low' });
  expect(editPatch(complex, { ...editDraft(complex), choices: { of: '' } }, unstated)).toEqual({ isomer: null });
});

test('beside another state of the record stands what differs from it', () => {
  const mine = { ...editDraft(record(trans)), notes: 'mine' };
  expect(editDifferences({ ...record(trans), notes: 'theirs' }, mine, null)).toEqual([
    { name: 'Notes', present: 'theirs', mine: 'mine' },
  ]);
});

test('an embargo is sent as the instant at which its day begins, in UTC', () => {
  const complex = record(trans);
  const draft = { ...editDraft(complex), embargo: '2027-03-01' };
  expect(editPatch(complex, draft, null)).toEqual({ embargoUntil: '2027-03-01T00:00:00.000Z' });
});

const spectrum = (id: string, state = 'registered') => ({ id, state }) as unknown as SpectrumSummary;
const band = (wavenumber: number, epsilon: number | null, kind = 'd-d') =>
  ({ wavenumber, epsilon, quantity: 'absorbance', height: 0.5, assignment: { class: kind, to: '4T2g' } }) as BandRecord;

test('withdrawn spectra are not drawn at first', () => {
  expect([...shownAtFirst([spectrum('a'), spectrum('b', 'withdrawn')])]).toEqual(['a']);
});

test('a band of several spectra is marked once, over the highest; only those of drawn curves', () => {
  const lists = [
    { spectrum: spectrum('a'), bands: [band(17400, 15)] },
    { spectrum: spectrum('b'), bands: [band(17450, 18), band(17450, 900, 'LMCT'), band(30000, null)] },
    { spectrum: spectrum('c'), bands: [band(9000, 5)] },
  ];
  const series = ['a', 'b'].map((id) => ({ id, label: id, x: [], y: [] }));
  expect(overlayBands(lists, series, 'epsilon').map(({ wavenumber, height }) => [wavenumber, height])).toEqual([
    [17400, 18],
    [17450, 900],
  ]);
  expect(overlayBands(lists, series, 'absorbance').map(({ height }) => height)).toEqual([0.5, 0.5, 0.5]);
});

test('of a preparation only what was typed is sent', () => {
  expect(preparationInput({ ...emptyPreparation('lab'), label: ' QN-1 ', formula: ' ' }, {})).toEqual({
    label: 'QN-1',
    lab: 'lab',
    visibility: 'programme',
  });
});

test('equal centres are told once with their number', () => {
  const [a, b] = [{ element: 'Ru' }, { element: 'Fe' }] as ComplexRecord['centres'];
  expect(centreKinds([a!, a!, b!]).map(({ count }) => count)).toEqual([2, 1]);
});

test('an entry of the history says what changed, and why something was withdrawn', () => {
  expect(historyText({ action: 'change', detail: { notes: 'x', isomer: 1, reopened: 2 } })).toBe(
    'changed: notes, isomer; 2 attestations reopened',
  );
  expect(historyText({ action: 'withdraw', detail: { state: 'withdrawn', withdrawnReason: 'wrong salt' } })).toBe(
    'withdrawn: wrong salt',
  );
  expect(historyText({ action: 'unheard-of', detail: {} })).toBe('unheard-of');
});

test('who sees a record is told with its embargo', () => {
  const lab = { id: '1', name: 'North Quay' };
  expect(visibilityText({ visibility: 'lab', embargoUntil: null, lab })).toBe('North Quay only');
  expect(visibilityText({ visibility: 'programme', embargoUntil: '2027-01-01T00:00:00.000Z', lab })).toBe(
    'every lab of the programme; guests not before 2027-01-01',
  );
});
