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

const post = (path: string, body: unknown, status?: number) =>
  json(call('POST', path, { as: token, json: body }), status);

// The answers of the wire contract; tables: F. A. Cotton, Chemical Applications of Group Theory (from memory).
test('products, descent and splitting', async () => {
  expect(await post('/api/derive/product', { group: 'Oh', irreps: ['T2g', 'Eg'] })).toEqual({
    terms: [
      { irrep: 'T1g', count: 1 },
      { irrep: 'T2g', count: 1 },
    ],
  });
  const { maps } = await post('/api/derive/descent', { from: 'Oh', to: 'D4h', irreps: ['T2g'] });
  expect(maps).toEqual([
    {
      irrep: 'T2g',
      terms: expect.arrayContaining([
        { irrep: 'Eg', count: 1 },
        { irrep: 'B2g', count: 1 },
      ]),
    },
  ]);
  const { terms } = (await post('/api/derive/splitting', { group: 'Oh', term: '3F' })) as { terms: string[] };
  expect([...terms].sort()).toEqual(['3A2g', '3T1g', '3T2g']);
});

test('the d¹ octahedron: Laporte forbidden, lent by t1u and t2u', async () => {
  const analysis = await post('/api/derive/selection', { group: 'Oh', from: '2T2g', to: '2Eg' });
  expect(analysis).toMatchObject({
    spinAllowed: true,
    laporteAllowed: false,
    dipole: { x: false, y: false, z: false },
    mechanism: 'vibronic',
  });
  expect((analysis.vibronic as { x: string[] }).x.sort()).toEqual(['T1u', 'T2u']);
});

test('what is no group or no irrep is refused with its place', async () => {
  await json(call('GET', '/api/symmetry/groups/Qh', { as: token }), 404);
  const refused = await post('/api/derive/product', { group: 'Oh', irreps: ['T3g'] }, 422);
  expect(refused.errors).toMatchObject([{ pointer: '#/irreps' }]);
});

test('vibrations of coordinates in place of a geometry', async () => {
  const octahedron = [
    [0, 0, 0],
    [2, 0.04, 0],
    [-2, 0, 0.03],
    [0, 2.03, 0],
    [0, -2, 0],
    [0.02, 0, 2],
    [0, -0.04, -1.97],
  ].map(([x, y, z], i) => ({ element: i === 0 ? 'Co' : 'N', x, y, z }));
  const found = await post('/api/derive/vibrations', { coordinates: octahedron });
  const ideal = await post('/api/derive/vibrations', { geometry: 'OC-6', sites: [...'AAAAAA'] });
  expect(found).toMatchObject({ group: 'Oh', vibrations: ideal.vibrations, total: ideal.total, tolerance: 0.1 });
  expect(await post('/api/derive/vibrations', { coordinates: octahedron, tolerance: 0.005 })).not.toMatchObject({
    group: 'Oh',
  });
  const both = await post('/api/derive/vibrations', { coordinates: octahedron, geometry: 'OC-6' }, 422);
  expect(both.errors).toMatchObject([{ pointer: '#/coordinates' }]);
  const neither = await post('/api/derive/vibrations', {}, 422);
  expect(neither.errors).toMatchObject([{ pointer: '#/geometry' }, { pointer: '#/sites' }]);
  const twice = [...octahedron, octahedron[0]];
  const refused = await post('/api/derive/vibrations', { coordinates: twice }, 422);
  expect(refused.errors).toMatchObject([{ pointer: '#/coordinates', detail: expect.stringContaining('1 and 8') }]);
});
