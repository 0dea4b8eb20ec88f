import { eq, like } from 'drizzle-orm';
import { afterAll, beforeAll, beforeEach, describe, expect, test, vi } from 'vitest';
import { TestBrowser } from './account-browser.ts';
import { call, json, openRegistry } from './harness.ts';
import { person } from './people.ts';
import { appCode, giveApp, givePassword, TEST_PASSWORD } from './second-factor-people.ts';

const verified = vi.hoisted(() => ({ count: 0 }));
vi.mock('@node-rs/argon2', async (original) => {
  const real = await original<typeof import('@node-rs/argon2')>();
  const verify: typeof real.verify = (...given) => {
    verified.count++;
    return real.verify(...given);
  };
  return { ...real, verify };
});

let registry: Awaited<ReturnType<typeof openRegistry>>;
type Person = Awaited<ReturnType<typeof person>>;
let ada: Person;
let number = 0;
const password = TEST_PASSWORD;
const wrong = 'not the password of anybody';
/** An address from which nobody has signed in. */
const elsewhere = () => `198.51.100.${++number}`;

async function server() {
  const { database } = await import('#src/server/database.ts');
  return { ...(await database()), tables: await import('#src/db/schema/index.ts') };
}
async function newcomer(name: string): Promise<Person> {
  const made = await person(name);
  await givePassword(made.id);
  return made;
}
const sessionsOf = async (accountId: string) => {
  const { db, tables } = await server();
  return db.select().from(tables.sessions).where(eq(tables.sessions.accountId, accountId));
};

beforeAll(async () => {
  registry = await openRegistry();
  ada = await newcomer('Ada');
});
afterAll(() => registry.close());
beforeEach(async () => {
  const { write, tables } = await server();
  await write((tx) => tx.delete(tables.limits));
});

describe('signing in', () => {
  test('begins a session that tells browser and address, and the trail has it', async () => {
    const browser = new TestBrowser('192.0.2.7');
    expect(await browser.signIn({ email: ' Ada@Test.example ', password })).toBeNull();
    const [session] = await json<{ browser: string; address: string; current: boolean; secondFactor: boolean }[]>(
      browser.call('GET', '/api/account/sessions'),
    );
    expect(session).toMatchObject({
      browser: 'Firefox on Linux',
      address: '192.0.2.7',
      current: true,
      secondFactor: false,
    });
    const { db, tables } = await server();
    const rows = await db.select().from(tables.trail).where(eq(tables.trail.action, 'sign-in'));
    expect(rows).toContainEqual(expect.objectContaining({ actorId: ada.id, subjectId: ada.id }));
    expect(JSON.stringify(rows)).not.toContain(password);
  });

  test('believes no address that the client names itself', async () => {
    const browser = new TestBrowser('192.0.2.8');
    const lies = { 'x-forwarded-for': '203.0.113.9', 'x-client-address': '203.0.113.9', forwarded: 'for=203.0.113.9' };
    expect(await browser.signIn({ email: ada.email, password }, lies)).toBeNull();
    const rows = await sessionsOf(ada.id);
    expect(rows.map(({ address }) => address)).toContain('192.0.2.8');
    expect(rows.map(({ address }) => address)).not.toContain('203.0.113.9');
  });

  test('refuses unknown, wrong, closed and passwordless alike, for the same work', async () => {
    const closed = await newcomer('Closed');
    const bare = await person('Bare');
    const { write, tables } = await server();
    await write((tx) =>
      tx.update(tables.accounts).set({ state: 'deactivated' }).where(eq(tables.accounts.id, closed.id)),
    );
    const attempts = [
      { email: ada.email, password: wrong },
      { email: 'nobody@test.example', password },
      { email: closed.email, password },
      { email: bare.email, password },
    ];
    const seen = [];
    for (const form of attempts) {
      verified.count = 0;
      const browser = new TestBrowser(elsewhere());
      seen.push({ code: await browser.signIn(form), hashes: verified.count, session: browser.session });
    }
    expect(seen).toEqual(attempts.map(() => ({ code: 'credentials', hashes: 1, session: undefined })));
  });

  test('tells the log of a refusal with the account and without what was typed', async () => {
    const { log } = await import('#src/server/log.ts');
    const warn = vi.spyOn(log, 'warn');
    await new TestBrowser('192.0.2.9').signIn({ email: ada.email, password: wrong });
    await new TestBrowser('192.0.2.9').signIn({ email: 'typed the password here', password: wrong });
    expect(warn.mock.calls).toEqual([
      [{ reason: 'wrong password', account: ada.id, address: '192.0.2.9' }, 'sign-in refused'],
      [{ reason: 'unknown address', account: undefined, address: '192.0.2.9' }, 'sign-in refused'],
    ]);
    warn.mockRestore();
  });
});

