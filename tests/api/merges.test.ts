import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import type { ComplexRecord } from '#src/contracts/complexes.ts';
import type { MergeTask } from '#src/contracts/merges.ts';
import type { SpectrumRecord } from '#src/contracts/spectra.ts';
import { call, json, openRegistry } from './harness.ts';
import { lab, person } from './people.ts';
import { grant } from './shared-content.ts';

type Person = Awaited<ReturnType<typeof person>>;
const any = { 'if-match': '*' };
let registry: Awaited<ReturnType<typeof openRegistry>>;
let north: string;
let south: string;
let northLead: Person;
let southLead: Person;
let member: Person;
let steward: Person;
let guest: Person;

beforeAll(async () => {
  registry = await openRegistry();
  north = await lab('North');
  south = await lab('South');
  northLead = await person('North Lead', { labs: { [north]: 'lead' } });
  southLead = await person('South Lead', { labs: { [south]: 'lead' } });
  member = await person('North Member', { labs: { [north]: 'contributor' } });
  steward = await person('Steward', { steward: true });
  guest = await person('Guest');
});
afterAll(() => registry.close());

const halves = ['F', 'Cl', 'Br', 'I', 'CN', 'NO2', 'OH', 'N3', 'NCS', 'NCO'];
const metals = ['Co', 'Cr', 'Rh', 'Ir', 'Fe'];
let used = 0;
/** One identity a call. */
const freshFormula = () => `[${metals[used % 5]}(${halves[Math.floor(used++ / 5)]})(NH3)5]2+`;

async function register({ token }: Person, labId: string, formula: string, more: object = {}): Promise<string> {
  const body = { formula, geometry: 'OC-6', lab: labId, ...more };
  return (await json<ComplexRecord>(call('POST', '/api/complexes', { as: token, json: body }), 201)).accession;
}

let runs = 0;
async function upload({ token }: Person, labId: string, complex: string, more: object = {}): Promise<string> {
  const lines = Array.from({ length: 60 }, (_, i) => `${400 + 5 * i},${Math.exp(-(((i - 30) / 8) ** 2)).toFixed(4)}`);
  const form = new FormData();
  form.set('file', new File([`Wavelength (nm),Absorbance\n${lines.join('\n')}\n# run ${++runs}`], 'scan.csv'));
  const conditions = { technique: 'solution', solvent: 'water', concentration: 0.01, pathLength: 1 };
  form.set('metadata', JSON.stringify({ complex, lab: labId, ...conditions, ...more }));
  return (await json<{ id: string }>(call('POST', '/api/spectra', { as: token, form }), 201)).id;
}

async function attestedBand(spectrum: string, by: Person, judge: Person): Promise<string> {
  const band = {
    wavenumber: 20_000,
    height: 80,
    quantity: 'epsilon',
    found: 'picked',
    assignment: { class: 'd-d', centre: 0 },
  };
  const [made] = await json<{ id: string }[]>(
    call('PUT', `/api/spectra/${spectrum}/bands`, { as: by.token, json: [band] }),
  );
  await json(call('POST', `/api/bands/${made!.id}/attest`, { as: judge.token, json: { reason: 'as expected' } }));
  return made!.id;
}

const read = ({ token }: Person, path: string) => call('GET', path, { as: token });
const record = (who: Person, accession: string) => json<ComplexRecord>(read(who, `/api/complexes/${accession}`));
const merge = (from: string, into: string, headers: Record<string, string> = any, who = steward) =>
  call('POST', `/api/complexes/${from}/merge`, {
    as: who.token,
    json: { into, reason: 'one ion, written in two ways' },
    headers,
  });
const tasks = async () => (await json<{ items: MergeTask[] }>(read(steward, '/api/merge-tasks?limit=500'))).items;
const taskOf = async (accession: string) =>
  (await tasks()).find(({ first, second }) => [first, second].some(({ complex }) => complex.accession === accession));

/** North's own record and South's of the same complex, of which neither lab knows. */
async function twins() {
  const formula = freshFormula();
  const hidden = await register(member, north, formula, { visibility: 'lab', notes: 'a secret of North' });
  const open = await register(southLead, south, formula);
  return { formula, hidden, open };
}

