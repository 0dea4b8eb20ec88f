import { call, json } from '../harness.ts';
import { type Fixture, type MatrixRow, statuses } from './fixture.ts';

const body = {
  input: {
    n: 6,
    geometry: 'OC-6',
    spin: 'low',
    bands: [
      { wavenumber: 21_050, to: '1T1g' },
      { wavenumber: 29_500, to: '1T2g' },
    ],
  },
};
const saved = async (f: Fixture, accession: string, by: keyof Fixture['people'] = 'contributor') =>
  (
    await json<{ id: string }>(
      call('POST', `/api/complexes/${accession}/fits`, { as: f.people[by].token, json: body }),
      201,
    )
  ).id;

export const rows: Record<string, MatrixRow> = {
  listLevelFits: {
    send: (f) => ({ path: `/api/complexes/${f.open}/fits` }),
    expect: statuses({ guests: 404, grantedGuests: 200, others: 200 }),
  },
  'listLevelFits, lab only': {
    send: (f) => ({ path: `/api/complexes/${f.labOnly}/fits` }),
    expect: statuses({ guests: 404, southMembers: 404, others: 200 }),
  },
  createLevelFit: {
    send: (f) => ({ path: `/api/complexes/${f.open}/fits`, json: body }),
    expect: statuses({ guests: 403, readToken: 403, others: 201 }),
  },
  'createLevelFit, lab only': {
    send: (f) => ({
      path: `/api/complexes/${f.labOnly}/fits`,
      json: {
        input: {
          ...body.input,
          n: 3,
          bands: [
            { wavenumber: 21_500, to: '4T2g' },
            { wavenumber: 28_500, to: '4T1g' },
          ],
          spin: 'high',
        },
      },
    }),
    expect: statuses({ guests: 403, readToken: 403, southMembers: 404, others: 201 }),
  },
  withdrawLevelFit: {
    send: async (f) => ({ path: `/api/level-fits/${await saved(f, f.open)}` }),
    expect: statuses({ guests: 403, readToken: 403, southMembers: 403, others: 204 }),
  },
  'withdrawLevelFit, of another lab’s maker': {
    send: async (f) => ({ path: `/api/level-fits/${await saved(f, f.open, 'otherContributor')}` }),
    expect: statuses({
      guests: 403,
      readToken: 403,
      contributor: 403,
      otherLead: 403,
      others: 204,
    }),
  },
};
