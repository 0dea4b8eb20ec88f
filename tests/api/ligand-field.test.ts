import { afterAll, beforeAll, expect, test } from 'vitest';
import { call, json, openRegistry } from './harness.ts';
import { person } from './people.ts';

let close: () => Promise<void>;
let token: string;

beforeAll(async () => {
  ({ close } = await openRegistry());
  token = (await person('reader', { steward: true })).token;
});
afterAll(() => close());

const post = <T>(path: string, body: unknown, status?: number) =>
  json<T>(call('POST', path, { as: token, json: body }), status);
interface Level {
  energy: number;
  degeneracy: number;
  label: string;
}

// tests/checks/ligandfield.json, closed form of d³: Δ and the two 4T1g of Δ = 17 400, B = 725 cm⁻¹
test('d³ octahedral: quartets at the closed form', async () => {
  const input = { n: 3, field: { kind: 'cubic', geometry: 'OC-6', delta: 17_400 }, B: 725, C: 2900, zeta: 0 };
  const { group, levels } = await post<{ group: string; levels: Level[] }>('/api/derive/levels', input);
  expect(group).toBe('Oh');
  expect(levels[0]).toMatchObject({ energy: 0, degeneracy: 4, label: '4A2g' });
  const quartets = levels.filter(({ label }) => label.startsWith('4T')).map(({ energy }) => energy);
  expect(quartets).toEqual([expect.closeTo(17_400, 0), expect.closeTo(24_574.1, 0), expect.closeTo(38_500.9, 0)]);
});

// Crossing of d⁶ at C/B 4.8: near Δ/B = 20 on the printed diagrams (common practice)
test('d⁶ octahedral: the ground term changes where the spins pair', async () => {
  const diagram = await post<{ x: number[]; crossings: { x: number; from: string; to: string }[] }>(
    '/api/derive/diagram',
    { n: 6, geometry: 'OC-6', ratioCB: 4.8, max: 40, points: 21 },
  );
  expect(diagram.x).toHaveLength(21);
  expect(diagram.crossings).toEqual([expect.objectContaining({ from: '5T2g', to: '1A1g' })]);
  expect(diagram.crossings[0]!.x).toBeGreaterThan(18);
  expect(diagram.crossings[0]!.x).toBeLessThan(22);
});

// ζ splits 4A2g of an ideal octahedron not at all: one Γ8 of four states (group theory)
test('d³ octahedral with spin–orbit coupling: labels of the double group', async () => {
  const { group, levels } = await post<{ group: string; levels: (Level & { multiplicity: null; symmetry: string })[] }>(
    '/api/derive/levels',
    { n: 3, field: { kind: 'cubic', geometry: 'OC-6', delta: 17_400 }, B: 725, C: 2900, zeta: 230 },
  );
  expect(group).toBe('Oh');
  expect(levels[0]).toMatchObject({ energy: 0, degeneracy: 4, multiplicity: null, label: 'Γ8+', symmetry: 'G3/2g' });
  expect(levels.reduce((sum, { degeneracy }) => sum + degeneracy, 0)).toBe(120);
});

test('an overlap field takes ζ and the mixing of s and d', async () => {
  const ligands = [0, 90, 180, 270].map((phi) => ({ theta: 90, phi, eSigma: 6000, ePi: 500, eDs: 800 }));
  const { group, levels } = await post<{ group: string; levels: Level[] }>('/api/derive/levels', {
    n: 9,
    field: { kind: 'overlap', ligands },
    B: 900,
    C: 4000,
    zeta: 800,
  });
  expect(group).toBe('D4h');
  expect(levels.map(({ degeneracy }) => degeneracy)).toEqual([2, 2, 2, 2, 2]);
});

interface Fit {
  candidates: {
    delta: number;
    B: number;
    C: number;
    errors: { delta: number | null };
    beta: number | null;
    freeIon: { B: number; source: string } | null;
    assignments: { to: string; residual: number }[];
    rms: number;
    ratioCB: number;
  }[];
}

// tests/checks/ligandfield.json, lw-001: Δ 21 550, B 657, β 0.716
test('bands give Δ, B and β with the table named, terms told or not', async () => {
  const bands = [
    { wavenumber: 21_550, to: '4T2g', uncertainty: 100 },
    { wavenumber: 28_500, to: '4T1g(F)', uncertainty: 100 },
  ];
  const input = { n: 3, geometry: 'OC-6', metal: 'Cr', oxidationState: 3, bands };
  for (const asked of [bands, bands.map(({ to: _, ...band }) => band)]) {
    const { candidates } = await post<Fit>('/api/derive/fit', { ...input, bands: asked });
    const [best] = candidates;
    expect(best!.delta).toBeCloseTo(21_550, 3);
    expect(best!.B).toBeCloseTo(657, 0);
    expect(best!.beta).toBeCloseTo(0.716, 3);
    expect(best!.freeIon).toMatchObject({ B: 918, source: expect.stringContaining('Jolly') });
    expect(best!.errors.delta).toBeCloseTo(100, 3);
    expect(best!.ratioCB).toBe(4.5);
    expect(best!.assignments.map(({ to }) => to)).toEqual(['4T2g', '4T1g(F)']);
  }
});

test('what cannot be fitted is refused where it stands', async () => {
  const input = { n: 3, geometry: 'OC-6', bands: [{ wavenumber: 17_400 }, { wavenumber: 24_500, to: '3T1g' }] };
  const problem = await post<{ errors: { pointer: string; detail: string }[] }>('/api/derive/fit', input, 422);
  expect(problem.errors[0]).toMatchObject({ pointer: '#/bands/1/to', detail: expect.stringContaining('4T2g') });
  const low = await post<typeof problem>('/api/derive/fit', { ...input, spin: 'low' }, 422);
  expect(low.errors[0]!.pointer).toBe('#/spin');
  const none = await post<typeof problem>('/api/derive/fit', { ...input, bands: [] }, 422);
  expect(none.errors[0]!.pointer).toBe('#/bands');
});

test('a diagram can count from the free ion', async () => {
  const input = { n: 3, geometry: 'OC-6', ratioCB: 4.5, max: 30, points: 4 };
  const { curves } = await post<{ curves: { label: string; y: number[] }[] }>('/api/derive/diagram', {
    ...input,
    view: 'absolute',
  });
  // 4A2g falls by 6/5 Δ (three electrons in t2g, closed form)
  expect(curves.find(({ label }) => label === '4A2g')!.y).toEqual([0, -12, -24, -36].map((y) => expect.closeTo(y, 9)));
});