describe('a pair of records that look like one complex', () => {
  test('waits for the steward with both sides, what differs, and what stands in the way', async () => {
    const { hidden, open } = await twins();
    const task = (await taskOf(hidden))!;
    expect([task.first.complex.accession, task.second.complex.accession]).toEqual([hidden, open]);
    expect(task.differs).toEqual(['lab', 'visibility']);
    expect(task.second.obstacles).toEqual([]);
    expect(task.first.obstacles).toEqual([expect.stringContaining('seen by fewer people')]);
    expect(task.first).toMatchObject({ maker: 'North Member', notes: 'a secret of North', folios: 0 });
  });

  test('is settled once, with a reason, when a person finds them different', async () => {
    const { hidden } = await twins();
    const task = (await taskOf(hidden))!;
    const settle = (body: object) =>
      call('POST', `/api/merge-tasks/${task.id}/settle`, { as: steward.token, json: body });
    expect((await settle({ outcome: 'different' })).status).toBe(422);
    expect((await settle({ outcome: 'merged', reason: 'no' })).status).toBe(422);
    expect((await settle({ outcome: 'different', reason: 'linkage isomers' })).status).toBe(204);
    expect((await settle({ outcome: 'different', reason: 'linkage isomers' })).status).toBe(409);
    expect(await taskOf(hidden)).toBeUndefined();
  });

  test('goes with a draft that is deleted, and is found again when a draft is registered', async () => {
    const formula = freshFormula();
    const hidden = await register(member, north, formula, { visibility: 'lab' });
    const draft = await register(southLead, south, formula, { state: 'draft' });
    expect(await taskOf(draft)).toBeDefined();
    expect((await call('DELETE', `/api/complexes/${draft}`, { as: southLead.token, headers: any })).status).toBe(204);
    expect(await taskOf(hidden)).toBeUndefined();

    const other = freshFormula();
    const early = await register(southLead, south, other, { state: 'draft' });
    const late = await register(member, north, other, { visibility: 'lab' });
    expect(await taskOf(late)).toBeUndefined();
    const registered = { as: southLead.token, headers: any, json: { state: 'registered' } };
    await json(call('PATCH', `/api/complexes/${early}`, registered));
    expect((await taskOf(late))?.second.complex.accession).toBe(early);
  });
});

