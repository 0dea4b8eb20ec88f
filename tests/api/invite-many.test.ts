import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { call, json, openRegistry } from './harness.ts';
import { lab, person } from './people.ts';
import { mailedToken } from './shared-content.ts';

let registry: Awaited<ReturnType<typeof openRegistry>>;
type Person = Awaited<ReturnType<typeof person>>;
type Invitation = { id: string; email: string; state: string; sends: number; sentAt: string; expiresAt: string };
let lead: Person;
let north: string;
let folio: string;

const PASSWORD = 'tundra velvet osmosis kettle';
const toLab = (body: object) => call('POST', `/api/labs/${north}/invitations`, { session: lead.id, json: body });
const toFolio = (body: object) => call('POST', `/api/folios/${folio}/invitations`, { session: lead.id, json: body });
const preview = (token: string) => call('POST', '/api/invitations/preview', { json: { token } });
const accept = (token: string, more: object = {}) =>
  call('POST', '/api/invitations/accept', { json: { token, name: 'Ada Nordby', password: PASSWORD, ...more } });
const resend = (id: string) => call('POST', `/api/invitations/${id}/resend`, { session: lead.id });

beforeAll(async () => {
  registry = await openRegistry();
  north = await lab('North');
  lead = await person('Lead North', { labs: { [north]: 'lead' } });
  const body = { name: 'Aqua ions', lab: north, licence: 'CC-BY-4.0' };
  folio = (await json<{ id: string }>(call('POST', '/api/folios', { as: lead.token, json: body }), 201)).id;
});
beforeEach(() => forgetCounts());
afterAll(() => registry.close());

describe('many at once', () => {
  test('each address gets a link of its own, once, whatever its capitals', async () => {
    const emails = ['A1@test.example', 'a2@test.example', 'a1@TEST.example'];
    const { items } = await json<{ items: Invitation[] }>(toFolio({ emails, level: 'download' }), 201);
    expect(items).toMatchObject([
      { email: 'a1@test.example', state: 'sent', level: 'download', sends: 1 },
      { email: 'a2@test.example', state: 'sent', level: 'download', sends: 1 },
    ]);
    const tokens = await Promise.all(items.map(({ email }) => mailedToken(email)));
    expect(new Set(tokens).size).toBe(2);
    expect((await accept(tokens[1]!)).status).toBe(200);
    expect(await json(preview(tokens[0]!))).toMatchObject({ email: 'a1@test.example' });
  });

  test('a bad one is named, and then none goes out', async () => {
    const before = await mailCount();
    const emails = ['b1@test.example', 'b2', 'b3@test.example', 'b4@test'];
    const { errors } = await json<{ errors: { pointer: string }[] }>(toLab({ emails, role: 'contributor' }), 422);
    expect(errors.map(({ pointer }) => pointer)).toEqual(['#/emails/1', '#/emails/3']);
    expect(await mailCount()).toBe(before);
    const listed = await json<Invitation[]>(call('GET', `/api/labs/${north}/invitations`, { session: lead.id }));
    expect(listed.filter(({ email }) => email.startsWith('b'))).toEqual([]);
  });

  test('either one or a list, and a list of at most fifty', async () => {
    const role = 'contributor';
    for (const body of [{ role }, { role, email: 'c@test.example', emails: ['d@test.example'] }, { role, emails: [] }])
      expect((await toLab(body)).status, JSON.stringify(body)).toBe(422);
    const many = Array.from({ length: 51 }, (_, i) => `many${i}@test.example`);
    expect((await toLab({ role, emails: many })).status).toBe(422);
    expect((await toLab({ role, emails: many.slice(1) })).status).toBe(201);
  });

  test('a hundred mails an hour, however they are asked for', async () => {
    const some = (of: string) => Array.from({ length: 50 }, (_, i) => `${of}${i}@test.example`);
    const role = 'contributor';
    expect((await toLab({ role, emails: some('x') })).status).toBe(201);
    expect((await toLab({ role, emails: some('y') })).status).toBe(201);
    const before = await mailCount();
    expect((await toLab({ role, emails: ['z@test.example'] })).status).toBe(429);
    expect(await mailCount()).toBe(before);
  });
});

