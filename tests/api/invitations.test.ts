import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { call, json, openRegistry } from './harness.ts';
import { lab, person } from './people.ts';
import { mailedToken } from './shared-content.ts';

let registry: Awaited<ReturnType<typeof openRegistry>>;
type Person = Awaited<ReturnType<typeof person>>;
let steward: Person;
let lead: Person;
let other: Person;
let contributor: Person;
let guest: Person;
let north: string;
let south: string;
let folio: string;

const PASSWORD = 'tundra velvet osmosis kettle';
const person1 = { name: 'Ada Nordby', password: PASSWORD };
const invite = (session: string, body: object, path = `/api/labs/${north}/invitations`) =>
  call('POST', path, { session, json: body });
const accept = (token: string, body: object = person1, session?: string) =>
  call('POST', '/api/invitations/accept', { json: { token, ...body }, session });

beforeAll(async () => {
  registry = await openRegistry();
  north = await lab('North');
  south = await lab('South');
  steward = await person('Steward', { steward: true });
  lead = await person('Lead North', { labs: { [north]: 'lead' } });
  other = await person('Lead South', { labs: { [south]: 'lead' } });
  contributor = await person('Contributor', { labs: { [north]: 'contributor' } });
  guest = await person('Guest');
  const made = await json<{ id: string }>(
    call('POST', '/api/folios', { as: lead.token, json: { name: 'Aqua ions', lab: north, licence: 'CC-BY-4.0' } }),
    201,
  );
  folio = made.id;
});
afterAll(() => registry.close());

describe('who may invite', () => {
  const body = { email: 'someone@test.example', role: 'contributor' };

  test('leads into their own labs, stewards anywhere', async () => {
    expect(await json(invite(lead.id, { ...body, role: 'lead' }), 201)).toMatchObject({
      state: 'sent',
      role: 'lead',
      lab: { id: north, name: 'North' },
      invitedBy: 'Lead North',
    });
    await json(invite(steward.id, body, `/api/labs/${south}/invitations`), 201);
  });

  test('nobody else', async () => {
    for (const who of [other, contributor, guest]) expect((await invite(who.id, body)).status).toBe(403);
    expect((await call('POST', `/api/labs/${north}/invitations`, { json: body })).status).toBe(401);
    const toFolio = `/api/folios/${folio}/invitations`;
    const asGuest = { email: 'someone@test.example' };
    expect((await invite(contributor.id, asGuest, toFolio)).status).toBe(403);
    expect((await invite(other.id, asGuest, toFolio)).status).toBe(404);
    expect((await invite(guest.id, asGuest, toFolio)).status).toBe(403);
  });

  test('no access token, whatever its scopes', async () => {
    expect((await call('POST', `/api/labs/${north}/invitations`, { as: steward.token, json: body })).status).toBe(403);
  });

  test('only from a page of our own', async () => {
    const path = `/api/labs/${north}/invitations`;
    const foreign = { origin: 'https://elsewhere.example' };
    expect((await call('POST', path, { session: lead.id, json: body, headers: foreign })).status).toBe(403);
  });

  test('refuses an end that is past or too far', async () => {
    for (const expires of ['2020-01-01', '2199-01-01']) {
      const answer = await invite(lead.id, { ...body, expires });
      expect(answer.status).toBe(422);
      expect(await answer.json()).toMatchObject({ errors: [{ pointer: '#/expires' }] });
    }
  });
});