describe('merging', () => {
  test('moves spectra and preparations, keeps attestations with a note, settles the task, and leaves an alias', async () => {
    const formula = freshFormula();
    const one = await register(member, north, formula, { state: 'draft', notes: 'made in May' });
    const other = await register(southLead, south, formula);
    const spectrum = await upload(member, north, one);
    const band = await attestedBand(spectrum, member, northLead);
    const preparation = await json<{ id: string }>(
      call('POST', `/api/complexes/${one}/preparations`, {
        as: member.token,
        json: { label: 'NM 7', lab: north, formula: formula.replace(/.*/, `${formula.replace(/2\+$/, '')}Cl2`) },
      }),
      201,
    );
    // A twin that the programme sees as well exists only in data of before the index; made by hand here.
    await asRegistered(one);

    const before = await read(steward, `/api/complexes/${one}`);
    expect((await merge(one, other, {})).status).toBe(428);
    expect((await merge(one, other, { 'if-match': '"stale"' })).status).toBe(412);
    const living = await json<ComplexRecord>(merge(one, other, { 'if-match': before.headers.get('etag')! }));

    expect(living).toMatchObject({ accession: other, spectra: 1, notes: `From ${one}: made in May` });
    expect(living.preparations.map(({ id }) => id)).toEqual([preparation.id]);
    expect(living.preparations[0]!.components).toEqual([{ accession: other, perFormulaUnit: 1 }]);
    const moved = await json<SpectrumRecord>(read(member, `/api/spectra/${spectrum}`));
    expect(moved).toMatchObject({ complex: other, species: [{ accession: other }] });
    expect(moved.bands[0]).toMatchObject({
      id: band,
      state: 'attested',
      judgement: `as expected Judged under ${one}, which was merged into this record.`,
      assignment: { centre: 0 },
    });

    const alias = await record(member, one);
    expect(alias).toMatchObject({ accession: other, mergedInto: other });
    expect(await record(member, other)).not.toHaveProperty('mergedInto');
    expect((await record(southLead, other)).history[0]).toMatchObject({ action: 'take-in', detail: { from: one } });
    const found = await json<{ items: { accession: string }[]; total: number }>(
      read(member, `/api/complexes?q=${one}`),
    );
    expect(found).toMatchObject({ total: 1, items: [{ accession: other }] });
    const listed = await json<{ total: number }>(read(member, `/api/spectra?complex=${one}`));
    expect(listed.total).toBe(1);
    expect((await merge(one, other)).status).toBe(409);
  });

  test('a change by the old accession reaches the record that lives on', async () => {
    const { hidden, open } = await twins();
    await json(merge(hidden, open));
    const alias = await read(southLead, `/api/complexes/${hidden}`);
    const headers = { 'if-match': alias.headers.get('etag')! };
    await json(call('PATCH', `/api/complexes/${hidden}`, { as: southLead.token, headers, json: { notes: 'dried' } }));
    expect((await record(southLead, open)).notes).toBe('dried');
  });

  test('brings nothing of one lab’s own into the sight of others', async () => {
    const { hidden, open } = await twins();
    const spectrum = await upload(member, north, hidden);
    const preparation = await json<{ id: string }>(
      call('POST', `/api/complexes/${hidden}/preparations`, { as: member.token, json: { label: 'N1', lab: north } }),
      201,
    );
    const before = await (await read(southLead, `/api/complexes/${open}`)).text();
    await json(merge(hidden, open));
    expect((await read(southLead, `/api/spectra/${spectrum}`)).status).toBe(404);
    expect((await read(southLead, `/api/preparations/${preparation.id}`)).status).toBe(404);
    expect(await (await read(southLead, `/api/complexes/${open}`)).text()).toBe(before);
    expect((await record(northLead, open)).spectra).toBe(1);
    expect((await record(northLead, open)).notes).toBeNull();
    const { history } = await record(steward, open);
    expect(history.map(({ action, detail }) => [action, detail.of])).toEqual([
      ['merge', hidden],
      ['register', undefined],
      ['register', hidden],
    ]);
  });

  test('guests of a folio get no spectrum that nobody shared with them', async () => {
    const { hidden, open } = await twins();
    const [theirs, ours] = [await upload(member, north, hidden), await upload(southLead, south, open)];
    const folio = async (lead: Person, labId: string, items: object[]) =>
      (
        await json<{ id: string }>(
          call('POST', '/api/folios', {
            as: lead.token,
            json: { name: `Of ${labId}`, lab: labId, licence: 'CC-BY-4.0', shows: 'proposed', items },
          }),
          201,
        )
      ).id;
    const ofNorth = await folio(northLead, north, [{ accession: hidden, spectra: 'all' }]);
    const ofSouth = await folio(southLead, south, [{ accession: open, spectra: 'all' }]);
    const northGuest = await person(`North Guest ${runs}`);
    await grant(ofNorth, northGuest.id, 'view', northLead.id);
    await grant(ofSouth, guest.id, 'view', southLead.id);

    await json(merge(hidden, open));
    const idsOf = async (who: Person) =>
      (await json<{ items: { id: string }[] }>(read(who, `/api/spectra?complex=${open}`))).items.map(({ id }) => id);
    expect(await idsOf(guest)).toEqual([ours]);
    expect(await idsOf(northGuest)).toEqual([theirs]);
    expect(await record(northGuest, hidden)).toMatchObject({ accession: open, spectra: 1 });
    const history = (await record(guest, open)).history.map(({ action }) => action);
    expect(history).toEqual(['register']);
    const items = (await json<{ items: unknown[] }>(read(southLead, `/api/folios/${ofSouth}`))).items;
    expect(items).toEqual([{ accession: open, spectra: [ours] }]);
  });

  test('is refused where somebody would lose or gain sight, or where the two are not one', async () => {
    const { hidden, open } = await twins();
    const another = await register(southLead, south, freshFormula());
    const detail = async (response: Response | Promise<Response>) => {
      const answer = await response;
      return `${answer.status} ${((await answer.json()) as { detail: string }).detail}`;
    };
    expect(await detail(merge(open, hidden))).toMatch(/^409 .*seen by fewer people/);
    expect(await detail(merge(hidden, another))).toMatch(/^409 They differ in composition/);
    expect(await detail(merge(hidden, hidden))).toMatch(/^422 /);
    const embargo = { as: southLead.token, headers: any, json: { embargoUntil: '2999-01-01T00:00:00.000Z' } };
    await json(call('PATCH', `/api/complexes/${open}`, embargo));
    expect(await detail(merge(hidden, open))).toMatch(/^409 They are under different embargoes/);
    await json(call('PATCH', `/api/complexes/${open}`, { ...embargo, json: { embargoUntil: null } }));

    const both = await person(`Of both ${runs}`, { labs: { [north]: 'contributor', [south]: 'contributor' } });
    await upload(both, south, hidden);
    expect(await detail(merge(hidden, open))).toMatch(/^409 Spectra or preparations of other labs/);
    expect((await record(member, hidden)).accession).toBe(hidden);
    expect((await record(member, hidden)).spectra).toBe(1);
  });

  test('saved fits go along with their spectra; one of typed wavenumbers is withdrawn', async () => {
    const { hidden, open } = await twins();
    const { centres } = await record(member, hidden);
    const spectrum = await upload(member, north, hidden);
    const fit = (more: object) => {
      const { dCount } = centres[0]!;
      const input = { n: dCount, geometry: 'OC-6', bands: [{ wavenumber: 20_000, ...more }] };
      const sent = call('POST', `/api/complexes/${hidden}/fits`, { as: member.token, json: { input } });
      return json<{ id: string }>(sent, 201);
    };
    const [band] = await json<{ id: string }[]>(
      call('PUT', `/api/spectra/${spectrum}/bands`, {
        as: member.token,
        json: [{ wavenumber: 20_000, height: 80, quantity: 'epsilon', found: 'typed', assignment: { class: 'd-d' } }],
      }),
    );
    const [measured, typed] = [await fit({ band: band!.id }), await fit({})];
    await json(merge(hidden, open));
    const fitsOf = async (who: Person) =>
      (await json<{ id: string }[]>(read(who, `/api/complexes/${open}/fits`))).map(({ id }) => id);
    expect(await fitsOf(member)).toEqual([measured.id]);
    expect(await fitsOf(southLead)).toEqual([]);
    expect((await call('DELETE', `/api/level-fits/${typed.id}`, { as: steward.token })).status).toBe(404);
  });

  test('a chain of aliases ends where the last record lives', async () => {
    const formula = freshFormula();
    const [a, b] = [await register(member, north, formula, { visibility: 'lab' }), await lab(`West ${runs}`)];
    const west = await person(`West Lead ${runs}`, { labs: { [b]: 'lead' } });
    const second = await register(west, b, formula);
    await json(merge(a, second));
    const last = await copyOf(second);
    await json(merge(second, last));
    for (const old of [a, second]) expect(await record(west, old)).toMatchObject({ accession: last, mergedInto: last });
    expect((await json<{ total: number }>(read(west, `/api/complexes?q=${a}`))).total).toBe(1);
  });

  test('a bundle built before still opens, and one ordered by the old accession holds the living record', async () => {
    const { hidden, open } = await twins();
    await json(merge(hidden, open));
    const { id } = await json<{ id: string }>(
      call('POST', '/api/bundles', { as: southLead.token, json: { complexes: [hidden] } }),
      202,
    );
    const { gatherContent, stillOpen } = await import('#src/server/bundles/content.ts');
    const { askerBy } = await import('./people.ts');
    const asker = await askerBy(southLead.token);
    const order = { folioId: null, complexes: [hidden] };
    const content = await gatherContent(asker, order);
    expect(content.complexes.map(({ accession }) => accession)).toEqual([open]);
    const held = { name: id, complexes: [await idOf(hidden)], spectra: [], bands: [] };
    expect(await stillOpen(asker, order, held)).toBe(true);
  });
});

