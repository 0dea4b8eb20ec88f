import { and, eq } from 'drizzle-orm';
import { afterAll, beforeAll, describe, expect, test, vi } from 'vitest';
import { call, json, openRegistry } from '../harness.ts';
import { person } from '../people.ts';
import { grant, spectrum as storeSpectrum } from '../shared-content.ts';
import { sightOf } from './model.ts';
import { askers, buildWorld, type World } from './world.ts';

// Roundabout ways to learn of what is out of sight: tags, cursors, keys of repeated requests, duplicates, the work that
// an answer costs, and the moment after access ended.

let registry: Awaited<ReturnType<typeof openRegistry>>;
let world: World;
beforeAll(async () => {
  registry = await openRegistry();
  world = await buildWorld();
}, 60_000);
afterAll(() => registry.close());

const get = (as: string, path: string, headers: Record<string, string> = {}) => call('GET', path, { as, headers });
const tokenOf = (name: keyof World['people']) => world.people[name].token;
const complexOf = (element: string) => world.complexes.find((complex) => complex.element === element)!;
/** The part of a problem that may differ from request to request is none: refusals are compared whole. */
const whole = async (response: Response) => ({ status: response.status, body: await response.text() });

async function endMembership(accountId: string): Promise<void> {
  const { database } = await import('#src/server/database.ts');
  const { memberships } = await import('#src/db/schema/index.ts');
  await (await database()).write((tx) => tx.delete(memberships).where(eq(memberships.accountId, accountId)));
}
async function endGrants(accountId: string): Promise<void> {
  const { database } = await import('#src/server/database.ts');
  const { grants } = await import('#src/db/schema/index.ts');
  const revokedAt = new Date().toISOString();
  await (await database()).write((tx) => tx.update(grants).set({ revokedAt }).where(eq(grants.accountId, accountId)));
}

describe('entity tags', () => {
  test('differ between askers exactly when what they are given differs', async () => {
    for (const path of [`/api/complexes/${complexOf('Co').accession}`, `/api/spectra/${world.spectra[0]!.id}`]) {
      const seen = await Promise.all(
        askers.map(async (name) => {
          const response = await get(tokenOf(name), path);
          return { tag: response.headers.get('etag'), body: await response.text() };
        }),
      );
      const tagOf = new Map<string, string | null>();
      for (const { tag, body } of seen) {
        expect(tagOf.get(body) ?? tag).toBe(tag);
        tagOf.set(body, tag);
      }
      const tags = [...tagOf.values()].filter((tag) => tag !== null);
      expect(new Set(tags).size).toBe(tags.length);
      expect(tags.length).toBeGreaterThan(1);
    }
  });

  test('of another asker open nothing and tell nothing', async () => {
    const hidden = `/api/complexes/${complexOf('Ni').accession}`;
    const tag = (await get(tokenOf('southLead'), hidden)).headers.get('etag')!;
    expect((await get(tokenOf('southLead'), hidden, { 'if-none-match': tag })).status).toBe(304);
    const refused = await whole(await get(tokenOf('northLead'), hidden));
    for (const condition of [tag, '*', '"guessed"']) {
      const read = await get(tokenOf('northLead'), hidden, { 'if-none-match': condition });
      expect(await whole(read)).toEqual(refused);
      const headers = { 'if-match': condition };
      const write = await call('PATCH', hidden, { as: tokenOf('northLead'), headers, json: { notes: 'mine' } });
      expect(await whole(write)).toEqual(refused);
    }
    const unconditional = await call('PATCH', hidden, { as: tokenOf('northLead'), json: { notes: 'mine' } });
    expect(await whole(unconditional)).toEqual(refused);
  });
});

test('a cursor serves the asker alone whom it was given to, in its own list', async () => {
  const lists = [
    '/api/complexes?limit=1',
    '/api/spectra?limit=1',
    '/api/folios?limit=1',
    '/api/labs?limit=1',
    `/api/complexes/${complexOf('Co').accession}/preparations?limit=1`,
  ];
  for (const path of lists) {
    const { next } = await json<{ next: string }>(get(tokenOf('steward'), path));
    expect(next, path).toEqual(expect.any(String));
    const onward = `${path}&cursor=${encodeURIComponent(next)}`;
    expect((await get(tokenOf('steward'), onward)).status, path).toBe(200);
    for (const name of ['northLead', 'southLead'] as const)
      expect((await get(tokenOf(name), onward)).status, `${path} ${name}`).toBe(400);
    const elsewhere = lists.find((other) => other !== path)!;
    expect((await get(tokenOf('steward'), `${elsewhere}&cursor=${encodeURIComponent(next)}`)).status).toBe(400);
  }
});

