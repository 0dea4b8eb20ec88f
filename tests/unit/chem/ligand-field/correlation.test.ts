import { describe, expect, test } from 'vitest';
import {
  type Correlation,
  correlation,
  fitOverlap,
  flattening,
  type GeometryPath,
  levels,
  type OverlapFitRequest,
  orgelDiagram,
  overlapField,
  tetragonalPath,
  trigonalTwist,
} from '#src/chem/ligand-field/index.ts';

const [B, C] = [750, 3300];
const strength = { eSigma: 7000, ePi: 700 };
const ends = ({ curves }: Correlation, at: 'first' | 'last'): number[] =>
  curves.map(({ y }) => (at === 'first' ? y[0]! : y.at(-1)!)).sort((a, b) => a - b);

describe('correlation along a way', () => {
  const ways: [string, GeometryPath, string, string, string][] = [
    ['octahedron to square plane', tetragonalPath(strength), 'D4h', 'Oh', 'D4h'],
    ['octahedron to prism', trigonalTwist(strength), 'D3', 'Oh', 'D3h'],
    ['tetrahedron to square plane', flattening(strength), 'D2d', 'Td', 'D4h'],
  ];
  test.each(ways.flatMap((way) => [2, 3].map((n) => [...way, n] as const)))(
    '%s keeps a group and ends on the levels of both geometries',
    (_, path, kept, from, to, n) => {
      const all = correlation({ n, path, B, C, points: 9 });
      expect(all.group).toBe(kept);
      for (const [place, group, at] of [
        [0, from, 'first'],
        [1, to, 'last'],
      ] as const) {
        const geometry = levels({ n, field: { kind: 'overlap', ligands: path(place) }, B, C });
        expect(geometry.group).toBe(group);
        // Degenerate irreps of the higher group part in the lower one: every energy there is one here, and the other way.
        const told = geometry.levels.map(({ energy }) => energy);
        for (const energy of ends(all, at))
          expect(Math.min(...told.map((e) => Math.abs(e - energy)))).toBeLessThan(0.1);
        for (const energy of told)
          expect(Math.min(...ends(all, at).map((e) => Math.abs(e - energy)))).toBeLessThan(0.1);
      }
    },
  );

  test('curves of one label do not cross, and run without jumps', () => {
    const { curves, x } = correlation({ n: 3, path: tetragonalPath(strength), B, C, points: 41, view: 'absolute' });
    const labels = new Set(curves.map(({ label }) => label));
    for (const label of labels) {
      const own = curves.filter((curve) => curve.label === label);
      x.forEach((_, i) => {
        const energies = own.map(({ y }) => y[i]!);
        expect(energies).toEqual([...energies].sort((a, b) => a - b));
      });
    }
    // dE/dplace is at most what three electrons can gain from two whole ligands.
    const most = (3 * 2 * (strength.eSigma + 2 * strength.ePi)) / 40;
    for (const { y } of curves)
      for (let i = 1; i < y.length; i++) expect(Math.abs(y[i]! - y[i - 1]!)).toBeLessThan(most);
  });

  // Order of the square plane for σ and weak π donors: x²−y² far up (standard tables).
  test('one electron ends on the orbitals of the square plane', () => {
    const { curves } = correlation({ n: 1, path: tetragonalPath(strength), B, C, points: 3 });
    const last = Object.fromEntries(curves.map(({ label, y }) => [label, y[2]!]));
    const lowest = 2 * strength.ePi;
    expect(last['2B1g']).toBeCloseTo(3 * strength.eSigma - lowest, 6);
    expect(last['2A1g']).toBeCloseTo(strength.eSigma - lowest, 6);
    expect(last['2B2g']).toBeCloseTo(4 * strength.ePi - lowest, 6);
    expect(last['2Eg']).toBeCloseTo(0, 6);
  });

  test('the view from the centre of gravity keeps the barycentre at that of the free ion', () => {
    const { curves } = correlation({ n: 1, path: flattening(strength), B, C, points: 5, view: 'absolute' });
    for (let i = 0; i < 5; i++) {
      const sum = curves.reduce((total, { label, y }) => total + (label.includes('E') ? 2 : 1) * y[i]!, 0);
      expect(sum).toBeCloseTo(0, 6);
    }
  });

  test('two ligands on a line keep no group to follow levels by', () => {
    const path: GeometryPath = () => [0, 180].map((theta) => ({ theta, phi: 0, eSigma: 5000 }));
    expect(() => correlation({ n: 2, path, B, C })).toThrow(
      expect.objectContaining({ name: 'DomainError', field: 'path' }),
    );
    expect(() => correlation({ n: 2, path: flattening(strength), B, C, points: 1 })).toThrow(
      expect.objectContaining({ field: 'points' }),
    );
  });
});

