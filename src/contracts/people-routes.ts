import { pageOf } from './common.ts';
import {
  Departure,
  DepartureQuery,
  MeasuredRecord,
  MemberDetail,
  MemberInput,
  MemberPatch,
  PersonDetail,
  PersonPatch,
  PersonQuery,
  PersonRecord,
  SessionsEnded,
} from './people.ts';
import { route } from './route.ts';

const tag = 'Labs and people';
// Roles and accounts are for persons: no access token changes them, nor reads the list of everybody.
const read = { tag, who: 'member', scope: 'read' } as const;
const change = { tag, who: 'member', scope: 'write', sessionOnly: true } as const;
const look = { tag, who: 'steward', scope: 'read', sessionOnly: true } as const;
const steward = { tag, who: 'steward', scope: 'write', sessionOnly: true } as const;

/** Routes of members, accounts and their state. */
export const peopleRoutes = {
  addMember: route({
    ...steward,
    method: 'POST',
    path: '/api/labs/{id}/members',
    summary: 'Add somebody who has an account to a lab',
    body: MemberInput,
    status: 201,
    answers: MemberDetail,
    refusals: { 409: 'A member already' },
  }),
  readMember: route({
    ...read,
    method: 'GET',
    path: '/api/labs/{id}/members/{account}',
    summary: 'A person of a lab',
    status: 200,
    answers: MemberDetail,
  }),
  changeMember: route({
    ...change,
    method: 'PATCH',
    path: '/api/labs/{id}/members/{account}',
    summary: 'Change a person’s role in a lab',
    body: MemberPatch,
    conditional: true,
    status: 200,
    answers: MemberDetail,
    refusals: { 409: 'The only lead' },
  }),
  removeMember: route({
    ...change,
    method: 'DELETE',
    path: '/api/labs/{id}/members/{account}',
    summary: 'Leave a lab, or remove a person from it; drafts are handed over',
    query: DepartureQuery,
    conditional: true,
    status: 200,
    answers: Departure,
    refusals: { 409: 'The only lead' },
  }),
  readMeasured: route({
    ...read,
    method: 'GET',
    path: '/api/labs/{id}/measured',
    summary: 'What a lab measured for others, and others for it',
    status: 200,
    answers: MeasuredRecord,
  }),
  listPeople: route({
    ...look,
    method: 'GET',
    path: '/api/accounts',
    summary: 'Everybody who has an account, by name',
    query: PersonQuery,
    status: 200,
    answers: pageOf(PersonRecord),
  }),
  readPerson: route({
    ...look,
    method: 'GET',
    path: '/api/accounts/{id}',
    summary: 'An account',
    status: 200,
    answers: PersonDetail,
  }),
  changePerson: route({
    ...steward,
    method: 'PATCH',
    path: '/api/accounts/{id}',
    summary: 'Deactivate or reactivate an account, make a steward, correct a name',
    body: PersonPatch,
    conditional: true,
    status: 200,
    answers: PersonDetail,
    refusals: { 409: 'Oneself, or the only steward' },
  }),
  endPersonSessions: route({
    ...steward,
    method: 'POST',
    path: '/api/accounts/{id}/end-sessions',
    summary: 'Sign a person out everywhere',
    status: 200,
    answers: SessionsEnded,
  }),
  sendPasswordReset: route({
    ...steward,
    method: 'POST',
    path: '/api/accounts/{id}/password-reset',
    summary: 'Mail a person a link to choose a new password',
    status: 204,
    answers: null,
    refusals: { 409: 'The account is deactivated' },
  }),
};
