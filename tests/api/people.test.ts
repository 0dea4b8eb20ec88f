import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { call, json, openRegistry } from './harness.ts';
import { lab, person } from './people.ts';
import { draftComplex, type Member, mailsTo, makeDraft, memberPath, sendFresh, trailOf } from './people-world.ts';
import { spectrum } from './shared-content.ts';

type Person = Awaited<ReturnType<typeof person>>;
let registry: Awaited<ReturnType<typeof openRegistry>>;
let steward: Person;
let north: string;
let lead: Person;
let second: Person;
let maker: Person;
let made = 0;

beforeAll(async () => {
  registry = await openRegistry();
  steward = await person('Steward', { steward: true });
});
afterAll(() => registry.close());

// A lab of its own for each test, with two leads and one who makes.
beforeEach(async () => {
  made += 1;
  north = await lab(`North ${made}`);
  lead = await person(`Lead ${made}`, { labs: { [north]: 'lead' } });
  second = await person(`Second ${made}`, { labs: { [north]: 'lead' } });
  maker = await person(`Maker ${made}`, { labs: { [north]: 'contributor' } });
});

const read = (who: Person, of: Person) => json<Member>(call('GET', memberPath(north, of.id), { session: who.id }));
const setRole = (by: Person, of: Person, role: string) => sendFresh('PATCH', memberPath(north, of.id), by.id, { role });
const remove = (by: Person, of: Person, query = '') => sendFresh('DELETE', memberPath(north, of.id) + query, by.id);
const metals = ['Ni', 'Co', 'Fe', 'Mn', 'Cr', 'V', 'Ru', 'Rh', 'Ir', 'Os'];
const draft = () => draftComplex(maker.token, north, `[${metals[made % 10]}(NH3)5(OH2)]2+`);

describe('roles', () => {
  test('a change needs the state that was read, and bites on the next request', async () => {
    const path = memberPath(north, maker.id);
    expect((await call('PATCH', path, { session: lead.id, json: { role: 'lead' } })).status).toBe(428);
    const etag = (await call('GET', path, { session: lead.id })).headers.get('etag')!;
    const patch = () =>
      call('PATCH', path, { session: lead.id, json: { role: 'lead' }, headers: { 'if-match': etag } });
    expect((await call('GET', `/api/labs/${north}/invitations`, { session: maker.id })).status).toBe(403);
    expect(await json(patch())).toMatchObject({ id: maker.id, role: 'lead', onlyLead: false });
    expect((await patch()).status).toBe(412);
    expect((await call('GET', `/api/labs/${north}/invitations`, { session: maker.id })).status).toBe(200);
    expect((await mailsTo(maker.email)).map(({ subject }) => subject)).toEqual([`You are a lead of North ${made} now`]);
    expect((await trailOf(north)).at(-1)).toMatchObject({
      action: 'change-role',
      detail: { account: maker.id, from: 'contributor', to: 'lead' },
    });
  });

  test('the only lead keeps the role, unless a steward takes it', async () => {
    await json(setRole(lead, second, 'contributor'));
    expect(await json(setRole(lead, lead, 'contributor'), 409)).toMatchObject({
      detail: expect.stringContaining('make another member lead first'),
    });
    expect((await remove(lead, lead)).status).toBe(409);
    expect(await read(lead, lead)).toMatchObject({ role: 'lead', onlyLead: true });
    expect(await json(setRole(steward, lead, 'contributor'))).toMatchObject({ role: 'contributor' });
  });

  test('a deactivated lead does not count as one', async () => {
    await json(sendFresh('PATCH', `/api/accounts/${second.id}`, steward.id, { state: 'deactivated' }));
    expect((await setRole(lead, lead, 'contributor')).status).toBe(409);
    const people = await json<Member[]>(call('GET', `/api/labs/${north}/members`, { as: maker.token }));
    expect(people.find(({ id }) => id === second.id)).toMatchObject({ state: 'deactivated' });
  });

  test('who stops leading takes back the invitations that only a lead may send', async () => {
    const south = await lab(`South ${made}`);
    await json(
      call('POST', `/api/labs/${south}/members`, { session: steward.id, json: { account: second.id, role: 'lead' } }),
      201,
    );
    const invite = (to: string, labId: string, by: Person) =>
      json<{ id: string }>(
        call('POST', `/api/labs/${labId}/invitations`, {
          session: by.id,
          json: { email: to, role: 'contributor' },
        }),
        201,
      );
    const lost = await invite(`lost${made}@test.example`, north, second);
    const kept = await invite(`kept${made}@test.example`, south, second);
    const others = await invite(`others${made}@test.example`, north, lead);
    const folio = await json<{ id: string }>(
      call('POST', '/api/folios', { session: second.id, json: { name: 'F', lab: north, licence: 'CC0-1.0' } }),
      201,
    );
    const guest = await json<{ id: string }>(
      call('POST', `/api/folios/${folio.id}/invitations`, {
        session: second.id,
        json: { email: `guest${made}@test.example` },
      }),
      201,
    );
    await json(setRole(lead, second, 'contributor'));
    const { database } = await import('#src/server/database.ts');
    const { invitations } = await import('#src/db/schema/index.ts');
    const rows = await (await database()).db.select().from(invitations);
    const revoked = (id: string) => rows.find((row) => row.id === id)!.revokedAt !== null;
    expect([lost, kept, others, guest].map(({ id }) => revoked(id))).toEqual([true, false, false, true]);
    expect((await trailOf(north)).at(-1)!.detail.invitationsRevoked).toEqual(
      expect.arrayContaining([lost.id, guest.id]),
    );
  });

  test('a contributor, a token and a lead of another lab decide on no role', async () => {
    const outsider = await person(`Out ${made}`, { labs: { [await lab(`Out ${made}`)]: 'lead' } });
    const patch = (caller: object) =>
      call('PATCH', memberPath(north, maker.id), { ...caller, json: { role: 'lead' }, headers: { 'if-match': '*' } });
    expect((await patch({ session: maker.id })).status).toBe(403);
    expect((await patch({ session: outsider.id })).status).toBe(403);
    expect((await patch({ as: lead.token })).status).toBe(403);
    expect((await sendFresh('PATCH', memberPath(north, outsider.id), lead.id, { role: 'lead' })).status).toBe(404);
    expect((await setRole(lead, maker, 'owner')).status).toBe(422);
  });
});

