import { afterAll, beforeAll, expect, test } from 'vitest';
import { call, json, openRegistry, sessionHeaders, sessionOf } from './harness.ts';
import { lab, person } from './people.ts';
import { draftComplex, mailsTo, sendFresh, trailOf } from './people-world.ts';
import { complex, grant } from './shared-content.ts';

interface Person {
  id: string;
  name: string;
  email: string;
  steward: boolean;
  state: string;
  deactivatedAt: string | null;
  labs: { name: string; role: string; onlyLead: boolean }[];
  folios: number;
  lastSignInAt: string | null;
  secondFactor: boolean;
  drafts: { kind: string; name: string; accession: string }[];
  tokens: number;
  invitations: number;
}
let registry: Awaited<ReturnType<typeof openRegistry>>;
let north: string;
let steward: Awaited<ReturnType<typeof person>>;
let lead: Awaited<ReturnType<typeof person>>;

beforeAll(async () => {
  registry = await openRegistry();
  north = await lab('North');
  steward = await person('Steward', { steward: true });
  lead = await person('Lena Lead', { labs: { [north]: 'lead' } });
});
afterAll(() => registry.close());

const path = (id: string) => `/api/accounts/${id}`;
const read = (id: string) => json<Person>(call('GET', path(id), { session: steward.id }));
const change = (id: string, patch: object, by = steward.id) => sendFresh('PATCH', path(id), by, patch);

test('the list tells labs, folios, sign-in and second factor, and is for stewards by session only', async () => {
  const guest = await person('Gwen Guest');
  const { database } = await import('#src/server/database.ts');
  const { folios, secondFactors } = await import('#src/db/schema/index.ts');
  const { newId, nowIso } = await import('#src/server/ids.ts');
  const [folioId, soon] = [newId(), '2999-01-01T00:00:00.000Z'];
  const facts = { labId: north, makerId: lead.id, licence: 'CC0-1.0', shows: 'attested' as const };
  const at = { createdAt: nowIso(), updatedAt: nowIso() };
  await (await database()).write(async (tx) => {
    await tx.insert(folios).values({ id: folioId, name: 'Open', ...facts, ...at });
    await tx.insert(folios).values({ id: newId(), name: 'Later', ...facts, ...at, embargoUntil: soon });
    const factor = { accountId: guest.id, kind: 'totp' as const, name: 'Phone', createdAt: nowIso() };
    await tx.insert(secondFactors).values({ id: newId(), ...factor, confirmedAt: nowIso() });
    await tx.insert(secondFactors).values({ ...factor, id: newId(), accountId: lead.id });
  });
  await grant(folioId, guest.id, 'view', lead.id);
  await grant(folioId, guest.id, 'view', lead.id, '2020-01-01T00:00:00.000Z');
  await sessionOf(guest.id);

  const list = (query: string) =>
    json<{ items: Person[]; total: number; next: string | null }>(
      call('GET', `/api/accounts${query}`, { session: steward.id }),
    );
  const { items } = await list('?q=GWEN.guest@');
  expect(items).toEqual([
    expect.objectContaining({ name: 'Gwen Guest', labs: [], folios: 1, secondFactor: true, steward: false }),
  ]);
  expect(items[0]!.lastSignInAt).toMatch(/^20\d\d-/);
  expect((await list('?q=lena')).items[0]).toMatchObject({
    labs: [{ name: 'North', role: 'lead', onlyLead: true }],
    folios: 0,
    lastSignInAt: null,
    // Begun is not confirmed.
    secondFactor: false,
  });
  expect((await list('?q=%25')).total).toBe(0);
  const first = await list('?limit=2');
  expect(first).toMatchObject({ total: 3, items: [{ name: 'Gwen Guest' }, { name: 'Lena Lead' }] });
  expect((await list(`?limit=2&cursor=${first.next}`)).items.map(({ name }) => name)).toEqual(['Steward']);
  expect((await call('GET', '/api/accounts', { session: lead.id })).status).toBe(403);
  expect((await call('GET', '/api/accounts', { as: steward.token })).status).toBe(403);
});

test('deactivating ends sessions, tokens and invitations at once; drafts stay with the lab', async () => {
  const leaver = await person('Leo Leaver', { labs: { [north]: 'lead' } });
  const accession = await draftComplex(leaver.token, north, '[Co(NH3)6]3+');
  const cookie = await sessionHeaders(leaver.id);
  const invited = await json<{ id: string }>(
    call('POST', `/api/labs/${north}/invitations`, {
      headers: cookie,
      json: { email: 'wanted@test.example', role: 'contributor' },
    }),
    201,
  );
  expect(await read(leaver.id)).toMatchObject({
    drafts: [{ kind: 'complex', name: '[Co(NH3)6]3+', accession }],
    tokens: 1,
    invitations: 1,
  });
  expect((await call('GET', '/api/labs', { headers: cookie })).status).toBe(200);

  const etag = (await call('GET', path(leaver.id), { session: steward.id })).headers.get('etag')!;
  const send = (headers: Record<string, string>) =>
    call('PATCH', path(leaver.id), { session: steward.id, json: { state: 'deactivated' }, headers });
  expect((await send({})).status).toBe(428);
  expect(await json(send({ 'if-match': etag }))).toMatchObject({
    state: 'deactivated',
    deactivatedAt: expect.stringMatching(/^20\d\d-/),
    tokens: 0,
    invitations: 0,
    drafts: [{ accession }],
  });
  expect((await send({ 'if-match': etag })).status).toBe(412);

  expect((await call('GET', '/api/labs', { headers: cookie })).status).toBe(401);
  expect((await call('GET', '/api/labs', { as: leaver.token })).status).toBe(401);
  expect((await call('GET', `/api/complexes/${accession}`, { as: lead.token })).status).toBe(200);
  expect((await trailOf(leaver.id)).at(-1)).toMatchObject({
    action: 'deactivate',
    actorId: steward.id,
    detail: { sessions: 1, tokensRevoked: 1, invitationsRevoked: [invited.id] },
  });

  expect(await json(change(leaver.id, { state: 'active' }))).toMatchObject({ state: 'active', deactivatedAt: null });
  // What was ended stays ended; the person signs in again.
  expect((await call('GET', '/api/labs', { headers: cookie })).status).toBe(401);
  expect((await call('GET', '/api/labs', { as: leaver.token })).status).toBe(401);
  expect((await call('GET', '/api/labs', { session: leaver.id })).status).toBe(200);
  expect((await trailOf(leaver.id)).at(-1)).toMatchObject({ action: 'reactivate' });
});

