import { isIPv6 } from 'node:net';
import type { APIContext } from 'astro';
import { settings } from '../settings.ts';

type FromClient = Pick<APIContext, 'request' | 'clientAddress'>;

/**
 * Address of the client, for counters and for the list of sessions; `unknown` where there is none.
 *
 * Behind a proxy (`TRUST_PROXY`) it is the last entry of X-Forwarded-For, the one that the proxy itself wrote: whatever
 * stands before it came from the client and may be invented.
 */
export function clientAddress(context: FromClient): string {
  if (settings().trustProxy) {
    const told = context.request.headers.get('x-forwarded-for')?.split(',').at(-1)?.trim();
    if (told) return told;
  }
  try {
    return context.clientAddress;
  } catch {
    return 'unknown';
  }
}

/** What is counted as one client: an IPv6 network of 64 bits, since whoever has one has all its addresses. */
export function clientNetwork(address: string): string {
  const plain = address.replace(/^::ffff:(?=\d+\.\d+\.\d+\.\d+$)/i, '');
  if (!isIPv6(plain)) return plain;
  const [head = '', tail] = plain.split('%')[0]!.split('::');
  const groups = (text: string) => (text === '' ? [] : text.split(':'));
  const known = groups(head);
  const rest = groups(tail ?? '');
  const all = [...known, ...Array<string>(Math.max(0, 8 - known.length - rest.length)).fill('0'), ...rest];
  return `${all
    .slice(0, 4)
    .map((group) => group.replace(/^0+(?=.)/, '').toLowerCase())
    .join(':')}::/64`;
}
