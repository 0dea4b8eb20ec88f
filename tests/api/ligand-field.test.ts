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
  await post('/api/derive/levels', { ...input, zeta: 250 }, 422);
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
