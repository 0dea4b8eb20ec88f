import { afterAll, beforeAll, expect, test } from 'vitest';
import { call, json, openRegistry } from './harness.ts';
import { lab, person } from './people.ts';
import { difdup, formOf, inventedCurve } from './spectra-files.ts';
import { complex, share } from './spectra-world.ts';

interface Fit {
  id: string;
  result: { delta: number; B: number; assignments: { to: string }[] };
  input: { bands: { band?: string; spectrum?: string }[] };
  release: string;
  madeBy: string | null;
  note: string | null;
  may: { withdraw: boolean };
}
type Person = Awaited<ReturnType<typeof person>>;

let close: () => Promise<void>;
let north: string;
let ada: Person;
let bea: Person;
let lead: Person;
let guest: Person;
let nickel: { id: string; accession: string };
let bands: { id: string; wavenumber: number }[];
let spectrum: string;

// Bands of [Ni(H2O)6]2+ and what the textbook makes of them: Δ = ν₁, 15B = ν₂ + ν₃ − 3ν₁ (common practice).
const observed = [
  { wavenumber: 8500, to: '3T2g' },
  { wavenumber: 13_800, to: '3T1g(F)' },
  { wavenumber: 25_300, to: '3T1g(P)' },
];
const input = { n: 8, geometry: 'OC-6', metal: 'Ni', oxidationState: 2, bands: observed };

beforeAll(async () => {
  ({ close } = await openRegistry());
  north = await lab('North Quay');
  const south = await lab('South Pier');
  ada = await person('Ada', { labs: { [north]: 'contributor' } });
  lead = await person('Lin', { labs: { [north]: 'lead' } });
  bea = await person('Bea', { labs: { [south]: 'contributor' } });
  guest = await person('Gil');
  nickel = await complex(north, ada.id);
  await share({ labId: north, makerId: lead.id, complexId: nickel.id, guestId: guest.id });
  const body = formOf(difdup(inventedCurve(), ['##$MARK= fit']), {
    complex: nickel.accession,
    technique: 'solution',
    solvent: 'water',
    concentration: 0.05,
    pathLength: 1,
    bandwidth: 2,
  });
  spectrum = (await json<{ id: string }>(call('POST', '/api/spectra', { as: ada.token, form: body }), 201)).id;
  const list = observed.map(({ wavenumber, to }) => ({
    wavenumber,
    height: 5,
    quantity: 'epsilon',
    found: 'typed',
    assignment: { class: 'd-d', from: '3A2g', to },
  }));
  bands = await json(
    call('PUT', `/api/spectra/${spectrum}/bands`, { as: ada.token, json: list, headers: { 'if-match': '*' } }),
  );
});
afterAll(() => close());

const url = () => `/api/complexes/${nickel.accession}/fits`;
const save = (body: object, as = ada.token) => call('POST', url(), { as, json: body });
const list = (as: string) => json<Fit[]>(call('GET', url(), { as }));
const named = () => ({ ...input, bands: observed.map((band, i) => ({ ...band, band: bands[i]!.id })) });
const visibility = (value: 'programme' | 'lab') =>
  json(
    call('PATCH', `/api/spectra/${spectrum}`, {
      as: ada.token,
      json: { visibility: value },
      headers: { 'if-match': '*' },
    }),
  );

test('a fit is computed again, and kept with its input, its bands and the release', async () => {
  const saved = await json<Fit>(save({ input: named(), note: 'all three bands' }), 201);
  expect(saved.result.delta).toBeCloseTo(8500, -2);
  expect(saved.result.B / ((13_800 + 25_300 - 3 * 8500) / 15)).toBeCloseTo(1, 1);
  expect(saved.input.bands.every((band) => band.spectrum === spectrum)).toBe(true);
  expect(saved).toMatchObject({ madeBy: 'Ada', note: 'all three bands', may: { withdraw: true } });
  expect(saved.release).toMatch(/^\d+\.\d+\.\d+$/);
  // What a client claims to have found is no part of the request.
  const refused = await json<{ status: number }>(save({ input: named(), result: { delta: 1 } }), 422);
  expect(refused.status).toBe(422);
});

test('what does not belong to the complex is refused at its place', async () => {
  const places = async (body: object) =>
    (await json<{ errors: { pointer: string }[] }>(save(body), 422)).errors.map(({ pointer }) => pointer);
  expect(await places({ input: { ...input, n: 3 } })).toEqual(['#/input/n']);
  expect(await places({ input: { ...input, metal: 'Co' } })).toEqual(['#/input/metal']);
  expect(await places({ input: { ...input, oxidationState: 3 } })).toEqual(['#/input/oxidationState']);
  expect(await places({ centre: 4, input })).toEqual(['#/centre']);
  expect(await places({ input, candidate: 40 })).toEqual(['#/candidate']);
  const moved = named();
  moved.bands[1]!.wavenumber += 20;
  expect(await places({ input: moved })).toEqual(['#/input/bands/1/wavenumber']);
  const strange = named();
  strange.bands[0]!.band = 'of-nobody';
  expect(await places({ input: strange })).toEqual(['#/input/bands/0/band']);
});

test('a guest sees the fits whose bands they see, without names and notes', async () => {
  await json(save({ input, note: 'typed wavenumbers' }), 201);
  expect(await list(ada.token)).toHaveLength(2);
  const shown = await list(guest.token);
  expect(shown).toHaveLength(1);
  expect(shown[0]).toMatchObject({ madeBy: null, note: null, may: { withdraw: false } });
  expect(await list(bea.token)).toHaveLength(2);
});

test('a fit of a spectrum out of sight is not shown, nor may it be withdrawn', async () => {
  const [fit] = (await list(ada.token)).filter(({ note }) => note === 'all three bands');
  await visibility('lab');
  expect((await list(bea.token)).map(({ note }) => note)).toEqual(['typed wavenumbers']);
  await json(call('DELETE', `/api/level-fits/${fit!.id}`, { as: bea.token }), 404);
  await visibility('programme');
  await json(call('DELETE', `/api/level-fits/${fit!.id}`, { as: bea.token }), 403);
});

test('the lead of the home lab withdraws a fit, once', async () => {
  const before = await list(lead.token);
  const { id } = before[0]!;
  expect((await call('DELETE', `/api/level-fits/${id}`, { as: lead.token })).status).toBe(204);
  expect((await list(lead.token)).map((fit) => fit.id)).not.toContain(id);
  await json(call('DELETE', `/api/level-fits/${id}`, { as: lead.token }), 404);
});

test('a fit for the home lab alone is shown to its members and its maker', async () => {
  const saved = await json<Fit>(save({ input, visibility: 'lab', note: 'for us' }), 201);
  expect((await list(lead.token)).map(({ id }) => id)).toContain(saved.id);
  expect((await list(bea.token)).map(({ id }) => id)).not.toContain(saved.id);
});
