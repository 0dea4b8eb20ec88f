import { createHash } from 'node:crypto';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { readSpectrumFile } from '#src/chem/spectra/index.ts';
import { call, json, openRegistry } from './harness.ts';
import { lab, person } from './people.ts';
import { readZip } from './read-zip.ts';
import { complex, grant, spectrum } from './shared-content.ts';

type Person = Awaited<ReturnType<typeof person>>;
type Bundle = { id: string; state: string; size: number; sha256: string; progress: number };
let registry: Awaited<ReturnType<typeof openRegistry>>;
let north: string;
let south: string;
let lead: Person;
let other: Person;
let guest: Person;
let viewer: Person;
let folio: string;
const made: Record<string, { id: string; accession: string }> = {};
const measured: Record<string, Awaited<ReturnType<typeof spectrum>>> = {};

beforeAll(async () => {
  registry = await openRegistry();
  [north, south] = [await lab('North'), await lab('South')];
  lead = await person('Lead', { labs: { [north]: 'lead' } });
  other = await person('Other', { labs: { [south]: 'contributor' } });
  guest = await person('Guest');
  viewer = await person('Viewer');
  const own = { lab: north, maker: lead.id };
  const theirs = { lab: south, maker: other.id };
  made.shared = await complex(own, 1);
  made.chosen = await complex(own, 2);
  made.outside = await complex(own, 3);
  made.embargoed = await complex(own, 4, { embargoUntil: '2999-01-01T00:00:00.000Z' });
  measured.plain = await spectrum(own, made.shared.id, { fileName: '../../ Nickel=Ω?.CSV' });
  measured.twin = await spectrum(theirs, made.shared.id, { title: '=HYPERLINK("x")', text: 'a file of its own\r\n' });
  measured.secret = await spectrum(theirs, made.shared.id, { visibility: 'lab', text: 'seen by South alone\n' });
  measured.one = await spectrum(own, made.chosen.id, { text: 'the one that was chosen\n' });
  measured.left = await spectrum(own, made.chosen.id, { text: 'the one that was left out\n' });
  measured.outside = await spectrum(own, made.outside.id, { text: 'outside the folio\n' });
  const body = {
    name: 'Aqua ions of nickel',
    description: 'Invented for a test',
    lab: north,
    licence: 'CC-BY-4.0',
    shows: 'proposed',
    items: [
      { accession: made.shared.accession, spectra: 'all' },
      { accession: made.chosen.accession, spectra: [measured.one.id] },
      { accession: made.embargoed.accession, spectra: 'all' },
    ],
  };
  folio = (await json<{ id: string }>(call('POST', '/api/folios', { as: lead.token, json: body }), 201)).id;
  await grant(folio, guest.id, 'download', lead.id);
  await grant(folio, viewer.id, 'view', lead.id);
});
afterAll(() => registry.close());

/** Run the queued jobs as the server would. */
async function work(until: () => Promise<boolean>) {
  const { startJobLoop } = await import('#src/server/jobs.ts');
  const { jobHandlers } = await import('#src/server/job-handlers.ts');
  const { database } = await import('#src/server/database.ts');
  const loop = startJobLoop(await database(), { handlers: jobHandlers, pollMs: 20, pause: () => 0 });
  try {
    await expect.poll(until, { timeout: 15_000 }).toBe(true);
  } finally {
    await loop.stop();
  }
}

const order = (as: string, body: object) => json<Bundle>(call('POST', '/api/bundles', { as, json: body }), 202);
const read = (as: string, id: string) => json<Bundle>(call('GET', `/api/bundles/${id}`, { as }));
const file = (as: string, id: string, headers = {}) => call('GET', `/api/bundles/${id}/file`, { as, headers });

async function build(as: string, body: object): Promise<Bundle & { archive: Buffer }> {
  const { id } = await order(as, body);
  await work(async () => (await read(as, id)).state === 'ready');
  return { ...(await read(as, id)), archive: Buffer.from(await (await file(as, id)).arrayBuffer()) };
}

const hex = (algorithm: string, bytes: Buffer) => createHash(algorithm).update(bytes).digest('hex');

/** What `sha256sum -c` does: each line of the list against the file it names. Answers the paths that were checked. */
function check(files: Map<string, Buffer>, list: string, algorithm: string): string[] {
  const lines = files.get(list)!.toString().trimEnd().split('\n');
  return lines.map((line) => {
    const [, sum, path] = /^([0-9a-f]+) {2}(.+)$/.exec(line)!;
    expect(hex(algorithm, files.get(path!)!), path).toBe(sum);
    return path!;
  });
}

