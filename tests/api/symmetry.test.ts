import { afterAll, beforeAll, expect, test } from 'vitest';
import { call, json, openRegistry } from './harness.ts';
import { lab, person } from './people.ts';

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

test('double groups in tables and products; parts of squares; d orbitals', async () => {
  const table = await json(call('GET', '/api/symmetry/groups/Td', { as: token }));
  const double = table.double as { order: number; irreps: { bethe: string }[] };
  expect(double.order).toBe(48);
  expect(double.irreps.map(({ bethe }) => bethe)).toEqual(['Γ1', 'Γ2', 'Γ3', 'Γ4', 'Γ5', 'Γ6', 'Γ7', 'Γ8']);
  const linear = await json(call('GET', '/api/symmetry/groups/Cinfv', { as: token }));
  expect(linear.double).toBeNull();
  expect(await post('/api/derive/product', { group: 'O', irreps: ['Γ6', 'Γ6'] })).toEqual({
    terms: [
      { irrep: 'Γ1', count: 1 },
      { irrep: 'Γ4', count: 1 },
    ],
  });
  expect(await post('/api/derive/product', { group: 'Oh', irreps: ['T2g', 'T2g'], part: 'antisymmetric' })).toEqual({
    terms: [{ irrep: 'T1g', count: 1 }],
  });
  await post('/api/derive/product', { group: 'Oh', irreps: ['T2g', 'Eg'], part: 'symmetric' }, 422);
  const { orbitals } = await post('/api/derive/splitting', { group: 'D4h', term: '2D' });
  expect(orbitals).toContainEqual({ orbital: 'x2-y2', irrep: 'b1g' });
});

test('all transitions of a registered complex', async () => {
  const north = await lab('North Quay');
  const as = (await person('chemist', { labs: { [north]: 'contributor' } })).token;
  const register = async (body: Record<string, unknown>) =>
    (await json<{ accession: string }>(call('POST', '/api/complexes', { as, json: { lab: north, ...body } }), 201))
      .accession;
  const chromium = await register({ formula: '[Cr(ox)3]3-', geometry: 'OC-6' });
  const { accession, centres } = await json(call('GET', `/api/complexes/${chromium}/transitions`, { as }));
  expect(accession).toBe(chromium);
  expect(centres).toMatchObject([
    {
      element: 'Cr',
      dCount: 3,
      ground: { label: '4A2g', group: 'Oh' },
      views: [
        { kind: 'framework', group: 'D3', ground: ['4A2'] },
        { kind: 'donorSet', group: 'Oh', ground: ['4A2g'] },
      ],
    },
  ]);
  const iron = await register({ formula: '[Fe(en)3]2+', geometry: 'OC-6' });
  const path = `/api/complexes/${iron}/transitions`;
  expect(await json(call('GET', path, { as }))).toMatchObject({ centres: [{ ground: null, views: [] }] });
  expect(await json(call('GET', `${path}?spin=high`, { as }))).toMatchObject({
    centres: [{ ground: { label: '5T2g' } }],
  });
  await json(call('GET', `${path}?spin=sideways`, { as }), 400);
});