test('an accession is handed out once, also when the last draft that had one is deleted', async () => {
  const draft = await register(member, north, freshFormula(), { state: 'draft' });
  await call('DELETE', `/api/complexes/${draft}`, { as: member.token, headers: any });
  expect(await register(member, north, freshFormula())).not.toBe(draft);
});

describe('moving a spectrum', () => {
  const move = (who: Person, id: string, body: object) =>
    call('POST', `/api/spectra/${id}/move`, {
      as: who.token,
      headers: any,
      json: { reason: 'the other isomer', ...body },
    });

  test('takes it to the right complex, and opens its attestations again', async () => {
    const [wrong, right] = [
      await register(member, north, freshFormula()),
      await register(member, north, freshFormula()),
    ];
    const spectrum = await upload(member, north, wrong);
    await attestedBand(spectrum, member, northLead);
    const moved = await json<SpectrumRecord>(move(northLead, spectrum, { complex: right }));
    expect(moved).toMatchObject({
      complex: right,
      species: [{ accession: right }],
      bands: [{ state: 'proposed', judgedBy: null, judgement: expect.stringContaining('Reopened') }],
    });
    expect((await record(member, wrong)).spectra).toBe(0);
    expect((await record(member, right)).spectra).toBe(1);
    expect((await move(northLead, spectrum, { complex: right })).status).toBe(422);
    expect((await move(member, spectrum, { complex: wrong })).status).toBe(403);
  });

  test('keeps what one lab alone saw with that lab', async () => {
    const [own, open] = [
      await register(member, north, freshFormula(), { visibility: 'lab' }),
      await register(southLead, south, freshFormula()),
    ];
    const spectrum = await upload(member, north, own);
    expect(await json(move(northLead, spectrum, { complex: open }))).toMatchObject({ visibility: 'lab' });
    expect((await read(southLead, `/api/spectra/${spectrum}`)).status).toBe(404);
    const hidden = await register(southLead, south, freshFormula(), { visibility: 'lab' });
    expect((await move(northLead, spectrum, { complex: hidden })).status).toBe(422);
  });

  test('leaves folios that shared it, unless they hold the right complex, too', async () => {
    const [wrong, right] = [
      await register(member, north, freshFormula()),
      await register(member, north, freshFormula()),
    ];
    const [moving, staying] = [await upload(member, north, wrong), await upload(member, north, right)];
    const folio = async (items: object[]) => {
      const body = { name: `Folio ${runs++}`, lab: north, licence: 'CC0-1.0', shows: 'proposed', items };
      const { id } = await json<{ id: string }>(call('POST', '/api/folios', { as: northLead.token, json: body }), 201);
      const reader = await person(`Reader ${runs}`);
      await grant(id, reader.id, 'view', northLead.id);
      return { id, reader };
    };
    const of = (accession: string, spectra: 'all' | string[] = 'all') => ({ accession, spectra });
    const both = await folio([of(wrong, [moving]), of(right, [staying])]);
    const rightOnly = await folio([of(right)]);
    const wrongOnly = await folio([of(wrong)]);
    await json(move(northLead, moving, { complex: right }));
    const sees = async ({ reader }: { reader: Person }) =>
      (await json<{ items: { id: string }[] }>(read(reader, '/api/spectra?sort=created'))).items.map(({ id }) => id);
    expect(await sees(both)).toEqual([moving, staying]);
    expect(await sees(rightOnly)).toEqual([staying]);
    expect(await sees(wrongOnly)).toEqual([]);
  });

  test('does not put the same spectrum of the same file twice on a complex', async () => {
    const [wrong, right] = [
      await register(member, north, freshFormula()),
      await register(member, north, freshFormula()),
    ];
    const same = async (complex: string) => {
      const form = new FormData();
      form.set('file', new File(['Wavelength (nm),Absorbance\n400,0.1\n410,0.2\n420,0.3\n430,0.2\n'], 'same.csv'));
      form.set('metadata', JSON.stringify({ complex, lab: north, technique: 'solution' }));
      return (await json<{ id: string }>(call('POST', '/api/spectra', { as: member.token, form }), 201)).id;
    };
    const [first, second] = [await same(wrong), await same(right)];
    const refused = await json<{ id: string }>(move(northLead, first, { complex: right }), 409);
    expect(refused.id).toBe(second);
  });
});

