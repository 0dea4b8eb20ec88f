import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { call, json, openRegistry } from './harness.ts';
import { lab, person } from './people.ts';
import { difdup, formOf, inventedCurve, warmReader } from './spectra-files.ts';
import { complex, share } from './spectra-world.ts';

type Person = Awaited<ReturnType<typeof person>>;
interface Points {
  xUnit: string;
  yUnit: string;
  x: number[];
  y: (number | null)[];
  decimated: boolean;
}
interface Record_ {
  id: string;
  [name: string]: unknown;
}

let registry: Awaited<ReturnType<typeof openRegistry>>;
let north: string;
let south: string;
let ada: Person;
let lead: Person;
let viewer: Person;
let taker: Person;
let stranger: Person;
let shared: { id: string; accession: string };
let kept: { id: string; accession: string };
let green: Record_;
let fine: Record_;
let unknownCell: Record_;
let own: Record_;

const curve = inventedCurve();
/** Finer than a guest may see it: 420 nm in steps of 0.05. */
const fineCurve = inventedCurve(0.05);
let fineSpike = 0;

async function upload(as: string, accession: string, body: string, more: object = {}): Promise<Record_> {
  const metadata = {
    complex: accession,
    technique: 'solution',
    solvent: 'water',
    concentration: 0.05,
    pathLength: 1,
    ...more,
  };
  return json<Record_>(call('POST', '/api/spectra', { as, form: formOf(body, metadata) }), 201);
}
const points = (spectrum: Record_, query = '', as = ada.token) =>
  json<Points>(call('GET', `/api/spectra/${spectrum.id}/points?${query}`, { as }));

beforeAll(async () => {
  registry = await openRegistry();
  await warmReader();
  north = await lab('North');
  south = await lab('South');
  ada = await person('Ada', { labs: { [north]: 'contributor' } });
  lead = await person('Lea', { labs: { [north]: 'lead' } });
  stranger = await person('Sten', { labs: { [south]: 'contributor' } });
  viewer = await person('Vi');
  taker = await person('Tak');
  shared = await complex(north, ada.id);
  kept = await complex(north, ada.id, { formula: '[Cu(OH2)6]2+' });
  await share({ labId: north, makerId: lead.id, complexId: shared.id, guestId: viewer.id }, { shows: 'attested' });
  await share({ labId: north, makerId: lead.id, complexId: shared.id, guestId: taker.id }, { level: 'download' });
  green = await upload(ada.token, shared.accession, difdup(curve), { operator: 'Ada', notes: 'for us' });
  // One narrow spike, which no thinning may lose.
  fineSpike = 4321;
  fineCurve.y[fineSpike] = 1.5;
  const rows = fineCurve.x.map((x, i) => `${x.toFixed(2)},${i === 99 ? '' : fineCurve.y[i]}`);
  const csv = `wavelength / nm,absorbance\n${rows.join('\n')}\n`;
  fine = await upload(ada.token, shared.accession, csv, { title: 'Fine steps' });
  unknownCell = await upload(
    ada.token,
    kept.accession,
    difdup(curve, ['##YUNITS= TRANSMITTANCE']).replace('##YUNITS= ABSORBANCE\r\n', ''),
    {
      concentration: undefined,
      pathLength: undefined,
      solvent: 'acetone',
    },
  );
  own = await upload(ada.token, kept.accession, difdup(curve), { visibility: 'lab', title: 'Only ours' });
}, 60_000);
afterAll(async () => {
  const { closeWorkers } = await import('#src/server/worker-pool.ts');
  await closeWorkers();
  await registry.close();
});