describe('Orgel diagrams', () => {
  test('holds the levels of highest spin of both geometries', () => {
    const { x, curves } = orgelDiagram({ n: 7, B, max: 12_000, points: 3 });
    expect(x).toEqual([-12_000, 0, 12_000]);
    expect(curves.map(({ label, parent }) => `${label}(${parent})`).sort()).toEqual([
      '4A2(F)',
      '4T1(F)',
      '4T1(P)',
      '4T2(F)',
    ]);
    for (const [place, geometry] of [
      [0, 'T-4'],
      [2, 'OC-6'],
    ] as const) {
      const { levels: all } = levels({ n: 7, field: { kind: 'cubic', geometry, delta: 12_000 }, B, C: 20 * B });
      const wanted = all.filter(({ multiplicity }) => multiplicity === 4).map(({ energy }) => energy);
      const told = curves.map(({ y }) => y[place]!).sort((a, b) => a - b);
      told.forEach((energy, i) => {
        expect(energy - told[0]!).toBeCloseTo(wanted[i]! - wanted[0]!, 5);
      });
    }
    // Without field: F, and P 15B above it.
    expect(curves.map(({ y }) => Math.round(y[1]!)).sort((a, b) => a - b)).toEqual([0, 0, 0, 15 * B]);
  });

  test.each([
    [{ max: 0 }, 'max'],
    [{ points: 1 }, 'points'],
    [{ B: -1 }, 'B'],
    [{ n: 10 }, 'n'],
  ])('%o is refused', (part, field) => {
    expect(() => orgelDiagram({ n: 3, B, max: 1000, ...part })).toThrow(expect.objectContaining({ field }));
  });
});

describe('mixing of s and d', () => {
  // z² of a square plane falls by 4 eds, the others stay: Vanquickenborne and Ceulemans 1981 (from memory).
  test('lowers z2 of a square plane by 4 eDs and nothing in an octahedron', () => {
    const square = tetragonalPath(strength)(1).slice(0, 4);
    const shift = (ligands: readonly (typeof square)[0][]): number[] => {
      const [plain, mixed] = [0, 900].map((eDs) => overlapField(ligands.map((ligand) => ({ ...ligand, eDs }))).data);
      return [...mixed!].map((x, k) => Math.round((x - plain![k]!) * 1e6) / 1e6 || 0);
    };
    const only = new Array<number>(25).fill(0);
    expect(shift(square)).toEqual(only.map((_, k) => (k === 0 ? -3600 : 0)));
    expect(shift(tetragonalPath(strength)(0))).toEqual(only);
    expect(() => overlapField([{ ...square[0]!, eDs: -1 }])).toThrow(/0 or more/);
  });
});

