import { expect, test } from 'vitest';
import {
  conditionErrors,
  conditionsInput,
  conditionsOf,
  emptyConditions,
  epsilonNeeds,
} from '#src/components/spectra/upload/conditions-draft.ts';
import { conditionDifferences, conditionsPatch } from '#src/components/spectra/upload/conditions-patch.ts';
import { readNumber } from '#src/components/spectra/upload/read-number.ts';
import type { SpectrumRecord } from '#src/contracts/spectra.ts';

test.each([
  ['5e-3', 0.005],
  ['0,005', 0.005],
  ['5.0 × 10⁻³', 0.005],
  ['5*10^-3', 0.005],
  ['1 000', 1000],
  ['−2', -2],
])('the number %s is read as %d', (text, value) => {
  expect(readNumber(text)).toBeCloseTo(value, 12);
});

test('an empty text is no number told, a word is none at all', () => {
  expect(readNumber('  ')).toBeNull();
  expect(readNumber('about 5')).toBeNaN();
  expect(readNumber('1.2.3')).toBeNaN();
});

test('only what was told is sent, the concentration in mol dm⁻³', () => {
  const draft = {
    ...emptyConditions,
    solvents: [{ name: ' water ', percent: '' }],
    concentration: '5,2',
    concentrationUncertainty: '0.1',
    concentrationUnit: 'mmol' as const,
    k: '2' as const,
    pH: '0',
  };
  expect(conditionErrors(draft)).toEqual({});
  expect(conditionsInput(draft)).toEqual({
    technique: 'solution',
    visibility: 'programme',
    solvent: 'water',
    concentration: 0.0052,
    concentrationUncertainty: 0.0001,
    k: 2,
    pathLength: 1,
    medium: { pH: 0 },
  });
});

test('shares of a mixture must be told and add up', () => {
  const mixture = (a: string, b: string) => ({
    ...emptyConditions,
    solvents: [
      { name: 'ethanol', percent: a },
      { name: 'methanol', percent: b },
    ],
  });
  expect(conditionErrors(mixture('80', '')).solvents).toMatch(/share/);
  expect(conditionErrors(mixture('80', '30')).solvents).toMatch(/110 %/);
  expect(conditionErrors(mixture('80', '20'))).toEqual({});
  expect(conditionsInput(mixture('80', '20')).solvent).toEqual([
    { name: 'ethanol', volumeFraction: 0.8 },
    { name: 'methanol', volumeFraction: 0.2 },
  ]);
});

test('what is no number, not above nought or out of range is named at its field', () => {
  const errors = conditionErrors({ ...emptyConditions, concentration: 'thin', temperature: '-4', pH: '19' });
  expect(Object.keys(errors).sort()).toEqual(['concentration', 'pH', 'temperature']);
});

test('what ε still needs is said, and nothing for techniques that give none', () => {
  expect(epsilonNeeds({ ...emptyConditions, pathLength: '' }, 'absorbance')).toMatch(/concentration and the path/);
  expect(epsilonNeeds({ ...emptyConditions, concentration: '0.01' }, 'absorbance')).toBeNull();
  expect(epsilonNeeds(emptyConditions, 'epsilon')).toBeNull();
  expect(epsilonNeeds({ ...emptyConditions, technique: 'reflectance' }, 'reflectance')).toBeNull();
});

const record = {
  title: 'curve',
  technique: 'solution',
  solvent: [{ name: 'water', volumeFraction: 1 }],
  concentration: 0.005,
  concentrationUncertainty: null,
  pathLength: 1,
  pathLengthUncertainty: null,
  temperature: 298,
  phase: null,
  medium: { pH: 1, ionicStrength: null, electrolyte: null, atmosphere: null, age: null },
  bandwidth: null,
  cell: null,
  polarisation: null,
  operator: null,
  measuredAt: null,
  notes: 'first',
  visibility: 'programme',
} as unknown as SpectrumRecord;

test('a form that was not touched changes nothing', () => {
  expect(conditionsPatch(record, conditionsOf(record))).toEqual({});
});

test('a patch holds what changed, null for what was emptied', () => {
  const draft = { ...conditionsOf(record), notes: '', pH: '', temperature: '77', concentrationUncertainty: '0.0002' };
  expect(conditionsPatch(record, draft)).toEqual({
    notes: null,
    medium: { pH: null },
    temperature: 77,
    concentrationUncertainty: 0.0002,
    k: 1,
  });
});

test('beside another state of the record stands what differs from it', () => {
  const draft = { ...conditionsOf(record), temperature: '77' };
  expect(conditionDifferences({ ...record, temperature: 293 }, draft)).toEqual([
    { name: 'Temperature', present: '293', mine: '77' },
  ]);
});
