import { afterAll, beforeAll, expect, test, vi } from 'vitest';
import { call, openRegistry } from './harness.ts';
import { person } from './people.ts';

let close: () => Promise<void>;
beforeAll(async () => {
  close = (await openRegistry()).close;
});
afterAll(() => close());

test('every request is a line with who, what and its answer; a refused one tells from where, too', async () => {
  const { log } = await import('#src/server/log.ts');
  const info = vi.spyOn(log, 'info');
  const warn = vi.spyOn(log, 'warn');
  const ada = await person('Ada');
  await call('GET', '/api/complexes?q=not+logged', { as: ada.token });
  await call('GET', '/api/trail', { as: ada.token });
  await call('GET', '/api/complexes');

  const who = { account: ada.id, tokenId: expect.any(String), requestId: expect.any(String), method: 'GET' };
  expect(info.mock.calls).toEqual([[{ ...who, path: '/api/complexes', status: 200, ms: expect.any(Number) }]]);
  const address = expect.any(String);
  expect(warn.mock.calls).toEqual([
    [expect.objectContaining({ ...who, path: '/api/trail', status: 403, address }), 'request refused'],
    [expect.objectContaining({ path: '/api/complexes', status: 401, address }), 'request refused'],
  ]);
  vi.restoreAllMocks();
});
