import { afterAll, beforeAll, expect, test } from 'vitest';
import { call, json, openRegistry } from './harness.ts';
import { lab, person } from './people.ts';
import { mailsTo, sendFresh } from './people-world.ts';
import { complex, grant, spectrum } from './shared-content.ts';

type Person = Awaited<ReturnType<typeof person>>;
let registry: Awaited<ReturnType<typeof openRegistry>>;
let north: string;
let south: string;
let lead: Person;
let maker: Person;
let other: Person;
let reader: Person;
let number = 0;

beforeAll(async () => {
  registry = await openRegistry();
  [north, south] = [await lab('North'), await lab('South')];
  lead = await person('Lead', { labs: { [north]: 'lead' } });
  maker = await person('Maker', { labs: { [north]: 'contributor' } });
  other = await person('Other', { labs: { [south]: 'lead' } });
});
afterAll(() => registry.close());

/** Somebody of South whom no test named before. */
const freshReader = () => person(`reader${++number}`, { labs: { [south]: 'contributor' } });
const freshComplex = (more: object = {}) => complex({ lab: north, maker: maker.id }, 600 + ++number, more);
const note = (accession: string, notes: string, more: object = {}) =>
  json(
    call('PATCH', `/api/complexes/${accession}`, {
      as: lead.token,
      json: { notes, ...more },
      headers: { 'if-match': '*' },
    }),
  );
const mentions = async (email: string) => (await mailsTo(email)).filter(({ kind }) => kind === 'mention');

test('a mail says who, where and the sentence, once', async () => {
  reader = await freshReader();
  const { accession } = await freshComplex();
  await note(accession, `Secret yield 12 %. Could @${reader.email} check the shoulder? Thanks.`);
  const [mail, ...more] = await mentions(reader.email);
  expect(more).toEqual([]);
  expect(mail!.subject).toBe(`Lead mentioned you in the notes of [Ni(OH2)6]2+ (${accession})`);
  expect(mail!.text).toContain(`Could @${reader.email} check the shoulder?`);
  expect(mail!.text).toContain(`http://localhost:4321/complexes/${accession}`);
  expect(mail!.text).not.toContain('Secret');
  // The text is mended around the name: nobody is told twice.
  await note(accession, `Yield 14 %. Could @${reader.email} check the shoulder? Thanks.`);
  await note(accession, `Could @${reader.email} check the shoulder again? Thanks.`);
  expect(await mentions(reader.email)).toHaveLength(1);
});

test('the part before the @ does where it fits one member alone', async () => {
  reader = await freshReader();
  const handle = reader.email.split('@')[0];
  const { accession } = await freshComplex();
  await note(accession, `Ask @${handle}.`);
  expect(await mentions(reader.email)).toHaveLength(1);

  const { database } = await import('#src/server/database.ts');
  const { accounts, memberships } = await import('#src/db/schema/index.ts');
  const { newId, nowIso } = await import('#src/server/ids.ts');
  const twin = { id: newId(), email: `${handle}@elsewhere.example`, name: 'Twin', createdAt: nowIso() };
  await (await database()).write((tx) => tx.insert(accounts).values(twin));
  const next = await freshComplex();
  // Somebody who is no member does not make a name doubtful.
  await note(next.accession, `Now ask @${handle}.`);
  expect(await mentions(reader.email)).toHaveLength(2);
  await (await database()).write((tx) =>
    tx
      .insert(memberships)
      .values({ accountId: twin.id, labId: south, role: 'contributor' as const, createdAt: nowIso() }),
  );
  const last = await freshComplex();
  await note(last.accession, `Then ask @${handle}.`);
  expect(await mentions(reader.email)).toHaveLength(2);
  expect(await mentions(twin.email)).toEqual([]);
});

test('who cannot see the record gets no mail, and gets it when it is opened to them', async () => {
  reader = await freshReader();
  const { accession } = await freshComplex({ visibility: 'lab' });
  await note(accession, `For @${reader.email} and @${maker.email} later.`);
  expect(await mentions(reader.email)).toEqual([]);
  expect(await mentions(maker.email)).toHaveLength(1);
  await json(
    call('PATCH', `/api/complexes/${accession}`, {
      as: lead.token,
      json: { visibility: 'programme' },
      headers: { 'if-match': '*' },
    }),
  );
  expect(await mentions(reader.email)).toHaveLength(1);
  // Who knew it already is not told again.
  expect(await mentions(maker.email)).toHaveLength(1);
});

