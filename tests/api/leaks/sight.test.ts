import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import type { Page } from '#src/contracts/common.ts';
import type { ComplexRecord, ComplexSummary, PreparationRecord } from '#src/contracts/complexes.ts';
import type { FolioRecord, LabRecord } from '#src/contracts/sharing.ts';
import type { BandRecord, SpectrumRecord, SpectrumSummary } from '#src/contracts/spectra.ts';
import { call, json, openRegistry } from '../harness.ts';
import { askerBy } from '../people.ts';
import { complexAsMember, isMember, isSteward, type Sight, sightOf, spectrumAsMember, tally } from './model.ts';
import { type AskerName, askers, buildWorld, type Complex, rolesOf, type Spectrum, type World } from './world.ts';

// What every kind of asker is told, held against a model of the design that shares no line with the program.

let registry: Awaited<ReturnType<typeof openRegistry>>;
let world: World;
beforeAll(async () => {
  registry = await openRegistry();
  world = await buildWorld();
}, 60_000);
afterAll(() => registry.close());

const EVERY_STATE = 'state=draft,registered,withdrawn';
const answered = new Map<AskerName, string[]>();
async function ask(asker: AskerName, path: string): Promise<Response> {
  const response = await call('GET', path, { as: world.people[asker].token });
  if (!response.headers.get('content-type')?.includes('octet-stream'))
    answered.set(asker, [...(answered.get(asker) ?? []), `${path}\n${await response.clone().text()}`]);
  return response;
}
const read = <T>(asker: AskerName, path: string) => json<T>(ask(asker, path));
const accessions = (complexes: readonly { accession: string }[]) => complexes.map(({ accession }) => accession).sort();
const ids = (records: readonly { id: string }[]) => records.map(({ id }) => id).sort();
const counts = (facet: { value: string | number; count: number }[] = []) =>
  Object.fromEntries(facet.map(({ value, count }) => [String(value), count]));

/** Registered spectra of a complex in sight: those that are counted and drawn. */
const counted = (sight: Sight, complex: Complex) =>
  sight.spectra.filter((s) => s.complex === complex && s.state === 'registered');
const shownBands = (sight: Sight, complex: Complex) =>
  sight.spectra.filter((s) => s.complex === complex).flatMap((s) => sight.bandsOf(s));
const labIds = (sight: Sight, complex: Complex) => [
  world.labs[complex.lab],
  ...sight.spectra.filter((s) => s.complex === complex).map((s) => world.labs[s.lab]),
];