describe('a repeated request', () => {
  test('of somebody who left the lab is refused as a new one is', async () => {
    const leaver = await person('leaver', { labs: { [world.labs.north]: 'lead' } });
    const co = complexOf('Co').accession;
    const form = () => {
      const made = new FormData();
      made.set('file', new File(['nm,absorbance\n400,0.1\n410,0.2\n420,0.1\n# leaver'], 'scan.csv'));
      made.set('metadata', JSON.stringify({ complex: co, lab: world.labs.north, technique: 'solution' }));
      return made;
    };
    const send = (what: 'complex' | 'folio' | 'preparation' | 'spectrum' | 'bundle', key: string) => {
      const lab = world.labs.north;
      const paths = {
        complex: ['/api/complexes', { formula: '[Pd(NH3)4]2+', geometry: 'SP-4', lab }],
        folio: ['/api/folios', { name: 'a folio', lab, licence: 'CC0-1.0' }],
        preparation: [`/api/complexes/${co}/preparations`, { label: 'L 1', lab }],
        bundle: ['/api/bundles', { complexes: [complexOf('Cr').accession] }],
        spectrum: ['/api/spectra', undefined],
      } as const;
      const [path, body] = paths[what];
      const headers = { 'idempotency-key': key };
      return call('POST', path, { as: leaver.token, headers, ...(body ? { json: body } : { form: form() }) });
    };
    const kinds = ['complex', 'folio', 'preparation', 'spectrum', 'bundle'] as const;
    const answers = new Map<string, string>();
    for (const kind of kinds) {
      const first = await send(kind, `first ${kind}`);
      expect([201, 202], kind).toContain(first.status);
      answers.set(kind, await first.text());
    }
    for (const kind of kinds) expect(await (await send(kind, `first ${kind}`)).text(), kind).toBe(answers.get(kind));

    await endMembership(leaver.id);
    for (const kind of kinds) {
      const again = await whole(await send(kind, `first ${kind}`));
      expect(again.status, kind).toBe(403);
      expect(again, kind).toEqual(await whole(await send(kind, `fresh ${kind}`)));
    }
  });

  test('of somebody who changed labs is refused as a new one is, though a member still', async () => {
    const mover = await person('mover', { labs: { [world.labs.north]: 'lead' } });
    const send = (path: string, body: object) => (key: string) =>
      call('POST', path, { as: mover.token, headers: { 'idempotency-key': key }, json: body });
    const lab = world.labs.north;
    const requests = [
      send('/api/complexes', { formula: '[Pt(NH3)4]2+', geometry: 'SP-4', lab }),
      send('/api/folios', { name: 'another folio', lab, licence: 'CC0-1.0' }),
      send(`/api/complexes/${complexOf('Co').accession}/preparations`, { label: 'L 2', lab }),
      send('/api/bundles', { complexes: [complexOf('Cr').accession] }),
      send('/api/bundles', { folio: world.folios[0]!.id }),
    ];
    for (const [i, request] of requests.entries()) expect([201, 202]).toContain((await request(`m${i}`)).status);
    const { database } = await import('#src/server/database.ts');
    const { memberships } = await import('#src/db/schema/index.ts');
    const move = { labId: world.labs.south };
    await (await database()).write((tx) => tx.update(memberships).set(move).where(eq(memberships.accountId, mover.id)));
    for (const [i, request] of requests.entries()) {
      const again = await whole(await request(`m${i}`));
      expect(again.status).toBeGreaterThanOrEqual(400);
      expect(again).toEqual(await whole(await request(`new m${i}`)));
    }
  });

  test('of a guest whose access ended is refused as a new one is', async () => {
    const guest = await person('guest for a while');
    await grant(world.folios[0]!.id, guest.id, 'download', world.people.steward.id);
    const { database } = await import('#src/server/database.ts');
    const { grants } = await import('#src/db/schema/index.ts');
    const accepted = { termsAcceptedAt: new Date().toISOString(), termsLicence: 'CC-BY-4.0' };
    await (await database()).write((tx) => tx.update(grants).set(accepted).where(eq(grants.accountId, guest.id)));
    const order = (key: string) =>
      call('POST', '/api/bundles', {
        as: guest.token,
        headers: { 'idempotency-key': key },
        json: { folio: world.folios[0]!.id },
      });
    expect((await order('once')).status).toBe(202);
    await endGrants(guest.id);
    expect(await whole(await order('once'))).toEqual(await whole(await order('another')));
    expect((await order('once')).status).toBe(403);
  });

  test('of a merge that was made gives its answer again, not a conflict', async () => {
    const { copyPair } = await import('./twins.ts');
    const { from, into } = await copyPair(world);
    const path = `/api/complexes/${from}`;
    const tag = (await get(tokenOf('steward'), path)).headers.get('etag')!;
    const send = () =>
      call('POST', `${path}/merge`, {
        as: tokenOf('steward'),
        headers: { 'if-match': tag, 'idempotency-key': 'merge once' },
        json: { into, reason: 'one ion' },
      });
    const first = await whole(await send());
    expect(first.status).toBe(200);
    expect(await whole(await send())).toEqual(first);
  });
});