/** Files below the one top folder. */
function filesOf(archive: Buffer): Map<string, Buffer> {
  const entries = readZip(archive);
  const tops = new Set(entries.map(({ path }) => path.split('/')[0]));
  expect(tops.size).toBe(1);
  return new Map(entries.map(({ path, bytes }) => [path.slice(path.indexOf('/') + 1), bytes]));
}

test('a bundle is a valid bag with the originals byte for byte', async () => {
  const { archive, sha256, size } = await build(lead.token, { folio });
  expect([hex('sha256', archive), archive.length]).toEqual([sha256, size]);
  const files = filesOf(archive);

  // RFC 8493 §2.1.1 and §3: two exact lines; every payload file in every payload manifest.
  expect(files.get('bagit.txt')!.toString()).toBe('BagIt-Version: 1.0\nTag-File-Character-Encoding: UTF-8\n');
  const payload = [...files.keys()].filter((path) => path.startsWith('data/')).sort();
  expect(check(files, 'manifest-sha256.txt', 'sha256').sort()).toEqual(payload);
  expect(check(files, 'manifest-sha512.txt', 'sha512').sort()).toEqual(payload);
  const tags = ['bag-info.txt', 'bagit.txt', 'manifest-sha256.txt', 'manifest-sha512.txt'];
  expect(check(files, 'tagmanifest-sha256.txt', 'sha256').sort()).toEqual(tags);
  expect(check(files, 'tagmanifest-sha512.txt', 'sha512').sort()).toEqual(tags);
  const octets = payload.reduce((sum, path) => sum + files.get(path)!.length, 0);
  expect(files.get('bag-info.txt')!.toString()).toContain(`Payload-Oxum: ${octets}.${payload.length}\n`);
  expect(files.get('bag-info.txt')!.toString()).toMatch(
    /External-Identifier: urn:uuid:[0-9a-f]{8}-[0-9a-f]{4}-5[0-9a-f]{3}-[89ab]/,
  );

  const originals = payload.filter((path) => path.startsWith('data/originals/')).map((path) => files.get(path)!);
  for (const name of ['plain', 'twin', 'one'])
    expect(
      originals.some((bytes) => bytes.equals(measured[name]!.bytes)),
      name,
    ).toBe(true);
  for (const path of payload) expect(path).toMatch(/^[A-Za-z0-9./_-]+$/);
});

test('each spectrum comes as JCAMP-DX and CSV with the same points, and says that it is synthetic', async () => {
  const files = filesOf((await build(lead.token, { folio })).archive);
  const at = `data/spectra/${made.shared!.accession}/${measured.plain!.id}`;
  const [jcamp] = readSpectrumFile(files.get(`${at}.jdx`)!);
  const [csv] = readSpectrumFile(files.get(`${at}.csv`)!);
  const y = [expect.any(Number), Number.NaN, expect.any(Number), expect.any(Number), expect.any(Number)];
  expect(jcamp).toMatchObject({
    xUnit: 'nm',
    x: [400, 410, 420, 430, 440],
    y,
    title: expect.stringContaining('SYNTHETIC'),
  });
  expect(csv!.x).toEqual(jcamp!.x);
  expect(csv!.y).toEqual(jcamp!.y);
  const readme = files.get('data/README.md')!.toString();
  expect(readme).toContain('SYNTHETIC: 3 of the 3 spectra');
  expect(readme).toContain('sha256sum -c manifest-sha256.txt');
  expect(readme).toContain('The safety data sheet, local rules and licensed practice decide.');
  expect(files.get('data/LICENSE.txt')!.toString()).toContain('SPDX-License-Identifier: CC-BY-4.0');
});

test('cells of tables are no formulas, and numbers stay numbers', async () => {
  const files = filesOf((await build(lead.token, { folio })).archive);
  const spectra = files.get('data/spectra.csv')!.toString();
  expect(spectra).toContain(`"'=HYPERLINK(""x"")"`);
  expect(spectra).toContain(',0.05,');
  expect(files.get('data/bands.csv')!.toString()).toContain(",'=1+1,");
});