describe('points', () => {
  test('rise in cm⁻¹ and are ε = A/(c·l) where the conditions give it', async () => {
    const { x, y, yUnit, decimated } = await points(green);
    expect(yUnit).toBe('epsilon');
    expect(decimated).toBe(false);
    expect(x[0]).toBeCloseTo(12_500, 6);
    expect(x).toEqual([...x].sort((a, b) => a - b));
    expect(y[0]).toBeCloseTo(curve.y.at(-1)! / 0.05, 9);
  });

  test.each([
    ['nm', 380, 800],
    ['um', 0.38, 0.8],
    ['cm-1', 1e7 / 800, 1e7 / 380],
    // hc/e = 1239.841984 eV nm, c = 299792.458 THz nm: CODATA 2018, exact.
    ['eV', 1239.841984 / 800, 1239.841984 / 380],
    ['THz', 299_792.458 / 800, 299_792.458 / 380],
  ])('in %s rise from %f to %f', async (unit, first, last) => {
    const { x, xUnit } = await points(green, `xUnit=${unit}`);
    expect(xUnit).toBe(unit);
    expect(x[0]! / first).toBeCloseTo(1, 8);
    expect(x.at(-1)! / last).toBeCloseTo(1, 8);
    expect(x).toEqual([...x].sort((a, b) => a - b));
  });

  test('in each quantity agree with the absorbance', async () => {
    const at = async (yUnit: string) => (await points(green, `xUnit=nm&yUnit=${yUnit}&from=400&to=400`)).y[0]!;
    const absorbance = curve.y[curve.x.indexOf(400)]!;
    expect(await at('absorbance')).toBeCloseTo(absorbance, 9);
    expect(await at('file')).toBeCloseTo(absorbance, 9);
    expect(await at('epsilon')).toBeCloseTo(absorbance / 0.05, 9);
    expect(await at('log-epsilon')).toBeCloseTo(Math.log10(absorbance / 0.05), 9);
    expect(await at('transmittance')).toBeCloseTo(10 ** -absorbance, 9);
  });

  test('of a file in transmittance without cell are those of the file, and no ε', async () => {
    const plain = await points(unknownCell, 'xUnit=nm');
    expect(plain).toMatchObject({ yUnit: 'transmittance', x: curve.x });
    const { y } = await points(unknownCell, 'xUnit=nm&yUnit=absorbance&from=400&to=400');
    expect(y[0]).toBeCloseTo(-Math.log10(curve.y[curve.x.indexOf(400)]!), 9);
    expect(
      await json(call('GET', `/api/spectra/${unknownCell.id}/points?yUnit=epsilon`, { as: ada.token }), 422),
    ).toMatchObject({
      errors: [{ pointer: '#/yUnit' }],
    });
  });

  test('thinned keep extremes and the gap; a wrong unit is 400', async () => {
    const { x, y, decimated } = await points(fine, 'xUnit=nm&yUnit=absorbance&max=100');
    expect(decimated).toBe(true);
    expect(x.length).toBeLessThanOrEqual(100);
    expect(Math.max(...y.map((v) => v ?? 0))).toBe(1.5);
    expect(y).toContain(null);
    const whole = await points(fine, 'max=200000');
    expect(whole).toMatchObject({ decimated: false });
    expect(whole.x).toHaveLength(fineCurve.x.length);
    expect((await call('GET', `/api/spectra/${fine.id}/points?xUnit=miles`, { as: ada.token })).status).toBe(400);
  });
});

describe('a guest', () => {
  test('with view gets one thinning of the whole curve, whatever windows and units are asked for', async () => {
    const seen = new Set<number>();
    for (const unit of ['nm', 'cm-1'])
      for (const yUnit of ['absorbance', 'transmittance', 'file'])
        for (let from = 380; from < 800; from += 70) {
          const [a, b] = unit === 'nm' ? [from, from + 70] : [1e7 / (from + 70), 1e7 / from];
          const { x } = await points(fine, `xUnit=${unit}&yUnit=${yUnit}&from=${a}&to=${b}&max=200000`, viewer.token);
          for (const value of x) seen.add(Math.round((unit === 'nm' ? value : 1e7 / value) * 100));
        }
    expect(seen.size).toBeGreaterThan(1000);
    expect(seen.size).toBeLessThanOrEqual(2000);
    expect((await points(fine, 'max=200000', taker.token)).x).toHaveLength(fineCurve.x.length);
  });

  test('with view gets no files, with download the same as a member', async () => {
    for (const what of ['file', 'jcamp']) {
      expect((await call('GET', `/api/spectra/${green.id}/${what}`, { as: viewer.token })).status).toBe(403);
      expect((await call('GET', `/api/spectra/${green.id}/${what}`, { as: taker.token })).status).toBe(200);
    }
    const may = (as: string) => json(call('GET', `/api/spectra/${green.id}`, { as }));
    expect(await may(viewer.token)).toMatchObject({
      may: { change: false, propose: false, attest: false, download: false },
    });
    expect(await may(taker.token)).toMatchObject({ may: { download: true } });
  });

  test('learns neither names and notes of the lab nor that other spectra exist', async () => {
    expect(await json(call('GET', `/api/spectra/${green.id}`, { as: viewer.token }))).toMatchObject({
      operator: null,
      notes: null,
    });
    const missing = await call('GET', '/api/spectra/none', { as: viewer.token });
    for (const spectrum of [own, unknownCell]) {
      const hidden = await call('GET', `/api/spectra/${spectrum.id}`, { as: viewer.token });
      expect(hidden.status).toBe(404);
      expect(await hidden.text()).toBe(await missing.clone().text());
    }
    const list = await json(call('GET', '/api/spectra?facets=1', { as: viewer.token }));
    expect(list).toMatchObject({ total: 2, facets: { technique: [{ value: 'solution', count: 2 }] } });
  });

  test('sees attested bands alone where the folio says so', async () => {
    const bands = [
      { wavenumber: 14_000, height: 12.4, quantity: 'epsilon', found: 'picked', assignment: { class: 'd-d' } },
      { wavenumber: 25_000, height: 18, quantity: 'epsilon', found: 'picked', assignment: { class: 'd-d' } },
    ];
    const put = await json<{ id: string }[]>(
      call('PUT', `/api/spectra/${green.id}/bands`, { as: ada.token, json: bands }),
    );
    await json(call('POST', `/api/bands/${put[0]!.id}/attest`, { as: lead.token, json: {} }));
    const idsOf = async (as: string) =>
      (await json<{ id: string }[]>(call('GET', `/api/spectra/${green.id}/bands`, { as }))).map(({ id }) => id);
    expect(await idsOf(viewer.token)).toEqual([put[0]!.id]);
    expect(await idsOf(taker.token)).toEqual(put.map(({ id }) => id));
    expect(await json(call('GET', `/api/spectra/${green.id}`, { as: viewer.token }))).toMatchObject({
      bandCount: 1,
      bands: [{ id: put[0]!.id, state: 'attested', proposedBy: null, judgedBy: null }],
    });
    expect((await call('POST', `/api/bands/${put[1]!.id}/attest`, { as: viewer.token, json: {} })).status).toBe(403);
  });
});

