import { expect, test } from 'vitest';
import { transitionTable } from '#src/chem/symmetry/index.ts';
import { firstBand, matchesOf, type PlacedBand } from '#src/components/symmetry/band-matching.ts';
import { judgedGroups } from '#src/components/symmetry/judged-groups.ts';
import { isStrong, ownTerms, partsOfRow } from '#src/components/symmetry/panel-argument.ts';
import { distinctViews, transitionRows, transitionsCsv } from '#src/components/symmetry/transition-rows.ts';
import type { BandRecord } from '#src/contracts/spectra.ts';

const placed = (id: string, epsilon: number | null, assignment: BandRecord['assignment']): PlacedBand => ({
  band: {
    id,
    wavenumber: 21_550,
    wavelength: 464,
    height: 1,
    quantity: 'epsilon',
    epsilon,
    fwhm: null,
    shoulder: false,
    oscillatorStrength: null,
    uncertainty: null,
    found: 'picked',
    assignment,
    verdict: null,
    state: 'proposed',
    proposedBy: null,
    judgedBy: null,
    judgement: null,
    may: { judge: false },
  },
  spectrum: { id: 's', title: 'Invented' },
});
const sites = Array.from({ length: 6 }, () => 'N');
// Three rings that leave D3: pairs of vertices of OC-6, no vertex twice, as the record of a tris-chelate has them.
const tris = transitionTable({
  dCount: 3,
  geometry: 'OC-6',
  spin: null,
  sites,
  chelates: [
    [0, 2],
    [1, 4],
    [3, 5],
  ],
  effectiveGroup: null,
});
const hexa = transitionTable({ dCount: 3, geometry: 'OC-6', spin: null, sites, chelates: [], effectiveGroup: 'D4h' });

test('a label of the octahedron stands in its row, with or without the free-ion term', () => {
  expect(matchesOf(hexa, { class: 'd-d', from: '4A2g', to: '4T1g(P)' })).toEqual([
    { row: '4T1g', group: 'Oh', to: null },
  ]);
  expect(matchesOf(hexa, { class: 'd-d', to: '4T2g' })).toEqual([{ row: '4T2g', group: 'Oh', to: null }]);
});

test('a label of a lower group is read in that group, and may belong to parts of several terms', () => {
  const found = matchesOf(hexa, { class: 'd-d', from: '4B1g', to: '4Eg' });
  expect(found.map(({ row, group, to }) => `${row} ${group} ${to}`)).toEqual(['4T1g D4h 4Eg', '4T2g D4h 4Eg']);
});

test('no label, a term that there is not, or another lower term match nothing', () => {
  expect(matchesOf(hexa, { class: 'd-d' })).toEqual([]);
  expect(matchesOf(hexa, { class: 'd-d', from: '4A2g', to: '5T2g' })).toEqual([]);
  expect(matchesOf(hexa, { class: 'd-d', from: '4T2g', to: '4T1g' })).toEqual([]);
});

test('the strongest d–d band comes first, charge transfer only where there is none', () => {
  const weak = placed('weak', 12, { class: 'd-d', to: '4T2g' });
  const strong = placed('strong', 40, { class: 'd-d', to: '4T1g' });
  const charge = placed('charge', 12_000, { class: 'LMCT' });
  expect(firstBand([weak, charge, strong])?.band.id).toBe('strong');
  const ligand = placed('ligand', 80_000, { class: 'intraligand' });
  expect(firstBand([ligand, charge])?.band.id).toBe('charge');
  expect(firstBand([ligand])?.band.id).toBe('ligand');
  expect(firstBand([])).toBeNull();
});

test('rows carry their bands; parts of one term share those named in the octahedron', () => {
  const view = tris.views.find(({ kind }) => kind === 'framework')!;
  const rows = transitionRows(tris, view, [placed('b', 40, { class: 'd-d', from: '4A2g', to: '4T2g' })]);
  const own = rows.filter(({ excited }) => excited === '4T2g');
  expect(own.map(({ transition }) => transition.to).sort()).toEqual(['4A1', '4E']);
  expect(own.every(({ bands }) => bands.length === 1)).toBe(true);
  expect(own.map(({ leads }) => leads)).toEqual([true, false]);
  expect(rows.filter(({ excited }) => excited === '4T1g').every(({ bands }) => bands.length === 0)).toBe(true);
});

test('a part named in the group of the view comes first, else what is allowed', () => {
  const view = hexa.views.find(({ kind }) => kind === 'effective')!;
  const row = view.rows.find(({ label }) => label === '4T2g')!;
  const named = placed('n', 40, { class: 'd-d', from: '4B1g', to: '4B2g' });
  expect(partsOfRow(hexa, view, row, named)[0]).toEqual({ from: '4B1g', to: '4B2g' });
});

test('framework and donor set of one group are one view with both words', () => {
  expect(distinctViews(hexa).map(({ view, words }) => `${view.group}: ${words}`)).toEqual([
    'Oh: framework, donor set',
    'D4h: effective',
  ]);
  expect(distinctViews(tris).map(({ view }) => view.group)).toEqual(['D3', 'Oh']);
});

test('a d0 centre has no views, and its charge transfer is judged in the groups of the record', () => {
  const d0 = transitionTable({
    dCount: 0,
    geometry: 'T-4',
    spin: null,
    sites: null,
    chelates: [],
    effectiveGroup: null,
  });
  const [judged] = judgedGroups(d0, { pointGroup: 'Td', donorSetGroup: 'Td', effectiveGroup: null });
  expect(judged).toEqual({ kind: 'framework', group: 'Td', words: 'framework, donor set', view: null });
  const band = placed('c', 2400, { class: 'LMCT', from: '1A1', to: '1T2' });
  const part = ownTerms('Td', band)!;
  expect(part).toEqual({ from: '1A1', to: '1T2' });
  expect(isStrong('Td', part, band)).toBe(true);
  expect(ownTerms('Td', placed('o', 1, { class: 'MLCT', from: 'dπ(Ru)', to: 'π*(bpy)' }))).toBeNull();
  expect(isStrong('Oh', { from: '4A2g', to: '4T2g' }, null)).toBe(false);
});

test('the CSV has every view, a line for each part, and the bands', () => {
  const csv = transitionsCsv(hexa, [placed('b', 40, { class: 'd-d', from: '4A2g', to: '4T2g' })]);
  const [head, ...lines] = csv.split('\r\n');
  expect(head).toMatch(/^excited term in Oh,levels,free-ion terms,judged by,group,from,to,spin,Laporte,along x/);
  expect(
    lines.some(
      (line) => line.startsWith('4T2g,1,4F,framework,Oh,4A2g,4T2g,allowed,forbidden,') && line.endsWith(',21550'),
    ),
  ).toBe(true);
  expect(lines.some((line) => line.includes(',effective,D4h,4B1g,'))).toBe(true);
});
