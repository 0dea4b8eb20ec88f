import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import type { Page } from '#src/contracts/common.ts';
import type { ComplexRecord, ComplexSummary } from '#src/contracts/complexes.ts';
import { call, json, openRegistry } from './harness.ts';
import { lab, person } from './people.ts';

let close: () => Promise<void>;
let north: string;
let south: string;
let contributor: string;
let lead: string;
let outsider: string;
let steward: string;

beforeAll(async () => {
  ({ close } = await openRegistry());
  north = await lab('North Quay');
  south = await lab('South Pier');
  contributor = (await person('contributor', { labs: { [north]: 'contributor' } })).token;
  lead = (await person('lead', { labs: { [north]: 'lead' } })).token;
  outsider = (await person('outsider', { labs: { [south]: 'lead' } })).token;
  steward = (await person('steward', { steward: true })).token;
});
afterAll(() => close());

const post = (body: Record<string, unknown>, as = contributor, labId = north) =>
  call('POST', '/api/complexes', { as, json: { lab: labId, ...body } });
const register = (body: Record<string, unknown>, as?: string, labId?: string) =>
  json<ComplexRecord>(post(body, as, labId), 201);
const read = (accession: string, as = contributor) => call('GET', `/api/complexes/${accession}`, { as });
const list = (query: string, as = contributor) =>
  json<Page<ComplexSummary>>(call('GET', `/api/complexes?${query}`, { as }));

describe('registering', () => {
  test('derives what follows from the formula of a salt', async () => {
    const record = await register({ formula: 'K3[Cr(C2O4)3]·3H2O', geometry: 'OC-6' });
    expect(record).toMatchObject({
      formula: '[Cr(ox)3]3-',
      charge: -3,
      hill: 'C6CrO12',
      pointGroup: 'D3',
      donorSetGroup: 'Oh',
      state: 'registered',
      visibility: 'programme',
      lab: { name: 'North Quay' },
    });
    expect(record.centres).toMatchObject([
      {
        element: 'Cr',
        group: 6,
        oxidationState: { value: 3 },
        dCount: 3,
        geometry: 'OC-6',
        groundTerm: { label: '4A2g', group: 'Oh' },
      },
    ]);
    expect(record.accession).toMatch(/^ZF\d{6}-[0-9A-Z]$/);
  });

  test.each(['[Cr(ox)3]3-', 'K3[Cr(ox)3]', 'Na3[Cr(C2O4)3]·5H2O', 'rac-[Cr(ox)3]^3-'])(
    'meets the record of the same ion written as %s',
    async (formula) => {
      const problem = await json(post({ formula, geometry: 'OC-6' }), 409);
      expect(problem.accession).toMatch(/^ZF/);
    },
  );

  test('keeps cis, trans and each hand apart', async () => {
    const trans = await register({ formula: 'trans-[CoCl2(en)2]Cl', geometry: 'OC-6' });
    expect(trans).toMatchObject({
      pointGroup: 'D2h',
      donorSetGroup: 'D4h',
      isomer: { descriptor: 'trans', chirality: null },
    });
    const cis = await register({ formula: '[CoCl2(en)2]+', geometry: 'OC-6', isomer: 1, chirality: 'rac' });
    expect(cis).toMatchObject({ pointGroup: 'C2', isomer: { descriptor: 'cis', chirality: 'rac' } });
    const lambda = await register({ formula: '[CoCl2(en)2]+', geometry: 'OC-6', isomer: 1 });
    expect(lambda.isomer.chirality).toBe('Λ');
    const unstated = await register({ formula: '[CoCl2(en)2]+' });
    expect(unstated).toMatchObject({ pointGroup: null, isomer: { descriptor: null, sites: null } });
    const { siblings } = await json<ComplexRecord>(read(trans.accession));
    expect(siblings.map((s) => s.accession).sort()).toEqual([cis, lambda, unstated].map((c) => c.accession).sort());
  });

  test('refuses what cannot be read, with its position', async () => {
    const problem = await json(post({ formula: '[Co(NH3)6' }), 422);
    expect(problem.errors).toMatchObject([{ pointer: '#/formula', position: expect.any(Number) }]);
  });

  test('asks before it saves what only a person can settle', async () => {
    const problem = await json(post({ formula: '[Cr(H20)6]3+', geometry: 'OC-6' }), 422);
    const [question] = problem.questions as { code: string; choices: { value: string }[] }[];
    expect(question!.code).toBe('suspicious-token');
    const answered = await register({
      formula: '[Cr(H20)6]3+',
      geometry: 'OC-6',
      answers: { [question!.code]: question!.choices[0]!.value },
    });
    expect(answered.formula).toBe('[Cr(H2O)6]3+');
  });

  test('refuses a polyhedron of another coordination number', async () => {
    const problem = await json(post({ formula: '[Ni(H2O)6]2+', geometry: 'T-4' }), 422);
    expect(problem.errors).toMatchObject([{ pointer: '#/geometry' }]);
  });

  test('refuses unknown fields and a lab of others', async () => {
    await json(post({ formula: '[Ni(H2O)6]2+', dCount: 8 }), 422);
    await json(post({ formula: '[Ni(H2O)6]2+' }, contributor, south), 403);
  });

  test('acts once for one Idempotency-Key', async () => {
    const send = (formula: string) =>
      call('POST', '/api/complexes', {
        as: contributor,
        json: { lab: north, formula },
        headers: { 'idempotency-key': '"k1"' },
      });
    const first = await json<ComplexRecord>(send('[Ni(en)3]2+'), 201);
    const second = await json<ComplexRecord>(send('[Ni(en)3]2+'), 201);
    expect(second.accession).toBe(first.accession);
    await json(send('[Ni(bpy)3]2+'), 422);
  });

  test('a twin out of the maker’s sight is made as usual, and the steward gets a task', async () => {
    await register({ formula: '[Mn(H2O)6]2+', geometry: 'OC-6', visibility: 'lab' }, outsider, south);
    await register({ formula: '[Mn(H2O)6]2+', geometry: 'OC-6' });
    const { database } = await import('#src/server/database.ts');
    const { mergeTasks } = await import('#src/db/schema/index.ts');
    expect(await (await database()).db.select().from(mergeTasks)).toHaveLength(1);
  });
});