describe('throttling', () => {
  const guess = (email: string, address: string) => new TestBrowser(address).signIn({ email, password: wrong });
  /** Attempts without the work of a password. */
  async function attempts(who: { email: string; id?: string }, address: string, times: number) {
    const { countSignIn } = await import('#src/server/accounts/throttle.ts');
    const outcome = { counted: 0, refused: 0 };
    for (let i = 0; i < times; i++)
      await countSignIn({ email: who.email, accountId: who.id, address }).then(
        () => outcome.counted++,
        () => outcome.refused++,
      );
    return outcome;
  }

  test('ten wrong passwords from one client end its tries at that account, not the owner’s', async () => {
    const [bea, stranger] = [await newcomer('Bea'), elsewhere()];
    for (let i = 0; i < 10; i++) expect(await guess(bea.email, stranger)).toBe('credentials');
    expect(await guess(bea.email, stranger)).toBe('too-many');
    expect(await new TestBrowser(stranger).signIn({ email: bea.email, password })).toBe('too-many');
    expect(await new TestBrowser(elsewhere()).signIn({ email: bea.email, password })).toBeNull();
  });

  test('an address without an account is throttled like one with', async () => {
    const stranger = elsewhere();
    expect(await attempts({ email: 'no.account@test.example' }, stranger, 11)).toEqual({ counted: 10, refused: 1 });
    expect(await guess('no.account@test.example', stranger)).toBe('too-many');
  });

  test('a success forgets the tries before it', async () => {
    const [cy, address] = [await newcomer('Cy'), elsewhere()];
    await attempts(cy, address, 9);
    expect(await new TestBrowser(address).signIn({ email: cy.email, password })).toBeNull();
    expect(await attempts(cy, address, 10)).toEqual({ counted: 10, refused: 0 });
  });

  test('a hundred tries from many clients close an account, but not where its owner signs in', async () => {
    const [dee, home] = [await newcomer('Dee'), elsewhere()];
    expect(await new TestBrowser(home).signIn({ email: dee.email, password })).toBeNull();
    for (let i = 0; i < 10; i++) await attempts(dee, elsewhere(), 10);
    expect(await new TestBrowser(elsewhere()).signIn({ email: dee.email, password })).toBe('too-many');
    expect(await new TestBrowser(home).signIn({ email: dee.email, password })).toBeNull();
  });

  test('one client alone cannot close an account to others', async () => {
    const eve = await newcomer('Eve');
    expect(await attempts(eve, elsewhere(), 55)).toEqual({ counted: 10, refused: 45 });
    const { db, tables } = await server();
    const counts = await db.select().from(tables.limits).where(like(tables.limits.key, 'sign-in:%'));
    expect(counts.map(({ count }) => count).sort((a, b) => a - b)).toEqual([10, 55]);
    expect(await new TestBrowser(elsewhere()).signIn({ email: eve.email, password })).toBeNull();
  });

  test('a client that tries many accounts is stopped, a building that signs in is not', async () => {
    const [fay, office] = [await newcomer('Fay'), elsewhere()];
    for (let i = 0; i < 59; i++) await attempts({ email: `guess${i}@test.example` }, office, 1);
    // Each success is given back.
    for (let i = 0; i < 3; i++) expect(await new TestBrowser(office).signIn({ email: fay.email, password })).toBeNull();
    expect(await guess('guess60@test.example', office)).toBe('credentials');
    expect(await guess('guess61@test.example', office)).toBe('too-many');
    expect(await guess('guess61@test.example', elsewhere())).toBe('credentials');
  });

  test('keeps no address that was typed', async () => {
    await guess('somebody.typed@test.example', elsewhere());
    const { db, tables } = await server();
    expect(JSON.stringify(await db.select().from(tables.limits))).not.toContain('typed');
  });
});