describe('a duplicate', () => {
  test('out of sight is registered as a new complex is, and the steward alone is told', async () => {
    const register = (as: string, formula: string, more: object) =>
      call('POST', '/api/complexes', { as, json: { formula, geometry: 'OC-6', ...more } });
    const hidden = { lab: world.labs.north, visibility: 'lab' };
    await json(register(tokenOf('northLead'), '[Rh(NH3)6]3+', hidden), 201);
    const twin = await register(tokenOf('southLead'), '[Rh(NH3)6]3+', { lab: world.labs.south });
    const fresh = await register(tokenOf('southLead'), '[Ir(NH3)6]3+', { lab: world.labs.south });
    expect([twin.status, fresh.status]).toEqual([201, 201]);
    const names = (headers: Headers) => [...headers.keys()].filter((name) => !name.startsWith('ratelimit')).sort();
    expect(names(twin.headers)).toEqual(names(fresh.headers));
    const shape = (record: Record<string, unknown>) =>
      Object.entries(record).map(([name, value]) => [name, Array.isArray(value) ? value.length : typeof value]);
    const [one, other] = [(await twin.json()) as never, (await fresh.json()) as never];
    expect(shape(one)).toEqual(shape(other));
    const { total } = await json<{ total: number }>(get(tokenOf('steward'), '/api/merge-tasks'));
    expect(total).toBe(1);
    for (const name of askers.filter((asker) => asker !== 'steward'))
      expect((await get(tokenOf(name), '/api/merge-tasks')).status, name).toBe(403);
  });

  test('of a file out of sight is taken like any other', async () => {
    const co = complexOf('Co');
    const text = 'nm,absorbance\n400,0.1\n410,0.2\n420,0.1\n# measured twice\n';
    const owner = { lab: world.labs.south, maker: world.people.southLead.id };
    await storeSpectrum(owner, co.id, { visibility: 'lab', text });
    const upload = (name: 'northLead' | 'southLead', lab: string) => {
      const form = new FormData();
      form.set('file', new File([text], 'scan.csv'));
      form.set('metadata', JSON.stringify({ complex: co.accession, lab, technique: 'solution' }));
      return call('POST', '/api/spectra', { as: tokenOf(name), form });
    };
    expect((await upload('northLead', world.labs.north)).status).toBe(201);
    expect((await upload('southLead', world.labs.south)).status).toBe(409);
  });
});

test('what is hidden costs the same statements as what is not there', async () => {
  const { database } = await import('#src/server/database.ts');
  const { client } = await database();
  const statements: string[] = [];
  const spy = vi.spyOn(client, 'execute').mockImplementation(
    new Proxy(client.execute.bind(client), {
      apply(target, _, args: Parameters<typeof client.execute>) {
        const [statement] = args as [string | { sql: string }];
        statements.push(typeof statement === 'string' ? statement : statement.sql);
        return Reflect.apply(target, client, args);
      },
    }),
  );
  const nothing = '00000000-0000-7000-8000-000000000000';
  const spectrum = world.spectra.find(({ complex }) => complex === complexOf('Ni'))!.id;
  const preparation = world.preparations.find(({ complex }) => complex === complexOf('Ni'))!.id;
  const [hidden, absent] = [complexOf('Ni').accession, 'ZF999999-0'];
  const { checkCharacter } = await import('#src/contracts/accession.ts');
  const unused = `${absent.slice(0, 9)}${checkCharacter('ZF999999')}`;
  const pairs: [string, string, string][] = [
    ['GET', `/api/complexes/${hidden}`, `/api/complexes/${unused}`],
    ['PATCH', `/api/complexes/${hidden}`, `/api/complexes/${unused}`],
    ['GET', `/api/complexes/${hidden}/preparations`, `/api/complexes/${unused}/preparations`],
    ['GET', `/api/preparations/${preparation}`, `/api/preparations/${nothing}`],
    ['GET', `/api/folios/${world.folios[3]!.id}`, `/api/folios/${nothing}`],
    ...['', '/points', '/bands', '/file', '/jcamp'].map((part): [string, string, string] => [
      'GET',
      `/api/spectra/${spectrum}${part}`,
      `/api/spectra/${nothing}${part}`,
    ]),
    ['GET', `/api/spectra?complex=${hidden}`, `/api/spectra?complex=${unused}`],
    ['GET', `/api/complexes?q=${hidden}`, `/api/complexes?q=${unused}`],
  ];
  const costOf = async (as: string, method: string, path: string) => {
    statements.length = 0;
    const body = method === 'PATCH' ? { json: { notes: 'x' }, headers: { 'if-match': '*' } } : {};
    const { status } = await call(method, path, { as, ...body });
    return { status, statements: [...statements] };
  };
  for (const name of ['northLead', 'guestView'] as const)
    for (const [method, there, not] of pairs) {
      const absentCost = await costOf(tokenOf(name), method, not);
      expect(absentCost.statements.length, `${name} ${method} ${there}`).toBeGreaterThan(0);
      expect(await costOf(tokenOf(name), method, there), `${name} ${method} ${there}`).toEqual(absentCost);
    }
  spy.mockRestore();
});