describe('changing', () => {
  test('needs the ETag of what was read, and gives a new one', async () => {
    const { accession } = await register({ formula: '[V(H2O)6]3+', geometry: 'OC-6' });
    const path = `/api/complexes/${accession}`;
    await json(call('PATCH', path, { as: lead, json: { notes: 'x' } }), 428);
    const before = (await read(accession, lead)).headers.get('etag')!;
    const after = await call('PATCH', path, {
      as: lead,
      json: { notes: 'kept under argon' },
      headers: { 'if-match': before },
    });
    expect(after.status).toBe(200);
    await json(call('PATCH', path, { as: lead, json: { notes: 'y' }, headers: { 'if-match': before } }), 412);
    expect((await json<ComplexRecord>(read(accession))).notes).toBe('kept under argon');
    expect(
      (await call('GET', path, { as: lead, headers: { 'if-none-match': after.headers.get('etag')! } })).status,
    ).toBe(304);
  });

  test('states an isomer later, and re-derives the groups', async () => {
    const { accession } = await register({ formula: '[CrCl3(NH3)3]', geometry: 'OC-6' });
    const record = await json<ComplexRecord>(
      call('PATCH', `/api/complexes/${accession}`, { as: lead, json: { isomer: 0 }, headers: { 'if-match': '*' } }),
    );
    expect(record.isomer.descriptor).toBe('fac');
    expect(record.pointGroup).toBe('C3v');
  });

  test('another spin state leaves the hand as it was: not stated, rac, or one of the two', async () => {
    const unstated = await register({ formula: '[Fe(bpy)3]2+', geometry: 'OC-6' });
    const racemate = await register({ formula: '[Fe(phen)3]2+', geometry: 'OC-6', chirality: 'rac' });
    const delta = await register({ formula: 'Δ-[Fe(en)3]2+', geometry: 'OC-6' });
    for (const { accession, isomer } of [unstated, racemate, delta]) {
      const record = await json<ComplexRecord>(
        call('PATCH', `/api/complexes/${accession}`, {
          as: lead,
          json: { spinState: 'low' },
          headers: { 'if-match': '*' },
        }),
      );
      expect(record.centres[0]!.spinState).toBe('low');
      expect(record.isomer).toEqual(isomer);
    }
    expect([unstated, racemate, delta].map(({ isomer }) => isomer.chirality)).toEqual([null, 'rac', 'Δ']);
  });

  test('withdraws with a reason only', async () => {
    const { accession } = await register({ formula: '[Fe(H2O)6]3+', geometry: 'OC-6' });
    const send = (body: object) =>
      call('PATCH', `/api/complexes/${accession}`, { as: lead, json: body, headers: { 'if-match': '*' } });
    await json(send({ state: 'withdrawn' }), 422);
    const record = await json<ComplexRecord>(send({ state: 'withdrawn', withdrawnReason: 'hydrolysed sample' }));
    expect(record).toMatchObject({ state: 'withdrawn', withdrawnReason: 'hydrolysed sample' });
    expect((await list('limit=500')).items.map((c) => c.accession)).not.toContain(accession);
    expect((await list('limit=500&state=withdrawn')).items.map((c) => c.accession)).toEqual([accession]);
  });

  test('deletes a draft, and no registered complex', async () => {
    const draft = await register({ formula: '[Ti(H2O)6]3+', state: 'draft' });
    const registered = await register({ formula: '[Cu(H2O)6]2+' });
    const send = (accession: string) =>
      call('DELETE', `/api/complexes/${accession}`, { as: lead, headers: { 'if-match': '*' } });
    expect((await send(draft.accession)).status).toBe(204);
    expect((await read(draft.accession)).status).toBe(404);
    expect((await send(registered.accession)).status).toBe(409);
  });
});

