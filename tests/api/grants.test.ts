import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { call, json, openRegistry } from './harness.ts';
import { lab, person } from './people.ts';
import { complex, grant } from './shared-content.ts';

let registry: Awaited<ReturnType<typeof openRegistry>>;
type Person = Awaited<ReturnType<typeof person>>;
type Request = { id: string; wants: string; outcome: string | null; settledAt: string | null };
let north: string;
let lead: Person;
let second: Person;
let item: { id: string; accession: string };

const DAY = 24 * 3600 * 1000;
const inDays = (days: number) => new Date(Date.now() + days * DAY).toISOString();

async function folioOf(): Promise<string> {
  const items = [{ accession: item.accession, spectra: 'all' }];
  const body = { name: 'Aqua ions', lab: north, licence: 'CC-BY-4.0', items };
  return (await json<{ id: string }>(call('POST', '/api/folios', { as: lead.token, json: body }), 201)).id;
}
const read = (as: string, folio: string) => call('GET', `/api/folios/${folio}`, { as });
const patch = (folio: string, id: string, body: object, tag = '*') =>
  call('PATCH', `/api/folios/${folio}/grants/${id}`, {
    session: lead.id,
    json: body,
    headers: { 'if-match': tag },
  });
const revoke = (folio: string, id: string) => call('DELETE', `/api/folios/${folio}/grants/${id}`, { session: lead.id });

beforeAll(async () => {
  registry = await openRegistry();
  north = await lab('North');
  lead = await person('Ada Lead', { labs: { [north]: 'lead' } });
  second = await person('Bo Lead', { labs: { [north]: 'lead' } });
  item = await complex({ lab: north, maker: lead.id }, 1);
});
afterAll(() => registry.close());

describe('a grant', () => {
  test('changes at the next request, under the version that was read', async () => {
    const folio = await folioOf();
    const guest = await person('Guest One');
    const id = await grant(folio, guest.id, 'download', lead.id);
    const found = await call('GET', `/api/folios/${folio}/grants/${id}`, { as: lead.token });
    const tag = found.headers.get('etag')!;
    expect(await json(found)).toMatchObject({ id, email: guest.email, level: 'download', grantedBy: 'Ada Lead' });
    expect(await json(read(guest.token, folio))).toMatchObject({ may: { download: true } });
    const expires = inDays(30);
    expect(await json(patch(folio, id, { level: 'view', expires }, tag))).toMatchObject({ level: 'view', expires });
    expect(await json(read(guest.token, folio))).toMatchObject({ may: { download: false }, expires });
    expect((await patch(folio, id, { level: 'download' }, tag)).status).toBe(412);
    const without = { session: lead.id, json: { level: 'view' } };
    expect((await call('PATCH', `/api/folios/${folio}/grants/${id}`, without)).status).toBe(428);
  });

  test('ends in time to come, within five years', async () => {
    const folio = await folioOf();
    const guest = await person('Guest Two');
    const id = await grant(folio, guest.id, 'view', lead.id);
    for (const expires of [inDays(-1), inDays(6 * 366)]) {
      const { errors } = await json<{ errors: { pointer: string }[] }>(patch(folio, id, { expires }), 422);
      expect(errors.map(({ pointer }) => pointer)).toEqual(['#/expires']);
    }
  });

  test('whose time is over can be renewed, one that was revoked cannot', async () => {
    const folio = await folioOf();
    const guest = await person('Guest Three');
    const id = await grant(folio, guest.id, 'view', lead.id, inDays(-1));
    expect((await read(guest.token, folio)).status).toBe(404);
    await json(patch(folio, id, { expires: inDays(10) }));
    expect((await read(guest.token, folio)).status).toBe(200);
    expect((await revoke(folio, id)).status).toBe(204);
    expect((await patch(folio, id, { expires: inDays(10) })).status).toBe(409);
    expect((await read(guest.token, folio)).status).toBe(404);
  });

  test('accepted before licences were noted is one of the licence that held until it changed', async () => {
    const folio = await folioOf();
    const guest = await person('Guest Before');
    const id = await grant(folio, guest.id, 'view', lead.id);
    const { write, grants, eq } = await tables();
    const termsAcceptedAt = '2026-11-01T00:00:00.000Z';
    await write((tx) => tx.update(grants).set({ termsAcceptedAt }).where(eq(grants.id, id)));
    expect(await json(read(guest.token, folio))).toMatchObject({ terms: { isCurrent: true } });
    const body = { json: { licence: 'CC0-1.0' }, headers: { 'if-match': '*' } };
    await json(call('PATCH', `/api/folios/${folio}`, { as: lead.token, ...body }));
    expect(await json(read(guest.token, folio))).toMatchObject({
      terms: { acceptedAt: termsAcceptedAt, licence: 'CC-BY-4.0', isCurrent: false },
    });
  });

  test('that is ended by hand tells the guest once, and whom to write to', async () => {
    const folio = await folioOf();
    const guest = await person('Guest Four');
    const id = await grant(folio, guest.id, 'view', second.id);
    await revoke(folio, id);
    await revoke(folio, id);
    expect(await mailsTo(guest.email)).toEqual([
      expect.objectContaining({
        kind: 'access-ended',
        subject: 'Your access to "Aqua ions" ended',
        text: expect.stringContaining('Bo Lead (bo.lead@test.example), North, can renew it.'),
      }),
    ]);
  });

  test('that ends while another goes on is no news', async () => {
    const folio = await folioOf();
    const guest = await person('Guest Five');
    const id = await grant(folio, guest.id, 'view', lead.id);
    await grant(folio, guest.id, 'download', lead.id);
    await revoke(folio, id);
    expect((await read(guest.token, folio)).status).toBe(200);
    expect(await mailsTo(guest.email)).toEqual([]);
  });
});

