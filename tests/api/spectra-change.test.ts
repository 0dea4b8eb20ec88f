import { afterAll, beforeAll, beforeEach, describe, expect, test } from 'vitest';
import { call, json, openRegistry } from './harness.ts';
import { lab, person } from './people.ts';
import { difdup, formOf, inventedCurve, warmReader } from './spectra-files.ts';
import { complex } from './spectra-world.ts';

type Person = Awaited<ReturnType<typeof person>>;
interface Band {
  id: string;
  height: number;
  epsilon: number | null;
  state: string;
  [name: string]: unknown;
}
interface Spectrum {
  id: string;
  bands: Band[];
  flags: { code: string }[];
  [name: string]: unknown;
}

let registry: Awaited<ReturnType<typeof openRegistry>>;
let north: string;
let ada: Person;
let bea: Person;
let lead: Person;
let southLead: Person;
let southContributor: Person;
let welcome: Person;
let nickel: { id: string; accession: string };
let zinc: { id: string; accession: string };
let spectrum: Spectrum;
let made = 0;

async function upload(accession: string, more: object = {}): Promise<Spectrum> {
  const metadata = {
    complex: accession,
    technique: 'solution',
    solvent: 'water',
    concentration: 0.05,
    pathLength: 1,
    bandwidth: 2,
    ...more,
  };
  const body = difdup(inventedCurve(), [`##$MARK= ${++made}`]);
  return json<Spectrum>(call('POST', '/api/spectra', { as: ada.token, form: formOf(body, metadata) }), 201);
}
const read = (id = spectrum.id, as = ada.token) => json<Spectrum>(call('GET', `/api/spectra/${id}`, { as }));
const patch = (body: object, { as = ada.token, id = spectrum.id, match = '*' } = {}) =>
  call('PATCH', `/api/spectra/${id}`, { as, json: body, headers: { 'if-match': match } });
const put = (bands: unknown, { as = ada.token, id = spectrum.id, headers = {} } = {}) =>
  call('PUT', `/api/spectra/${id}/bands`, { as, json: bands, headers });
const judge = (band: Band, what: 'attest' | 'dispute', as: string, body: object = {}) =>
  call('POST', `/api/bands/${band.id}/${what}`, { as, json: body });

const first = {
  wavenumber: 14_000,
  height: 12.4,
  quantity: 'epsilon',
  fwhm: 2300,
  found: 'picked',
  assignment: { class: 'd-d', centre: 0, from: '3A2g', to: '3T1g' },
};
const second = {
  wavenumber: 25_000,
  height: 0.9,
  quantity: 'absorbance',
  found: 'typed',
  assignment: { class: 'd-d' },
};

beforeAll(async () => {
  registry = await openRegistry();
  await warmReader();
  north = await lab('North');
  const south = await lab('South');
  const welcoming = await lab('Welcoming', { outsideAttest: true });
  ada = await person('Ada', { labs: { [north]: 'contributor' } });
  bea = await person('Bea', { labs: { [north]: 'contributor', [welcoming]: 'contributor' } });
  lead = await person('Lea', { labs: { [north]: 'lead' } });
  southLead = await person('Sol', { labs: { [south]: 'lead' } });
  southContributor = await person('Sten', { labs: { [south]: 'contributor' } });
  welcome = await person('Wim', { labs: { [welcoming]: 'lead' } });
  nickel = await complex(north, ada.id);
  zinc = await complex(north, ada.id, { formula: '[Zn(OH2)6]2+', element: 'Zn', group: 12, dCount: 10 });
}, 60_000);
beforeEach(async () => {
  spectrum = await upload(nickel.accession);
});
afterAll(async () => {
  const { closeWorkers } = await import('#src/server/worker-pool.ts');
  await closeWorkers();
  await registry.close();
});