describe('leaving', () => {
  test('drafts go to the lead who removes, with their trail; what is registered keeps its maker', async () => {
    const accession = await draft();
    const registered = await json<{ accession: string }>(
      call('POST', '/api/complexes', {
        as: maker.token,
        json: { formula: `[${metals[made % 10]}F(NH3)5]2+`, geometry: 'OC-6', lab: north },
      }),
      201,
    );
    const body = { label: `P ${made}`, lab: north };
    const preparation = await json<{ id: string }>(
      call('POST', `/api/complexes/${registered.accession}/preparations`, { as: maker.token, json: body }),
      201,
    );
    await makeDraft('preparations', preparation.id);
    const { database } = await import('#src/server/database.ts');
    const { complexes } = await import('#src/db/schema/index.ts');
    const { eq } = await import('drizzle-orm');
    const { db } = await database();
    const rowOf = async (name: string) => (await db.select().from(complexes).where(eq(complexes.accession, name)))[0]!;
    const measured = await spectrum({ lab: north, maker: maker.id }, (await rowOf(registered.accession)).id);
    await makeDraft('spectra', measured.id);

    const counts = { complexes: 1, preparations: 1, spectra: 1 };
    expect(await read(lead, maker)).toMatchObject({ email: maker.email, drafts: counts });
    expect(await read(maker, maker)).toMatchObject({ drafts: counts });
    expect(await read(maker, lead)).toMatchObject({ email: null, drafts: null });

    const before = await rowOf(accession);
    expect((await call('DELETE', memberPath(north, maker.id), { session: lead.id })).status).toBe(428);
    expect(await json(remove(lead, maker))).toEqual({
      drafts: counts,
      draftsTo: { id: lead.id, name: `Lead ${made}` },
      tokens: 0,
      invitations: 0,
    });
    const after = await rowOf(accession);
    expect(after).toMatchObject({ makerId: lead.id, state: 'draft', version: before.version + 1 });
    expect((await rowOf(registered.accession)).makerId).toBe(maker.id);
    for (const id of [after.id, preparation.id, measured.id])
      expect((await trailOf(id)).at(-1)).toMatchObject({
        action: 'hand-over',
        detail: { from: maker.id, to: lead.id },
      });
    expect((await call('GET', `/api/complexes/${accession}`, { as: maker.token })).status).toBe(404);
    expect((await call('GET', `/api/complexes/${accession}`, { as: lead.token })).status).toBe(200);
    expect((await mailsTo(maker.email)).at(-1)!.subject).toBe(`You are no longer a member of North ${made}`);
  });

  test('who leaves names who gets the drafts, a member of the lab only', async () => {
    const accession = await draft();
    const outsider = await person(`Elsewhere ${made}`, { labs: { [await lab(`Else ${made}`)]: 'lead' } });
    for (const to of [outsider.id, maker.id, 'nobody'])
      expect(await json(remove(maker, maker, `?draftsTo=${to}`), 400)).toMatchObject({
        errors: [{ pointer: '#/draftsTo' }],
      });
    const left = await json<{ draftsTo: { id: string } }>(remove(maker, maker, `?draftsTo=${second.id}`));
    expect(left.draftsTo.id).toBe(second.id);
    expect((await call('GET', `/api/complexes/${accession}`, { as: second.token })).status).toBe(200);
    expect((await trailOf(north)).at(-1)).toMatchObject({ action: 'leave', actorId: maker.id });
    expect(await mailsTo(maker.email)).toEqual([]);
  });

  test('without a name, the lead who serves longest gets them', async () => {
    const accession = await draft();
    expect(await json(remove(maker, maker))).toMatchObject({ draftsTo: { id: lead.id } });
    expect((await call('GET', `/api/complexes/${accession}`, { as: lead.token })).status).toBe(200);
  });

  test('a draft that nobody took waits for the next lead, out of the sight of who left', async () => {
    const empty = await lab(`Alone ${made}`);
    const alone = await person(`Alone ${made}`, { labs: { [empty]: 'lead', [north]: 'contributor' } });
    const accession = await draftComplex(alone.token, empty, '[Mo(NH3)5(OH2)]3+');
    const left = sendFresh('DELETE', memberPath(empty, alone.id), steward.id);
    expect(await json(left)).toMatchObject({ drafts: { complexes: 1 }, draftsTo: null });
    const open = (as: string) => call('GET', `/api/complexes/${accession}`, { as });
    expect((await open(alone.token)).status).toBe(404);
    expect((await open(steward.token)).status).toBe(200);
    await json(
      call('POST', `/api/labs/${empty}/members`, { session: steward.id, json: { account: lead.id, role: 'lead' } }),
      201,
    );
    expect((await open(lead.token)).status).toBe(200);
  });

  test('tokens for the lab end with the membership, others stay; the lab is out of reach at once', async () => {
    const token = (more: object) =>
      json<{ token: string }>(
        call('POST', '/api/tokens', {
          session: maker.id,
          json: { name: 't', scopes: ['read'], expires: '2027-06-01', ...more },
        }),
        201,
      );
    const ofLab = await token({ lab: north });
    const general = await token({});
    expect(await json(remove(second, maker))).toMatchObject({ tokens: 1 });
    expect((await call('GET', '/api/complexes', { as: ofLab.token })).status).toBe(401);
    expect((await call('GET', '/api/complexes', { as: general.token })).status).toBe(200);
    // Without another lab the person is a guest from now on.
    expect((await call('GET', `/api/labs/${north}`, { as: maker.token })).status).toBe(403);
  });

  test('nobody but a lead removes another', async () => {
    const body = { headers: { 'if-match': '*' } };
    expect((await call('DELETE', memberPath(north, lead.id), { session: maker.id, ...body })).status).toBe(403);
    expect((await call('DELETE', memberPath(north, maker.id), { as: lead.token, ...body })).status).toBe(403);
  });
});

