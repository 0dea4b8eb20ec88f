import { lab, person } from '../people.ts';
import { type Fixture, type MatrixRow, statuses } from './fixture.ts';

const any = { 'if-match': '*' };

/** A member of North of their own for each cell, so that the people of the fixture keep their roles. */
async function memberOf(f: Fixture): Promise<string> {
  return (await person(f.fresh(), { labs: { [f.north]: 'contributor' } })).id;
}
const spare = async (f: Fixture) => (await person(f.fresh())).id;

const northLeads = statuses({
  guests: 403,
  readToken: 403,
  contributor: 403,
  southMembers: 403,
  others: 200,
});
const stewards = (done: number) => statuses({ others: 403, steward: done });

export const rows: Record<string, MatrixRow> = {
  addMember: {
    send: async (f) => ({
      path: `/api/labs/${f.north}/members`,
      json: { account: await spare(f), role: 'contributor' },
    }),
    expect: stewards(201),
  },
  readMember: {
    send: async (f) => ({ path: `/api/labs/${f.north}/members/${f.people.contributor.id}` }),
    expect: statuses({ guests: 403, others: 200 }),
  },
  changeMember: {
    send: async (f) => ({
      path: `/api/labs/${f.north}/members/${await memberOf(f)}`,
      json: { role: 'lead' },
      headers: any,
    }),
    expect: northLeads,
  },
  'changeMember, of a lab that nobody of the matrix leads': {
    send: async (f) => {
      const labId = await lab(f.fresh());
      const { id } = await person(f.fresh(), { labs: { [labId]: 'contributor' } });
      return { path: `/api/labs/${labId}/members/${id}`, json: { role: 'lead' }, headers: any };
    },
    expect: stewards(200),
  },
  removeMember: {
    send: async (f) => ({ path: `/api/labs/${f.north}/members/${await memberOf(f)}`, headers: any }),
    expect: northLeads,
  },
  'removeMember, who is none': {
    send: async (f) => ({ path: `/api/labs/${f.north}/members/${await spare(f)}`, headers: any }),
    expect: { ...northLeads, lead: 404, steward: 404 },
  },
  readMeasured: {
    send: (f) => ({ path: `/api/labs/${f.north}/measured` }),
    expect: statuses({ guests: 403, others: 200 }),
  },
  listPeople: { send: () => ({ path: '/api/accounts' }), expect: stewards(200) },
  readPerson: { send: (f) => ({ path: `/api/accounts/${f.people.lead.id}` }), expect: stewards(200) },
  changePerson: {
    send: async (f) => ({ path: `/api/accounts/${await spare(f)}`, json: { state: 'deactivated' }, headers: any }),
    expect: stewards(200),
  },
  endPersonSessions: {
    send: async (f) => ({ path: `/api/accounts/${await spare(f)}/end-sessions` }),
    expect: stewards(200),
  },
  sendPasswordReset: {
    send: async (f) => ({ path: `/api/accounts/${await spare(f)}/password-reset` }),
    expect: stewards(204),
  },
};
