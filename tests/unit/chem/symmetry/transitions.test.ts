import { describe, expect, test } from 'vitest';
import { geometries } from '#src/chem/geometry/index.ts';
import { descend, findGroup, type TransitionsRequest, transitionTable } from '#src/chem/symmetry/index.ts';

const given: TransitionsRequest = {
  dCount: 3,
  geometry: 'OC-6',
  spin: null,
  sites: [...'NNNNNN'],
  chelates: [],
  effectiveGroup: null,
};
const table = (more: Partial<TransitionsRequest>) => transitionTable({ ...given, ...more });
const view = (more: Partial<TransitionsRequest>, kind: string) => {
  const found = table(more).views.find((each) => each.kind === kind);
  if (!found) throw new Error(`no view ${kind}`);
  return found;
};
const row = (of: ReturnType<typeof view>, label: string) => of.rows.find((each) => each.label === label)!;
const open = (dipole: Record<string, boolean>): string => ['x', 'y', 'z'].filter((d) => dipole[d]).join('');

// F. A. Cotton, Chemical Applications of Group Theory, 3rd ed., 1990, chapter 9: the examples below; from memory.
describe('worked examples', () => {
  test('d¹ octahedron: 2T2g to 2Eg, promoted by t1u and t2u', () => {
    const framework = view({ dCount: 1 }, 'framework');
    expect(framework.rows.map(({ label }) => label)).toEqual(['2Eg']);
    const [only] = framework.rows[0]!.transitions;
    expect(only).toMatchObject({ from: '2T2g', to: '2Eg', laporteAllowed: false, mechanism: 'vibronic' });
    expect(only!.vibronic.z).toEqual(['T1u', 'T2u']);
  });

  test('trans-tetragonal cobalt(III): 1A1g to 1A2g closed along z, open across it with Eu', () => {
    const donors = view({ dCount: 6, spin: 'low', sites: [...'XXNNNN'] }, 'donorSet');
    expect(donors.group).toBe('D4h');
    const [a2g, eg] = row(donors, '1T1g').transitions;
    expect([a2g!.to, eg!.to]).toEqual(['1A2g', '1Eg']);
    expect(a2g!.vibronic).toEqual({ x: ['Eu'], y: ['Eu'], z: [] });
    expect(eg!.vibronic).toEqual({ x: ['A2u', 'B2u'], y: ['A2u', 'B2u'], z: ['Eu'] });
  });

  test('trans-bis(chelates): the rings lower D4h to D2h through C2″, and z stays the axis of the odd pair', () => {
    const request = {
      dCount: 6,
      spin: 'low',
      sites: [...'XXNNNN'],
      chelates: [
        [2, 4],
        [3, 5],
      ],
    } as const;
    const framework = view(request, 'framework');
    expect(framework.group).toBe('D2h');
    expect(framework.axes).toContain('2 on z');
    for (const irrep of ['T1g', 'T2g', 'Eg', 'A2g']) {
      const inD4h = descend('Oh', 'D4h', [irrep]).maps[0]!.terms.flatMap(({ irrep: label }) =>
        descend('D4h', 'D2h', [label], "C2''").maps[0]!.terms.map((term) => `1${term.irrep}`),
      );
      const found = row(framework, `1${irrep}`).transitions.map(({ to }) => to);
      expect([...new Set(found)].sort()).toEqual([...new Set(inD4h)].sort());
    }
    for (const { transitions } of framework.rows) {
      for (const { dipole } of transitions) expect(open(dipole)).toBe('');
    }
  });

  test('tetrahedral d⁷: 4A2 to 4T1 twice and open, 4A2 to 4T2 closed', () => {
    const framework = view({ dCount: 7, geometry: 'T-4', sites: [...'NNNN'] }, 'framework');
    expect(row(framework, '4T1')).toMatchObject({ count: 2, freeIon: ['4F', '4P'], spinAllowed: true });
    expect(open(row(framework, '4T1').transitions[0]!.dipole)).toBe('xyz');
    expect(open(row(framework, '4T2').transitions[0]!.dipole)).toBe('');
    expect(row(framework, '4T2').transitions[0]!.laporteAllowed).toBeNull();
  });

  test('tris-chelates in D3: of 4T2g the A1 part along z and the E part across, of 4T1g only E', () => {
    const chelates = [
      [0, 2],
      [1, 4],
      [3, 5],
    ] as const;
    const framework = view({ chelates }, 'framework');
    expect(framework.group).toBe('D3');
    expect(framework.ground).toEqual(['4A2']);
    const opens = (label: string) => row(framework, label).transitions.map(({ to, dipole }) => `${to} ${open(dipole)}`);
    expect(opens('4T2g')).toEqual(['4A1 z', '4E xy']);
    expect(opens('4T1g')).toEqual(['4A2 ', '4E xy']);
  });

  test('d⁰ oxo-ions and d¹⁰: none, said in words', () => {
    for (const dCount of [0, 10]) {
      const { views, ground, notes } = table({ dCount, geometry: 'T-4', sites: [...'OOOO'] });
      expect([views, ground]).toEqual([[], null]);
      expect(notes.join()).toMatch(/charge transfer/);
    }
  });
});

