import { afterAll, beforeAll, expect, test } from 'vitest';
import type { Page } from '#src/contracts/common.ts';
import type { AccessLogRow, FolioReader } from '#src/contracts/oversight.ts';
import { call, json, openRegistry } from './harness.ts';
import { lab, person } from './people.ts';
import { complex, grant, spectrum } from './shared-content.ts';

type Person = Awaited<ReturnType<typeof person>>;
let registry: Awaited<ReturnType<typeof openRegistry>>;
let north: string;
let lead: Person;
let southLead: Person;
let contributor: Person;
let guest: Person;
let never: Person;
let steward: Person;
let made: { complex: { id: string; accession: string }; spectrum: { id: string }; folio: string };

beforeAll(async () => {
  registry = await openRegistry();
  north = await lab('North');
  const south = await lab('South');
  lead = await person('Lead', { labs: { [north]: 'lead' } });
  southLead = await person('South lead', { labs: { [south]: 'lead' } });
  contributor = await person('Contributor', { labs: { [north]: 'contributor' } });
  [guest, never, steward] = [await person('Guest'), await person('Never'), await person('Steward', { steward: true })];
  const owner = { lab: north, maker: contributor.id };
  const one = await complex(owner, 501);
  const other = await complex({ lab: south, maker: southLead.id }, 502);
  const curve = await spectrum(owner, one.id);
  const { id } = await json<{ id: string }>(
    call('POST', '/api/folios', {
      as: lead.token,
      json: {
        name: 'Aqua ions',
        lab: north,
        licence: 'CC-BY-4.0',
        shows: 'proposed',
        items: [{ accession: one.accession, spectra: 'all' }],
      },
    }),
    201,
  );
  made = { complex: one, spectrum: curve, folio: id };
  await grant(id, guest.id, 'download', lead.id);
  await grant(id, never.id, 'view', lead.id, '2020-01-01T00:00:00.000Z');
  await call('GET', `/api/complexes/${other.accession}`, { as: contributor.token });
});
afterAll(() => registry.close());

async function written() {
  const { flushAccessLog } = await import('#src/server/access-log.ts');
  await flushAccessLog();
}
async function log(who: Person, search = '') {
  await written();
  return json<Page<AccessLogRow>>(call('GET', `/api/access-log${search}`, { session: who.id }));
}
const brief = (page: Page<AccessLogRow>) =>
  page.items.map(({ kind, subject, count }) => `${kind} ${subject.type} ${count}`).sort();

test('looks and downloads are counted, one row a person, record and day; lists and refusals are not', async () => {
  const as = guest.token;
  const curve = `/api/spectra/${made.spectrum.id}`;
  for (const path of [
    `/api/complexes/${made.complex.accession}`,
    `/api/complexes/${made.complex.accession}`,
    curve,
    `${curve}/points`,
    `${curve}/points?max=200000`,
    `${curve}/file`,
    `${curve}/jcamp`,
    `/api/folios/${made.folio}`,
    '/api/complexes',
    '/api/folios',
  ])
    expect((await call('GET', path, { as })).status, path).toBe(200);
  await written();
  expect((await call('GET', `/api/complexes/${made.complex.accession}`, { as })).status).toBe(200);
  expect((await call('GET', '/api/spectra/unknown', { as })).status).toBe(404);

  const told = await log(steward, `?account=${guest.id}`);
  expect(brief(told)).toEqual(['download spectrum 3', 'look complex 3', 'look folio 1', 'look spectrum 2']);
  expect(told.items.find(({ subject }) => subject.type === 'complex')).toMatchObject({
    account: { name: 'Guest', email: guest.email },
    subject: { label: `${made.complex.accession} [Ni(OH2)6]2+`, href: `/complexes/${made.complex.accession}` },
    day: new Date().toISOString().slice(0, 10),
  });
});

test('a curve that was thinned for who may only look is no download', async () => {
  const { noteRead } = await import('#src/server/oversight/reads.ts');
  const { routes } = await import('#src/contracts/routes.ts');
  const { askerBy } = await import('./people.ts');
  const looker = await person('Looker');
  const asker = await askerBy(looker.token);
  const access = { spectrum: { id: made.spectrum.id } };
  const read = (points: number, decimated: boolean, max: number) =>
    noteRead(routes.readPoints as never, { asker, access, query: { max } }, { x: new Array(points), decimated });
  read(2000, true, 200_000);
  read(8000, true, 8000);
  expect(brief(await log(steward, `?account=${looker.id}`))).toEqual(['look spectrum 2']);
  read(9000, true, 9000);
  expect(brief(await log(steward, `?account=${looker.id}&kind=download`))).toEqual(['download spectrum 1']);
});