describe('a second factor', () => {
  let gil: Person;
  let secret: string;
  beforeAll(async () => {
    gil = await newcomer('Gil');
    secret = (await giveApp(gil.id)).secret;
  });

  test('is asked for after the right password only, and comes in one request with it', async () => {
    const browser = new TestBrowser();
    expect(await browser.signIn({ email: gil.email, password: wrong, code: appCode(secret) })).toBe('credentials');
    expect(await browser.signIn({ email: gil.email, password })).toBe('second-factor');
    expect(browser.session).toBeUndefined();
    expect(await sessionsOf(gil.id)).toEqual([]);
    expect(await browser.signIn({ email: gil.email, password, code: '000000' })).toBe('second-factor-wrong');
    expect(browser.session).toBeUndefined();
    expect(await browser.signIn({ email: gil.email, password, code: appCode(secret) })).toBeNull();
    expect(await sessionsOf(gil.id)).toMatchObject([{ secondFactor: true }]);
  });

  test('a code counts once', async () => {
    const { write, tables } = await server();
    await write((tx) => tx.update(tables.secondFactors).set({ lastStep: null }));
    const code = appCode(secret);
    expect(await new TestBrowser().signIn({ email: gil.email, password, code })).toBeNull();
    expect(await new TestBrowser().signIn({ email: gil.email, password, code })).toBe('second-factor-wrong');
  });

  test('wrong codes count as attempts', async () => {
    const address = elsewhere();
    for (let i = 0; i < 10; i++)
      expect(await new TestBrowser(address).signIn({ email: gil.email, password, code: '000000' })).toBe(
        'second-factor-wrong',
      );
    expect(await new TestBrowser(address).signIn({ email: gil.email, password, code: appCode(secret) })).toBe(
      'too-many',
    );
  });
});

describe('the session', () => {
  const status = async (cookie: string) =>
    (await call('GET', '/api/account', { headers: { cookie: `authjs.session-token=${cookie}` } })).status;

  test('signing in over another session ends that one, and the cookie is a new one', async () => {
    const hal = await newcomer('Hal');
    const browser = new TestBrowser();
    await browser.signIn({ email: hal.email, password });
    const planted = browser.session!;
    expect(await browser.signIn({ email: ada.email, password })).toBeNull();
    expect(browser.session).not.toBe(planted);
    expect(await status(planted)).toBe(401);
    expect(await status(browser.session!)).toBe(200);
    expect((await sessionsOf(hal.id)).map(({ endedAt }) => endedAt)).toEqual([expect.any(String)]);
  });

  test('a refused sign-in leaves the session that is there', async () => {
    const browser = new TestBrowser();
    await browser.signIn({ email: ada.email, password });
    const before = browser.session!;
    expect(await browser.signIn({ email: ada.email, password: wrong })).toBe('credentials');
    expect(await status(before)).toBe(200);
  });

  test('signing out ends it on the server: a copied cookie opens nothing', async () => {
    const browser = new TestBrowser();
    await browser.signIn({ email: ada.email, password });
    const copied = browser.session!;
    expect(await status(copied)).toBe(200);
    await browser.signOut();
    expect(browser.session).toBeUndefined();
    expect(await status(copied)).toBe(401);
    const { db, tables } = await server();
    const rows = await db.select().from(tables.trail).where(eq(tables.trail.action, 'sign-out'));
    expect(rows).toMatchObject([{ actorId: ada.id }]);
  });

  test.each([
    ['twelve hours after it began', { expiresAt: '2026-01-01T00:00:00.000Z' }],
    ['four hours after its last request', { lastSeenAt: new Date(Date.now() - 4 * 3600 * 1000 - 1).toISOString() }],
  ])('ends %s', async (_, past) => {
    const browser = new TestBrowser();
    await browser.signIn({ email: ada.email, password });
    expect(await status(browser.session!)).toBe(200);
    const { write, tables } = await server();
    await write((tx) => tx.update(tables.sessions).set(past).where(eq(tables.sessions.accountId, ada.id)));
    expect(await status(browser.session!)).toBe(401);
  });

  test('lasts twelve hours at most', async () => {
    const ivo = await newcomer('Ivo');
    await new TestBrowser().signIn({ email: ivo.email, password });
    const [row] = await sessionsOf(ivo.id);
    expect(Date.parse(row!.expiresAt) - Date.parse(row!.createdAt)).toBeLessThanOrEqual(12 * 3600 * 1000 + 1000);
  });

  test('a closed account is out at its next request', async () => {
    const jo = await newcomer('Jo');
    const browser = new TestBrowser();
    await browser.signIn({ email: jo.email, password });
    const { write, tables } = await server();
    await write((tx) => tx.update(tables.accounts).set({ state: 'deactivated' }).where(eq(tables.accounts.id, jo.id)));
    expect(await status(browser.session!)).toBe(401);
  });
});