describe('what a record leaves open is told', () => {
  test.each<[string, Partial<TransitionsRequest>, RegExp]>([
    ['spin', { dCount: 6 }, /low or high/],
    ['crossover', { dCount: 6, spin: 'crossover' }, /spin=low/],
    ['geometry', { geometry: null }, /geometry is not known/],
    ['d electrons', { dCount: null }, /number of d electrons/],
    ['a share of an electron', { dCount: 5.5 }, /number of d electrons/],
    ['order of the levels', { dCount: 7, geometry: 'TBPY-5', sites: [...'NNNNN'], spin: 'high' }, /does not follow/],
  ])('%s', (_, more, words) => {
    const { ground, notes } = table(more);
    expect(ground).toBeNull();
    expect(notes.join(' ')).toMatch(words);
  });

  test('isomer: the ideal polyhedron stands in', () => {
    const { views, notes } = table({ sites: null });
    expect(views.map(({ kind, group }) => [kind, group])).toEqual([['polyhedron', 'Oh']]);
    expect(notes.join(' ')).toMatch(/isomer is not stated/);
  });

  test('an effective group that is none of the subgroups', () => {
    expect(table({ effectiveGroup: 'D5h' }).notes.join(' ')).toMatch(/effective group cannot be judged/);
    expect(view({ effectiveGroup: 'D3d' }, 'effective').ground).toEqual(['4A2g']);
  });
});

const cases = geometries.flatMap(({ symbol, vertices }) =>
  [1, 2, 3, 4, 5, 6, 7, 8, 9].map((dCount) => ({ symbol, dCount, n: vertices.length })),
);

test.each(cases)('$symbol d$dCount: every view keeps the states of each term', ({ symbol, dCount, n }) => {
  for (const spin of ['low', 'high'] as const) {
    const sites = Array.from({ length: n }, (_, i) => (i === 0 ? 'Cl' : 'N'));
    const { views, parent, notes } = table({ geometry: symbol, dCount, spin, sites });
    if (views.length === 0) expect(notes).toHaveLength(1);
    const size = (group: string, label: string) =>
      findGroup(group)!.irreps.find((irrep) => irrep.label === label.slice(1))?.dimension ?? 2;
    for (const { group, rows, ground } of views) {
      for (const { label, transitions } of rows) {
        const parts = transitions.filter(({ from }) => from === ground[0]);
        const states = parts.reduce((sum, { to }) => sum + size(group, to), 0);
        expect(states).toBeGreaterThan(0);
        expect(states).toBeLessThanOrEqual(size(parent!, label) * ground.filter((g) => g === ground[0]).length);
      }
    }
  }
});