describe('conditions', () => {
  test('need If-Match, fresh; what follows from them follows again', async () => {
    const path = `/api/spectra/${spectrum.id}`;
    expect((await call('PATCH', path, { as: ada.token, json: { cell: 'quartz' } })).status).toBe(428);
    expect((await patch({ cell: 'quartz' }, { match: '"old"' })).status).toBe(412);
    const tag = (await call('GET', path, { as: ada.token })).headers.get('etag')!;
    const mended = await json<Spectrum>(
      patch(
        { solvent: 'acetone', concentration: null, medium: { pH: 3 }, pathLengthUncertainty: 0.02, k: 2 },
        { match: tag },
      ),
    );
    expect(mended).toMatchObject({
      solvent: [{ name: 'acetone' }],
      concentration: null,
      medium: { pH: 3 },
      pathLengthUncertainty: 0.01,
      pathLength: 1,
    });
    expect(mended.flags.map(({ code }) => code)).toEqual(['no-concentration']);
    expect((await patch({ cell: 'quartz' }, { match: tag })).status).toBe(412);
  });

  test('are checked against the cut-off of the solvent', async () => {
    const { x, y } = inventedCurve();
    const deep = difdup({ x: x.map((nm) => nm - 100), y });
    const metadata = {
      complex: nickel.accession,
      technique: 'solution',
      solvent: 'water',
      concentration: 0.05,
      pathLength: 1,
    };
    const made = await json<Spectrum>(
      call('POST', '/api/spectra', { as: ada.token, form: formOf(deep, metadata) }),
      201,
    );
    expect(made.flags).toEqual([]);
    // Acetone is opaque below 330 nm, water from 190 nm on transparent (CRC Handbook, from memory); the file begins at 280.
    const codes = async (solvent: string | null) =>
      (await json<Spectrum>(patch({ solvent }, { id: made.id }))).flags.map(({ code }) => code);
    expect(await codes('acetone')).toEqual(['below-cutoff']);
    expect(await codes('water')).toEqual([]);
    expect(await codes(null)).toEqual(['no-solvent']);
  });

  test('cannot lose what every spectrum has, and are changed by those who may', async () => {
    expect(await json(patch({ technique: null }), 422)).toMatchObject({ errors: [{ pointer: '#/technique' }] });
    expect(await json(patch({ concentration: -1 }), 422)).toMatchObject({ errors: [{ pointer: '#/concentration' }] });
    expect((await patch({ notes: 'x' }, { as: bea.token })).status).toBe(403);
    expect((await patch({ notes: 'x' }, { as: southLead.token })).status).toBe(403);
    expect((await patch({ notes: 'x' }, { as: lead.token })).status).toBe(200);
  });

  test('mended reopen the judgement of the bands whose ε changes, with a line in the trail', async () => {
    const [a, b] = await json<[Band, Band]>(put([first, second]));
    expect((await judge(a, 'attest', lead.token)).status).toBe(200);
    await json(patch({ notes: 'nothing of ε' }));
    expect((await read()).bands[0]!.state).toBe('attested');

    await json(patch({ concentration: 0.1 }));
    const { bands } = await read();
    expect(bands[0]).toMatchObject({ id: a.id, state: 'proposed', judgedBy: null, quantity: 'epsilon' });
    expect(bands[0]!.epsilon).toBeCloseTo(6.2, 9);
    expect(bands[0]!.height).toBeCloseTo(6.2, 9);
    expect(bands[1]).toMatchObject({ id: b.id, height: 0.9 });
    expect(bands[1]!.epsilon).toBeCloseTo(9, 9);
    const { database } = await import('#src/server/database.ts');
    const { trail } = await import('#src/db/schema/index.ts');
    const rows = await (await database()).db.select().from(trail);
    expect(rows.filter(({ action, subjectId }) => action === 'reopen' && subjectId === a.id)).toHaveLength(1);
  });

  test('without concentration leave the absorbance of a band, and no ε', async () => {
    await json(put([first]));
    await json(patch({ concentration: null }));
    const [band] = (await read()).bands;
    expect(band).toMatchObject({ quantity: 'absorbance', epsilon: null, oscillatorStrength: null });
    expect(band!.height).toBeCloseTo(0.62, 9);
  });

  test('of a mixture give no ε', async () => {
    const species = [
      { accession: nickel.accession, basis: 'declared' },
      { accession: zinc.accession, fraction: 0.5, basis: 'weighed in' },
    ];
    await json(put([second]));
    await json(patch({ species }));
    expect((await read()).bands[0]!.epsilon).toBeNull();
    expect((await call('GET', `/api/spectra/${spectrum.id}/points?yUnit=epsilon`, { as: ada.token })).status).toBe(422);
  });

  test('another technique means another stored quantity', async () => {
    await json(patch({ technique: 'emission', solvent: 'water' }));
    const emission = await read();
    expect(emission).toMatchObject({ technique: 'emission', colour: null, flags: [] });
    await json(patch({ technique: 'solution' }));
    expect((await read()).colour).toBe(spectrum.colour);
  });
});

