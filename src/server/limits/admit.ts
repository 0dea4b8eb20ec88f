import type { APIContext } from 'astro';
import type { Route } from '#src/contracts/route.ts';
import type { Asker } from '../access/asker.ts';
import { database } from '../database.ts';
import { HttpError } from '../http.ts';
import { settings } from '../settings.ts';
import { AtOnce } from './at-once.ts';
import { clientAddress, clientNetwork } from './client-address.ts';
import { RequestCounter, type Standing } from './counter.ts';
import { DERIVE_AT_ONCE, policyOf } from './policy.ts';

const counter = new RequestCounter(database);
/** Turns of the derivations of each account, in this process. */
export const derivationTurns = new AtOnce(DERIVE_AT_ONCE);

/** A request that was let in. */
export interface Admitted {
  /** What the answer tells of the limit, whatever becomes of the request. */
  headers: Record<string, string>;
  /** Gives back what the request held. */
  leave: () => void;
}

/**
 * Count a request, and for a derivation wait for its turn. Stands behind who (401) and what they may ever do (403), so
 * that refusals are told as what they are, and before the body is read.
 *
 * @throws {HttpError} 429 with Retry-After
 */
export async function admitWithin(
  route: Route,
  asker: Asker | null,
  context: Pick<APIContext, 'request' | 'clientAddress'>,
): Promise<Admitted> {
  const policy = policyOf(route, asker !== null);
  if (!policy || settings().rateLimits === 'off') return { headers: {}, leave: () => undefined };
  const standing = await counter.take(policy, whoCounts(policy.name, asker, context));
  const headers = rateHeaders(standing);
  if (!standing.allowed) {
    const seconds = Math.max(1, Math.ceil(standing.resetMs / 1000));
    throw new HttpError(429, `${policy.most.toLocaleString('en')} requests were made: try again in ${seconds} s`, {
      headers: { ...headers, 'retry-after': String(seconds) },
    });
  }
  if (policy.name !== 'derive') return { headers, leave: () => undefined };
  return { headers, leave: await derivationTurns.enter(asker?.accountId ?? '', context.request.signal) };
}

/** Tokens ask apart from each other and from the screens; what is costly counts for the account, whichever way it came. */
function whoCounts(name: string, asker: Asker | null, context: Pick<APIContext, 'request' | 'clientAddress'>): string {
  if (!asker) return clientNetwork(clientAddress(context));
  return name === 'api' && asker.tokenId ? `token:${asker.tokenId}` : asker.accountId;
}

/**
 * `RateLimit-Policy` and `RateLimit` as structured fields (draft-ietf-httpapi-ratelimit-headers-10, from memory): q the
 * quota, w the window in seconds, qu its unit where that is not requests, r what is left, t the seconds until more.
 */
function rateHeaders({ policy, remaining, resetMs }: Standing): Record<string, string> {
  const { name, most, windowMs } = policy;
  const policies = [`"${name}";q=${most};w=${windowMs / 1000}`];
  if (name === 'derive') policies.push(`"derive-at-once";q=${DERIVE_AT_ONCE.most};qu="concurrent-requests"`);
  return {
    'ratelimit-policy': policies.join(', '),
    ratelimit: `"${name}";r=${remaining};t=${Math.ceil(resetMs / 1000)}`,
  };
}
