import { afterAll, beforeAll, expect, test } from 'vitest';
import { call, json, openRegistry } from './harness.ts';
import { lab, person } from './people.ts';
import { complex, grant, spectrum } from './shared-content.ts';

type Person = Awaited<ReturnType<typeof person>>;
type Folio = { id: string; items: { accession: string; spectra: 'all' | string[] }[]; grants: unknown[] };
let registry: Awaited<ReturnType<typeof openRegistry>>;
let north: string;
let south: string;
let lead: Person;
let maker: Person;
let other: Person;
let guest: Person;
const made: Record<'open' | 'second' | 'southern', { id: string; accession: string }> = {} as never;
let measured: Awaited<ReturnType<typeof spectrum>>;

const folio = (as: string, body: object = {}) =>
  json<Folio>(
    call('POST', '/api/folios', { as, json: { name: 'Aqua ions', lab: north, licence: 'CC-BY-4.0', ...body } }),
    201,
  );
const read = (as: string, id: string) => call('GET', `/api/folios/${id}`, { as });

beforeAll(async () => {
  registry = await openRegistry();
  [north, south] = [await lab('North'), await lab('South')];
  lead = await person('Lead', { labs: { [north]: 'lead' } });
  maker = await person('Maker', { labs: { [north]: 'contributor' } });
  other = await person('Other', { labs: { [south]: 'lead' } });
  guest = await person('Guest');
  made.open = await complex({ lab: north, maker: lead.id }, 1);
  made.second = await complex({ lab: north, maker: lead.id }, 2);
  made.southern = await complex({ lab: south, maker: other.id }, 3, { visibility: 'lab' });
  measured = await spectrum({ lab: north, maker: lead.id }, made.open.id);
});
afterAll(() => registry.close());

test('holds what its maker sees, in the order given', async () => {
  const items = [
    { accession: made.second.accession, spectra: 'all' },
    { accession: made.open.accession.toLowerCase().replace('-', ''), spectra: [measured.id] },
  ];
  const { id } = await folio(maker.token, { items });
  expect(await json(read(lead.token, id))).toMatchObject({
    items: [
      { accession: made.second.accession, spectra: 'all' },
      { accession: made.open.accession, spectra: [measured.id] },
    ],
    shows: 'attested',
    level: null,
    may: { change: true, invite: false, download: true },
  });
});

test('nothing out of sight can be put in, nor a spectrum of another complex, nor anything twice', async () => {
  const faults = async (items: object[]) => {
    const answer = call('POST', '/api/folios', {
      as: lead.token,
      json: { name: 'X', lab: north, licence: 'CC0-1.0', items },
    });
    return (await json<{ errors: { pointer: string }[] }>(answer, 422)).errors.map((error) => error.pointer);
  };
  expect(await faults([{ accession: made.southern.accession, spectra: 'all' }])).toEqual(['#/items/0/accession']);
  expect(await faults([{ accession: made.second.accession, spectra: [measured.id] }])).toEqual(['#/items/0/spectra/0']);
  expect(await faults([{ accession: made.open.accession }, { accession: made.open.accession }])).toEqual(['#/items/1']);
});

test('what was granted cannot be passed on', async () => {
  const theirs = await folio(other.token, {
    lab: south,
    items: [{ accession: made.southern.accession, spectra: 'all' }],
  });
  await grant(theirs.id, lead.id, 'download', other.id);
  await json(read(lead.token, theirs.id));
  const items = [{ accession: made.southern.accession, spectra: 'all' }];
  const { id } = await folio(lead.token);
  expect((await call('PUT', `/api/folios/${id}/items`, { as: lead.token, json: items })).status).toBe(422);
});

test('a guest reads what is granted, at its level, until it ends or is revoked', async () => {
  const { id } = await folio(lead.token, { items: [{ accession: made.open.accession, spectra: 'all' }] });
  expect((await read(guest.token, id)).status).toBe(404);
  const grantId = await grant(id, guest.id, 'view', lead.id, '2998-01-01T00:00:00.000Z');
  expect(await json(read(guest.token, id))).toMatchObject({
    items: [{ accession: made.open.accession }],
    grants: [],
    level: 'view',
    expires: '2998-01-01T00:00:00.000Z',
    may: { change: false, invite: false, download: false },
  });
  expect(await json(call('GET', '/api/folios', { as: guest.token }))).toMatchObject({ total: 1, items: [{ id }] });
  expect((await json<Folio>(read(lead.token, id))).grants).toHaveLength(1);
  expect((await json<Folio>(read(maker.token, id))).grants).toEqual([]);
  expect((await call('DELETE', `/api/folios/${id}/grants/${grantId}`, { session: maker.id })).status).toBe(403);
  expect((await call('DELETE', `/api/folios/${id}/grants/${grantId}`, { session: lead.id })).status).toBe(204);
  const shut = await read(guest.token, id);
  const never = await read(guest.token, '00000000-0000-7000-8000-000000000000');
  expect([shut.status, await shut.text()]).toEqual([404, await never.text()]);
  expect(await json(call('GET', `/api/folios/${id}/grants`, { as: lead.token }))).toMatchObject([{ revoked: true }]);
});

test('an embargo shuts guests out, and them alone', async () => {
  const { id } = await folio(lead.token);
  await grant(id, guest.id, 'download', lead.id);
  await json(read(guest.token, id));
  const patch = (embargoUntil: string | null) =>
    json(call('PATCH', `/api/folios/${id}`, { as: lead.token, json: { embargoUntil }, headers: { 'if-match': '*' } }));
  await patch('2998-05-01T00:00:00Z');
  expect((await read(guest.token, id)).status).toBe(404);
  expect(await json(read(maker.token, id))).toMatchObject({ embargoUntil: '2998-05-01T00:00:00.000Z' });
  await patch('2020-05-01T00:00:00Z');
  await json(read(guest.token, id));
});

test('who made it changes it as long as they work there; others of the lab do not', async () => {
  const { id } = await folio(maker.token);
  const second = await person('Second', { labs: { [north]: 'contributor' } });
  const patch = async (as: string, tag = '*') =>
    (await call('PATCH', `/api/folios/${id}`, { as, json: { name: 'Renamed' }, headers: { 'if-match': tag } })).status;
  const etag = (await read(maker.token, id)).headers.get('etag')!;
  expect(await patch(second.token)).toBe(403);
  expect(await patch(maker.token, etag)).toBe(200);
  expect(await patch(maker.token, etag)).toBe(412);
  expect(await patch(other.token)).toBe(404);
});

test('new content leaves alone what others put in out of sight of who writes', async () => {
  const steward = await person('Steward', { steward: true });
  const writer = await person('Writer', { labs: { [north]: 'lead' } });
  const items = [{ accession: made.southern.accession }, { accession: made.open.accession }];
  const { id } = await folio(steward.token, { items });
  const put = [{ accession: made.second.accession }];
  const after = await json<Folio>(call('PUT', `/api/folios/${id}/items`, { as: writer.token, json: put }));
  expect(after.items).toEqual([{ accession: made.second.accession, spectra: 'all' }]);
  expect((await json<Folio>(read(steward.token, id))).items.map(({ accession }) => accession)).toEqual([
    made.second.accession,
    made.southern.accession,
  ]);
});