describe('access that ended', () => {
  const sheetOf = async (who: Person) => {
    const { daySheet } = await import('#src/server/day-sheet/day-sheet.ts');
    const { askerBy } = await import('./people.ts');
    return daySheet(await askerBy(who.token));
  };
  const told = async (who: Person | null, path: string) => {
    const { endedAt } = await import('#src/server/folios/ended.ts');
    const { askerBy } = await import('./people.ts');
    return endedAt(who && (await askerBy(who.token)), path);
  };

  test('is told to who had it and to nobody else; the API answers all alike', async () => {
    const folio = await folioOf();
    const [had, never, has] = [await person('Had'), await person('Never'), await person('Has')];
    const id = await grant(folio, had.id, 'view', lead.id);
    await grant(folio, has.id, 'view', lead.id);
    expect(await told(had, `/folios/${folio}`)).toBeNull();
    await revoke(folio, id);
    expect(await told(had, `/folios/${folio}`)).toMatchObject({
      name: 'Aqua ions',
      lab: 'North',
      contact: 'Ada Lead',
      mayAsk: true,
    });
    for (const who of [never, has, lead, null]) expect(await told(who, `/folios/${folio}`)).toBeNull();
    for (const path of ['/folios/00000000-0000-7000-8000-000000000000', '/folios', `/folios/${folio}/more`, '/'])
      expect(await told(had, path), path).toBeNull();
    const answers = await Promise.all(
      [had, never].map(async ({ token }) => {
        const answer = await read(token, folio);
        return [answer.status, await answer.text()];
      }),
    );
    expect(answers[0]).toEqual(answers[1]);
    expect((await sheetOf(had)).ended).toMatchObject([{ id: folio, name: 'Aqua ions', contact: 'Ada Lead' }]);
    expect((await sheetOf(never)).ended).toEqual([]);
  });

  test('tells the name that the folio had then', async () => {
    const folio = await folioOf();
    const guest = await person('Had Once');
    await revoke(folio, await grant(folio, guest.id, 'view', lead.id));
    // Renamed in another millisecond than the end.
    await new Promise((done) => setTimeout(done, 5));
    const body = { json: { name: 'Secret plans' }, headers: { 'if-match': '*' } };
    await json(call('PATCH', `/api/folios/${folio}`, { as: lead.token, ...body }));
    expect(await told(guest, `/folios/${folio}`)).toMatchObject({ name: 'Aqua ions' });
    expect((await sheetOf(guest)).ended).toMatchObject([{ name: 'Aqua ions' }]);
  });

  test('of a record is told to who opened it', async () => {
    const folio = await folioOf();
    const [opened, closed] = [await person('Opened'), await person('Closed')];
    const ids = [await grant(folio, opened.id, 'view', lead.id), await grant(folio, closed.id, 'view', lead.id)];
    const { db, write, accessLog, complexes, eq } = await tables();
    const [row] = await db.select().from(complexes).where(eq(complexes.accession, item.accession));
    const at = new Date().toISOString();
    const look = { kind: 'look' as const, subjectType: 'complex' as const, subjectId: row!.id, day: at.slice(0, 10) };
    await write((tx) =>
      tx.insert(accessLog).values({ accountId: opened.id, ...look, count: 1, firstAt: at, lastAt: at }),
    );
    for (const id of ids) await revoke(folio, id);
    expect(await told(opened, `/complexes/${item.accession}`)).toMatchObject({ id: folio });
    expect(await told(closed, `/complexes/${item.accession}`)).toBeNull();
  });

  test('is forgotten by the day sheet after ninety days', async () => {
    const folio = await folioOf();
    const guest = await person('Long Ago');
    await grant(folio, guest.id, 'view', lead.id, inDays(-91));
    expect((await sheetOf(guest)).ended).toEqual([]);
    expect(await told(guest, `/folios/${folio}`)).toMatchObject({ mayAsk: false });
    const ask = { session: guest.id, json: { wants: 'longer' } };
    expect((await call('POST', `/api/folios/${folio}/requests`, ask)).status).toBe(404);
  });
});

