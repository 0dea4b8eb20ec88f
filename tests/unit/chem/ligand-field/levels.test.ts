import { describe, expect, test } from 'vitest';
import { fieldLevels, type Level } from '#src/chem/ligand-field/field-levels.ts';
import { levels } from '#src/chem/ligand-field/levels.ts';
import { zeros } from '#src/chem/ligand-field/matrix.ts';
import { type OverlapLigand, overlapField } from '#src/chem/ligand-field/overlap.ts';

const [B, C] = [830, 3700];
const DELTA = 14200;
const COUNTS = [1, 2, 3, 4, 5, 6, 7, 8, 9];
const choose = (n: number, k: number): number => (k === 0 ? 1 : (choose(n - 1, k - 1) * n) / k);
const cubic = (n: number, geometry: 'OC-6' | 'T-4' | 'CU-8', delta = DELTA) =>
  levels({ n, field: { kind: 'cubic', geometry, delta }, B, C });

const mean = (all: Level[]): number => {
  const weight = all.reduce((sum, { degeneracy }) => sum + degeneracy, 0);
  return all.reduce((sum, { energy, degeneracy }) => sum + energy * degeneracy, 0) / weight;
};

/** Multiplicity, degeneracy and energy, as text that tells 0.01 cm⁻¹ apart. */
const outline = (all: Level[]): string[] =>
  all.map((l) => `${l.multiplicity} ${l.degeneracy} ${l.energy.toFixed(2)}`.replace('-0.00', '0.00')).sort();

describe('cubic fields', () => {
  test.each(COUNTS)('d%i has all states of the shell, ascending from 0', (n) => {
    const { group, levels: all } = cubic(n, 'OC-6');
    expect(group).toBe('Oh');
    expect(all.reduce((sum, { degeneracy }) => sum + degeneracy, 0)).toBe(choose(10, n));
    expect(all[0]!.energy).toBe(0);
    expect(all.map(({ energy }) => energy)).toEqual(all.map(({ energy }) => energy).sort((a, b) => a - b));
  });

  // A hole of d sees the field with the other sign and repels as an electron does.
  test.each(COUNTS)('d%i in an octahedron is the hole problem of d(10 − n) in a tetrahedron', (n) => {
    const octahedron = cubic(n, 'OC-6').levels;
    const tetrahedron = cubic(10 - n, 'T-4').levels;
    const label = (l: Level): string =>
      `${l.label?.replace('g', '')} ${l.energy.toFixed(3).replace('-0.000', '0.000')}`;
    expect(octahedron.map(label).sort()).toEqual(tetrahedron.map(label).sort());
  });

  test('a cube turns the order of the tetrahedron into Oh', () => {
    const { group, levels: all } = cubic(7, 'CU-8', 4100);
    const tetrahedron = cubic(7, 'T-4', 4100);
    expect([group, tetrahedron.group]).toEqual(['Oh', 'Td']);
    expect(all.map((l) => l.label)).toEqual(tetrahedron.levels.map((l) => `${l.label}g`));
  });

  test.each(COUNTS)('the field does not move the centre of gravity of d%i', (n) => {
    const { levels: strong } = cubic(n, 'OC-6');
    const { levels: none } = cubic(n, 'OC-6', 0);
    // Energies count from the lowest level; the highest spin alone has a centre of gravity that B and C fix.
    const top = Math.max(...strong.map(({ multiplicity }) => multiplicity ?? 0));
    const spread = (all: Level[]): number =>
      mean(all.filter(({ multiplicity }) => multiplicity === top)) -
      mean(all.filter(({ multiplicity }) => multiplicity !== top));
    if (strong.some(({ multiplicity }) => multiplicity !== top)) expect(spread(strong)).toBeCloseTo(spread(none), 5);
    else expect(mean(strong)).toBeCloseTo(n === 1 ? 0.4 * DELTA : 0.6 * DELTA, 5);
  });

  // Term energies of d²: Griffith 1961 (from memory); terms of F, P, G, D, S in Oh by group theory.
  test('without field the levels of d2 come together in the terms of the free ion', () => {
    const { levels: all } = cubic(2, 'OC-6', 0);
    const term = (parent: string, multiplicity: number) =>
      all.filter((l) => l.parent === parent && l.multiplicity === multiplicity);
    const expected: [string, number, number, string[]][] = [
      ['F', 3, 0, ['3A2g', '3T1g', '3T2g']],
      ['P', 3, 15 * B, ['3T1g']],
      ['G', 1, 12 * B + 2 * C, ['1A1g', '1Eg', '1T1g', '1T2g']],
      ['D', 1, 5 * B + 2 * C, ['1Eg', '1T2g']],
      ['S', 1, 22 * B + 7 * C, ['1A1g']],
    ];
    for (const [parent, multiplicity, energy, labels] of expected) {
      const found = term(parent, multiplicity);
      expect(found.map((l) => l.label).sort()).toEqual(labels);
      for (const level of found) expect(level.energy).toBeCloseTo(energy, 5);
    }
  });

  test('2H and 2P of d3 coincide, so that the parents of 2T1g tell neither', () => {
    const unknown = cubic(3, 'OC-6').levels.filter((l) => l.parent === null);
    expect(unknown.map((l) => l.label)).toEqual(['2T1g', '2T1g', '2T1g']);
  });

  test.each([
    [{ n: 0 }, 'n'],
    [{ n: 10 }, 'n'],
    [{ n: 2.5 }, 'n'],
    [{ B: -1 }, 'B'],
    [{ C: Number.NaN }, 'C'],
    [{ field: { kind: 'cubic', geometry: 'OC-6', delta: -5 } as const }, 'delta'],
    [{ field: { kind: 'cubic', geometry: 'SP-4' as 'OC-6', delta: 5 } as const }, 'geometry'],
    [{ field: { kind: 'overlap', ligands: [] } as const }, 'ligands'],
  ])('%o is refused', (part, field) => {
    const request = { n: 3, field: { kind: 'cubic', geometry: 'OC-6', delta: 17400 } as const, B, C, ...part };
    expect(() => levels(request)).toThrow(expect.objectContaining({ name: 'DomainError', field }));
  });
});

