import { describe, expect, test } from 'vitest';
import { levels } from '#src/chem/ligand-field/index.ts';
import { applicabilityOf } from '#src/components/ligand-field/panel/applicability.ts';
import { firstSliders } from '#src/components/ligand-field/panel/first-sliders.ts';
import { byTerm, levelRows } from '#src/components/ligand-field/panel/level-rows.ts';
import { firstChosen, fitBands, isCandidate, matchBands } from '#src/components/ligand-field/panel/observed-bands.ts';
import { moveSliders, type Sliders } from '#src/components/ligand-field/panel/slider-state.ts';
import type { BandRecord } from '#src/contracts/spectra.ts';

const start: Sliders = { delta: 17_400, B: 700, C: 3150, zeta: 0, ratioCB: 4.5 };

describe('sliders', () => {
  test('C follows B while tied, and goes its own way once moved', () => {
    const tied = moveSliders(start, { kind: 'set', name: 'B', value: 800 });
    expect(tied).toMatchObject({ B: 800, C: 3600, ratioCB: 4.5 });
    const free = moveSliders(tied, { kind: 'set', name: 'C', value: 3000 });
    expect(moveSliders(free, { kind: 'set', name: 'B', value: 900 })).toMatchObject({ B: 900, C: 3000, ratioCB: null });
    expect(moveSliders(free, { kind: 'tie', tied: true }).ratioCB).toBe(3000 / 800);
  });

  test('values stay within their ranges, and what is no number is the least', () => {
    expect(moveSliders(start, { kind: 'set', name: 'delta', value: 1e9 }).delta).toBe(45_000);
    expect(moveSliders(start, { kind: 'set', name: 'zeta', value: Number.NaN }).zeta).toBe(0);
  });

  test('a candidate without B or C keeps what stands', () => {
    const next = moveSliders(start, { kind: 'candidate', candidate: { delta: 20_300, B: null, C: null } });
    expect(next).toMatchObject({ delta: 20_300, B: 700, C: 3150, ratioCB: 4.5 });
    expect(moveSliders(next, { kind: 'reset', to: start })).toBe(start);
  });

  // f and g after C. K. Jørgensen: NH3 1.25, Cr(III) 17 400 cm⁻¹.
  test('begin at f·g where the tables have ion and ligands', () => {
    const chromium = firstSliders({ element: 'Cr', oxidationState: 3 }, 'OC-6', [
      { abbreviation: 'NH3', count: 6, denticity: 1 },
    ]);
    expect(chromium.delta).toBeCloseTo(1.25 * 17_400, -2);
    expect(firstSliders({ element: 'Xx', oxidationState: null }, 'T-4', [])).toMatchObject({ B: 800, C: 3600 });
  });
});

const band = (id: string, wavenumber: number, assignment: BandRecord['assignment'], epsilon: number | null = 40) =>
  ({ id, wavenumber, epsilon, uncertainty: null, assignment }) as unknown as BandRecord;

describe('observed bands', () => {
  test('d–d bands of the centre and weak unassigned ones can be levels', () => {
    expect(isCandidate(band('a', 17_400, { class: 'd-d', to: '4T2g' }), 0)).toBe(true);
    expect(isCandidate(band('b', 17_400, { class: 'd-d', to: '4T2g', centre: 1 }), 0)).toBe(false);
    expect(isCandidate(band('c', 30_000, { class: 'unassigned' }), 0)).toBe(true);
    expect(isCandidate(band('d', 30_000, { class: 'unassigned' }, 8000), 0)).toBe(false);
    expect(isCandidate(band('e', 30_000, { class: 'LMCT' }), 0)).toBe(false);
  });

  test('unassigned bands are fitted at first only where no other is there', () => {
    const assigned = band('a', 17_400, { class: 'd-d', to: '4T2g' });
    const open = band('b', 24_600, { class: 'unassigned', to: '4T1g' });
    expect(firstChosen([assigned, open])).toEqual(['a']);
    expect(firstChosen([open])).toEqual(['b']);
    expect(fitBands([assigned, open])).toEqual([
      { band: 'a', wavenumber: 17_400, to: '4T2g' },
      { band: 'b', wavenumber: 24_600 },
    ]);
  });

  // [Ni(H2O)6]2+ : 8500, 13 800 and 25 300 cm⁻¹ (common practice).
  test('a term that comes twice is met by its parent, or in rising order', () => {
    const { levels: nickel, group } = levels({
      n: 8,
      field: { kind: 'cubic', geometry: 'OC-6', delta: 8500 },
      B: 900,
      C: 4000,
    });
    const told = [
      { wavenumber: 25_300, to: '3T1g(P)' },
      { wavenumber: 8500, to: '3T2g' },
      { wavenumber: 13_800, to: '3T1g' },
      { wavenumber: 40_000, to: '5T2g' },
    ];
    const places = matchBands(byTerm(nickel), told);
    expect(places[3]).toBeNull();
    expect(places.slice(0, 3).map((place) => `${nickel[place!]!.label} ${nickel[place!]!.parent}`)).toEqual([
      '3T1g P',
      '3T2g F',
      '3T1g F',
    ]);
    const rows = levelRows(group, nickel, [{ band: band('x', 8500, { class: 'd-d' }), level: places[1]! }]);
    const first = rows.find(({ label }) => label === '3T2g');
    expect(rows[0]).toMatchObject({ isGround: true, verdict: 'ground level' });
    expect(first).toMatchObject({ spinAllowed: true, verdict: 'spin allowed, Laporte forbidden: vibronic' });
    expect(first!.bands[0]!.distance).toBeCloseTo(0, 6);
    expect(rows.find(({ label }) => label.startsWith('1Eg'))).toMatchObject({ spinAllowed: false });
  });
});

describe('where a diagram applies', () => {
  const centre = { element: 'Cr', dCount: 3, geometry: 'OC-6' } as Parameters<typeof applicabilityOf>[0];
  test.each([
    [{ dCount: 0 }, /d⁰/],
    [{ dCount: 10 }, /d¹⁰/],
    [{ dCount: null }, /cannot be counted/],
    [{ dCount: 5.5 }, /shares electrons/],
    [{ geometry: null }, /not stated/],
    [{ geometry: 'L-2' }, /no cubic parent/],
  ])('%j is told in words', (part, words) => {
    const found = applicabilityOf({ ...centre, ...part }, null);
    expect(found.kind === 'none' ? found.sentence : '').toMatch(words);
  });

  test('what is not cubic is drawn by its nearest parent, and says so', () => {
    expect(applicabilityOf(centre, 'Oh')).toEqual({ kind: 'cubic', n: 3, geometry: 'OC-6', note: null });
    expect(applicabilityOf({ ...centre, geometry: 'SP-4' }, null)).toMatchObject({
      geometry: 'OC-6',
      note: expect.stringContaining('far from cubic'),
    });
    expect(applicabilityOf(centre, 'C4v')).toMatchObject({ note: expect.stringContaining('not all alike') });
  });
});
