import { afterAll, beforeAll, expect, test } from 'vitest';
import { call, json, openRegistry } from './harness.ts';
import { lab, person } from './people.ts';
import { complex, spectrum } from './shared-content.ts';

type Lab = { id: string; name: string; members: number; complexes: number; spectra: number; role: string | null };
let registry: Awaited<ReturnType<typeof openRegistry>>;
let north: string;
let south: string;
let steward: Awaited<ReturnType<typeof person>>;
let lead: Awaited<ReturnType<typeof person>>;
let contributor: Awaited<ReturnType<typeof person>>;

beforeAll(async () => {
  registry = await openRegistry();
  [north, south] = [await lab('North'), await lab('South')];
  steward = await person('Steward', { steward: true });
  lead = await person('Zoe Lead', { labs: { [north]: 'lead' } });
  contributor = await person('Contributor', { labs: { [south]: 'contributor' } });
  await person('Abel', { labs: { [north]: 'contributor' } });
  const own = { lab: north, maker: lead.id };
  const open = await complex(own, 1);
  await complex(own, 2, { visibility: 'lab' });
  await spectrum(own, open.id);
  await spectrum(own, open.id, { visibility: 'lab', text: 'for North alone\n' });
});
afterAll(() => registry.close());

test('counts are over what the asker sees', async () => {
  const read = (as: string) => json<Lab>(call('GET', `/api/labs/${north}`, { as }));
  expect(await read(lead.token)).toMatchObject({ members: 2, complexes: 2, spectra: 2, role: 'lead' });
  expect(await read(contributor.token)).toMatchObject({ members: 2, complexes: 1, spectra: 1, role: null });
});

test('pages follow the names, and say where the next is', async () => {
  const first = await call('GET', '/api/labs?limit=1', { as: lead.token });
  const page = await json<{ items: Lab[]; total: number; next: string }>(first.clone());
  expect(page).toMatchObject({ items: [{ name: 'North' }], total: 2 });
  const link = /^<([^>]+)>; rel="next"$/.exec(first.headers.get('link')!)![1]!;
  expect(await json(call('GET', link, { as: lead.token }))).toMatchObject({ items: [{ name: 'South' }], next: null });
  expect((await call('GET', link, { as: contributor.token })).status).toBe(400);
});

test('people: leads first, addresses for those who lead', async () => {
  const read = (as: string) =>
    json<{ name: string; email: string | null }[]>(call('GET', `/api/labs/${north}/members`, { as }));
  expect((await read(lead.token)).map(({ name, email }) => [name, email])).toEqual([
    ['Zoe Lead', 'zoe.lead@test.example'],
    ['Abel', 'abel@test.example'],
  ]);
  expect((await read(contributor.token)).map(({ email }) => email)).toEqual([null, null]);
});

test('a steward adds a lab; a name is taken once', async () => {
  const answer = await call('POST', '/api/labs', { as: steward.token, json: { name: 'West', place: 'Pier 3' } });
  const { id } = await json<Lab>(answer.clone(), 201);
  expect(answer.headers.get('location')).toBe(`/api/labs/${id}`);
  expect((await call('POST', '/api/labs', { as: steward.token, json: { name: 'West' } })).status).toBe(409);
});

test('a change needs the state that was read', async () => {
  const patch = (headers: Record<string, string>, body: object = { outsideAttest: true }) =>
    call('PATCH', `/api/labs/${north}`, { as: lead.token, json: body, headers });
  expect((await patch({})).status).toBe(428);
  const etag = (await call('GET', `/api/labs/${north}`, { as: lead.token })).headers.get('etag')!;
  expect(await json(patch({ 'if-match': etag }))).toMatchObject({ outsideAttest: true });
  expect((await patch({ 'if-match': etag })).status).toBe(412);
  expect((await patch({ 'if-match': '*' }, { name: 'South' })).status).toBe(409);
  expect((await patch({ 'if-match': '*' }, { owner: 'me' })).status).toBe(422);
});
