import { createHash } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, test, vi } from 'vitest';
import { call, json, openRegistry } from './harness.ts';
import { lab, person } from './people.ts';
import { decimalCommas, difdup, formOf, inventedCurve, warmReader } from './spectra-files.ts';
import { complex } from './spectra-world.ts';

type Person = Awaited<ReturnType<typeof person>>;
let registry: Awaited<ReturnType<typeof openRegistry>>;
let north: string;
let south: string;
let ada: Person;
let both: Person;
let guest: Person;
let nickel: { id: string; accession: string };

const curve = inventedCurve();
const file = difdup(curve);
const told = (more: object = {}) => ({
  complex: nickel.accession,
  technique: 'solution',
  solvent: 'water',
  concentration: 0.05,
  pathLength: 1,
  temperature: 298,
  ...more,
});
const upload = (as: string, metadata: unknown, body: string | Uint8Array = file, headers = {}) =>
  call('POST', '/api/spectra', { as, form: formOf(body, metadata), headers });
const variant = (mark: string) => difdup(curve, [`##$MARK= ${mark}`]);

beforeAll(async () => {
  process.env.MAX_UPLOAD_BYTES = '300000';
  registry = await openRegistry();
  await warmReader();
  north = await lab('North');
  south = await lab('South');
  ada = await person('Ada', { labs: { [north]: 'contributor' } });
  both = await person('Bo', { labs: { [north]: 'contributor', [south]: 'contributor' } });
  guest = await person('Gus');
  nickel = await complex(north, ada.id);
}, 60_000);
afterAll(async () => {
  const { closeWorkers } = await import('#src/server/worker-pool.ts');
  await closeWorkers();
  await registry.close();
});

describe('preview', () => {
  const preview = (body: string, options?: unknown, as = guest.token) =>
    call('POST', '/api/derive/spectrum', { as, form: formOf(body, options, { part: 'options' }) });

  test('gives x and y of a DIFDUP file in its own units and order, to a guest as well', async () => {
    const { blocks } = await json<{ blocks: Record<string, unknown>[] }>(preview(file));
    expect(blocks).toHaveLength(1);
    expect(blocks[0]).toMatchObject({ kind: 'curve', xUnit: 'nm', yUnit: 'absorbance', points: curve.x.length });
    expect(blocks[0]!.x).toEqual(curve.x);
    for (const [i, y] of (blocks[0]!.y as number[]).entries()) expect(y).toBeCloseTo(curve.y[i]!, 9);
  });

  test('reads decimal commas, keeps a gap as null and asks for the units', async () => {
    const { blocks } = await json<{ blocks: Record<string, unknown>[] }>(preview(decimalCommas));
    expect(blocks[0]).toMatchObject({
      xUnit: null,
      yUnit: null,
      suggestedXUnit: 'nm',
      x: [400, 410, 420, 430, 440, 450],
    });
    expect(blocks[0]!.y).toEqual([0.512, null, 0.498, 0.455, 0.402, 0.351]);
  });

  test('checks the conditions sent along', async () => {
    const { blocks } = await json<{ blocks: { flags: { code: string }[] }[] }>(
      preview(file, { solvent: 'acetone', pathLength: 1 }),
    );
    expect(blocks[0]!.flags.map(({ code }) => code)).toEqual(['no-concentration']);
  });

  test('refuses what is no spectrum, a wrong option, bad JSON, another kind of body, and too much', async () => {
    expect((await preview('no numbers here')).status).toBe(422);
    expect(await json(preview(file, { xUnit: 'miles' }), 422)).toMatchObject({ errors: [{ pointer: '#/xUnit' }] });
    expect((await preview(file, '{')).status).toBe(400);
    expect((await call('POST', '/api/derive/spectrum', { as: guest.token, json: {} })).status).toBe(415);
    expect((await preview('1;2\n'.repeat(80_000))).status).toBe(413);
    expect((await call('POST', '/api/derive/spectrum', { form: formOf(file) })).status).toBe(401);
  });
});

