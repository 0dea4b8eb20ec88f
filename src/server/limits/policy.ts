import type { Route } from '#src/contracts/route.ts';

/** So many requests of one kind within one window. */
export interface RatePolicy {
  /** Name in the headers and in the key of its counter. */
  name: 'api' | 'nobody' | 'derive' | 'upload' | 'bundle';
  /** Requests within a window, all processes together. */
  most: number;
  windowMs: number;
  /** Requests of a window that a process lets through before it counts in the database at all. */
  unseen: number;
  /** Requests that a process draws from the database at once. */
  share: number;
}

const MINUTE = 60_000; // ms
const HOUR = 60 * MINUTE;

/**
 * What one account (one access token for `api`; one client address for `nobody`) may ask for. Each request counts
 * against one of these. They are there to hold a script that runs wild, not a person, nor a lab that loads its archive:
 * a screen asks some ten times when it opens.
 *
 * - `nobody`: requests that nobody signed in for. By address, so that they cannot use up what belongs to people; those
 *   who signed in are never counted by address, however many of them share one.
 * - `derive`: besides these, `DERIVE_AT_ONCE` holds.
 * - `upload`, `bundle`: counted one by one, since each costs far more than its count.
 */
export const POLICIES: Record<RatePolicy['name'], RatePolicy> = {
  api: { name: 'api', most: 6000, windowMs: MINUTE, unseen: 60, share: 200 },
  nobody: { name: 'nobody', most: 600, windowMs: MINUTE, unseen: 20, share: 20 },
  derive: { name: 'derive', most: 1800, windowMs: MINUTE, unseen: 30, share: 60 },
  upload: { name: 'upload', most: 1200, windowMs: HOUR, unseen: 0, share: 1 },
  bundle: { name: 'bundle', most: 120, windowMs: HOUR, unseen: 0, share: 1 },
};

/**
 * Derivations of one account that run at once, how many more may wait for their turn, and how long.
 *
 * Held by each process for itself: what they would use up, the worker threads, belongs to the process, too. With P
 * processes an account has up to P times as many running.
 */
export const DERIVE_AT_ONCE = { most: 4, waiting: 100, waitMs: 30_000 };

/** Live access tokens of one account. */
export const MOST_TOKENS = 50;

/** Which of them a request counts against; null for what must answer always. */
export function policyOf(route: Pick<Route, 'method' | 'path' | 'multipart'>, somebody: boolean): RatePolicy | null {
  // Whoever watches over the program asks often, and most of all when the database, and so the counter, is away.
  if (route.path === '/api/health') return null;
  if (!somebody) return POLICIES.nobody;
  if (route.path.startsWith('/api/derive/')) return POLICIES.derive;
  if (route.method === 'POST' && route.path === '/api/bundles') return POLICIES.bundle;
  return route.multipart ? POLICIES.upload : POLICIES.api;
}
