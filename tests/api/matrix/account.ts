import { sessionOf } from '../harness.ts';
import { type AskerKind, type Fixture, type MatrixRow, statuses } from './fixture.ts';

/** Everybody signed in, guests too; never an access token. */
const own = (done: number) => statuses({ readToken: 403, others: done });
const everybody = (status: number) => ({ ...statuses({ others: status }), nobody: status, revokedToken: status });
const any = { 'if-match': '*' };
let number = 0;

/** A spare session of the one who asks; of somebody else for nobody and for tokens that open nothing. */
const sessionFor = (f: Fixture, kind: AskerKind) => sessionOf(f.people[kind === 'nobody' ? 'lead' : kind].id);

export const rows: Record<string, MatrixRow> = {
  readAccount: { send: () => ({ path: '/api/account' }), expect: own(200) },
  changeAccount: {
    send: (f) => ({ path: '/api/account', json: { name: f.fresh() }, headers: any }),
    expect: own(200),
  },
  listSessions: { send: () => ({ path: '/api/account/sessions' }), expect: own(200) },
  endSessions: { send: () => ({ path: '/api/account/sessions' }), expect: own(204) },
  endSession: {
    send: async (f, kind) => ({ path: `/api/account/sessions/${await sessionFor(f, kind)}` }),
    expect: own(204),
  },
  'endSession, of somebody else': {
    send: async (f) => ({ path: `/api/account/sessions/${await sessionOf(f.people.guestExpired.id)}` }),
    expect: statuses({ readToken: 403, guestExpired: 204, others: 404 }),
  },
  // People of the matrix have no password: the one sent is wrong for everybody.
  changePassword: {
    send: () => ({ path: '/api/account/password', json: { current: 'x', password: 'tundra velvet osmosis kettle' } }),
    expect: own(422),
  },
  askAddressChange: {
    send: () => ({ path: '/api/account/address', json: { email: 'new@test.example', password: 'x' } }),
    expect: own(422),
  },
  cancelAddressChange: { send: () => ({ path: '/api/account/address' }), expect: own(204) },
  previewAddressChange: {
    send: () => ({ path: '/api/account/address/preview', json: { token: 'unknown' } }),
    expect: everybody(404),
  },
  confirmAddressChange: {
    send: () => ({ path: '/api/account/address/confirm', json: { token: 'unknown' } }),
    expect: everybody(404),
  },
  askPasswordReset: {
    send: () => ({ path: '/api/password-resets', json: { email: `asked${++number}@test.example` } }),
    expect: everybody(202),
  },
  previewPasswordReset: {
    send: () => ({ path: '/api/password-resets/preview', json: { token: 'unknown' } }),
    expect: everybody(404),
  },
  completePasswordReset: {
    send: () => ({
      path: '/api/password-resets/complete',
      json: { token: 'unknown', password: 'tundra velvet osmosis kettle' },
    }),
    expect: everybody(404),
  },
};