describe('sending again', () => {
  const invited = async (email: string) => {
    const made = await json<Invitation>(toFolio({ email }), 201);
    return { ...made, token: await mailedToken(email) };
  };

  test('gives a new link, and the older one is dead at once', async () => {
    const { id, token, expiresAt } = await invited('e1@test.example');
    const again = await json<Invitation>(resend(id));
    expect(again).toMatchObject({ id, state: 'sent', sends: 2 });
    expect(again.expiresAt >= expiresAt).toBe(true);
    expect((await preview(token)).status).toBe(404);
    expect((await accept(token)).status).toBe(404);
    const newer = await mailedToken('e1@test.example');
    expect(newer).not.toBe(token);
    expect((await accept(newer)).status).toBe(200);
    expect((await resend(id)).status).toBe(409);
    expect(await json(call('GET', `/api/invitations/${id}`, { session: lead.id }))).toMatchObject({
      state: 'accepted',
      acceptedAt: expect.any(String),
    });
  });

  test('wakes one that lapsed, and not one that was revoked or whose access would be over', async () => {
    const lapsed = await invited('e2@test.example');
    await setInvitation(lapsed.id, { expiresAt: '2026-01-01T00:00:00.000Z' });
    expect((await preview(lapsed.token)).status).toBe(404);
    expect(await json(resend(lapsed.id))).toMatchObject({ state: 'sent' });
    expect(await json(preview(await mailedToken('e2@test.example')))).toMatchObject({ email: 'e2@test.example' });
    await setInvitation(lapsed.id, { grantExpiresAt: '2026-01-01T00:00:00.000Z' });
    expect((await resend(lapsed.id)).status).toBe(409);

    const revoked = await invited('e3@test.example');
    expect((await call('DELETE', `/api/invitations/${revoked.id}`, { session: lead.id })).status).toBe(204);
    expect((await resend(revoked.id)).status).toBe(409);
    expect((await preview(revoked.token)).status).toBe(404);
  });

  test('five times a day', async () => {
    const { id } = await invited('e4@test.example');
    for (let i = 0; i < 5; i++) expect((await resend(id)).status).toBe(200);
    expect((await resend(id)).status).toBe(429);
    expect(await json(call('GET', `/api/invitations/${id}`, { session: lead.id }))).toMatchObject({ sends: 6 });
  });
});

describe('terms', () => {
  test('are told before, and kept with the licence', async () => {
    await json(toFolio({ email: 'f1@test.example', expires: '2027-05-31' }), 201);
    const token = await mailedToken('f1@test.example');
    expect(await json(preview(token))).toMatchObject({
      invitedBy: 'Lead North',
      lab: { name: 'North' },
      folio: { name: 'Aqua ions', licence: 'CC-BY-4.0' },
      level: 'view',
      accessUntil: '2027-05-31T23:59:59.999Z',
    });
    expect((await accept(token, { terms: false })).status).toBe(422);
    expect((await accept(token, { terms: true, licence: 'CC0-1.0' })).status).toBe(409);
    await json(accept(token, { terms: true, licence: 'CC-BY-4.0' }));
    const grants = await json<{ email: string }[]>(call('GET', `/api/folios/${folio}/grants`, { as: lead.token }));
    expect(grants.find(({ email }) => email === 'f1@test.example')).toMatchObject({
      termsLicence: 'CC-BY-4.0',
      termsAcceptedAt: expect.any(String),
      grantedBy: 'Lead North',
    });
  });

  test('of another licence are asked for again, and reading goes on', async () => {
    const guest = await person('Reader');
    await json(toFolio({ email: guest.email }), 201);
    const token = await mailedToken(guest.email);
    await json(call('POST', '/api/invitations/accept', { session: guest.id, json: { token } }));
    const read = () => json<{ terms: object }>(call('GET', `/api/folios/${folio}`, { as: guest.token }));
    expect((await read()).terms).toMatchObject({ licence: 'CC-BY-4.0', isCurrent: true });
    const patch = { licence: 'CC-BY-NC-4.0' };
    await json(call('PATCH', `/api/folios/${folio}`, { as: lead.token, json: patch, headers: { 'if-match': '*' } }));
    expect((await read()).terms).toMatchObject({ licence: 'CC-BY-4.0', isCurrent: false });
    const terms = (licence: string) =>
      call('POST', `/api/folios/${folio}/terms`, { session: guest.id, json: { licence } });
    expect((await terms('CC-BY-4.0')).status).toBe(409);
    expect(await json(terms('CC-BY-NC-4.0'))).toMatchObject({ terms: { licence: 'CC-BY-NC-4.0', isCurrent: true } });
    expect((await read()).terms).toMatchObject({ licence: 'CC-BY-NC-4.0', isCurrent: true });
  });
});

async function tables() {
  const { database } = await import('#src/server/database.ts');
  return { ...(await database()), ...(await import('#src/db/schema/index.ts')), ...(await import('drizzle-orm')) };
}

async function setInvitation(id: string, values: { expiresAt?: string; grantExpiresAt?: string }) {
  const { write, invitations, eq } = await tables();
  await write((tx) => tx.update(invitations).set(values).where(eq(invitations.id, id)));
}

/** Every test has the hour of its own. */
async function forgetCounts() {
  const { write, limits } = await tables();
  await write((tx) => tx.delete(limits));
}

async function mailCount(): Promise<number> {
  const { db, mails } = await tables();
  return (await db.select().from(mails)).length;
}