describe('a new address', () => {
  test('gets an account, once, with what the invitation offers', async () => {
    await json(invite(lead.id, { email: 'Ada@Test.example', role: 'contributor' }), 201);
    const token = await mailedToken('ada@test.example');
    expect(await json(call('POST', '/api/invitations/preview', { json: { token } }))).toMatchObject({
      email: 'ada@test.example',
      invitedBy: 'Lead North',
      lab: { name: 'North' },
      role: 'contributor',
      hasAccount: false,
    });
    expect(await json(accept(token))).toEqual({ email: 'ada@test.example', lab: north, folio: null });
    const members = await json<{ name: string; role: string }[]>(
      call('GET', `/api/labs/${north}/members`, { as: lead.token }),
    );
    expect(members).toContainEqual(expect.objectContaining({ name: 'Ada Nordby', role: 'contributor' }));
    expect((await accept(token)).status).toBe(404);
    const [account] = await accountsOf('ada@test.example');
    const { passwordFits } = await import('#src/server/passwords.ts');
    expect(await passwordFits(account!.passwordHash, PASSWORD)).toBe(true);
  });

  test('needs a name and a password that is long and not guessed first', async () => {
    await json(invite(lead.id, { email: 'bo@test.example', role: 'contributor' }), 201);
    const token = await mailedToken('bo@test.example');
    const faults = async (body: object) => {
      const answer = await accept(token, body);
      expect(answer.status).toBe(422);
      return ((await answer.json()) as { errors: { pointer: string }[] }).errors.map((e) => e.pointer);
    };
    expect(await faults({})).toEqual(['#/name', '#/password']);
    expect(await faults({ name: 'Bo', password: 'only 14 chars!' })).toEqual(['#/password']);
    for (const password of [
      'passwordpassword',
      '123456789012345678',
      'aaaaaaaaaaaaaaaaaa',
      'Zaffre-Zaffre-2026',
      'bo@test.example.bo',
    ])
      expect(await faults({ name: 'Bo', password }), password).toEqual(['#/password']);
    expect((await accept(token, { name: 'Bo', password: PASSWORD })).status).toBe(200);
  });

  test('is taken once when two accept at the same moment', async () => {
    await json(invite(lead.id, { email: 'cy@test.example', role: 'contributor' }), 201);
    const token = await mailedToken('cy@test.example');
    const answers = await Promise.all([1, 2, 3, 4].map(() => accept(token)));
    const states = answers.map((answer) => answer.status).sort();
    expect(states[0]).toBe(200);
    expect(states.slice(1).every((status) => status === 404 || status === 401)).toBe(true);
    expect(await accountsOf('cy@test.example')).toHaveLength(1);
  });

  test('is refused while signed in as somebody else', async () => {
    await json(invite(lead.id, { email: 'di@test.example', role: 'contributor' }), 201);
    const token = await mailedToken('di@test.example');
    expect((await accept(token, person1, contributor.id)).status).toBe(403);
    expect(
      (await call('POST', '/api/invitations/accept', { as: contributor.token, json: { token, ...person1 } })).status,
    ).toBe(403);
    expect((await accept(token)).status).toBe(200);
  });
});

describe('an address that has an account', () => {
  test('must be signed in as that account, and keeps its password', async () => {
    await json(invite(lead.id, { email: guest.email, level: 'view' }, `/api/folios/${folio}/invitations`), 201);
    const token = await mailedToken(guest.email);
    const before = await accountsOf(guest.email);
    expect(await json(call('POST', '/api/invitations/preview', { json: { token } }))).toMatchObject({
      hasAccount: true,
    });
    expect((await accept(token)).status).toBe(401);
    expect((await accept(token, {}, contributor.id)).status).toBe(403);
    expect((await call('GET', `/api/folios/${folio}`, { as: guest.token })).status).toBe(404);
    expect(await json(accept(token, person1, guest.id))).toEqual({ email: guest.email, folio, lab: null });
    expect(await accountsOf(guest.email)).toEqual(before);
    expect(await json(call('GET', `/api/folios/${folio}`, { as: guest.token }))).toMatchObject({ level: 'view' });
  });

  test('a guest asked again gets the newer level and end, in one grant', async () => {
    const body = { email: guest.email, level: 'download', expires: '2027-06-30' };
    await json(invite(lead.id, body, `/api/folios/${folio}/invitations`), 201);
    await json(accept(await mailedToken(guest.email), {}, guest.id));
    const grants = await json<Record<string, unknown>[]>(
      call('GET', `/api/folios/${folio}/grants`, { as: lead.token }),
    );
    expect(grants).toEqual([
      expect.objectContaining({
        email: guest.email,
        level: 'download',
        expires: '2027-06-30T23:59:59.999Z',
        revoked: false,
      }),
    ]);
    expect(Date.parse(grants[0]!.termsAcceptedAt as string)).toBeLessThanOrEqual(Date.now());
  });

  test('a lead asked in as contributor stays lead; a contributor rises', async () => {
    const role = async (name: string) =>
      (
        await json<{ name: string; role: string }[]>(call('GET', `/api/labs/${north}/members`, { as: lead.token }))
      ).find((member) => member.name === name)?.role;
    await json(invite(steward.id, { email: lead.email, role: 'contributor' }), 201);
    await json(accept(await mailedToken(lead.email), {}, lead.id));
    expect(await role('Lead North')).toBe('lead');
    await json(invite(steward.id, { email: contributor.email, role: 'lead' }), 201);
    await json(accept(await mailedToken(contributor.email), {}, contributor.id));
    expect(await role('Contributor')).toBe('lead');
  });
});