describe('list', () => {
  const list = (query: string, as = ada.token) =>
    json<{
      items: Record_[];
      total: number;
      next: string | null;
      facets?: Record<string, { value: string; count: number }[]>;
    }>(call('GET', `/api/spectra?${query}`, { as }));

  test('filters, and counts every choice with the other filters kept', async () => {
    expect((await list('')).total).toBe(4);
    expect((await list('', stranger.token)).total).toBe(3);
    expect((await list(`complex=${kept.accession}`)).total).toBe(2);
    expect((await list('q=fine')).items.map(({ id }) => id)).toEqual([fine.id]);
    expect((await list('q=acetone')).items.map(({ id }) => id)).toEqual([unknownCell.id]);
    expect((await list('q=100%25')).total).toBe(0);
    expect((await list(`lab=${south}`)).total).toBe(0);
    const { items, facets } = await list('flag=no-concentration&facets=1');
    expect(items.map(({ id }) => id)).toEqual([unknownCell.id]);
    expect(facets!.lab).toMatchObject([{ value: north, label: 'North', count: 1 }]);
    expect(facets!.flag!.find(({ value }) => value === 'no-concentration')).toEqual({
      value: 'no-concentration',
      count: 1,
    });
  });

  test.each(['created', '-created', 'title', '-title', 'complex', '-complex'])(
    'pages through in the order %s, once each',
    async (sort) => {
      const ids: string[] = [];
      let cursor: string | null = '';
      while (cursor !== null) {
        const page: Awaited<ReturnType<typeof list>> = await list(
          `sort=${sort}&limit=1${cursor ? `&cursor=${cursor}` : ''}`,
        );
        ids.push(...page.items.map(({ id }) => id));
        cursor = page.next;
      }
      expect(ids).toEqual((await list(`sort=${sort}`)).items.map(({ id }) => id));
      expect(new Set(ids).size).toBe(4);
    },
  );

  test('binds a cursor to the asker and the filters', async () => {
    const { next } = await list('limit=1');
    expect((await call('GET', `/api/spectra?limit=1&cursor=${next}`, { as: stranger.token })).status).toBe(400);
    expect((await call('GET', `/api/spectra?limit=1&sort=title&cursor=${next}`, { as: ada.token })).status).toBe(400);
  });
});

test('a member of another lab who sees a spectrum by a grant to look at it takes no files of it', async () => {
  const hidden = await complex(north, ada.id, { visibility: 'lab' });
  const spectrum = await upload(ada.token, hidden.accession, difdup(curve), { visibility: 'lab' });
  const partner = await person('Pia', { labs: { [south]: 'lead' } });
  expect((await call('GET', `/api/spectra/${spectrum.id}`, { as: partner.token })).status).toBe(404);
  await share({ labId: north, makerId: lead.id, complexId: hidden.id, guestId: partner.id });
  expect(await json(call('GET', `/api/spectra/${spectrum.id}`, { as: partner.token }))).toMatchObject({
    may: { download: false },
  });
  expect((await call('GET', `/api/spectra/${spectrum.id}/file`, { as: partner.token })).status).toBe(403);
});