test('a second build of the same content has the same bytes, whoever of the same sight asks', async () => {
  const first = await build(lead.token, { folio });
  const second = await build(lead.token, { folio });
  expect(second.archive.equals(first.archive)).toBe(true);
  const steward = await person('Steward', { steward: true });
  expect((await build(steward.token, { folio })).archive.equals(first.archive)).toBe(true);
  const entries = readZip(first.archive);
  expect(new Set(entries.map(({ stamp }) => stamp)).size).toBe(1);
  expect(new Set(entries.map(({ mode }) => mode))).toEqual(new Set([0o100644]));
});

test('metadata for machines names every payload file', async () => {
  const files = filesOf((await build(lead.token, { folio })).archive);
  const crate = JSON.parse(files.get('data/ro-crate-metadata.json')!.toString()) as {
    '@graph': Record<string, unknown>[];
  };
  const root = crate['@graph'].find((entity) => entity['@id'] === './')!;
  expect(root).toMatchObject({ '@type': 'Dataset', license: [{ '@id': 'https://spdx.org/licenses/CC-BY-4.0' }] });
  const named = (root.hasPart as { '@id': string }[]).map((part) => `data/${part['@id']}`);
  const payload = [...files.keys()].filter(
    (path) => path.startsWith('data/') && !path.endsWith('ro-crate-metadata.json'),
  );
  expect(named.sort()).toEqual(payload.sort());
  const tables = JSON.parse(files.get('data/datapackage.json')!.toString()) as {
    resources: { path: string; schema: { fields: { name: string }[] } }[];
  };
  for (const { path, schema } of tables.resources) {
    const head = files.get(`data/${path}`)!.toString().split('\r\n')[0];
    expect(schema.fields.map((field) => field.name).join(',')).toBe(head);
  }
});

test("a guest's bundle holds the folio and nothing else", async () => {
  const { archive } = await build(guest.token, { folio });
  const files = filesOf(archive);
  const all = Buffer.concat([...files.values()]).toString('latin1');
  for (const name of ['plain', 'twin', 'one']) expect(all).toContain(measured[name]!.id);
  for (const name of ['secret', 'left', 'outside']) {
    expect(all).not.toContain(measured[name]!.id);
    expect(all).not.toContain(measured[name]!.bytes.toString('latin1'));
  }
  expect(all).not.toContain(made.outside!.accession);
  expect(all).not.toContain(made.embargoed!.accession);
});

test('bands follow what the folio shows', async () => {
  const text = async () =>
    filesOf((await build(guest.token, { folio })).archive)
      .get('data/bands.csv')!
      .toString();
  expect(await text()).toContain(measured.plain!.band);
  const { etag } = Object.fromEntries((await call('GET', `/api/folios/${folio}`, { as: lead.token })).headers);
  const patch = (shows: string, tag = '*') =>
    json(call('PATCH', `/api/folios/${folio}`, { as: lead.token, json: { shows }, headers: { 'if-match': tag } }));
  const before = await build(guest.token, { folio });
  await patch('attested', etag);
  expect(await text()).not.toContain(measured.plain!.band);
  expect((await file(guest.token, before.id)).status).toBe(404);
  await patch('proposed');
  expect((await file(guest.token, before.id)).status).toBe(200);
});

test('who may only look gets none; who is out of sight is not told', async () => {
  const post = async (as: string, body: object) => (await call('POST', '/api/bundles', { as, json: body })).status;
  expect(await post(viewer.token, { folio })).toBe(403);
  expect(await post(viewer.token, { complexes: [made.shared!.accession] })).toBe(403);
  expect(await post((await person('Nobody')).token, { folio })).toBe(403);
  expect(await post(other.token, { folio })).toBe(404);
  expect(await post(guest.token, { complexes: [made.outside!.accession] })).toBe(422);
  expect(await post(guest.token, { complexes: [] })).toBe(422);
});

test('a selection of complexes holds what the asker sees', async () => {
  const files = filesOf((await build(other.token, { complexes: [made.shared!.accession] })).archive);
  const table = files.get('data/spectra.csv')!.toString();
  expect(table).toContain(measured.secret!.id);
  expect(table).not.toContain(measured.one!.id);
  expect(files.get('data/LICENSE.txt')!.toString()).toContain('No licence was chosen');
});

