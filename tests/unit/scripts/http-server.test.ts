import type { AddressInfo } from 'node:net';
import { expect, test } from 'vitest';
import { closeServer, createAppServer, listen } from '../../../scripts/lib/http-server.ts';

/** What the program is told of where a request came from. */
async function forwardedTo(trustProxy: boolean, headers: Record<string, string>): Promise<unknown> {
  const server = createAppServer(
    (request, response) => void response.end(JSON.stringify(request.headers['x-forwarded-for'] ?? null)),
    { trustProxy },
  );
  await listen(server, '127.0.0.1', 0);
  try {
    const answer = await fetch(`http://127.0.0.1:${(server.address() as AddressInfo).port}/`, { headers });
    return await answer.json();
  } finally {
    await closeServer(server, 100);
  }
}

test.each([
  ['without a proxy nothing that a client says of itself is believed', false, '203.0.113.9', null],
  ['behind one, what it says is', true, '203.0.113.9', '203.0.113.9'],
  ['but not what the client wrote before it', true, '1.2.3.4, 203.0.113.9', '203.0.113.9'],
])('%s', async (_, trustProxy, given, told) => {
  expect(await forwardedTo(trustProxy, { 'x-forwarded-for': given })).toBe(told);
});
