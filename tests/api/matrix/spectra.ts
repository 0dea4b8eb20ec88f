import { call, json } from '../harness.ts';
import { difdup, formOf, inventedCurve } from '../spectra-files.ts';
import { type AskerKind, type Fixture, type MatrixRow, statuses } from './fixture.ts';

const any = { 'if-match': '*' };
const isSouth = (kind: AskerKind) => kind === 'otherContributor' || kind === 'otherLead';

/** A file that no other cell has sent. */
const freshFile = (f: Fixture) => difdup(inventedCurve(20), [`##$MARK= ${f.fresh()}`]);
const metadata = (complex: string, lab: string, more: object = {}) => ({
  complex,
  lab,
  technique: 'solution',
  solvent: 'water',
  concentration: 0.05,
  pathLength: 1,
  ...more,
});

/** A spectrum of North's contributor, or of South's on North's complex. */
async function spectrumOf(f: Fixture, more: object = {}, south = false): Promise<string> {
  const form = formOf(freshFile(f), metadata(f.open, south ? f.south : f.north, more));
  const as = (south ? f.people.otherContributor : f.people.contributor).token;
  return (await json<{ id: string }>(call('POST', '/api/spectra', { as, form }), 201)).id;
}
let shared: Promise<string> | undefined;
const sharedSpectrum = (f: Fixture) => {
  shared ??= spectrumOf(f);
  return shared;
};
let labOnly: Promise<string> | undefined;
/** South's own: North's folio shares what North may see, so that its guests see this one as little as North does. */
const labOnlySpectrum = (f: Fixture) => {
  labOnly ??= spectrumOf(f, { visibility: 'lab' }, true);
  return labOnly;
};

const band = { wavenumber: 21_000, height: 2, quantity: 'epsilon', found: 'typed', assignment: { class: 'd-d' } };
const fittedBand = { ...band, fwhm: 3000, found: 'fitted' };
const fit = {
  points: 20,
  quantity: 'epsilon',
  wavelengthCheck: 0.2,
  steps: [{ operation: 'find', parameters: {} }],
  components: [{ wavenumber: 21_000, height: 2, fwhm: 3000, area: 6387, error: 12 }],
};
/** A band that North's contributor proposed, attested by their lead where the guests' folio is to show it. */
async function bandOf(f: Fixture, { attested = false } = {}): Promise<string> {
  const id = await spectrumOf(f);
  const as = f.people.contributor.token;
  const [made] = await json<[{ id: string }]>(call('PUT', `/api/spectra/${id}/bands`, { as, json: [band] }));
  if (attested) await json(call('POST', `/api/bands/${made.id}/attest`, { as: f.people.lead.token, json: {} }));
  return made.id;
}

const reads = statuses({ guests: 404, grantedGuests: 200, others: 200 });
const takes = statuses({ guests: 404, guestView: 403, guestDownload: 200, others: 200 });
const labReads = statuses({ guests: 404, northMembers: 404, others: 200 });
// A lead who sees it; the steward belongs to no lab, and North does not let contributors of other labs judge.
const judges = statuses({
  guests: 403,
  readToken: 403,
  contributor: 403,
  otherContributor: 403,
  steward: 403,
  others: 200,
});

export const rows: Record<string, MatrixRow> = {
  deriveSpectrum: {
    send: () => ({ path: '/api/derive/spectrum', form: formOf(difdup(inventedCurve(20)), {}, { part: 'options' }) }),
    expect: statuses({ others: 200 }),
  },
  listSpectra: { send: () => ({ path: '/api/spectra' }), expect: statuses({ others: 200 }) },
  createSpectrum: {
    send: (f, kind) => ({
      path: '/api/spectra',
      form: formOf(freshFile(f), metadata(f.open, isSouth(kind) ? f.south : f.north)),
    }),
    expect: statuses({ guests: 403, readToken: 403, others: 201 }),
  },
  'createSpectrum, complex out of sight': {
    send: (f, kind) => ({
      path: '/api/spectra',
      form: formOf(freshFile(f), metadata(f.labOnly, isSouth(kind) ? f.south : f.north)),
    }),
    expect: statuses({ guests: 403, readToken: 403, southMembers: 422, others: 201 }),
  },
  readSpectrum: { send: async (f) => ({ path: `/api/spectra/${await sharedSpectrum(f)}` }), expect: reads },
  'readSpectrum, lab only': {
    send: async (f) => ({ path: `/api/spectra/${await labOnlySpectrum(f)}` }),
    expect: labReads,
  },
  changeSpectrum: {
    send: async (f) => ({
      path: `/api/spectra/${await sharedSpectrum(f)}`,
      json: { notes: f.fresh() },
      headers: any,
    }),
    expect: statuses({ guests: 403, readToken: 403, southMembers: 403, others: 200 }),
  },
  'changeSpectrum, lab only': {
    send: async (f) => ({
      path: `/api/spectra/${await labOnlySpectrum(f)}`,
      json: { notes: f.fresh() },
      headers: any,
    }),
    expect: statuses({ guests: 403, readToken: 403, northMembers: 404, others: 200 }),
  },
  deleteSpectrum: {
    send: async (f) => ({ path: `/api/spectra/${await spectrumOf(f, { state: 'draft' })}`, headers: any }),
    expect: statuses({ guests: 403, readToken: 403, southMembers: 404, others: 204 }),
  },
  readSpectrumFile: { send: async (f) => ({ path: `/api/spectra/${await sharedSpectrum(f)}/file` }), expect: takes },
  'readSpectrumFile, lab only': {
    send: async (f) => ({ path: `/api/spectra/${await labOnlySpectrum(f)}/file` }),
    expect: labReads,
  },
  readSpectrumJcamp: { send: async (f) => ({ path: `/api/spectra/${await sharedSpectrum(f)}/jcamp` }), expect: takes },
  readPoints: { send: async (f) => ({ path: `/api/spectra/${await sharedSpectrum(f)}/points` }), expect: reads },
  'readPoints, lab only': {
    send: async (f) => ({ path: `/api/spectra/${await labOnlySpectrum(f)}/points` }),
    expect: labReads,
  },
  listSimilar: { send: async (f) => ({ path: `/api/spectra/${await sharedSpectrum(f)}/similar` }), expect: reads },
  'listSimilar, lab only': {
    send: async (f) => ({ path: `/api/spectra/${await labOnlySpectrum(f)}/similar` }),
    expect: labReads,
  },
  readBands: { send: async (f) => ({ path: `/api/spectra/${await sharedSpectrum(f)}/bands` }), expect: reads },
  'readBands, lab only': {
    send: async (f) => ({ path: `/api/spectra/${await labOnlySpectrum(f)}/bands` }),
    expect: labReads,
  },
  replaceBands: {
    send: async (f) => ({ path: `/api/spectra/${await spectrumOf(f)}/bands`, json: [band] }),
    expect: statuses({ guests: 403, readToken: 403, southMembers: 403, others: 200 }),
  },
  replaceFittedBands: {
    send: async (f) => ({ path: `/api/spectra/${await spectrumOf(f)}/fit`, json: { bands: [fittedBand], fit } }),
    expect: statuses({ guests: 403, readToken: 403, southMembers: 403, others: 200 }),
  },
  attestBand: {
    send: async (f) => ({ path: `/api/bands/${await bandOf(f)}/attest`, json: {} }),
    expect: judges,
  },
  disputeBand: {
    send: async (f) => ({
      path: `/api/bands/${await bandOf(f, { attested: true })}/dispute`,
      json: { reason: 'too weak' },
    }),
    expect: judges,
  },
};
