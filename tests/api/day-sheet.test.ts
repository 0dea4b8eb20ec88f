import { afterAll, beforeAll, expect, test } from 'vitest';
import type { DaySheet } from '#src/contracts/day-sheet.ts';
import { call, json, openRegistry } from './harness.ts';
import { askerBy, lab, person } from './people.ts';

type Person = Awaited<ReturnType<typeof person>>;
let registry: Awaited<ReturnType<typeof openRegistry>>;
let north: string;
let south: string;
let maker: Person;
let northLead: Person;
let southLead: Person;
let southMember: Person;
let guest: Person;

const sheetOf = async ({ token }: Person): Promise<DaySheet> => {
  const { daySheet } = await import('#src/server/day-sheet/day-sheet.ts');
  return daySheet(await askerBy(token));
};
const complex = async (formula: string, rest: object = {}) => {
  const body = { formula, geometry: 'OC-6', lab: north, ...rest };
  const made = await json<{ accession: string }>(call('POST', '/api/complexes', { as: maker.token, json: body }), 201);
  return made.accession;
};

/** Upload a scan with one proposed d–d band, by the maker. */
async function spectrum(accession: string, visibility: 'programme' | 'lab' = 'programme'): Promise<string> {
  const rows = Array.from({ length: 200 }, (_, i) => [400 + i, Math.exp(-(((i - 100) / 30) ** 2))]);
  const form = new FormData();
  const text = `Wavelength (nm),Absorbance\n${rows.map((row) => row.join(',')).join('\n')}\n`;
  form.set('file', new File([`${text}# ${accession} ${visibility}`], 'scan.csv', { type: 'text/csv' }));
  const conditions = { technique: 'solution', solvent: 'water', concentration: 0.01, pathLength: 1 };
  form.set('metadata', JSON.stringify({ complex: accession, lab: north, visibility, ...conditions }));
  const { id } = await json<{ id: string }>(call('POST', '/api/spectra', { as: maker.token, form }), 201);
  const band = { wavenumber: 20_000, height: 100, quantity: 'epsilon', found: 'picked' };
  const bands = [
    { ...band, assignment: { class: 'd-d', from: '4A2g', to: '4T2g' } },
    { ...band, wavenumber: 22_000, assignment: { class: 'unassigned' } },
  ];
  await json(call('PUT', `/api/spectra/${id}/bands`, { as: maker.token, json: bands }));
  return id;
}

beforeAll(async () => {
  registry = await openRegistry();
  north = await lab('North');
  south = await lab('South');
  maker = await person('Maker', { labs: { [north]: 'contributor' } });
  northLead = await person('North Lead', { labs: { [north]: 'lead' } });
  southLead = await person('South Lead', { labs: { [south]: 'lead' } });
  southMember = await person('South Member', { labs: { [south]: 'contributor' } });
  guest = await person('Guest');
});
afterAll(() => registry.close());

test('drafts are the maker’s own: a lead who sees them is not told to finish them', async () => {
  const accession = await complex('[V(H2O)6]2+', { state: 'draft' });
  expect((await sheetOf(maker)).drafts).toMatchObject({ total: 1, items: [{ accession, lab: 'North' }] });
  expect((await sheetOf(northLead)).drafts.total).toBe(0);
});

test('proposed assignments wait for who may attest them and sees them, never for who proposed', async () => {
  const open = await spectrum(await complex('[Cr(NH3)6]3+'));
  const hidden = await spectrum(await complex('[Co(NH3)6]3+', { visibility: 'lab' }), 'lab');

  const ofNorth = (await sheetOf(northLead)).toAttest;
  expect(ofNorth.items.map(({ id }) => id).sort()).toEqual([open, hidden].sort());
  // The band without a class is no assignment.
  expect(ofNorth.items.find(({ id }) => id === open)).toMatchObject({ bands: 1, classes: ['d-d'], lab: 'North' });

  expect((await sheetOf(southLead)).toAttest).toMatchObject({ total: 1, items: [{ id: open }] });
  expect((await sheetOf(maker)).toAttest.total).toBe(0);
  expect((await sheetOf(southMember)).toAttest.total).toBe(0);
});

test('a contributor of another lab is asked once the measuring lab allows it', async () => {
  const url = `/api/labs/${north}`;
  await json(call('PATCH', url, { as: northLead.token, json: { outsideAttest: true }, headers: { 'if-match': '*' } }));
  expect((await sheetOf(southMember)).toAttest.total).toBe(1);
  expect((await sheetOf(maker)).toAttest.total).toBe(0);
});

test('what was attested waits no longer', async () => {
  const [waiting] = (await sheetOf(southLead)).toAttest.items;
  const bands = await json<{ id: string; assignment: { class: string } }[]>(
    call('GET', `/api/spectra/${waiting!.id}/bands`, { as: southLead.token }),
  );
  const band = bands.find(({ assignment }) => assignment.class === 'd-d')!;
  await json(call('POST', `/api/bands/${band.id}/attest`, { as: southLead.token, json: {} }));
  expect((await sheetOf(southLead)).toAttest.total).toBe(0);
});

test('recent spectra are those in sight', async () => {
  expect((await sheetOf(maker)).recentSpectra).toHaveLength(2);
  expect((await sheetOf(southLead)).recentSpectra).toHaveLength(1);
});

test('invitations out are one’s own and without an answer', async () => {
  const invite = { email: 'new@partner.example', role: 'contributor' };
  const sent = await json<{ id: string }>(
    call('POST', `/api/labs/${north}/invitations`, { session: northLead.id, json: invite }),
    201,
  );
  expect((await sheetOf(northLead)).invitations).toMatchObject({ total: 1, items: [{ id: sent.id, to: 'North' }] });
  expect((await sheetOf(southLead)).invitations.total).toBe(0);
  await call('DELETE', `/api/invitations/${sent.id}`, { session: northLead.id });
  expect((await sheetOf(northLead)).invitations.total).toBe(0);
});

test('a guest gets the folios granted, with level and end, and nothing else', async () => {
  expect(await sheetOf(guest)).toMatchObject({ folios: [], recentSpectra: [], toAttest: { total: 0 } });
  const input = { name: 'Shared', lab: north, licence: 'CC-BY-4.0', items: [] };
  const folio = await json<{ id: string }>(call('POST', '/api/folios', { as: northLead.token, json: input }), 201);
  const { database } = await import('#src/server/database.ts');
  const { grants } = await import('#src/db/schema/index.ts');
  const given = { folioId: folio.id, accountId: guest.id, level: 'view' as const, grantedBy: northLead.id };
  await (await database()).write((tx) =>
    tx.insert(grants).values({
      ...given,
      id: 'grant-1',
      createdAt: '2026-01-01T00:00:00.000Z',
      expiresAt: '2999-01-01T00:00:00.000Z',
    }),
  );
  const sheet = await sheetOf(guest);
  expect(sheet.folios).toMatchObject([{ id: folio.id, access: 'view', expires: '2999-01-01T00:00:00.000Z' }]);
  expect(sheet.recentSpectra).toEqual([]);
});
