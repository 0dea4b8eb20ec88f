import { type MatrixRow, statuses } from './fixture.ts';

/** By session, since tokens never get here; who reads with a token is refused although the account might. */
const stewards = statuses({ steward: 200, others: 403 });
/** Leads, each of the own lab. */
const leads = (northLead: number, southLead: number) =>
  statuses({ steward: 200, lead: northLead, otherLead: southLead, others: 403 });

export const rows: Record<string, MatrixRow> = {
  listTrail: { send: () => ({ path: '/api/trail?facets=1' }), expect: stewards },
  readTrailRow: { send: () => ({ path: '/api/trail/1' }), expect: stewards },
  'readTrailRow, one that is not there': {
    send: () => ({ path: '/api/trail/999999' }),
    expect: statuses({ steward: 404, others: 403 }),
  },
  'readTrailRow, by no number': {
    send: () => ({ path: '/api/trail/last' }),
    expect: statuses({ steward: 404, others: 403 }),
  },
  verifyTrail: { send: () => ({ path: '/api/trail/verify' }), expect: stewards },
  exportTrailCsv: { send: () => ({ path: '/api/trail/export.csv' }), expect: stewards },
  exportTrailLines: { send: () => ({ path: '/api/trail/export.jsonl' }), expect: stewards },
  listAccessLog: { send: () => ({ path: '/api/access-log' }), expect: leads(200, 200) },
  'listAccessLog, of a folio of North': {
    send: (f) => ({ path: `/api/access-log?folio=${f.folio}` }),
    expect: leads(200, 404),
  },
  'listAccessLog, of a complex of North': {
    send: (f) => ({ path: `/api/access-log?complex=${f.open}` }),
    expect: leads(200, 404),
  },
  listFolioReaders: {
    send: (f) => ({ path: `/api/access-log/readers?folio=${f.folio}` }),
    expect: leads(200, 404),
  },
  revokeAllTokens: {
    // Of those made long ago, that is of none: the other rows need theirs.
    send: () => ({ path: '/api/tokens?until=2000-01-01T00:00:00Z' }),
    expect: statuses({ readToken: 403, others: 200 }),
  },
};
