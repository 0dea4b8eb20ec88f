import { describe, expect, test } from 'vitest';
import { type Diagram, diagram } from '#src/chem/ligand-field/diagram.ts';
import { levels } from '#src/chem/ligand-field/levels.ts';

const labelsAt = (all: Diagram, point: number): string[] =>
  all.curves
    .map(({ label, y }) => ({ label, y: y[point]! }))
    .sort((a, b) => a.y - b.y || a.label.localeCompare(b.label))
    .map(({ label }) => label);

describe('diagram', () => {
  test('takes 101 points up to 40 unless told', () => {
    const { x, curves } = diagram({ n: 2, geometry: 'OC-6', ratioCB: 4.42 });
    expect([x.length, x[0], x[100]]).toEqual([101, 0, 40]);
    for (const { y } of curves) expect(y).toHaveLength(101);
  });

  // The 45 states of d² make 11 levels of Oh: 3A2g, 3T1g twice, 3T2g, 1A1g twice, 1Eg twice, 1T1g, 1T2g twice.
  test('draws every level of d2 once, with the term it rises from', () => {
    const { group, curves } = diagram({ n: 2, geometry: 'OC-6', ratioCB: 4.42 });
    expect(group).toBe('Oh');
    expect(curves.map(({ label, parent }) => `${label}(${parent})`).sort()).toEqual([
      '1A1g(G)',
      '1A1g(S)',
      '1Eg(D)',
      '1Eg(G)',
      '1T1g(G)',
      '1T2g(D)',
      '1T2g(G)',
      '3A2g(F)',
      '3T1g(F)',
      '3T1g(P)',
      '3T2g(F)',
    ]);
  });

  test.each([3, 5, 6])('agrees with the levels of d%i at one field', (n) => {
    const [B, ratioCB] = [700, 4.3];
    const chart = diagram({ n, geometry: 'T-4', ratioCB, max: 30, points: 4 });
    const { group, levels: all } = levels({
      n,
      field: { kind: 'cubic', geometry: 'T-4', delta: 20 * B },
      B,
      C: ratioCB * B,
    });
    expect(chart.group).toBe(group);
    const drawn = chart.curves.map(({ label, y }) => `${label} ${(y[2]! * B).toFixed(3)}`.replace('-0.000', '0.000'));
    const told = all.map(({ label, energy }) => `${label} ${energy.toFixed(3)}`.replace('-0.000', '0.000'));
    expect(drawn.sort()).toEqual(told.sort());
  });

  test('the ground level lies at 0 and covers 0 to max without a gap', () => {
    const chart = diagram({ n: 6, geometry: 'OC-6', ratioCB: 4.8, max: 33, points: 50 });
    for (const i of chart.x.keys()) expect(Math.min(...chart.curves.map(({ y }) => y[i]!))).toBe(0);
    expect(chart.ground.map(({ label }) => label)).toEqual(['5T2g', '1A1g']);
    expect(chart.ground[0]!.from).toBe(0);
    expect(chart.ground[0]!.to).toBe(chart.ground[1]!.from);
    expect(chart.ground[1]!.to).toBe(33);
    expect(chart.crossings).toEqual([{ x: chart.ground[0]!.to, from: '5T2g', to: '1A1g' }]);
  });

  test('a crossing beyond max is not told; the points asked for do not move one', () => {
    expect(diagram({ n: 6, geometry: 'OC-6', ratioCB: 4.8, max: 15 }).crossings).toEqual([]);
    const [coarse, fine] = [2, 333].map((points) => diagram({ n: 5, geometry: 'OC-6', ratioCB: 4.477, points }));
    expect(coarse!.crossings).toEqual(fine!.crossings);
  });

  test('both levels of a crossing have one energy there', () => {
    const [{ x, from, to }] = diagram({ n: 4, geometry: 'OC-6', ratioCB: 4.61 }).crossings as [Diagram['crossings'][0]];
    const { levels: all } = levels({ n: 4, field: { kind: 'cubic', geometry: 'OC-6', delta: x }, B: 1, C: 4.61 });
    expect(new Set([all[0]!.label, all[1]!.label])).toEqual(new Set([from, to]));
    expect(all[1]!.energy).toBeLessThan(1e-4);
  });

  // High-spin ground terms of octahedron, tetrahedron and cube: common practice, in every textbook of the field.
  test.each([
    ['OC-6', ['2T2g', '3T1g', '4A2g', '5Eg', '6A1g', '5T2g', '4T1g', '3A2g', '2Eg']],
    ['T-4', ['2E', '3A2', '4T1', '5T2', '6A1', '5E', '4A2', '3T1', '2T2']],
    ['CU-8', ['2Eg', '3A2g', '4T1g', '5T2g', '6A1g', '5Eg', '4A2g', '3T1g', '2T2g']],
  ] as const)('weak-field grounds of %s', (geometry, labels) => {
    const found = labels.map((_, i) => diagram({ n: i + 1, geometry, ratioCB: 4.5, points: 2 }).ground[0]!.label);
    expect(found).toEqual(labels);
  });

  test('a repeated label stands in rising order at every point', () => {
    const { x, curves } = diagram({ n: 5, geometry: 'OC-6', ratioCB: 4.5, points: 21 });
    const doublets = curves.filter(({ label }) => label === '2T2g');
    expect(doublets).toHaveLength(10);
    x.forEach((_, i) => {
      const y = doublets.map((curve) => curve.y[i]!);
      expect(y).toEqual([...y].sort((a, b) => a - b));
    });
  });

  test('order at strong field is that of the configurations for d6', () => {
    const chart = diagram({ n: 6, geometry: 'OC-6', ratioCB: 4.5, max: 400, points: 2 });
    expect(labelsAt(chart, 1).slice(0, 5)).toEqual(['1A1g', '3T1g', '3T2g', '1T1g', '1T2g']);
  });

  test.each([
    [{ n: 11 }, 'n'],
    [{ ratioCB: -1 }, 'ratioCB'],
    [{ max: 0 }, 'max'],
    [{ max: Number.POSITIVE_INFINITY }, 'max'],
    [{ points: 1 }, 'points'],
    [{ points: 1e6 }, 'points'],
    [{ geometry: 'TPR-6' as 'OC-6' }, 'geometry'],
  ])('%o is refused', (part, field) => {
    const request = { n: 3, geometry: 'OC-6' as const, ratioCB: 4.5, ...part };
    expect(() => diagram(request)).toThrow(expect.objectContaining({ name: 'DomainError', field }));
  });
});
