import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import type { Database } from '#src/db/client.ts';
import type { RatePolicy } from '#src/server/limits/policy.ts';
import { call, json, openRegistry } from './harness.ts';
import { lab, person } from './people.ts';

let registry: Awaited<ReturnType<typeof openRegistry>>;
let ada: Awaited<ReturnType<typeof person>>;
let guest: Awaited<ReturnType<typeof person>>;

beforeAll(async () => {
  registry = await openRegistry();
  ada = await person('Ada', { labs: { [await lab('North')]: 'contributor' } });
  guest = await person('Guest');
  await call('GET', '/api/health'); // loads the program
});
afterAll(() => registry.close());

/** A count that another process has already used up, in a window that still lasts. */
async function usedUp(key: string, count: number): Promise<void> {
  const { database } = await import('#src/server/database.ts');
  const { limits } = await import('#src/db/schema/index.ts');
  const until = Date.now() + 2 * 3600 * 1000;
  await (await database()).write((tx) => tx.insert(limits).values({ key, count, until }));
}

test('an answer tells the limit it counted against and what is left', async () => {
  const first = await call('GET', '/api/complexes', { as: ada.token });
  expect(first.headers.get('ratelimit-policy')).toBe('"api";q=6000;w=60');
  const left = (answer: Response) => Number(/^"api";r=(\d+);t=\d+$/.exec(answer.headers.get('ratelimit') ?? '')?.[1]);
  const second = await call('GET', '/api/complexes', { as: ada.token });
  expect(left(second)).toBe(left(first) - 1);
  // Refused for what it is, and told all the same.
  const missing = await call('GET', '/api/complexes/ZF000000-0', { as: ada.token });
  expect([missing.status, left(missing)]).toEqual([404, left(second) - 1]);
  const derived = await call('POST', '/api/derive/product', {
    as: ada.token,
    json: { group: 'Oh', irreps: ['T2g', 'T1u'] },
  });
  expect(derived.headers.get('ratelimit-policy')).toBe(
    '"derive";q=1800;w=60, "derive-at-once";q=4;qu="concurrent-requests"',
  );
});

test('a limit that is used up is 429 with Retry-After, behind who and what may ever be done, before the body', async () => {
  const { POLICIES } = await import('#src/server/limits/policy.ts');
  await usedUp(`bundle:${ada.id}`, POLICIES.bundle.most);
  const refused = await call('POST', '/api/bundles', { as: ada.token, form: new FormData() });
  expect(await json(refused, 429)).toMatchObject({ title: 'Too many requests', detail: expect.stringMatching(/ s$/) });
  expect(Number(refused.headers.get('retry-after'))).toBeGreaterThan(0);
  expect(refused.headers.get('ratelimit')).toMatch(/^"bundle";r=0;t=\d+$/);
  expect((await call('POST', '/api/bundles', { json: {} })).status).toBe(401);
  const reader = await person('Reader', { scopes: ['read'] });
  await usedUp(`bundle:${reader.id}`, POLICIES.bundle.most);
  expect((await call('POST', '/api/bundles', { as: reader.token, json: {} })).status).toBe(403);
  // Another kind of request, and another person, are not held up.
  expect((await call('GET', '/api/complexes', { as: ada.token })).status).toBe(200);
  expect((await call('POST', '/api/bundles', { as: guest.token, json: {} })).status).toBe(403);
});

test('health answers always, and nobody is counted by address alone', async () => {
  expect((await call('GET', '/api/health')).headers.get('ratelimit')).toBeNull();
  expect((await call('GET', '/api/openapi.json')).headers.get('ratelimit-policy')).toBe('"nobody";q=600;w=60');
  expect((await call('GET', '/api/openapi.json', { as: guest.token })).headers.get('ratelimit-policy')).toBe(
    '"api";q=6000;w=60',
  );
});

test('more derivations than may run and wait are turned away, of that account alone', async () => {
  const { derivationTurns } = await import('#src/server/limits/admit.ts');
  const { DERIVE_AT_ONCE } = await import('#src/server/limits/policy.ts');
  const idle = new AbortController();
  const running = await Promise.all(
    Array.from({ length: DERIVE_AT_ONCE.most }, () => derivationTurns.enter(ada.id, idle.signal)),
  );
  const derive = (as: string) =>
    call('POST', '/api/derive/product', { as, json: { group: 'Oh', irreps: ['T2g', 'T1u'] } });
  // One waits until a turn is given back.
  const waited = derive(ada.token);
  running.pop()!();
  expect((await waited).status).toBe(200);
  running.push(await derivationTurns.enter(ada.id, idle.signal));

  const leaving = Array.from({ length: DERIVE_AT_ONCE.waiting }, () => new AbortController());
  const waiting = leaving.map(({ signal }) => derivationTurns.enter(ada.id, signal).catch(() => undefined));
  const refused = await derive(ada.token);
  expect([refused.status, refused.headers.get('retry-after')]).toEqual([429, '2']);
  expect((await derive(guest.token)).status).toBe(200);
  for (const one of leaving) one.abort();
  await Promise.all(waiting);
  for (const leave of running) leave();
  expect((await derive(ada.token)).status).toBe(200);
});

