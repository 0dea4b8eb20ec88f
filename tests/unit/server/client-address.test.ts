import { expect, test } from 'vitest';

Object.assign(process.env, {
  ZAFFRE_MODE: 'demo',
  AUTH_SECRET: 'a secret for the tests alone, long enough',
  TRUST_PROXY: '1',
});
const { clientAddress, clientNetwork } = await import('#src/server/limits/client-address.ts');

const from = (forwarded: string | null, clientAddress = '10.0.0.1') => ({
  request: new Request(
    'http://localhost:4321/',
    forwarded === null ? {} : { headers: { 'x-forwarded-for': forwarded } },
  ),
  clientAddress,
});

test('behind a proxy the address is what the proxy wrote, not what the client sent before it', () => {
  expect(clientAddress(from('203.0.113.9'))).toBe('203.0.113.9');
  expect(clientAddress(from('1.2.3.4, 203.0.113.9'))).toBe('203.0.113.9');
  expect(clientAddress(from(null))).toBe('10.0.0.1');
});

test('where there is no address nothing fails', () => {
  const none = { request: new Request('http://localhost:4321/') } as Parameters<typeof clientAddress>[0];
  Object.defineProperty(none, 'clientAddress', {
    get: () => {
      throw new Error('no address');
    },
  });
  expect(clientAddress(none)).toBe('unknown');
});

test.each([
  ['203.0.113.9', '203.0.113.9'],
  ['::ffff:203.0.113.9', '203.0.113.9'],
  ['2001:db8:0:12:aaaa::1', '2001:db8:0:12::/64'],
  ['2001:DB8::12:0:0:0:1', '2001:db8:0:12::/64'],
  ['::1', '0:0:0:0::/64'],
  ['fe80::1%eth0', 'fe80:0:0:0::/64'],
])('%s counts as %s', (address, network) => expect(clientNetwork(address)).toBe(network));