describe('state', () => {
  test('is withdrawn with a reason, and taken back by a lead', async () => {
    expect(await json(patch({ state: 'withdrawn' }), 422)).toMatchObject({
      errors: [{ pointer: '#/withdrawnReason' }],
    });
    expect(await json(patch({ state: 'withdrawn', withdrawnReason: 'wrong sample' }))).toMatchObject({
      state: 'withdrawn',
      withdrawnReason: 'wrong sample',
      may: { propose: false },
    });
    expect((await put([first])).status).toBe(409);
    expect((await patch({ state: 'registered' })).status).toBe(403);
    expect(await json(patch({ state: 'registered' }, { as: lead.token }))).toMatchObject({
      state: 'registered',
      withdrawnReason: null,
    });
    expect((await patch({ state: 'draft' })).status).toBe(422);
  });

  test('a draft can be deleted, a registered spectrum cannot', async () => {
    const remove = (id: string, headers = {}) => call('DELETE', `/api/spectra/${id}`, { as: ada.token, headers });
    expect((await remove(spectrum.id, { 'if-match': '*' })).status).toBe(409);
    const draft = await upload(nickel.accession, { state: 'draft' });
    await json(put([first], { id: draft.id }));
    expect((await call('GET', `/api/spectra/${draft.id}`, { as: bea.token })).status).toBe(404);
    expect((await remove(draft.id)).status).toBe(428);
    expect((await remove(draft.id, { 'if-match': '*' })).status).toBe(204);
    expect((await call('GET', `/api/spectra/${draft.id}`, { as: ada.token })).status).toBe(404);
  });
});

