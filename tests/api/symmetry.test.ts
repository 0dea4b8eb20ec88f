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