describe('adding', () => {
  const add = (session: string, account: string, role = 'contributor') =>
    call('POST', `/api/labs/${north}/members`, { session, json: { account, role } });

  test('a steward moves somebody: in here, out there', async () => {
    const south = await lab(`South of ${made}`);
    const mover = await person(`Mover ${made}`, { labs: { [south]: 'contributor' } });
    const added = await add(steward.id, mover.id);
    expect(added.headers.get('location')).toBe(memberPath(north, mover.id));
    expect(await json(added, 201)).toMatchObject({ id: mover.id, role: 'contributor', drafts: { complexes: 0 } });
    await json(sendFresh('DELETE', memberPath(south, mover.id), steward.id));
    const labs = await json<{ items: { id: string; role: string | null }[] }>(
      call('GET', '/api/labs?limit=500', { as: mover.token }),
    );
    expect(labs.items.filter(({ role }) => role !== null).map(({ id }) => id)).toEqual([north]);
    expect((await mailsTo(mover.email))[0]).toMatchObject({ subject: `You are a contributor of North ${made} now` });
  });

  test('not twice, not somebody deactivated or unknown, and only by a steward', async () => {
    expect((await add(steward.id, maker.id)).status).toBe(409);
    expect(await json(add(steward.id, 'nobody'), 422)).toMatchObject({ errors: [{ pointer: '#/account' }] });
    const gone = await person(`Gone ${made}`);
    await json(sendFresh('PATCH', `/api/accounts/${gone.id}`, steward.id, { state: 'deactivated' }));
    expect(await json(add(steward.id, gone.id), 422)).toMatchObject({ detail: 'This account is deactivated' });
    expect((await add(lead.id, maker.id)).status).toBe(403);
  });
});