describe('bands', () => {
  test('get ε, oscillator strength and the uncertainty that the bandwidth leaves', async () => {
    const [a, b] = await json<[Band, Band]>(put([first, second]));
    expect(a).toMatchObject({
      wavelength: 1e7 / 14_000,
      epsilon: 12.4,
      shoulder: false,
      state: 'proposed',
      proposedBy: 'Ada',
      verdict: null,
      may: { judge: false },
    });
    // f = 4.319e-9 · 1.0645 · ε · fwhm (Mulliken 1939 and the area of a Gaussian, from memory).
    expect(a.oscillatorStrength as number).toBeCloseTo(4.319e-9 * 1.0645 * 12.4 * 2300, 8);
    // 2 nm at 714.3 nm are 39.2 cm⁻¹; as a rectangle, over √12.
    expect(a.uncertainty as number).toBeCloseTo(39.2 / Math.sqrt(12), 2);
    expect(b).toMatchObject({ uncertainty: null, oscillatorStrength: null, fwhm: null });
    expect(b.epsilon).toBeCloseTo(18, 9);
  });

  test('keep id and judgement while nothing of them changes, with or without the id sent', async () => {
    const [a, b] = await json<[Band, Band]>(put([first, second]));
    await json(judge(a, 'attest', lead.token));
    const again = await json<Band[]>(put([{ ...second, id: b.id }, first], { as: bea.token }));
    expect(again.map(({ id, state }) => [id, state])).toEqual([
      [b.id, 'proposed'],
      [a.id, 'attested'],
    ]);
    const [changed] = await json<Band[]>(
      put([{ ...first, id: a.id, assignment: { class: 'LMCT' } }], { as: bea.token }),
    );
    expect(changed).toMatchObject({ id: a.id, state: 'proposed', proposedBy: 'Bea', judgedBy: null });
    expect((await judge(b, 'attest', lead.token)).status).toBe(404);
  });

  test('whose number alone was mended stay the proposal of who made the assignment', async () => {
    const [a] = await json<[Band]>(put([first], { as: lead.token }));
    const [mended] = await json<[Band]>(put([{ ...first, id: a.id, wavenumber: 14_010 }]));
    expect(mended).toMatchObject({ proposedBy: 'Lea', state: 'proposed' });
    expect((await judge(mended, 'attest', lead.token)).status).toBe(403);
  });

  test('refuse ids, centres and numbers that do not fit, and strangers', async () => {
    const pointerOf = async (bands: unknown) =>
      (await json<{ errors: { pointer: string }[] }>(put(bands), 422)).errors[0]!.pointer;
    expect(await pointerOf([{ ...first, id: 'none' }])).toBe('#/0/id');
    expect(await pointerOf([first, { ...first, assignment: { class: 'd-d', centre: 3 } }])).toBe(
      '#/1/assignment/centre',
    );
    expect(await pointerOf([{ ...first, wavenumber: 12 }])).toBe('#/0/wavenumber');
    expect((await put([first], { as: southContributor.token })).status).toBe(403);
  });

  test('heed If-Match where it is sent', async () => {
    const tag = (await call('GET', `/api/spectra/${spectrum.id}/bands`, { as: ada.token })).headers.get('etag')!;
    await json(put([first], { headers: { 'if-match': tag } }));
    expect((await put([second], { headers: { 'if-match': tag } })).status).toBe(412);
    const whole = (await call('GET', `/api/spectra/${spectrum.id}`, { as: ada.token })).headers.get('etag')!;
    await json(put([second], { headers: { 'if-match': whole } }));
  });

  test('get a verdict where the electron count contradicts them', async () => {
    const colourless = await upload(zinc.accession);
    const [band] = await json<Band[]>(put([{ ...first, assignment: { class: 'd-d' } }], { id: colourless.id }));
    expect(band!.verdict).toBe('A d10 ion has no d–d band.');
    const record = await json<{ doubts: number }>(call('GET', `/api/complexes/${zinc.accession}`, { as: ada.token }));
    expect(record.doubts).toBe(1);
    const [quartet] = await json<Band[]>(put([{ ...first, assignment: { class: 'd-d', to: '4T2g' } }]));
    expect(quartet!.verdict).toBe('A d8 ion has no term of multiplicity 4.');
    await json(patch({ solvent: 'acetone' }));
    const [deep] = await json<Band[]>(put([{ ...second, wavenumber: 40_000 }]));
    expect(deep!.verdict).toMatch(/below the cut-off of acetone/);
  });
});