async function idOf(accession: string): Promise<string> {
  const { database } = await import('#src/server/database.ts');
  const { complexes } = await import('#src/db/schema/index.ts');
  const { eq } = await import('drizzle-orm');
  const { db } = await database();
  return (await db.select().from(complexes).where(eq(complexes.accession, accession)))[0]!.id;
}

/** Make a draft a registered record of the programme under an identity key that the index takes for another. */
async function asRegistered(accession: string): Promise<void> {
  const { database } = await import('#src/server/database.ts');
  const { complexes } = await import('#src/db/schema/index.ts');
  const { eq, sql } = await import('drizzle-orm');
  const { write } = await database();
  await write((tx) =>
    tx
      .update(complexes)
      .set({ state: 'registered', identityKey: sql`${complexes.identityKey} || ' as first written'` })
      .where(eq(complexes.accession, accession)),
  );
}

/** A second record of the programme of the same complex, as older data may hold it. */
async function copyOf(accession: string): Promise<string> {
  const { database } = await import('#src/server/database.ts');
  const { complexes } = await import('#src/db/schema/index.ts');
  const { eq } = await import('drizzle-orm');
  const { formatAccession } = await import('#src/contracts/accession.ts');
  const { newId } = await import('#src/server/ids.ts');
  const { db, write } = await database();
  const [row] = await db.select().from(complexes).where(eq(complexes.accession, accession));
  const copy = formatAccession('ZF', 999_000 + used);
  const more = { id: newId(), number: -1 - used, accession: copy, search: copy.toLowerCase() };
  await write((tx) => tx.insert(complexes).values({ ...row!, ...more, identityKey: `${row!.identityKey} again` }));
  return copy;
}