describe('a token that does not work', () => {
  test('unknown, used, lapsed, revoked and replaced ones get one and the same answer', async () => {
    const fresh = async (email: string) => {
      const { id } = await json<{ id: string }>(invite(lead.id, { email, role: 'contributor' }), 201);
      return { id, token: await mailedToken(email) };
    };
    const used = await fresh('e1@test.example');
    await json(accept(used.token));
    const lapsed = await fresh('e2@test.example');
    await setInvitation(lapsed.id, { expiresAt: '2026-01-01T00:00:00.000Z' });
    const revoked = await fresh('e3@test.example');
    expect((await call('DELETE', `/api/invitations/${revoked.id}`, { session: lead.id })).status).toBe(204);
    const replaced = await fresh('e4@test.example');
    const newer = await fresh('e4@test.example');

    const answers: string[] = [];
    for (const token of ['x'.repeat(43), used.token, lapsed.token, revoked.token, replaced.token])
      for (const path of ['accept', 'preview']) {
        const body = path === 'accept' ? { token, ...person1 } : { token };
        const answer = await call('POST', `/api/invitations/${path}`, { json: body });
        expect(answer.status).toBe(404);
        answers.push(await answer.text());
      }
    expect(new Set(answers).size).toBe(1);
    expect((await accept(newer.token)).status).toBe(200);

    const listed = await json<{ id: string; state: string }[]>(
      call('GET', `/api/labs/${north}/invitations`, { session: lead.id }),
    );
    const states = Object.fromEntries(listed.map(({ id, state }) => [id, state]));
    expect([used, lapsed, revoked, replaced, newer].map(({ id }) => states[id])).toEqual([
      ...['accepted', 'lapsed', 'revoked', 'revoked', 'accepted'],
    ]);
    expect((await call('DELETE', `/api/invitations/${used.id}`, { session: lead.id })).status).toBe(409);
  });

  test('only leads of that lab and stewards revoke', async () => {
    const { id } = await json<{ id: string }>(invite(lead.id, { email: 'f@test.example', role: 'lead' }), 201);
    const revoke = async (who: Person) => (await call('DELETE', `/api/invitations/${id}`, { session: who.id })).status;
    expect(await revoke(guest)).toBe(403);
    expect(await revoke(other)).toBe(404);
    expect(await revoke(steward)).toBe(204);
  });
});

test('the token is in the mail alone', async () => {
  await json(invite(lead.id, { email: 'gil@test.example', role: 'contributor' }), 201);
  const token = await mailedToken('gil@test.example');
  const { database } = await import('#src/server/database.ts');
  const { invitations, trail } = await import('#src/db/schema/index.ts');
  const { db } = await database();
  const kept = JSON.stringify([await db.select().from(invitations), await db.select().from(trail)]);
  expect(kept).not.toContain(token);
  const outbox = await json<{ items: { to: string; text: string }[] }>(call('GET', '/api/outbox'));
  expect(outbox.items.find((mail) => mail.to === 'gil@test.example')?.text).toContain(token);
  expect((await call('GET', '/api/outbox', { as: steward.token })).status).toBe(403);
});

test('attempts are limited by address', async () => {
  let last = 200;
  for (let i = 0; i < 80 && last !== 429; i++)
    last = (await call('POST', '/api/invitations/preview', { json: { token: 'guess' } })).status;
  expect(last).toBe(429);
});

async function accountsOf(email: string) {
  const { database } = await import('#src/server/database.ts');
  const { accounts } = await import('#src/db/schema/index.ts');
  const { eq } = await import('drizzle-orm');
  return (await database()).db.select().from(accounts).where(eq(accounts.email, email));
}

async function setInvitation(id: string, values: { expiresAt: string }) {
  const { database } = await import('#src/server/database.ts');
  const { invitations } = await import('#src/db/schema/index.ts');
  const { eq } = await import('drizzle-orm');
  await (await database()).write((tx) => tx.update(invitations).set(values).where(eq(invitations.id, id)));
}