describe('judgement', () => {
  test('is a lead’s who sees the band, never the proposer’s, nor a contributor’s of the same lab', async () => {
    const [a, b] = await json<[Band, Band]>(put([first, second]));
    expect((await judge(a, 'attest', ada.token)).status).toBe(403);
    expect((await judge(a, 'attest', bea.token)).status).toBe(403);
    expect((await judge(a, 'attest', southContributor.token)).status).toBe(403);
    expect(await json(judge(a, 'attest', southLead.token, { reason: 'agrees with mine' }))).toMatchObject({
      state: 'attested',
      judgedBy: 'Sol',
      judgement: 'agrees with mine',
    });
    expect(await json(judge(b, 'attest', lead.token))).toMatchObject({ state: 'attested', judgement: null });
    expect((await read(spectrum.id, lead.token)).may).toMatchObject({ attest: true });
  });

  test('by a contributor of another lab needs the leave of the measuring lab', async () => {
    const welcoming = await upload(nickel.accession, {});
    expect((await read(welcoming.id, southContributor.token)).may).toMatchObject({ attest: false });
    const form = formOf(difdup(inventedCurve(), ['##$MARK= welcoming']), {
      complex: nickel.accession,
      technique: 'solution',
    });
    const theirs = await json<Spectrum>(call('POST', '/api/spectra', { as: welcome.token, form }), 201);
    const [band] = await json<[Band]>(put([second], { as: welcome.token, id: theirs.id }));
    expect(await json(judge(band, 'attest', southContributor.token))).toMatchObject({
      state: 'attested',
      judgedBy: 'Sten',
    });
  });

  test('against needs a reason, and there must be something to attest', async () => {
    const [a, bare] = await json<[Band, Band]>(put([first, { ...second, assignment: undefined }]));
    expect(await json(judge(a, 'dispute', lead.token), 422)).toMatchObject({ errors: [{ pointer: '#/reason' }] });
    expect(await json(judge(a, 'dispute', lead.token, { reason: 'too intense' }))).toMatchObject({
      state: 'disputed',
      judgement: 'too intense',
    });
    expect((await judge(bare, 'attest', lead.token)).status).toBe(422);
  });
});

describe('fitted bands', () => {
  const component = { wavenumber: 14_000.4, height: 12.4, fwhm: 2300, area: 44_800, error: 9 };
  const fit = {
    points: 20,
    quantity: 'epsilon',
    wavelengthCheck: 0.3,
    steps: [
      { operation: 'settings', parameters: { shape: 'lorentzian', count: 1, edge: false, constant: false } },
      { operation: 'find', parameters: {} },
    ],
    components: [component],
  };
  const fitted = { ...first, wavenumber: 14_000.4, found: 'fitted' };
  const putFit = (json: unknown) => call('PUT', `/api/spectra/${spectrum.id}/fit`, { as: ada.token, json });

  test('come with their history, the uncertainty of fit and instrument, and the strength of their shape', async () => {
    const [band] = await json<[Band]>(putFit({ bands: [fitted], fit }));
    // 1 nm is 14 000.4² / 1e7 = 19.601 cm⁻¹; 0.3 nm by the check, a tenth of the bandwidth of 2 nm.
    expect(band.uncertainty as number).toBeCloseTo(Math.hypot(9, 0.3 * 19.601, 0.2 * 19.601), 2);
    expect(band.oscillatorStrength as number).toBeCloseTo(4.319e-9 * 44_800, 9);
    expect((await read()).fit).toEqual(fit);
  });

  test('keep history and uncertainty when an assignment is mended without it, and lose it with the last of them', async () => {
    const [band] = await json<[Band]>(putFit({ bands: [fitted], fit }));
    const mended = { ...fitted, id: band.id, assignment: { class: 'LMCT' } };
    const [after] = await json<[Band]>(put([mended]));
    expect(after).toMatchObject({ id: band.id, uncertainty: band.uncertainty });
    expect((await read()).fit).toEqual(fit);
    await json(put([second]));
    expect((await read()).fit).toBeNull();
  });

  test('are refused as a whole where a step is none, or where no band was fitted', async () => {
    const before = await read();
    const pointer = async (body: unknown) =>
      (await json<{ errors: { pointer: string }[] }>(putFit(body), 422)).errors[0]!.pointer;
    expect(await pointer({ bands: [fitted], fit: { ...fit, steps: [{ operation: 'guess', parameters: {} }] } })).toBe(
      '#/fit/steps/0/operation',
    );
    expect(await pointer({ bands: [first], fit })).toBe('#/fit');
    expect(await pointer({ bands: [{ ...fitted, id: 'nobody' }], fit })).toBe('#/bands/0/id');
    expect(await read()).toEqual(before);
  });
});
