import { describe, expect, test } from 'vitest';
import { geometries } from '#src/chem/geometry/index.ts';
import { findGroup, vibrations } from '#src/chem/symmetry/index.ts';

const dimensionOf = (group: string, label: string): number =>
  findGroup(group)!.irreps.find((irrep) => irrep.label === label)!.dimension;

describe.each(geometries)('$symbol', ({ symbol, group, vertices }) => {
  const kinds = vertices.map(() => 'A');
  const sitesToTry = [kinds, kinds.with(0, 'B'), kinds.with(0, 'B').with(1, 'C'), kinds.map((_, i) => `${i}`)];

  test.each(sitesToTry.map((sites) => ({ sites })))('has 3N − 6 modes, n of them stretches: $sites', ({ sites }) => {
    const found = vibrations({ geometry: symbol, sites });
    const size = (terms: readonly { irrep: string; count: number }[]): number =>
      terms.reduce((sum, { irrep, count }) => sum + count * dimensionOf(found.group, irrep), 0);
    const atoms = vertices.length + 1;
    expect(size(found.total)).toBe(3 * atoms);
    expect(size(found.vibrations)).toBe(3 * atoms - (vertices.length === 2 && group === 'Dinfh' ? 5 : 6));
    expect(size(found.stretches)).toBe(vertices.length);
    const modes = new Map(found.vibrations.map(({ irrep, count }) => [irrep, count]));
    for (const { irrep, count } of found.stretches) expect(modes.get(irrep) ?? 0).toBeGreaterThanOrEqual(count);
  });

  test('rule of mutual exclusion where there is a centre', () => {
    const found = vibrations({ geometry: symbol, sites: kinds });
    expect(found.group).toBe(group);
    if (findGroup(group)!.centrosymmetric) {
      for (const { infrared, raman } of found.vibrations) expect(infrared && raman).toBe(false);
    }
  });
});

// K. Nakamoto, Infrared and Raman Spectra of Inorganic and Coordination Compounds, Part A; from memory.
test('infrared-active stretches: sets A2u and Eu for trans-ML4X2, six of one dimension for cis', () => {
  const infrared = (text: string): number => {
    const found = vibrations({ geometry: 'OC-6', sites: [...text] });
    const active = new Set(found.vibrations.filter((mode) => mode.infrared).map(({ irrep }) => irrep));
    return found.stretches.reduce((sum, { irrep, count }) => sum + (active.has(irrep) ? count : 0), 0);
  };
  expect(infrared('XXAAAA')).toBe(2);
  expect(infrared('XAXAAA')).toBe(6);
});

test('the ligands stay on x and y whichever vertices the odd pair takes', () => {
  const labels = (text: string): unknown => vibrations({ geometry: 'OC-6', sites: [...text] }).vibrations;
  expect(labels('AAXXAA')).toEqual(labels('XXAAAA'));
  expect(labels('AAAAXX')).toEqual(labels('XXAAAA'));
  expect(labels('AAAXAA')).toEqual(labels('XAAAAA'));
});

test('chelate rings lower the group', () => {
  const links: [number, number][] = [
    [0, 2],
    [1, 4],
    [3, 5],
  ];
  expect(vibrations({ geometry: 'OC-6', sites: [...'AAAAAA'], links }).group).toBe('D3');
});

test('refusals', () => {
  const refused = (request: Parameters<typeof vibrations>[0], field: string) =>
    expect(() => vibrations(request)).toThrowError(expect.objectContaining({ name: 'DomainError', field }));
  refused({ geometry: 'OC-5', sites: [] }, 'geometry');
  refused({ geometry: 'OC-6', sites: ['A'] }, 'sites');
  refused({ geometry: 'T-4', sites: [...'AAAA'], links: [[0, 4]] }, 'links');
});
