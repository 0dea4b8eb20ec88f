import { afterAll, beforeAll, expect, test } from 'vitest';
import { call, json, openRegistry } from './harness.ts';
import { lab, person } from './people.ts';
import { complex, spectrum } from './shared-content.ts';
import { difdup, formOf, inventedCurve, warmReader } from './spectra-files.ts';

type Person = Awaited<ReturnType<typeof person>>;
interface Measured {
  forOthers: { lab: { id: string; name: string }; spectra: number }[];
  elsewhere: { lab: { id: string; name: string }; spectra: number }[];
}
let registry: Awaited<ReturnType<typeof openRegistry>>;
let north: string;
let facility: string;
let steward: Person;
let maker: Person;
let lead: Person;
let operator: Person;
let open: { id: string; accession: string };

beforeAll(async () => {
  registry = await openRegistry();
  await warmReader();
  [north, facility] = [await lab('North'), await lab('Optics facility')];
  steward = await person('Steward', { steward: true });
  lead = await person('Lead', { labs: { [north]: 'lead' } });
  maker = await person('Maker', { labs: { [north]: 'contributor' } });
  operator = await person('Operator', { labs: { [facility]: 'contributor' } });
  open = await complex({ lab: north, maker: maker.id }, 800);
}, 60_000);
afterAll(async () => {
  const { closeWorkers } = await import('#src/server/worker-pool.ts');
  await closeWorkers();
  await registry.close();
});

const prepare = async (accession: string, more: object = {}) =>
  (
    await json<{ id: string }>(
      call('POST', `/api/complexes/${accession}/preparations`, {
        as: maker.token,
        json: { label: 'Batch', lab: north, ...more },
      }),
      201,
    )
  ).id;
const measure = (preparation: string, more: object = {}) => {
  const metadata = { preparation, technique: 'solution', solvent: 'water', ...more };
  const file = difdup(inventedCurve(), [`##$MARK= ${preparation} ${JSON.stringify(more)}`]);
  return call('POST', '/api/spectra', { as: operator.token, form: formOf(file, metadata) });
};
const counts = (labId: string, as: string) => json<Measured>(call('GET', `/api/labs/${labId}/measured`, { as }));

test('a lead of the lab or a steward says that it is a facility; every member reads it', async () => {
  const patch = (as: string) =>
    call('PATCH', `/api/labs/${facility}`, { as, json: { facility: true }, headers: { 'if-match': '*' } });
  expect((await patch(operator.token)).status).toBe(403);
  expect((await patch(lead.token)).status).toBe(403);
  expect(await json(patch(steward.token))).toMatchObject({ facility: true });
  expect(await json(call('GET', `/api/labs/${facility}`, { as: maker.token }))).toMatchObject({ facility: true });
  expect(await json(call('GET', `/api/labs/${north}`, { as: maker.token }))).toMatchObject({ facility: false });
});

test('a facility measures a preparation of another lab; that lab sees it and its lead does not change it', async () => {
  const preparation = await prepare(open.accession);
  const made = await json<{ id: string; lab: { id: string } }>(measure(preparation), 201);
  expect(made.lab.id).toBe(facility);
  const seen = await json<{ preparation: string | null }>(call('GET', `/api/spectra/${made.id}`, { as: maker.token }));
  expect(seen.preparation).toBe(preparation);
  const patch = (as: string) =>
    call('PATCH', `/api/spectra/${made.id}`, { as, json: { notes: 'mine' }, headers: { 'if-match': '*' } });
  expect((await patch(lead.token)).status).toBe(403);
  expect((await patch(operator.token)).status).toBe(200);

  const kept = await json<{ id: string }>(measure(preparation, { visibility: 'lab' }), 201);
  expect((await call('GET', `/api/spectra/${kept.id}`, { as: lead.token })).status).toBe(404);
  // Each counts what it sees: the facility both, the preparing lab the one for the programme.
  const [north_, optics] = [
    { id: north, name: 'North' },
    { id: facility, name: 'Optics facility' },
  ];
  expect(await counts(facility, operator.token)).toEqual({ forOthers: [{ lab: north_, spectra: 2 }], elsewhere: [] });
  expect(await counts(facility, lead.token)).toEqual({ forOthers: [{ lab: north_, spectra: 1 }], elsewhere: [] });
  expect(await counts(north, lead.token)).toEqual({ forOthers: [], elsewhere: [{ lab: optics, spectra: 1 }] });
});

test('a preparation for its own lab is out of the sight of the facility', async () => {
  const hidden = await prepare(open.accession, { visibility: 'lab' });
  expect((await call('GET', `/api/preparations/${hidden}`, { as: operator.token })).status).toBe(404);
  expect(await json(measure(hidden), 422)).toMatchObject({ errors: [{ pointer: '#/preparation' }] });
});

test('what a lab measured itself counts nowhere, nor does what hangs on a preparation out of sight', async () => {
  const hidden = await prepare(open.accession, { visibility: 'lab', label: 'Hidden' });
  const before = await counts(north, operator.token);
  const own = await spectrum({ lab: north, maker: maker.id }, open.id, { text: 'own\n' });
  const other = await spectrum({ lab: facility, maker: operator.id }, open.id, { text: 'other\n' });
  const { database } = await import('#src/server/database.ts');
  const { spectra } = await import('#src/db/schema/index.ts');
  const { inArray } = await import('drizzle-orm');
  await (await database()).write((tx) =>
    tx
      .update(spectra)
      .set({ preparationId: hidden })
      .where(inArray(spectra.id, [own.id, other.id])),
  );
  expect(await counts(north, operator.token)).toEqual(before);
  expect((await counts(north, lead.token)).elsewhere).toEqual([{ ...before.elsewhere[0], spectra: 2 }]);
});