describe('turns', () => {
  test('are given in order; who waited too long or has gone waits no longer', async () => {
    const { AtOnce } = await import('#src/server/limits/at-once.ts');
    const turns = new AtOnce({ most: 1, waiting: 2, waitMs: 30 });
    const here = new AbortController();
    const leave = await turns.enter('a', here.signal);
    const gone = new AbortController();
    const [late, left] = [turns.enter('a', here.signal), turns.enter('a', gone.signal)];
    await expect(turns.enter('a', here.signal)).rejects.toMatchObject({ status: 429 });
    gone.abort(new Error('gone'));
    await expect(left).rejects.toThrow('gone');
    await expect(late).rejects.toMatchObject({ status: 429 });
    leave();
    const order: string[] = [];
    const patient = new AtOnce({ most: 1, waiting: 5, waitMs: 10_000 });
    const first = await patient.enter('b', here.signal);
    const others = ['second', 'third'].map(async (name) => {
      const end = await patient.enter('b', here.signal);
      order.push(name);
      end();
    });
    first();
    await Promise.all(others);
    expect(order).toEqual(['second', 'third']);
  });
});

describe('two processes on one database', () => {
  const handles: Database[] = [];
  afterAll(() => {
    for (const handle of handles) handle.close();
  });
  const policy = (more: Partial<RatePolicy>): RatePolicy => ({
    name: 'api',
    most: 50,
    windowMs: 60_000,
    unseen: 0,
    share: 1,
    ...more,
  });
  /** Two counters, each with a database handle of its own, at a clock that the test turns. */
  async function counters(clock: { now: number }) {
    const { openDatabase } = await import('#src/db/client.ts');
    const { RequestCounter } = await import('#src/server/limits/counter.ts');
    const url = `file:${join(registry.folder, 'zaffre.db')}`;
    const opened = await Promise.all([openDatabase(url), openDatabase(url)]);
    handles.push(...opened);
    return opened.map(
      (handle) =>
        new RequestCounter(
          async () => handle,
          () => clock.now,
        ),
    );
  }
  async function allowedOf(
    list: Awaited<ReturnType<typeof counters>>,
    rate: RatePolicy,
    who: string,
    requests: number,
  ) {
    let allowed = 0;
    for (let i = 0; i < requests; i++) if ((await list[i % list.length]!.take(rate, who)).allowed) allowed += 1;
    return allowed;
  }

  test('counted one by one, they let through exactly what is allowed', async () => {
    const clock = { now: Date.now() };
    expect(await allowedOf(await counters(clock), policy({}), 'one by one', 120)).toBe(50);
  });

  test('with shares, never more than the bound, and the next window begins anew', async () => {
    const clock = { now: Date.now() };
    const both = await counters(clock);
    const rate = policy({ unseen: 3, share: 8 });
    const allowed = await allowedOf(both, rate, 'shares', 200);
    expect(allowed).toBeLessThanOrEqual(50 + 2 * 3);
    expect(allowed).toBeGreaterThanOrEqual(50 - (8 + 3));
    const refused = await both[0]!.take(rate, 'shares');
    expect(refused).toMatchObject({ allowed: false, remaining: 0 });
    clock.now += refused.resetMs;
    expect(await allowedOf(both, rate, 'shares', 20)).toBe(20);
  });

  test('what one process used alone is known to the other; people do not share', async () => {
    const [one, other] = await counters({ now: Date.now() });
    expect(await allowedOf([one!], policy({ share: 10 }), 'alone', 60)).toBe(50);
    expect(await allowedOf([other!], policy({ share: 10 }), 'alone', 60)).toBe(0);
    expect(await allowedOf([other!], policy({ share: 10 }), 'somebody else', 60)).toBe(50);
  });

  test('many at the same moment draw one share after another, and a refusal costs no write', async () => {
    const { RequestCounter } = await import('#src/server/limits/counter.ts');
    const { database } = await import('#src/server/database.ts');
    const { write } = await database();
    let writes = 0;
    const counter = new RequestCounter(async () => ({
      write: (work) => {
        writes += 1;
        return write(work);
      },
    }));
    const rate = policy({ most: 40, share: 10 });
    const standings = await Promise.all(Array.from({ length: 100 }, () => counter.take(rate, 'at once')));
    expect(standings.filter(({ allowed }) => allowed)).toHaveLength(40);
    expect(writes).toBe(4);
  });
});

test('production has no switch for its limits', async () => {
  const { readSettings } = await import('#src/server/settings.ts');
  const production = {
    ZAFFRE_MODE: 'production',
    PUBLIC_ORIGIN: 'https://zaffre.example',
    AUTH_SECRET: 'x'.repeat(40),
    RESEND_API_KEY: 'key',
  };
  expect(readSettings(production).rateLimits).toBe('default');
  expect(() => readSettings({ ...production, RATE_LIMITS: 'off' })).toThrow('RATE_LIMITS');
});
