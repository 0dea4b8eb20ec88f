import Papa from 'papaparse';
import { expect, test } from 'vitest';
import { csvColumns } from '#src/components/complexes/table/table-csv.ts';
import { tableCsv } from '#src/components/ui/table-csv.ts';
import type { ComplexSummary } from '#src/contracts/complexes.ts';

const centre = (more: object) => ({
  element: 'Co',
  oxidationState: { value: 3, nominal: false, alternatives: [] },
  dCount: 6,
  spinState: 'low',
  geometry: 'OC-6',
  ...more,
});
const complex = {
  accession: 'ZF000042-X',
  formula: '[Co(NH3)6]3+',
  isomer: { descriptor: null, chirality: null },
  charge: 3,
  hill: 'CoH18N6',
  molarMass: 161.12,
  centres: [centre({})],
  ligands: [{ abbreviation: 'NH3', count: 6 }],
  pointGroup: 'Oh',
  donorSetGroup: 'Oh',
  strip: [
    { wavenumber: 21000.4, epsilon: 56, class: 'd-d' },
    { wavenumber: 29500, epsilon: null, class: 'd-d' },
  ],
  colour: null,
  lab: { id: '1', name: '=cmd()' },
  labs: 2,
  spectra: 5,
  state: 'registered',
  updatedAt: '2026-01-01T00:00:00.000Z',
} as unknown as ComplexSummary;

test('one row a complex: names of geometries, bands in one cell, texts that a spreadsheet would run made plain', () => {
  const text = tableCsv(csvColumns({ 'OC-6': 'octahedral' }), [complex]);
  const [cells] = Papa.parse<Record<string, string>>(text, { header: true }).data;
  expect(cells).toMatchObject({
    formula: '[Co(NH3)6]3+',
    descriptor: '',
    charge: '3',
    geometry: 'octahedral',
    'bands (cm-1)': '21000; 29500',
    'epsilon (dm3 mol-1 cm-1)': '56; ',
    'home lab': "'=cmd()",
  });
});

test('a value for each of several centres', () => {
  const two = {
    ...complex,
    centres: [centre({}), centre({ element: 'Cr', dCount: null })],
  } as unknown as ComplexSummary;
  const [element, dCount] = ['element', 'd-count'].map((id) => csvColumns({}).find((column) => column.id === id)!);
  expect([element!.value(two), dCount!.value(two)]).toEqual(['Co; Cr', '6; ']);
});