test('nobody deactivates themselves, and a steward is always left', async () => {
  expect((await change(steward.id, { state: 'deactivated' })).status).toBe(409);
  expect(await json(change(steward.id, { steward: false }), 409)).toMatchObject({
    detail: expect.stringContaining('only active steward'),
  });
  const other = await person('Otto Other');
  expect(await json(change(other.id, { steward: true }))).toMatchObject({ steward: true });
  expect((await call('GET', '/api/accounts', { session: other.id })).status).toBe(200);
  await json(change(other.id, { state: 'deactivated' }));
  // A deactivated steward does not count.
  expect((await change(steward.id, { steward: false })).status).toBe(409);
  await json(change(other.id, { state: 'active' }));
  expect(await json(change(other.id, { steward: false }))).toMatchObject({ steward: false });
  expect((await call('GET', '/api/accounts', { session: other.id })).status).toBe(403);
  await json(change(other.id, { state: 'deactivated' }));
  expect((await change(other.id, { steward: true })).status).toBe(409);
});

test('who stops being steward takes back what only a steward may send', async () => {
  const other = await person('Ines Invites', { steward: true });
  await json(
    call('POST', `/api/labs/${north}/invitations`, {
      session: other.id,
      json: { email: 'by-steward@test.example', role: 'lead' },
    }),
    201,
  );
  expect(await read(other.id)).toMatchObject({ invitations: 1 });
  expect(await json(change(other.id, { steward: false }))).toMatchObject({ invitations: 0 });
});

test('a name is corrected, an address never, and nothing else is taken', async () => {
  const other = await person('Nina Nmae');
  expect(await json(change(other.id, { name: 'Nina Name' }))).toMatchObject({ name: 'Nina Name' });
  expect((await change(other.id, { email: 'new@test.example' })).status).toBe(422);
  expect((await change(other.id, { password: 'a new long password' })).status).toBe(422);
  expect((await call('GET', path('nobody'), { session: steward.id })).status).toBe(404);
});

test('a steward signs a person out everywhere; tokens stay, and an own session stays', async () => {
  const other = await person('Sam Sessions', { labs: { [north]: 'contributor' } });
  const [one, two] = [await sessionHeaders(other.id), await sessionHeaders(other.id)];
  const end = (id: string, headers: Record<string, string>) =>
    json(call('POST', `${path(id)}/end-sessions`, { headers }));
  const own = await sessionHeaders(steward.id);
  expect(await end(other.id, own)).toEqual({ ended: 2 });
  for (const headers of [one, two]) expect((await call('GET', '/api/labs', { headers })).status).toBe(401);
  expect((await call('GET', '/api/labs', { as: other.token })).status).toBe(200);
  await end(steward.id, own);
  expect(await end(steward.id, own)).toEqual({ ended: 0 });
  expect((await trailOf(other.id)).at(-1)).toMatchObject({ action: 'end-sessions', detail: { ended: 2 } });
});

test('a steward has a reset link mailed and never learns it', async () => {
  const other = await person('Rita Reset');
  const reset = () => call('POST', `${path(other.id)}/password-reset`, { session: steward.id });
  const answer = await reset();
  expect([answer.status, await answer.text()]).toEqual([204, '']);
  const [mail] = await mailsTo(other.email);
  expect(mail).toMatchObject({ kind: 'password-reset' });
  await json(change(other.id, { state: 'deactivated' }));
  expect((await reset()).status).toBe(409);
  expect(await mailsTo(other.email)).toHaveLength(1);
});

test('drafts of another lab are listed too, and registered records are not', async () => {
  const south = await lab('South');
  const maker = await person('Mia Maker', { labs: { [north]: 'contributor', [south]: 'contributor' } });
  await draftComplex(maker.token, north, '[Rh(NH3)6]3+');
  await draftComplex(maker.token, south, '[Ir(NH3)6]3+');
  await complex({ lab: north, maker: maker.id }, 900);
  expect((await read(maker.id)).drafts.map(({ name }) => name)).toEqual(['[Rh(NH3)6]3+', '[Ir(NH3)6]3+']);
});