describe('shared fits of overlap parameters', () => {
  const place = (theta: number, phi: number, type: string) => ({ theta, phi, type });
  const ring = (type: string) => [0, 90, 180, 270].map((phi) => place(90, phi, type));
  const truth = { NH3: { eSigma: 7180, ePi: 0 }, Cl: { eSigma: 5550, ePi: 870 }, B: 690 };
  const shapes = [
    { n: 3, ligands: [...ring('NH3'), place(0, 0, 'NH3'), place(180, 0, 'NH3')], terms: ['4T2g', '4T1g'] },
    { n: 3, ligands: [...ring('NH3'), place(0, 0, 'Cl'), place(180, 0, 'Cl')], terms: ['4Eg', '4B2g', '4Eg'] },
    { n: 3, ligands: [...ring('NH3'), place(0, 0, 'NH3'), place(180, 0, 'Cl')], terms: ['4E', '4B2'] },
  ];
  const request = (): OverlapFitRequest => ({
    complexes: shapes.map(({ n, ligands, terms }) => {
      const typed = ligands.map(({ type, ...angles }) => ({ ...angles, ...truth[type as 'NH3' | 'Cl'] }));
      const { levels: all } = levels({ n, field: { kind: 'overlap', ligands: typed }, B: truth.B, C: 4.5 * truth.B });
      const bands = terms.map((to, i) => {
        const rank = terms.slice(0, i).filter((other) => other === to).length;
        return { to, wavenumber: all.filter(({ label }) => label === to)[rank]!.energy };
      });
      return { n, ion: 'Cr3+', ligands, bands };
    }),
    ligands: {
      NH3: { eSigma: { value: 6500 }, ePi: { value: 0, fixed: true } },
      Cl: { eSigma: { value: 6000 }, ePi: { value: 500 } },
    },
    ions: { 'Cr3+': { B: { value: 800 }, ratioCB: 4.5 } },
  });

  test('finds the parameters that made the bands', () => {
    const { parameters, complexes, rms, converged, degreesOfFreedom } = fitOverlap(request());
    expect(complexes.map(({ group }) => group)).toEqual(['Oh', 'D4h', 'C4v']);
    const at = (name: string) => parameters.find((p) => p.name === name)!;
    expect(at('NH3 eSigma').value).toBeCloseTo(7180, 1);
    expect(at('Cl eSigma').value).toBeCloseTo(5550, 0);
    expect(at('Cl ePi').value).toBeCloseTo(870, 0);
    expect(at('Cr3+ B').value).toBeCloseTo(690, 1);
    expect(at('NH3 ePi')).toMatchObject({ value: 0, error: null, fixed: true });
    expect(rms).toBeLessThan(0.1);
    expect(converged).toBe(true);
    expect(degreesOfFreedom).toBe(3);
  });

  test('tells standard errors that grow with the scatter', () => {
    const noisy = request();
    const bands = noisy.complexes.map((complex, c) => ({
      ...complex,
      bands: complex.bands.map((band, i) => ({
        ...band,
        wavenumber: band.wavenumber + 60 * ((i + c) % 2 === 0 ? 1 : -1),
      })),
    }));
    const { parameters, rms } = fitOverlap({ ...noisy, complexes: bands });
    expect(rms).toBeGreaterThan(5);
    for (const { error, fixed } of parameters) expect(fixed ? error === null : error! > 0).toBe(true);
  });

  test.each<[string, (r: OverlapFitRequest) => OverlapFitRequest, string]>([
    ['a ligand without parameters', (r) => ({ ...r, ligands: { NH3: r.ligands.NH3! } }), 'complexes/1/ligands'],
    ['an ion without parameters', (r) => ({ ...r, ions: {} }), 'complexes/0/ion'],
    [
      'a term that the group lacks',
      (r) => ({ ...r, complexes: [{ ...r.complexes[0]!, bands: [{ wavenumber: 17_000, to: '4Eu' }] }] }),
      'complexes/0/bands/0/to',
    ],
    ['no band', (r) => ({ ...r, complexes: [{ ...r.complexes[0]!, bands: [] }] }), 'complexes'],
    [
      'a start that is no number',
      (r) => ({ ...r, ions: { 'Cr3+': { B: { value: Number.NaN }, ratioCB: 4 } } }),
      'ions',
    ],
  ])('%s is refused', (_, change, field) => {
    expect(() => fitOverlap(change(request()))).toThrow(expect.objectContaining({ name: 'DomainError', field }));
  });
});