test('nobody tells themselves, a guest or an account that is deactivated', async () => {
  const guest = await person('Guest Named');
  const gone = await freshReader();
  const steward = await person('Steward', { steward: true });
  await json(sendFresh('PATCH', `/api/accounts/${gone.id}`, steward.id, { state: 'deactivated' }));
  const { accession } = await freshComplex();
  const folio = await json<{ id: string }>(
    call('POST', '/api/folios', {
      session: lead.id,
      json: { name: 'F', lab: north, licence: 'CC0-1.0', items: [{ accession, spectra: 'all' }] },
    }),
    201,
  );
  await grant(folio.id, guest.id, 'view', lead.id);
  expect((await call('GET', `/api/complexes/${accession}`, { as: guest.token })).status).toBe(200);
  await note(accession, `@${lead.email} @${guest.email} @${gone.email} @${steward.email}`);
  for (const { email } of [lead, guest, gone]) expect(await mentions(email)).toEqual([]);
  expect(await mentions(steward.email)).toHaveLength(1);
});

test('a new complex, a new preparation and a changed one tell whom they name', async () => {
  reader = await freshReader();
  const { accession } = await json<{ accession: string }>(
    call('POST', '/api/complexes', {
      as: maker.token,
      json: { formula: '[Rh(NH3)6]3+', geometry: 'OC-6', lab: north, notes: `See @${reader.email}.` },
    }),
    201,
  );
  const { id } = await json<{ id: string }>(
    call('POST', `/api/complexes/${accession}/preparations`, {
      as: maker.token,
      json: { label: 'Confidential label', lab: north, notes: `Sample for @${reader.email}.` },
    }),
    201,
  );
  const patch = { notes: `Sample for @${reader.email}. Also @${other.email}: dry it.` };
  await json(call('PATCH', `/api/preparations/${id}`, { as: maker.token, json: patch, headers: { 'if-match': '*' } }));
  const told = await mentions(reader.email);
  expect(told.map(({ subject }) => subject)).toEqual([
    `Maker mentioned you in the notes of [Rh(NH3)6]3+ (${accession})`,
    `Maker mentioned you in the notes of a preparation of [Rh(NH3)6]3+ (${accession})`,
  ]);
  expect(told[1]!.text).not.toContain('Confidential');
  expect((await mentions(other.email)).at(-1)!.text).toContain(`Also @${other.email}: dry it.`);
});

test('reasons of bands tell whom they name, by the sight of the spectrum', async () => {
  reader = await freshReader();
  const { id } = await freshComplex();
  const open = await spectrum({ lab: north, maker: maker.id }, id, { text: `a ${number}\n` });
  const kept = await spectrum({ lab: north, maker: maker.id }, id, { text: `b ${number}\n`, visibility: 'lab' });
  const propose = (spectrumId: string) =>
    json(
      call('PUT', `/api/spectra/${spectrumId}/bands`, {
        as: maker.token,
        json: [
          {
            wavenumber: 14_000,
            height: 0.2,
            quantity: 'absorbance',
            found: 'typed',
            assignment: { class: 'd-d', reason: `As @${reader.email} found it.` },
          },
        ],
        headers: { 'if-match': '*' },
      }),
    );
  await propose(kept.id);
  expect(await mentions(reader.email)).toEqual([]);
  await propose(open.id);
  await propose(open.id);
  const [mail, ...more] = await mentions(reader.email);
  expect(more).toEqual([]);
  expect(mail!.text).toContain(`/spectra/${open.id}`);
});

test('a dispute is mailed to the proposer once, and to whom its reason names', async () => {
  reader = await freshReader();
  const { id, accession } = await freshComplex();
  const { id: spectrumId, band } = await spectrum({ lab: north, maker: maker.id }, id, { text: `c ${number}\n` });
  const reason = `Too strong for d-d, @${maker.email} and @${reader.email}.`;
  await json(
    call('POST', `/api/bands/${band}/dispute`, { as: other.token, json: { reason }, headers: { 'if-match': '*' } }),
  );
  const told = (await mailsTo(maker.email)).filter(({ text }) => text.includes(spectrumId));
  expect(told.map(({ kind, subject }) => [kind, subject])).toEqual([
    ['dispute', 'Other disputes an assignment of yours'],
  ]);
  expect(told[0]!.text).toContain(reason);
  expect(told[0]!.text).toContain(`the assignment of a band of [Ni(OH2)6]2+ (${accession})`);
  expect((await mentions(reader.email)).map(({ subject }) => subject)).toEqual([
    `Other mentioned you in the judgement of a band of [Ni(OH2)6]2+ (${accession})`,
  ]);
});

test('a proposer who sees the spectrum no longer is not told of its dispute', async () => {
  const leaver = await person('Leaver', { labs: { [north]: 'contributor' } });
  const { id } = await freshComplex();
  const { band } = await spectrum({ lab: north, maker: leaver.id }, id, { text: `d ${number}\n` });
  await json(sendFresh('DELETE', `/api/labs/${north}/members/${leaver.id}`, leaver.id));
  await json(
    call('POST', `/api/bands/${band}/dispute`, {
      as: lead.token,
      json: { reason: 'Too strong for d-d' },
      headers: { 'if-match': '*' },
    }),
  );
  expect(await mailsTo(leaver.email)).toEqual([]);
});