describe.each(['token', 'session'] as const)('by %s', (means) => {
  const as = (who: { id: string; token: string }) => (means === 'token' ? { as: who.token } : { session: who.id });

  test('a grant that ended opens nothing at the very next request', async () => {
    const guest = await person(`guest by ${means}`);
    await grant(world.folios[0]!.id, guest.id, 'download', world.people.steward.id);
    const { database } = await import('#src/server/database.ts');
    const { grants } = await import('#src/db/schema/index.ts');
    const accepted = { termsAcceptedAt: new Date().toISOString(), termsLicence: 'CC-BY-4.0' };
    await (await database()).write((tx) =>
      tx
        .update(grants)
        .set(accepted)
        .where(and(eq(grants.accountId, guest.id), eq(grants.level, 'download'))),
    );
    const spectrum = sightOf(world, 'guestDownload').takes[0]!;
    const paths = [
      `/api/complexes/${spectrum.complex.accession}`,
      `/api/complexes/${spectrum.complex.accession}/preparations`,
      ...['', '/points', '/bands', '/file', '/jcamp'].map((part) => `/api/spectra/${spectrum.id}${part}`),
      `/api/folios/${world.folios[0]!.id}`,
    ];
    for (const path of paths) expect((await call('GET', path, as(guest))).status, path).toBe(200);
    await endGrants(guest.id);
    for (const path of paths) expect((await call('GET', path, as(guest))).status, path).toBe(404);
    for (const list of ['/api/complexes', '/api/spectra', '/api/folios'])
      expect(await json(call('GET', list, as(guest))), list).toMatchObject({ items: [], total: 0 });
  });

  test('a role that ended opens and changes nothing at the very next request', async () => {
    const member = await person(`member by ${means}`, { labs: { [world.labs.north]: 'lead' } });
    const own = complexOf('Cr').accession;
    const spectrum = world.spectra.find((s) => s.complex === complexOf('Cr') && s.lab === 'north')!.id;
    const reads = [`/api/complexes/${own}`, `/api/spectra/${spectrum}`, `/api/folios/${world.folios[0]!.id}`];
    const change = () =>
      call('PATCH', `/api/complexes/${own}`, { ...as(member), headers: { 'if-match': '*' }, json: { notes: means } });
    for (const path of reads) expect((await call('GET', path, as(member))).status, path).toBe(200);
    expect((await change()).status).toBe(200);
    await endMembership(member.id);
    for (const path of reads) expect((await call('GET', path, as(member))).status, path).toBe(404);
    expect((await change()).status).toBe(403);
    expect((await call('GET', '/api/labs', as(member))).status).toBe(403);
  });

  test('an account that was closed is nobody at the very next request', async () => {
    const member = await person(`closed by ${means}`, { labs: { [world.labs.north]: 'lead' } });
    const entry = means === 'token' ? { as: member.token } : { headers: await cookieOf(member.id) };
    expect((await call('GET', '/api/complexes', entry)).status).toBe(200);
    const { database } = await import('#src/server/database.ts');
    const { accounts } = await import('#src/db/schema/index.ts');
    const closed = { state: 'deactivated' as const };
    await (await database()).write((tx) => tx.update(accounts).set(closed).where(eq(accounts.id, member.id)));
    expect((await call('GET', '/api/complexes', entry)).status).toBe(401);
  });
});

async function cookieOf(accountId: string): Promise<Record<string, string>> {
  const { sessionHeaders } = await import('../harness.ts');
  return sessionHeaders(accountId);
}
