import { afterAll, beforeAll, expect, test } from 'vitest';
import { call, json, openRegistry } from './harness.ts';
import { person } from './people.ts';

let close: () => Promise<void>;
let token: string;

beforeAll(async () => {
  ({ close } = await openRegistry());
  token = (await person('steward', { steward: true })).token;
});
afterAll(() => close());

test('a method that a path does not serve is 405 with Allow, an unknown path 404', async () => {
  const answer = await call('PUT', '/api/complexes', { as: token, json: {} });
  expect(answer.headers.get('allow')).toBe('GET, POST');
  await json(answer, 405);
  await json(call('GET', '/api/nothing-here', { as: token }), 404);
});

test('isomers may be asked for by pattern alone', async () => {
  const list = await json<{ count: number }>(
    call('POST', '/api/derive/isomers', {
      as: token,
      json: {
        geometry: 'OC-6',
        ligands: [
          { pattern: ['A', 'B', 'B', 'A'], count: 1 },
          { label: 'X', count: 2 },
        ],
      },
    }),
  );
  // trans, cis-α (two hands), cis-β (two hands): common practice for an open tetradentate
  expect(list.count).toBe(5);
});