describe.each(askers)('%s', (asker) => {
  let sight: Sight;
  beforeAll(() => {
    sight = sightOf(world, asker);
  });

  test('gets in the list of complexes those in sight, with labs, spectra, strip and colour over spectra in sight', async () => {
    const page = await read<Page<ComplexSummary>>(asker, `/api/complexes?limit=500&${EVERY_STATE}`);
    expect(accessions(page.items)).toEqual(accessions(sight.complexes));
    expect(page.total).toBe(sight.complexes.length);
    for (const item of page.items) {
      const complex = sight.complexes.find(({ accession }) => accession === item.accession)!;
      const spectra = counted(sight, complex);
      expect(item.spectra).toBe(spectra.length);
      expect(item.labs).toBe(new Set(spectra.map((s) => s.lab)).size);
      expect([null, ...spectra.map((s) => s.colour)]).toContain(item.colour);
      expect(item.colour === null).toBe(spectra.length === 0);
      const places = spectra.flatMap((s) => sight.bandsOf(s)).map((b) => Math.round(b.wavelength));
      expect(places).toEqual(expect.arrayContaining(item.strip.map((b) => Math.round(1e7 / b.wavenumber))));
      expect(item.strip.length).toBe(Math.max(0, ...spectra.map((s) => sight.bandsOf(s).length)));
    }
  });

  test('gets in every facet counts over complexes in sight', async () => {
    const { facets = {} } = await read<Page<ComplexSummary>>(asker, `/api/complexes?facets=1&${EVERY_STATE}`);
    const told = Object.fromEntries(Object.entries(facets).map(([name, facet]) => [name, counts(facet)]));
    const over = (valuesOf: (complex: Complex) => (string | number)[]) => tally(sight.complexes, valuesOf);
    expect(told).toEqual({
      metal: over((c) => [c.element]),
      oxidationState: over((c) => [c.oxidationState]),
      dCount: over((c) => [c.dCount]),
      geometry: over((c) => [c.geometry]),
      spinState: {},
      pointGroup: over((c) => [world.complexes.indexOf(c) % 2 === 0 ? 'Oh' : 'D3']),
      ligand: over((c) => [c.ligand]),
      lab: over((c) => labIds(sight, c)),
      band: over((c) => shownBands(sight, c).map((b) => Math.floor(b.wavelength / 25 + 1e-9) * 25)),
    });
  });

  test('finds by every filter complexes in sight alone, judged by what is in sight of them', async () => {
    const [first] = world.complexes as [Complex, ...Complex[]];
    const cases: [query: string, matches: (complex: Complex) => boolean][] = [
      ...world.complexes
        .slice(0, 4)
        .map((c): [string, (x: Complex) => boolean] => [`metal=${c.element}`, (x) => x.element === c.element]),
      ...world.complexes
        .slice(2, 6)
        .map((c): [string, (x: Complex) => boolean] => [`ligand=${c.ligand}`, (x) => x.ligand === c.ligand]),
      ...Object.values(world.labs).map((id): [string, (x: Complex) => boolean] => [
        `lab=${id}`,
        (x) => labIds(sight, x).includes(id),
      ]),
      ...[300, 400, 500, 600, 700, 800, 900].map((from): [string, (x: Complex) => boolean] => [
        `bandFrom=${from}&bandTo=${from + 99}`,
        (x) => shownBands(sight, x).some((b) => b.wavelength >= from && b.wavelength <= from + 99),
      ]),
      ...(['d-d', 'LMCT', 'MLCT'] as const).map((kind): [string, (x: Complex) => boolean] => [
        `bandClass=${kind}`,
        (x) => shownBands(sight, x).some((b) => b.class === kind),
      ]),
      ...[11, 13, 15].map((least): [string, (x: Complex) => boolean] => [
        `minEpsilon=${least}`,
        (x) => shownBands(sight, x).some((b) => b.epsilon >= least),
      ]),
      ...world.folios.map((folio): [string, (x: Complex) => boolean] => [
        `folio=${folio.id}`,
        (x) => sight.folios.includes(folio) && folio.items.some((item) => item.complex === x),
      ]),
      [`q=${first.accession}`, (x) => x === first],
      // What was typed at registration, counter-ions and all, guests are not shown and cannot find by.
      ['q=typed-as-', () => isMember(asker)],
    ];
    for (const [query, matches] of cases) {
      const page = await read<Page<ComplexSummary>>(asker, `/api/complexes?limit=500&${EVERY_STATE}&${query}`);
      expect(accessions(page.items), query).toEqual(accessions(sight.complexes.filter(matches)));
      expect(page.total, query).toBe(page.items.length);
    }
  });

  test('opens complexes in sight alone, with inner remarks, names and preparations only of what is seen as a member', async () => {
    const absent = await (await ask(asker, '/api/complexes/ZF999999-0')).text();
    for (const complex of world.complexes) {
      const response = await ask(asker, `/api/complexes/${complex.accession}`);
      const living = complex.mergedInto ? world.complexes.find((c) => c.accession === complex.mergedInto)! : complex;
      const seen = sight.complexes.includes(living);
      expect(response.status, complex.element).toBe(seen ? 200 : 404);
      if (!seen) {
        expect(await response.text()).toBe(absent);
        continue;
      }
      const record = (await response.json()) as ComplexRecord;
      const asMember = complexAsMember(asker, living);
      expect(record.accession).toBe(living.accession);
      expect(record.mergedInto).toBe(complex.mergedInto);
      expect(record.notes).toBe(asMember ? living.note : null);
      const own = { at: expect.any(String), who: asMember ? living.maker : null, action: 'register' };
      expect(record.history.at(-1)).toEqual({ ...own, detail: asMember ? { typed: living.note } : {} });
      const prepared = sight.preparations.filter((p) => p.complex === living && p.state !== 'withdrawn');
      expect(ids(record.preparations)).toEqual(ids(prepared));
      expect(record.may.download).toBe(sight.takesComplexes.includes(living));
      expect(record.doubts).toBe(0);
    }
  });

  test('gets in the list of spectra those in sight, with counts and facets over them', async () => {
    const page = await read<Page<SpectrumSummary>>(asker, '/api/spectra?limit=500&facets=1');
    expect(ids(page.items)).toEqual(ids(sight.spectra));
    expect(page.total).toBe(sight.spectra.length);
    for (const item of page.items) {
      const spectrum = sight.spectra.find(({ id }) => id === item.id)!;
      expect(item.bandCount).toBe(sight.bandsOf(spectrum).length);
      const preparation = spectrum.preparation;
      expect(item.preparation).toBe(preparation && sight.preparations.includes(preparation) ? preparation.id : null);
    }
    expect(counts(page.facets!.lab)).toEqual(tally(sight.spectra, (s) => [world.labs[s.lab]]));
    expect(counts(page.facets!.flag)).toEqual(tally(sight.spectra, (s) => (s.flag ? [s.flag] : [])));
    const technique = sight.spectra.length > 0 ? { solution: sight.spectra.length } : {};
    expect(counts(page.facets!.technique)).toEqual(technique);
    for (const complex of world.complexes) {
      const listed = await read<Page<SpectrumSummary>>(asker, `/api/spectra?complex=${complex.accession}`);
      const living = world.complexes.find((c) => c.accession === (complex.mergedInto ?? complex.accession));
      expect(listed.total, complex.element).toBe(sight.spectra.filter((s) => s.complex === living).length);
    }
  });

  test('opens spectra in sight alone, with bands in sight and files where they may be taken', async () => {
    const absent = await (await ask(asker, '/api/spectra/00000000-0000-7000-8000-000000000000')).text();
    for (const spectrum of world.spectra) {
      const path = `/api/spectra/${spectrum.id}`;
      const response = await ask(asker, path);
      const seen = sight.spectra.includes(spectrum);
      expect(response.status, `${spectrum.title} ${spectrum.lab}`).toBe(seen ? 200 : 404);
      // What hangs on a spectrum goes by the same conditions: of most, some parts are asked for.
      const all = ['bands', 'points', 'file', 'jcamp'];
      const turn = world.spectra.indexOf(spectrum) % 4;
      const asked = seen ? (turn === 0 ? all : ['bands', 'file']) : turn === 0 ? all : [];
      const parts = await Promise.all(asked.map((part) => ask(asker, `${path}/${part}`)));
      const statuses = parts.map(({ status }) => status);
      if (!seen) {
        expect(await response.text()).toBe(absent);
        for (const part of parts) expect(await part.text()).toBe(absent);
        continue;
      }
      const taken = sight.takes.includes(spectrum) ? 200 : 403;
      const expected = asked.map((part) => (part === 'bands' || part === 'points' ? 200 : taken));
      expect(statuses, spectrum.title).toEqual(expected);
      const record = (await response.json()) as SpectrumRecord;
      const bands = (await parts[0]!.json()) as BandRecord[];
      const asMember = spectrumAsMember(asker, spectrum);
      expect(ids(bands)).toEqual(ids(sight.bandsOf(spectrum)));
      expect(ids(record.bands)).toEqual(ids(bands));
      expect([record.notes, record.operator]).toEqual(asMember ? [spectrum.note, spectrum.note] : [null, null]);
      for (const band of bands) expect(band.proposedBy).toBe(asMember ? spectrum.maker : null);
      expect(record.species.map(({ accession }) => accession)).toEqual([spectrum.complex.accession]);
    }
  }, 120_000);

  test('opens preparations in sight alone, of double salts the complexes in sight', async () => {
    const absent = await (await ask(asker, '/api/preparations/00000000-0000-7000-8000-000000000000')).text();
    for (const [i, preparation] of world.preparations.entries()) {
      if (i % 3 > 0 && !preparation.partner) continue;
      const response = await ask(asker, `/api/preparations/${preparation.id}`);
      const seen = sight.preparations.includes(preparation);
      expect(response.status, preparation.label).toBe(seen ? 200 : 404);
      if (!seen) expect(await response.text()).toBe(absent);
      else {
        const { components } = (await response.json()) as PreparationRecord;
        const parts = [preparation.complex, ...(preparation.partner ? [preparation.partner] : [])];
        expect(accessions(components)).toEqual(accessions(parts.filter((c) => sight.complexes.includes(c))));
      }
    }
  });

  test('gets folios in sight with the items in sight, and labs counted over what is in sight', async () => {
    const page = await read<Page<FolioRecord>>(asker, '/api/folios?limit=500');
    expect(ids(page.items)).toEqual(ids(sight.folios));
    expect(page.total).toBe(sight.folios.length);
    for (const folio of world.folios) {
      const response = await ask(asker, `/api/folios/${folio.id}`);
      expect(response.status, folio.name).toBe(sight.folios.includes(folio) ? 200 : 404);
      if (response.status !== 200) continue;
      const { items, grants } = (await response.json()) as FolioRecord;
      const expected = folio.items.filter((item) => sight.complexes.includes(item.complex));
      expect(accessions(items)).toEqual(accessions(expected.map((item) => item.complex)));
      for (const item of items) {
        const shared = expected.find(({ complex }) => complex.accession === item.accession)!.spectra;
        const inSight = (some: Spectrum[]) => ids(some.filter((s) => sight.spectra.includes(s)));
        expect(item.spectra === 'all' ? 'all' : [...item.spectra].sort()).toEqual(shared ? inSight(shared) : 'all');
      }
      if (!isSteward(asker) && rolesOf(asker)[folio.lab] !== 'lead') expect(grants).toEqual([]);
    }
    if (!isMember(asker)) return;
    const { items } = await read<Page<LabRecord>>(asker, '/api/labs');
    for (const [name, id] of Object.entries(world.labs))
      expect(items.find((lab) => lab.id === id)).toMatchObject({
        complexes: sight.complexes.filter((c) => c.lab === name).length,
        spectra: sight.spectra.filter((s) => s.lab === name).length,
      });
  });

  test('finds on the day sheet nothing but what is in sight', async () => {
    const { daySheet } = await import('#src/server/day-sheet/day-sheet.ts');
    const sheet = await daySheet(await askerBy(world.people[asker].token));
    const spectrumIds = new Set(sight.spectra.map(({ id }) => id));
    const told = [...sheet.recentSpectra, ...sheet.toAttest.items, ...sheet.spectrumDrafts.items];
    expect(told.filter(({ id }) => !spectrumIds.has(id))).toEqual([]);
    const byMember = ({ id }: { id: string }) => spectrumAsMember(asker, world.spectra.find((s) => s.id === id)!);
    expect(sheet.toAttest.items.filter((item) => !byMember(item))).toEqual([]);
    const registered = sight.spectra.filter((s) => s.state === 'registered').length;
    expect(sheet.recentSpectra.length).toBe(isMember(asker) ? Math.min(8, registered) : 0);
    const mine = <T extends { maker: string; state: string }>(records: T[]) =>
      records.filter((r) => r.maker === asker && r.state === 'draft').length;
    expect([sheet.drafts.total, sheet.spectrumDrafts.total]).toEqual([mine(sight.complexes), mine(sight.spectra)]);
    const open = world.grants.filter((g) => g.to === asker && !g.ended && !g.folio.embargoed);
    expect(ids(sheet.folios)).toEqual(ids(open.map((g) => g.folio)));
    expect(sheet.mergeTasks).toBe(isSteward(asker) ? 0 : null);
  });

  test('takes away in a bundle what may be taken, and nothing else', async () => {
    const { gatherContent } = await import('#src/server/bundles/content.ts');
    const person = await askerBy(world.people[asker].token);
    const selection = { folioId: null, complexes: world.complexes.map(({ accession }) => accession) };
    const content = await gatherContent(person, selection);
    expect(accessions(content.complexes)).toEqual(accessions(sight.takesComplexes));
    expect(ids(content.spectra)).toEqual(ids(sight.takes));
    expect(ids(content.bands)).toEqual(ids(sight.takes.flatMap((s) => sight.takenBandsOf(s))));
  });

  test('is told in no answer of all these any id, number or remark that is out of sight', () => {
    const open = new Set([
      ...sight.complexes.flatMap((c) => [c.id, c.accession, ...(complexAsMember(asker, c) ? [c.note] : [])]),
      ...sight.spectra.flatMap((s) => [
        s.id,
        s.title,
        ...(spectrumAsMember(asker, s) ? [s.note] : []),
        ...sight.bandsOf(s).map((b) => b.id),
      ]),
      ...sight.preparations.flatMap((p) => [p.id, p.label]),
      ...sight.folios.map((f) => f.id),
      // What became of a record that was merged away the steward reads in the history of the one that lives on.
      ...(isSteward(asker) ? world.complexes.filter((c) => c.mergedInto).flatMap((c) => [c.note, c.accession]) : []),
    ]);
    const secrets = [
      ...world.complexes.flatMap((c) => [c.id, c.accession, c.note]),
      ...world.spectra.flatMap((s) => [s.id, s.title, s.note, ...s.bands.map((b) => b.id)]),
      ...world.preparations.flatMap((p) => [p.id, p.label]),
      ...world.folios.map((f) => f.id),
    ].filter((secret) => !open.has(secret));
    const answers = (answered.get(asker) ?? []).map((text) => text.slice(text.indexOf('\n')));
    expect(answers.length).toBeGreaterThan(120);
    const told = secrets.filter((secret) => answers.some((answer) => answer.includes(secret)));
    expect(told).toEqual([]);
  });
});