describe('a request for more', () => {
  const ask = (who: Person, folio: string, body: object) =>
    call('POST', `/api/folios/${folio}/requests`, { session: who.id, json: body });
  const settle = (id: string, body: object, by = lead) =>
    call('POST', `/api/requests/${id}/settle`, { session: by.id, json: body });
  const asked = (folio: string) => json<Request[]>(call('GET', `/api/folios/${folio}/requests`, { session: lead.id }));

  test('for downloads opens them with the answer, and everybody is told', async () => {
    const folio = await folioOf();
    const guest = await person('Asks Downloads');
    await grant(folio, guest.id, 'view', lead.id, '2998-01-01T00:00:00.000Z');
    const { id } = await json<Request>(ask(guest, folio, { wants: 'download', message: 'For our fits' }), 201);
    expect(await asked(folio)).toMatchObject([{ id, wants: 'download', message: 'For our fits', settledAt: null }]);
    expect(await json(read(guest.token, folio))).toMatchObject({ asked: [{ id, wants: 'download' }] });
    for (const { email } of [lead, second])
      expect((await mailsTo(email)).filter(({ text }) => text.includes('For our fits'))).toHaveLength(1);
    const { daySheet } = await import('#src/server/day-sheet/day-sheet.ts');
    const { askerBy } = await import('./people.ts');
    expect((await daySheet(await askerBy(lead.token))).requests.items.map((row) => row.id)).toContain(id);

    expect(await json(settle(id, { outcome: 'granted', answer: 'Gladly' }))).toMatchObject({ outcome: 'granted' });
    expect(await json(read(guest.token, folio))).toMatchObject({
      level: 'download',
      expires: '2998-01-01T00:00:00.000Z',
      asked: [],
    });
    expect((await mailsTo(guest.email)).map(({ text }) => text)).toEqual([expect.stringContaining('Gladly')]);
    expect((await settle(id, { outcome: 'declined' }, second)).status).toBe(409);
  });

  test('for a longer time adds a year', async () => {
    const folio = await folioOf();
    const guest = await person('Asks Longer');
    const ends = inDays(20);
    await grant(folio, guest.id, 'view', lead.id, ends);
    const { id } = await json<Request>(ask(guest, folio, { wants: 'longer' }), 201);
    await json(settle(id, { outcome: 'granted' }));
    const { expires } = await json<{ expires: string }>(read(guest.token, folio));
    expect(Date.parse(expires) - Date.parse(ends)).toBe(365 * DAY);
  });

  test.each(['by its time', 'by hand'])('opens again what ended %s', async (how) => {
    const folio = await folioOf();
    const guest = await person(`Ended ${how}`);
    const id = await grant(folio, guest.id, 'view', lead.id, how === 'by hand' ? inDays(5) : inDays(-3));
    if (how === 'by hand') await revoke(folio, id);
    expect((await read(guest.token, folio)).status).toBe(404);
    const request = await json<Request>(ask(guest, folio, { wants: 'longer' }), 201);
    expect((await read(guest.token, folio)).status).toBe(404);
    await json(settle(request.id, { outcome: 'granted' }));
    const { expires } = await json<{ expires: string }>(read(guest.token, folio));
    expect(expires.slice(0, 10)).toBe(inDays(365).slice(0, 10));
  });

  test('that is declined, or for something else, changes nothing', async () => {
    const folio = await folioOf();
    const guest = await person('Asks In Vain');
    await grant(folio, guest.id, 'view', lead.id, '2998-01-01T00:00:00.000Z');
    for (const [wants, outcome] of [
      ['download', 'declined'],
      ['other', 'granted'],
    ]) {
      const { id } = await json<Request>(ask(guest, folio, { wants }), 201);
      expect(await json(settle(id, { outcome }))).toMatchObject({ outcome });
      expect(await json(read(guest.token, folio))).toMatchObject({
        level: 'view',
        expires: '2998-01-01T00:00:00.000Z',
      });
    }
    expect(await mailsTo(guest.email)).toHaveLength(2);
  });

  test('waits: three of one guest about one folio at one time', async () => {
    const folio = await folioOf();
    const [guest, other] = [await person('Asks Much'), await person('Asks Little')];
    for (const { id } of [guest, other]) await grant(folio, id, 'view', lead.id);
    for (let i = 0; i < 3; i++) expect((await ask(guest, folio, { wants: 'other' })).status).toBe(201);
    expect((await ask(guest, folio, { wants: 'other' })).status).toBe(409);
    expect((await ask(other, folio, { wants: 'other' })).status).toBe(201);
    const first = (await asked(folio)).at(-1)!;
    await json(settle(first.id, { outcome: 'declined' }));
    expect((await ask(guest, folio, { wants: 'other' })).status).toBe(201);
  });
});

