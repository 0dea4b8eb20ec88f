import { call, json } from '../harness.ts';
import { type Fixture, type MatrixRow, register, statuses } from './fixture.ts';

const any = { 'if-match': '*' };
/** Tetraammine complexes that no other row registers: one identity a call. */
const metals = ['Fe', 'Mn', 'Ru', 'Rh', 'Ir', 'Os', 'V', 'Ti', 'Mo', 'W'];
const halides = ['F', 'Cl', 'Br', 'I'];
let used = 0;
const unusedFormula = () => {
  const [metal, halide] = [metals[used % metals.length], halides[Math.floor(used / metals.length)]];
  used += 1;
  return `[${metal}${halide}(NH3)5]2+`;
};

const draftOf = (f: Fixture) =>
  register(f.people.contributor.token, f.north, { formula: unusedFormula(), state: 'draft' });
async function preparationOf(f: Fixture, accession: string, visibility = 'programme'): Promise<string> {
  const as = f.people.contributor.token;
  const body = { label: f.fresh(), lab: f.north, visibility };
  return (await json<{ id: string }>(call('POST', `/api/complexes/${accession}/preparations`, { as, json: body }), 201))
    .id;
}

export const rows: Record<string, MatrixRow> = {
  listComplexes: { send: () => ({ path: '/api/complexes' }), expect: statuses({ others: 200 }) },
  createComplex: {
    send: (f, kind) => ({
      path: '/api/complexes',
      json: {
        formula: unusedFormula(),
        geometry: 'OC-6',
        lab: kind === 'otherContributor' || kind === 'otherLead' ? f.south : f.north,
      },
    }),
    expect: statuses({ guests: 403, readToken: 403, others: 201 }),
  },
  readComplex: {
    send: (f) => ({ path: `/api/complexes/${f.open}` }),
    expect: statuses({ guests: 404, grantedGuests: 200, others: 200 }),
  },
  'readComplex, lab only': {
    send: (f) => ({ path: `/api/complexes/${f.labOnly}` }),
    expect: statuses({ guests: 404, southMembers: 404, others: 200 }),
  },
  'readComplex, draft': {
    send: (f) => ({ path: `/api/complexes/${f.draft}` }),
    expect: statuses({ guests: 404, southMembers: 404, readToken: 404, others: 200 }),
  },
  readTransitions: {
    send: (f) => ({ path: `/api/complexes/${f.open}/transitions` }),
    expect: statuses({ guests: 404, grantedGuests: 200, others: 200 }),
  },
  'readTransitions, lab only': {
    send: (f) => ({ path: `/api/complexes/${f.labOnly}/transitions` }),
    expect: statuses({ guests: 404, southMembers: 404, others: 200 }),
  },
  changeComplex: {
    send: (f) => ({ path: `/api/complexes/${f.open}`, json: { notes: f.fresh() }, headers: any }),
    expect: statuses({ guests: 403, readToken: 403, contributor: 403, southMembers: 403, others: 200 }),
  },
  'changeComplex, lab only': {
    send: (f) => ({ path: `/api/complexes/${f.labOnly}`, json: { notes: f.fresh() }, headers: any }),
    expect: statuses({ guests: 403, readToken: 403, contributor: 403, southMembers: 404, others: 200 }),
  },
  deleteComplex: {
    send: async (f) => ({ path: `/api/complexes/${await draftOf(f)}`, headers: any }),
    expect: statuses({ guests: 403, readToken: 403, southMembers: 404, others: 204 }),
  },
  listPreparations: {
    send: (f) => ({ path: `/api/complexes/${f.open}/preparations` }),
    expect: statuses({ guests: 404, grantedGuests: 200, others: 200 }),
  },
  createPreparation: {
    send: (f, kind) => ({
      path: `/api/complexes/${f.open}/preparations`,
      json: { label: f.fresh(), lab: kind === 'otherContributor' || kind === 'otherLead' ? f.south : f.north },
    }),
    expect: statuses({ guests: 403, readToken: 403, others: 201 }),
  },
  readPreparation: {
    send: async (f) => ({ path: `/api/preparations/${await preparationOf(f, f.open)}` }),
    expect: statuses({ guests: 404, others: 200 }),
  },
  'readPreparation, lab only': {
    send: async (f) => ({ path: `/api/preparations/${await preparationOf(f, f.open, 'lab')}` }),
    expect: statuses({ guests: 404, southMembers: 404, others: 200 }),
  },
  changePreparation: {
    send: async (f) => ({
      path: `/api/preparations/${await preparationOf(f, f.open)}`,
      json: { notes: 'dried' },
      headers: any,
    }),
    expect: statuses({ guests: 403, readToken: 403, southMembers: 403, others: 200 }),
  },
  deletePreparation: {
    send: async (f) => ({ path: `/api/preparations/${await preparationOf(f, f.open)}`, headers: any }),
    expect: statuses({ guests: 403, readToken: 403, southMembers: 403, others: 204 }),
  },
};