test('ranges are served', async () => {
  const { id, archive, sha256 } = await build(lead.token, { folio });
  const part = async (range: string, more = {}) => file(lead.token, id, { range, ...more });
  const bytes = async (response: Response) => Buffer.from(await response.arrayBuffer());
  const first = await part('bytes=0-99');
  expect(first.status).toBe(206);
  expect(Object.fromEntries(first.headers)).toMatchObject({
    'content-range': `bytes 0-99/${archive.length}`,
    'content-length': '100',
    etag: `"${sha256}"`,
    'content-disposition': expect.stringMatching(/^attachment; filename="zaffre-[0-9a-f-]+\.zip"/),
  });
  expect(await bytes(first)).toEqual(archive.subarray(0, 100));
  expect(await bytes(await part('bytes=100-'))).toEqual(archive.subarray(100));
  expect(await bytes(await part('bytes=-50'))).toEqual(archive.subarray(-50));
  expect((await part('bytes=0-9', { 'if-range': '"another"' })).status).toBe(200);
  const beyond = await part(`bytes=${archive.length}-`);
  expect([beyond.status, beyond.headers.get('content-range')]).toEqual([416, `bytes */${archive.length}`]);
  expect((await file(lead.token, id, { 'if-none-match': `"${sha256}"` })).status).toBe(304);
});

test('access is judged again when the file is fetched', async () => {
  const partner = await person('Partner');
  const grantId = await grant(folio, partner.id, 'download', lead.id);
  const { id } = await build(partner.token, { folio });
  expect((await file(partner.token, id)).status).toBe(200);
  expect((await file(lead.token, id)).status).toBe(404);
  expect((await call('DELETE', `/api/folios/${folio}/grants/${grantId}`, { session: lead.id })).status).toBe(204);
  for (const path of [`/api/bundles/${id}`, `/api/bundles/${id}/file`])
    expect((await call('GET', path, { as: partner.token })).status).toBe(404);
});

test('a bundle whose guest lost access before it was built is not built', async () => {
  const partner = await person('Late Partner');
  const grantId = await grant(folio, partner.id, 'download', lead.id);
  const { id } = await order(partner.token, { folio });
  await call('DELETE', `/api/folios/${folio}/grants/${grantId}`, { session: lead.id });
  await work(async () => (await rowOf(id))?.state === 'failed');
  expect(await stored(id)).toEqual([]);
});

test('an order can be cancelled, and is not built', async () => {
  const { id } = await order(lead.token, { folio });
  expect((await file(lead.token, id)).status).toBe(409);
  expect((await call('DELETE', `/api/bundles/${id}`, { as: lead.token })).status).toBe(204);
  expect(await read(lead.token, id)).toMatchObject({ state: 'cancelled' });
  const after = await build(lead.token, { folio });
  expect(await stored(id)).toEqual([]);
  expect((await call('DELETE', `/api/bundles/${after.id}`, { as: lead.token })).status).toBe(409);
});

test('a build that fails leaves nothing and says so', async () => {
  const { store } = await import('#src/server/store.ts');
  const lost = await complex({ lab: north, maker: lead.id }, 9);
  const { bytes } = await spectrum({ lab: north, maker: lead.id }, lost.id, { text: 'this one gets lost\n' });
  await store().delete(`originals/${hex('sha256', bytes)}`);
  const { id } = await order(lead.token, { complexes: [lost.accession] });
  await work(async () => (await read(lead.token, id)).state === 'failed');
  expect(await read(lead.token, id)).toMatchObject({ error: expect.stringContaining('order it again'), size: null });
  expect(await stored(id)).toEqual([]);
});

test('a repeated order with one Idempotency-Key is one bundle; too many at once are refused', async () => {
  const asker = await person('Eager', { labs: { [north]: 'contributor' } });
  const send = (headers = {}) => call('POST', '/api/bundles', { as: asker.token, json: { folio }, headers });
  const key = { 'idempotency-key': 'once' };
  const [first, again] = [await json<Bundle>(send(key), 202), await json<Bundle>(send(key), 202)];
  expect(again.id).toBe(first.id);
  for (let i = 0; i < 4; i++) await json(send(), 202);
  const refused = await send();
  expect([refused.status, refused.headers.get('retry-after')]).toEqual([429, '30']);
});

async function rowOf(id: string) {
  const { database } = await import('#src/server/database.ts');
  const { bundles } = await import('#src/db/schema/index.ts');
  const { eq } = await import('drizzle-orm');
  const [row] = await (await database()).db.select().from(bundles).where(eq(bundles.id, id));
  return row;
}

async function stored(id: string): Promise<string[]> {
  const { store } = await import('#src/server/store.ts');
  const keys: string[] = [];
  for await (const { key } of store().list(`bundles/${id}`)) keys.push(key);
  return keys;
}
