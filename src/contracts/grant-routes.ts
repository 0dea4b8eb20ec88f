import * as z from 'zod';
import {
  AccessRequestInput,
  AccessRequestRecord,
  AccessRequestSettlement,
  GrantPatch,
  GrantRecord,
  TermsAcceptance,
} from './grants.ts';
import { invitationRoutes } from './invitation-routes.ts';
import { route } from './route.ts';
import { FolioRecord } from './sharing.ts';

const share = 'Folios and bundles';
const read = { who: 'member', scope: 'read' } as const;
const write = { who: 'member', scope: 'write', sessionOnly: true } as const;
/** What a guest may send, as a person and not by a token. */
const guest = { who: 'signed-in', scope: 'write', sessionOnly: true } as const;

/** Routes of invitations, grants and requests for more. */
export const grantRoutes = {
  ...invitationRoutes,
  listGrants: route({
    ...read,
    method: 'GET',
    path: '/api/folios/{id}/grants',
    summary: 'Who may read a folio',
    tag: share,
    status: 200,
    answers: z.array(GrantRecord),
  }),
  readGrant: route({
    ...read,
    method: 'GET',
    path: '/api/folios/{id}/grants/{grant}',
    summary: 'A guest’s access',
    tag: share,
    status: 200,
    answers: GrantRecord,
  }),
  changeGrant: route({
    ...write,
    method: 'PATCH',
    path: '/api/folios/{id}/grants/{grant}',
    summary: 'Change the level or the end of a guest’s access; it holds from the next request on',
    tag: share,
    body: GrantPatch,
    status: 200,
    answers: GrantRecord,
    conditional: true,
    refusals: { 409: 'It was revoked' },
  }),
  revokeGrant: route({
    ...write,
    method: 'DELETE',
    path: '/api/folios/{id}/grants/{grant}',
    summary: 'End a guest’s access',
    tag: share,
    status: 204,
    answers: null,
  }),
  acceptTerms: route({
    ...guest,
    method: 'POST',
    path: '/api/folios/{id}/terms',
    summary: 'Accept the licence of a folio, once more where it changed',
    tag: share,
    body: TermsAcceptance,
    status: 200,
    answers: FolioRecord,
    refusals: { 409: 'The licence is another one by now' },
  }),
  askForMore: route({
    ...guest,
    method: 'POST',
    path: '/api/folios/{id}/requests',
    summary:
      'Ask the lab for downloads, for a longer time or for something else, also up to 90 days after access ended',
    tag: share,
    body: AccessRequestInput,
    status: 201,
    answers: AccessRequestRecord,
    refusals: { 409: 'Three requests wait for an answer' },
  }),
  listAccessRequests: route({
    ...read,
    method: 'GET',
    path: '/api/folios/{id}/requests',
    summary: 'What guests of a folio asked for',
    tag: share,
    status: 200,
    answers: z.array(AccessRequestRecord),
  }),
  settleAccessRequest: route({
    ...write,
    method: 'POST',
    path: '/api/requests/{id}/settle',
    summary: 'Grant or decline what a guest asked for',
    tag: share,
    body: AccessRequestSettlement,
    status: 200,
    answers: AccessRequestRecord,
    refusals: { 409: 'It was settled already' },
  }),
};