describe('upload', () => {
  test('keeps the bytes, the points and the conditions', async () => {
    const answer = await upload(ada.token, told({ concentrationUncertainty: 0.002, k: 2, medium: { pH: 2.5 } }));
    const made = await json(answer, 201);
    expect(answer.headers.get('location')).toBe(`/api/spectra/${made.id}`);
    expect(made).toMatchObject({
      complex: nickel.accession,
      lab: { id: north, name: 'North' },
      title: 'Invented green solution',
      solvent: [{ name: 'water', volumeFraction: 1 }],
      concentrationUncertainty: 0.001,
      k: 1,
      medium: { pH: 2.5 },
      points: curve.x.length,
      xUnit: 'nm',
      sha256: createHash('sha256').update(file).digest('hex'),
      size: file.length,
      block: 0,
      state: 'registered',
      flags: [],
      bands: [],
      species: [{ accession: nickel.accession, fraction: null, basis: 'declared' }],
      may: { change: true, propose: true, attest: false, download: true },
    });
    expect(made.xMin).toBeCloseTo(12_500, 6);
    expect(made.xMax).toBeCloseTo(1e7 / 380, 6);
    expect(made.colour).toMatch(/^#[0-9a-f]{6}$/);
    const read = await call('GET', `/api/spectra/${made.id}`, { as: ada.token });
    expect(read.headers.get('etag')).toBe(answer.headers.get('etag'));
    expect(await read.json()).toEqual(made);

    const original = await call('GET', `/api/spectra/${made.id}/file`, { as: ada.token });
    expect(await original.text()).toBe(file);
    expect(original.headers.get('content-type')).toBe('application/octet-stream');
  });

  test('refuses the same spectrum on the same complex and names the first; another complex may have it', async () => {
    const body = variant('twice');
    const first = await json(upload(ada.token, told(), body), 201);
    expect(await json(upload(both.token, told({ lab: north }), body), 409)).toMatchObject({ id: first.id });
    const other = await complex(north, ada.id);
    await json(upload(ada.token, told({ complex: other.accession }), body), 201);
  });

  test('does not tell of a duplicate that the asker may not see', async () => {
    const body = variant('hidden');
    await json(upload(ada.token, told({ visibility: 'lab' }), body), 201);
    const stranger = await person('Sten', { labs: { [south]: 'contributor' } });
    await json(upload(stranger.token, told(), body), 201);
  });

  test('asks for a unit that the file does not settle, with what would suit', async () => {
    const ask = () => upload(ada.token, told(), decimalCommas);
    expect(await json(ask(), 422)).toMatchObject({
      errors: [{ pointer: '#/xUnit', detail: expect.stringContaining('nm') }],
    });
    expect(await json(upload(ada.token, told({ xUnit: 'nm' }), decimalCommas), 422)).toMatchObject({
      errors: [{ pointer: '#/yUnit' }],
    });
    const made = await json(upload(ada.token, told({ xUnit: 'nm', yUnit: 'absorbance' }), decimalCommas), 201);
    expect(made).toMatchObject({ points: 6, reading: { told: { xUnit: 'nm', yUnit: 'absorbance' } } });
  });

  test.each([
    ['no metadata', undefined, '#/technique'],
    ['an unknown technique', { technique: 'guess' }, '#/technique'],
    ['neither complex nor preparation', { complex: undefined }, '#/complex'],
    ['a complex that is not there', { complex: 'ZF999999-0' }, '#/complex'],
    ['a preparation that is not there', { preparation: 'none' }, '#/preparation'],
    ['an instrument that is not there', { instrument: 'none' }, '#/instrument'],
    [
      'a species that is not there',
      { species: [{ accession: 'ZF999999-0', basis: 'guess' }] },
      '#/species/0/accession',
    ],
    ['shares that do not add up', { solvent: [{ name: 'water', volumeFraction: 0.5 }] }, '#/solvent'],
    ['a concentration of nothing', { concentration: 0 }, '#/concentration'],
    ['a block that is not there', { block: 4 }, '#/block'],
  ])('refuses %s', async (_what, more, pointer) => {
    const metadata = more === undefined ? undefined : told(more);
    const { errors } = await json<{ errors: { pointer: string }[] }>(
      upload(ada.token, metadata, variant('refused')),
      422,
    );
    expect(errors.map((error) => error.pointer)).toContain(pointer);
  });

  test('minds whose lab measured', async () => {
    expect((await upload(ada.token, told({ lab: south }), variant('lab'))).status).toBe(403);
    expect(await json(upload(both.token, told(), variant('lab')), 422)).toMatchObject({
      errors: [{ pointer: '#/lab' }],
    });
    expect(await json(upload(both.token, told({ lab: south }), variant('lab')), 201)).toMatchObject({
      lab: { name: 'South' },
    });
    expect((await upload(guest.token, told(), variant('lab'))).status).toBe(403);
  });

  test('refuses broken forms', async () => {
    expect((await upload(ada.token, '{"complex"')).status).toBe(400);
    const noFile = new FormData();
    noFile.append('metadata', JSON.stringify(told()));
    expect(await json(call('POST', '/api/spectra', { as: ada.token, form: noFile }), 422)).toMatchObject({
      errors: [{ pointer: '#/file' }],
    });
    const twoFiles = formOf(file, told());
    twoFiles.append('file', new Blob(['1 2']), 'second.txt');
    expect((await call('POST', '/api/spectra', { as: ada.token, form: twoFiles })).status).toBe(422);
    const noBoundary = { 'content-type': 'multipart/form-data' };
    expect((await call('POST', '/api/spectra', { as: ada.token, json: {}, headers: noBoundary })).status).toBe(400);
  });

  test('takes the metadata as a file of JSON, too, and stops a form that is too long whatever it holds', async () => {
    const form = new FormData();
    form.append('metadata', new Blob([JSON.stringify(told())], { type: 'application/json' }));
    form.append('file', new Blob([variant('json as a file')]), 'a.jdx');
    await json(call('POST', '/api/spectra', { as: ada.token, form }), 201);
    const long = formOf(variant('long'), told());
    long.append('more', new Blob(['x'.repeat(600_000)]), 'more.bin');
    expect((await call('POST', '/api/spectra', { as: ada.token, form: long })).status).toBe(413);
    const longText = new FormData();
    longText.append('file', new Blob([variant('long text')]), 'a.jdx');
    longText.append('metadata', new Blob([JSON.stringify(told({ notes: 'x'.repeat(210_000) }))]));
    expect((await call('POST', '/api/spectra', { as: ada.token, form: longText })).status).toBe(413);
  });

  test('acts once for one Idempotency-Key', async () => {
    const headers = { 'idempotency-key': 'try-1' };
    const body = variant('once');
    const first = await json(upload(ada.token, told(), body, headers), 201);
    expect(await json(upload(ada.token, told(), body, headers), 201)).toEqual(first);
    expect((await upload(ada.token, told({ notes: 'other' }), body, headers)).status).toBe(422);
  });

  test('keeps a name with other letters and hands it out safely', async () => {
    const form = formOf(variant('name'), told(), { name: '../Präparat "7"; №1.jdx' });
    const made = await json(call('POST', '/api/spectra', { as: ada.token, form }), 201);
    expect(made.fileName).toMatch(/Präparat/);
    const answer = await call('GET', `/api/spectra/${made.id}/file`, { as: ada.token });
    const disposition = answer.headers.get('content-disposition')!;
    expect(disposition).toMatch(/^attachment; filename="[\x20-\x7e]*"; filename\*=UTF-8''[A-Za-z0-9%._~-]+$/);
    expect(decodeURIComponent(disposition.split("UTF-8''")[1]!)).toBe(made.fileName);
  });

  test('writes JCAMP-DX that reads back as the same points and says what is synthetic', async () => {
    const made = await json(upload(ada.token, told({ synthetic: true }), variant('synthetic')), 201);
    const written = await (await call('GET', `/api/spectra/${made.id}/jcamp`, { as: ada.token })).text();
    expect(written).toMatch(/^##TITLE= SYNTHETIC/);
    expect(written).toMatch(/##DATA PROCESSING= SYNTHETIC/);
    // Nickel compounds carry usual cautions: they travel with the file, in lines that the standard takes for comments.
    expect(made.cautions).not.toEqual([]);
    expect(written).toMatch(/\r\n\$\$ Caution: /);
    expect(written.split('\r\n').every((line) => line.length <= 80)).toBe(true);
    const { readSpectrumFile } = await import('#src/chem/spectra/index.ts');
    const [again] = readSpectrumFile(new TextEncoder().encode(written));
    expect(again!.x).toEqual(curve.x);
    for (const [i, y] of again!.y.entries()) expect(y).toBeCloseTo(curve.y[i]!, 9);
  });
});

describe('order of writes', () => {
  const keyOf = (body: string) => `originals/${createHash('sha256').update(body).digest('hex')}`;
  const total = async () => (await json<{ total: number }>(call('GET', '/api/spectra', { as: ada.token }))).total;

  test('the bytes are in the store before the transaction that tells of them', async () => {
    const { store } = await import('#src/server/store.ts');
    const { database } = await import('#src/server/database.ts');
    const db = await database();
    const body = variant('order');
    const write = db.write;
    const { spectra } = await import('#src/db/schema/index.ts');
    const rows = await db.db.$count(spectra);
    let there: { size: number } | null = null;
    // Other writes, such as the count of requests, come before and after the one that tells of the spectrum.
    const spy = vi.spyOn(db, 'write').mockImplementation(async (work) => {
      const before = await store().head(keyOf(body));
      const done = await write(work);
      if ((await db.db.$count(spectra)) > rows && there === null) there = before;
      return done;
    });
    await json(upload(ada.token, told(), body), 201);
    spy.mockRestore();
    expect(there).toEqual({ size: body.length });
  });

  test('a store that is away leaves no record, and a failed transaction no record but a harmless object', async () => {
    const { store, StoreError } = await import('#src/server/store.ts');
    const { database } = await import('#src/server/database.ts');
    const before = await total();
    const body = variant('away');
    const away = vi.spyOn(store(), 'put').mockRejectedValueOnce(new StoreError('away'));
    expect((await upload(ada.token, told(), body)).status).toBe(503);
    away.mockRestore();
    expect(await total()).toBe(before);

    const db = await database();
    const write = db.write;
    // The first write after the bytes are in the store is the one that tells of them.
    const failing = vi.spyOn(db, 'write').mockImplementation(async (work) => {
      if (await store().head(keyOf(body))) throw new Error('the process died');
      return write(work);
    });
    expect((await upload(ada.token, told(), body)).status).toBe(500);
    failing.mockRestore();
    expect(await total()).toBe(before);
    expect(await store().head(keyOf(body))).toEqual({ size: body.length });
    await json(upload(ada.token, told(), body), 201);
  });
});