describe('deleting a folio', () => {
  const remove = (folio: string, tag = '*') =>
    call('DELETE', `/api/folios/${folio}`, { as: lead.token, headers: { 'if-match': tag } });

  test('waits until nobody outside reads it, and leaves the complexes', async () => {
    const folio = await folioOf();
    const guest = await person('Reads On');
    const id = await grant(folio, guest.id, 'download', lead.id);
    await json(call('POST', '/api/bundles', { as: guest.token, json: { folio } }), 202);
    expect((await remove(folio)).status).toBe(409);
    await revoke(folio, id);
    expect((await remove(folio, '"older"')).status).toBe(412);
    expect((await call('DELETE', `/api/folios/${folio}`, { as: lead.token })).status).toBe(428);
    expect((await remove(folio)).status).toBe(204);
    expect((await read(lead.token, folio)).status).toBe(404);
    expect((await call('GET', `/api/complexes/${item.accession}`, { as: lead.token })).status).toBe(200);
    const { db, jobs } = await tables();
    expect((await db.select().from(jobs)).map(({ state }) => state)).toEqual(['cancelled']);
  });

  test('ends its invitations', async () => {
    const { mailedToken } = await import('./shared-content.ts');
    const folio = await folioOf();
    const body = { email: 'late@test.example' };
    await json(call('POST', `/api/folios/${folio}/invitations`, { session: lead.id, json: body }), 201);
    const token = await mailedToken(body.email);
    expect((await remove(folio)).status).toBe(204);
    expect((await call('POST', '/api/invitations/preview', { json: { token } })).status).toBe(404);
  });
});

async function tables() {
  const { database } = await import('#src/server/database.ts');
  return { ...(await database()), ...(await import('#src/db/schema/index.ts')), ...(await import('drizzle-orm')) };
}

async function mailsTo(email: string) {
  const { db, mails, eq } = await tables();
  return db.select().from(mails).where(eq(mails.to, email));
}