test('a bundle fetched in ranges is one download', async () => {
  const { noteRead } = await import('#src/server/oversight/reads.ts');
  const { routes } = await import('#src/contracts/routes.ts');
  const { askerBy } = await import('./people.ts');
  const { database } = await import('#src/server/database.ts');
  const { bundles } = await import('#src/db/schema/index.ts');
  const { newId, nowIso } = await import('#src/server/ids.ts');
  const bundle = {
    id: newId(),
    requestedBy: guest.id,
    folioId: made.folio,
    state: 'ready' as const,
    createdAt: nowIso(),
  };
  await (await database()).write((tx) => tx.insert(bundles).values(bundle));
  const asker = await askerBy(guest.token);
  const read = (status: number, range?: string) =>
    noteRead(
      routes.readBundleFile as never,
      { asker, access: { bundle }, query: {} },
      new Response(null, { status, headers: range ? { 'content-range': range } : {} }),
    );
  read(206, 'bytes 0-99/300');
  read(206, 'bytes 100-199/300');
  read(304);
  const told = await log(lead, '?subjectType=bundle');
  expect(brief(told)).toEqual(['download bundle 1']);
  expect(told.items[0]!.subject).toMatchObject({ label: 'bundle of Aqua ions', href: `/folios/${made.folio}` });
});

test("a lead sees what is the own lab's, a steward all, others nothing", async () => {
  expect((await log(lead)).items.every(({ subject }) => subject.label !== null)).toBe(true);
  const ofSouth = await log(southLead);
  expect(ofSouth.items.map(({ account, subject }) => [account.name, subject.type])).toEqual([
    ['Contributor', 'complex'],
  ]);
  expect((await log(lead)).items.some(({ account }) => account.name === 'Contributor')).toBe(false);
  expect((await log(steward)).total).toBe((await log(lead)).total + ofSouth.total);
  const { accession } = made.complex;
  for (const search of [`?complex=${accession}`, `?spectrum=${made.spectrum.id}`, `?folio=${made.folio}`]) {
    expect((await log(lead, search)).total, search).toBeGreaterThan(0);
    expect((await call('GET', `/api/access-log${search}`, { session: southLead.id })).status, search).toBe(404);
  }
  expect((await call('GET', '/api/access-log', { session: contributor.id })).status).toBe(403);
  expect((await call('GET', '/api/access-log', { as: steward.token })).status).toBe(403);
});

test('is turned page by page, each row once', async () => {
  const all = await log(steward, '?limit=500');
  const seen: AccessLogRow[] = [];
  for (let next: string | null = ''; next !== null; ) {
    const page: Page<AccessLogRow> = await log(steward, `?limit=2${next && `&cursor=${encodeURIComponent(next)}`}`);
    seen.push(...page.items);
    next = page.next;
  }
  expect(seen).toEqual(all.items);
  expect(seen).toHaveLength(all.total);
});

test('of each reader of a folio: when last, how often, and those who never came', async () => {
  await written();
  const readers = await json<FolioReader[]>(
    call('GET', `/api/access-log/readers?folio=${made.folio}`, { session: lead.id }),
  );
  expect(readers.map(({ account, looks, downloads, ended }) => [account.name, looks, downloads, ended])).toEqual([
    ['Guest', 6, 4, false],
    ['Never', 0, 0, true],
  ]);
  expect(readers[0]!.lastDownload! <= new Date().toISOString()).toBe(true);
  expect(readers[1]).toMatchObject({ lastLook: null, lastDownload: null, level: 'view' });
});

test('a database that is away loses notes, not answers', async () => {
  const { flushAccessLog, noteAccess } = await import('#src/server/access-log.ts');
  const before = (await log(steward)).total;
  noteAccess({ accountId: 'nobody known' }, { kind: 'look', subjectType: 'complex', subjectId: made.complex.id });
  await expect(flushAccessLog()).resolves.toBeUndefined();
  expect((await log(steward)).total).toBe(before);
});