describe('overlap fields', () => {
  const [eSigma, ePi] = [6900, 850];
  const octahedron: OverlapLigand[] = [
    [0, 0],
    [180, 0],
    [90, 0],
    [90, 90],
    [90, 180],
    [90, 270],
  ].map(([theta, phi]) => ({ theta: theta!, phi: phi!, eSigma, ePi }));

  // Δo = 3 eσ − 4 eπ: Larsen and La Mar, J. Chem. Educ. 51 (1974) 633 (from memory).
  test.each(COUNTS)('six equal ligands are the cubic field for d%i, labels and all', (n) => {
    const key = (l: Level): string => `${l.label} ${l.degeneracy} ${l.energy.toFixed(2).replace('-0.00', '0.00')}`;
    const { group, levels: all } = levels({ n, field: { kind: 'overlap', ligands: octahedron }, B, C });
    expect(group).toBe('Oh');
    expect(all.map(key).sort()).toEqual(
      cubic(n, 'OC-6', 3 * eSigma - 4 * ePi)
        .levels.map(key)
        .sort(),
    );
  });

  // Angles as a person types them: 54.7356° is arccos(1/√3) to four decimals.
  test('four ligands on corners of a cube are the tetrahedron, in Td', () => {
    const corners: [number, number][] = [
      [54.7356, 45],
      [54.7356, 225],
      [125.2644, 135],
      [125.2644, 315],
    ];
    const ligands = corners.map(([theta, phi]) => ({ theta, phi, eSigma, ePi }));
    const { group, levels: all } = levels({ n: 7, field: { kind: 'overlap', ligands }, B, C });
    const tetrahedron = cubic(7, 'T-4', (4 / 9) * (3 * eSigma - 4 * ePi)).levels;
    expect(group).toBe('Td');
    const key = (l: Level): string => `${l.label} ${l.energy.toFixed(0).replace('-0', '0')}`;
    expect(all.map(key).sort()).toEqual(tetrahedron.map(key).sort());
  });

  // Order and labels of one electron in a square plane: x²−y² b1g, z² a1g, xy b2g, xz and yz eg (standard tables).
  test.each([0, 45, 30])('labels the orbitals of a square plane in D4h, turned by %i°', (turn) => {
    const ligands = octahedron.slice(2).map((l) => ({ ...l, phi: l.phi + turn }));
    const { group, axes, levels: all } = levels({ n: 1, field: { kind: 'overlap', ligands }, B, C });
    expect(group).toBe('D4h');
    expect(axes?.[2]).toEqual([0, 0, 1]);
    expect(all.map((l) => l.label)).toEqual(['2Eg', '2B2g', '2A1g', '2B1g']);
  });

  // 4T2g of Oh is 4B2g + 4Eg in D4h, 4A2g is 4B1g: correlation tables (from memory), ligands on x and y.
  test('two weaker ligands on z split the quartets of d3 as the descent to D4h tells', () => {
    const ligands = octahedron.map((l) => (l.theta === 90 ? l : { ...l, eSigma: 5000, ePi: 300 }));
    const { group, levels: all } = levels({ n: 3, field: { kind: 'overlap', ligands }, B, C });
    expect(group).toBe('D4h');
    const quartets = all.filter((l) => l.multiplicity === 4).slice(0, 3);
    expect(quartets[0]!.label).toBe('4B1g');
    expect(
      quartets
        .slice(1)
        .map((l) => l.label)
        .sort(),
    ).toEqual(['4B2g', '4Eg']);
  });

  // d(xz) lies in the plane xz, which holds the ligands: b1 of C2v, and xy a2 (character table).
  test('a bent pair has the plane of its ligands as xz of C2v', () => {
    const ligands = [0, 180].map((phi) => ({ theta: 50, phi: phi + 90, eSigma, ePi: 0 }));
    const { group, axes, levels: all } = levels({ n: 1, field: { kind: 'overlap', ligands }, B, C });
    expect(group).toBe('C2v');
    expect(Math.abs(axes![0][1])).toBeCloseTo(1, 9);
    expect(all.map((l) => l.label)).toContain('2B1');
    expect(all.at(-1)!.label).toBe('2B1');
  });

  test('π that differs in two directions lowers the group', () => {
    const flat = octahedron.map((l) => (l.theta === 90 ? l : { theta: l.theta, phi: 0, eSigma, ePiX: 900, ePiY: 100 }));
    expect(levels({ n: 1, field: { kind: 'overlap', ligands: flat }, B, C }).group).toBe('D2h');
  });

  test('ligands on one line have levels without labels', () => {
    const { group, levels: all } = levels({ n: 2, field: { kind: 'overlap', ligands: octahedron.slice(0, 2) }, B, C });
    expect(group).toBeNull();
    expect(all.every((l) => l.label === null && l.irrep === null)).toBe(true);
    expect(all.reduce((sum, { degeneracy }) => sum + degeneracy, 0)).toBe(45);
  });

  const twisted: OverlapLigand[] = [
    { theta: 12, phi: 40, eSigma: 7100, ePiX: 900, ePiY: -350, psi: 25 },
    { theta: 95, phi: 170, eSigma: 5200, ePi: 400 },
    { theta: 70, phi: 290, eSigma: 6100, ePiX: 0, ePiY: 1100, psi: 80 },
  ];

  test('the trace is the sum of all parameters', () => {
    const { data } = overlapField(twisted);
    const trace = data[0]! + data[6]! + data[12]! + data[18]! + data[24]!;
    expect(trace).toBeCloseTo(7100 + 900 - 350 + 5200 + 2 * 400 + 6100 + 1100, 6);
    for (let i = 0; i < 5; i++) for (let j = 0; j < i; j++) expect(data[i * 5 + j]).toBeCloseTo(data[j * 5 + i]!, 8);
  });

  test.each(COUNTS)('no field leaves the terms of d%i, a low field their states', (n) => {
    const states = (all: Level[]): number => all.reduce((sum, { degeneracy }) => sum + degeneracy, 0);
    expect(states(levels({ n, field: { kind: 'overlap', ligands: twisted }, B, C }).levels)).toBe(choose(10, n));
    const free = fieldLevels(n, zeros(5), { B, C });
    expect(states(free)).toBe(choose(10, n));
    expect(free).toHaveLength({ 1: 1, 2: 5, 3: 7, 4: 16, 5: 16, 6: 16, 7: 7, 8: 5, 9: 1 }[n]!);
  });

  test('turning all ligands about z changes nothing', () => {
    const turned = twisted.map((l) => ({ ...l, phi: l.phi + 37 }));
    const of = (ligands: OverlapLigand[]) =>
      outline(levels({ n: 3, field: { kind: 'overlap', ligands }, B, C }).levels);
    expect(of(turned)).toEqual(of(twisted));
  });

  test('π along local x lies in the plane of the bond and z: a ligand on x with ePiX raises xz, with ePiY xy', () => {
    const onX = (part: Partial<OverlapLigand>) => overlapField([{ theta: 90, phi: 0, eSigma: 0, ...part }]).data;
    expect(onX({ ePiX: 500 })[18]).toBeCloseTo(500, 9);
    expect(onX({ ePiY: 500 })[12]).toBeCloseTo(500, 9);
    expect(onX({ ePiX: 500, psi: 90 })[12]).toBeCloseTo(500, 9);
  });

  test('a missing number is refused with its ligand', () => {
    expect(() => overlapField([octahedron[0]!, { theta: 90, phi: Number.NaN, eSigma }])).toThrow(/Ligand 2/);
  });
});
