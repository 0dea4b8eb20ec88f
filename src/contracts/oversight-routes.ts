import * as z from 'zod';
import { pageOf } from './common.ts';
import {
  AccessLogQuery,
  AccessLogRow,
  FolioReader,
  FolioReadersQuery,
  RevokeAllQuery,
  TrailEntryRecord,
  TrailFilter,
  TrailQuery,
  TrailRow,
  TrailVerdict,
} from './oversight.ts';
import { route } from './route.ts';

const steward = {
  who: 'steward',
  scope: 'read',
  sessionOnly: true,
  method: 'GET',
  tag: 'Oversight',
  status: 200,
} as const;
const leads = { ...steward, who: 'member' } as const;

/** Routes of the trail, of who looked and of all own tokens at once: for people alone, never for access tokens. */
export const oversightRoutes = {
  listTrail: route({
    ...steward,
    path: '/api/trail',
    summary: 'Who did what when, the latest first',
    query: TrailQuery,
    answers: pageOf(TrailRow),
  }),
  readTrailRow: route({
    ...steward,
    path: '/api/trail/{seq}',
    summary: 'One row of the trail, with what it changed from as far as the trail tells',
    answers: TrailEntryRecord,
  }),
  verifyTrail: route({
    ...steward,
    path: '/api/trail/verify',
    summary: 'Whether every row still fits the hash of the one before',
    answers: TrailVerdict,
  }),
  exportTrailCsv: route({
    ...steward,
    path: '/api/trail/export.csv',
    summary: 'The trail as CSV for a spreadsheet',
    query: TrailFilter,
    answers: 'text/csv',
  }),
  exportTrailLines: route({
    ...steward,
    path: '/api/trail/export.jsonl',
    summary:
      'The trail as JSON lines with all that its hashes are over: SHA-256 of the JSON array previousHash, at, actorId, tokenId, action, subjectType, subjectId, detail as JSON text',
    query: TrailFilter,
    answers: 'application/jsonl',
  }),
  revokeAllTokens: route({
    who: 'signed-in',
    scope: 'write',
    sessionOnly: true,
    method: 'DELETE',
    path: '/api/tokens',
    summary: 'Revoke all own access tokens',
    tag: 'Labs and people',
    query: RevokeAllQuery,
    status: 200,
    answers: z.object({ revoked: z.number().int() }),
  }),
  listAccessLog: route({
    ...leads,
    path: '/api/access-log',
    summary: 'Who looked and who downloaded: a steward everything, a lead the records and folios of the own labs',
    query: AccessLogQuery,
    answers: pageOf(AccessLogRow),
    refusals: { 404: 'The record or folio that is asked for is not one of your labs' },
  }),
  listFolioReaders: route({
    ...leads,
    path: '/api/access-log/readers',
    summary: 'When each guest of a folio last looked and downloaded, for leads of its lab and stewards',
    query: FolioReadersQuery,
    answers: z.array(FolioReader),
    refusals: { 404: 'The folio is not in your sight' },
  }),
};