describe('finding', () => {
  test('filters, counts what each filter would leave, and keeps its own choice open', async () => {
    const page = await list('metal=Co&facets=1&sort=accession');
    expect(page.items.every((c) => c.centres[0]!.element === 'Co')).toBe(true);
    expect(page.total).toBe(page.items.length);
    const metals = Object.fromEntries(page.facets!.metal!.map(({ value, count }) => [value, count]));
    expect(metals.Co).toBe(page.total);
    expect(metals.Ni).toBeGreaterThan(0);
    expect(page.facets!.dCount).toEqual([{ value: 6, count: page.total }]);
  });

  test('pages through everything once, in either order, with a Link to the next', async () => {
    const { total } = await list('limit=1');
    for (const sort of ['accession', '-accession', 'metal', '-dCount', 'spectra', 'pointGroup']) {
      const seen: string[] = [];
      let cursor: string | null = '';
      while (cursor !== null) {
        const response = await call('GET', `/api/complexes?limit=3&sort=${sort}${cursor ? `&cursor=${cursor}` : ''}`, {
          as: contributor,
        });
        const page: Page<ComplexSummary> = await json(response);
        seen.push(...page.items.map((c) => c.accession));
        expect(response.headers.has('link')).toBe(page.next !== null);
        cursor = page.next;
      }
      expect(new Set(seen).size).toBe(total);
      expect(seen).toHaveLength(total);
    }
  });

  test('refuses a cursor of another asker or another order', async () => {
    const { next } = await list('limit=2&sort=accession');
    for (const [as, query] of [
      [lead, `sort=accession&cursor=${next}`],
      [contributor, `sort=metal&cursor=${next}`],
    ] as const)
      await json(call('GET', `/api/complexes?limit=2&${query}`, { as }), 400);
  });

  test.each([
    ['q=crox', 0],
    ['q=[Cr(ox)3]', 1],
    ['q=%25', 0],
    ['ligand=en&metal=Co', 4],
    ['pointGroup=D3&metal=Cr', 1],
    ['dCount=3&oxidationState=3&geometry=OC-6&ligand=ox', 1],
    ['bandFrom=400&bandTo=700', 0],
  ])('%s finds %i', async (query, count) => {
    expect((await list(query)).total).toBe(count);
  });

  test('refuses a query that does not fit', async () => {
    const problem = await json(call('GET', '/api/complexes?limit=9999', { as: contributor }), 400);
    expect(problem.errors).toMatchObject([{ pointer: '#/limit' }]);
  });

  test('what is out of sight reads like what is not there, and is not counted', async () => {
    const { accession } = await register({ formula: '[Co(bpy)3]3+', geometry: 'OC-6', visibility: 'lab' });
    const hidden = await read(accession, outsider);
    const missing = await read('ZF000042-X', outsider);
    const nonsense = await read('ZF000042-Y', outsider);
    expect([hidden.status, missing.status, nonsense.status]).toEqual([404, 404, 404]);
    const body = await hidden.text();
    expect(body).toBe(await missing.text());
    expect(body).toBe(await nonsense.text());
    const seen = await list('q=[Co(bpy)3]3%2B&facets=1', outsider);
    expect(seen).toMatchObject({ total: 0, items: [], facets: { metal: [], ligand: [] } });
    expect((await list('q=[Co(bpy)3]3%2B', steward)).total).toBe(1);
  });
});

describe('preparations', () => {
  test('hold counter-ions, solvates and the mass of a formula unit', async () => {
    const { items } = await list('q=[Cr(ox)3]');
    const path = `/api/complexes/${items[0]!.accession}/preparations`;
    const made = await json(
      call('POST', path, {
        as: contributor,
        json: { label: 'NQ-17', lab: north, formula: 'K3[Cr(ox)3]·3H2O', form: 'crystal' },
      }),
      201,
    );
    expect(made).toMatchObject({
      formula: 'K3[Cr(ox)3]·3H2O',
      counterIons: [{ formula: 'K+', count: 3 }],
      solvates: [{ formula: 'H2O', count: 3 }],
    });
    // Molar mass: tests/checks/formula.json, K3[Cr(C2O4)3]·3H2O (IUPAC/CIAAW 2021 weights)
    expect(made.molarMass).toBeCloseTo(487.39, 1);
    const wrong = await json(
      call('POST', path, { as: contributor, json: { label: 'x', lab: north, formula: '[Co(NH3)6]Cl3' } }),
      422,
    );
    expect(wrong.errors).toMatchObject([{ pointer: '#/formula' }]);
  });

  test('a double salt names both complexes, once both are registered', async () => {
    const cation = await register({ formula: '[Co(NH3)6]3+', geometry: 'OC-6' });
    const send = () =>
      call('POST', `/api/complexes/${cation.accession}/preparations`, {
        as: contributor,
        json: { label: 'DS', lab: north, formula: '[Co(NH3)6][Cr(CN)6]' },
      });
    await json(send(), 422);
    const anion = await register({ formula: '[Cr(CN)6]3-', geometry: 'OC-6' });
    const made = await json(send(), 201);
    expect(made.components).toEqual(
      expect.arrayContaining([cation, anion].map((c) => ({ accession: c.accession, perFormulaUnit: 1 }))),
    );
  });
});
