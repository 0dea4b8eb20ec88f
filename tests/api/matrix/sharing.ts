import { call, json } from '../harness.ts';
import { type Fixture, type MatrixRow, statuses } from './fixture.ts';

const any = { 'if-match': '*' };
const soon = () => new Date(Date.now() + 30 * 24 * 3600 * 1000).toISOString();
let number = 0;
const address = () => `invited${++number}@test.example`;

/** Who may decide on North's folios and people, and how the others are refused. */
const northLeads = (done: number, southLead: number) =>
  statuses({
    guests: 403,
    readToken: 403,
    contributor: 403,
    otherContributor: 403,
    otherLead: southLead,
    others: done,
  });

async function invitation(f: Fixture): Promise<string> {
  const body = { email: address(), role: 'contributor' };
  const sent = call('POST', `/api/labs/${f.north}/invitations`, { session: f.people.steward.id, json: body });
  return (await json<{ id: string }>(sent, 201)).id;
}

/** A grant of its own, so that the guests of the fixture keep theirs. */
async function spareGrant(f: Fixture): Promise<string> {
  const { grant } = await import('../shared-content.ts');
  return grant(f.folio, f.people.guestNoGrant.id, 'view', f.people.lead.id, '2020-01-01T00:00:00.000Z');
}

async function northFolio(f: Fixture): Promise<string> {
  const body = { name: f.fresh(), lab: f.north, licence: 'CC-BY-4.0' };
  return (await json<{ id: string }>(call('POST', '/api/folios', { as: f.people.lead.token, json: body }), 201)).id;
}

/** A folio of North that the guests of the fixture read, or read until a moment ago. */
async function guestFolio(f: Fixture, kind: Parameters<MatrixRow['send']>[1]): Promise<string> {
  const { grant } = await import('../shared-content.ts');
  const id = await northFolio(f);
  const by = f.people.lead.id;
  if (kind === 'guestView' || kind === 'guestDownload') await grant(id, f.people[kind].id, 'view', by);
  if (kind === 'guestExpired')
    await grant(id, f.people[kind].id, 'view', by, new Date(Date.now() - 1000).toISOString());
  return id;
}

/** A request of a guest about North's folio that nobody answered yet, straight in the database. */
async function request(f: Fixture): Promise<string> {
  const { database } = await import('#src/server/database.ts');
  const { newId, nowIso } = await import('#src/server/ids.ts');
  const { accessRequests } = await import('#src/db/schema/index.ts');
  const row = {
    id: newId(),
    accountId: f.people.guestView.id,
    folioId: f.folio,
    wants: 'longer' as const,
    createdAt: nowIso(),
  };
  await (await database()).write((tx) => tx.insert(accessRequests).values(row));
  return row.id;
}

/** A bundle ordered by the one who asks, or by the lead for those who may order none; never left to wait. */
async function bundleOf(f: Fixture, accountId: string): Promise<string> {
  const { database } = await import('#src/server/database.ts');
  const { newId, nowIso } = await import('#src/server/ids.ts');
  const { bundles } = await import('#src/db/schema/index.ts');
  const row = { id: newId(), requestedBy: accountId, folioId: f.folio, state: 'queued' as const, createdAt: nowIso() };
  await (await database()).write((tx) => tx.insert(bundles).values(row));
  return row.id;
}
const ownBundle = (f: Fixture, kind: Parameters<MatrixRow['send']>[1]) =>
  bundleOf(f, f.people[kind === 'nobody' ? 'lead' : kind].id);

async function tokenOf(f: Fixture, kind: Parameters<MatrixRow['send']>[1]): Promise<string> {
  const { database } = await import('#src/server/database.ts');
  const { newId, newSecret, nowIso, sha256 } = await import('#src/server/ids.ts');
  const { accessTokens } = await import('#src/db/schema/index.ts');
  const id = newId();
  const accountId = f.people[kind === 'nobody' ? 'lead' : kind].id;
  const row = {
    id,
    accountId,
    name: 'spare',
    hash: sha256(newSecret()),
    scopes: ['read' as const],
    createdAt: nowIso(),
    expiresAt: soon(),
  };
  await (await database()).write((tx) => tx.insert(accessTokens).values(row));
  return id;
}

const everybody = (status: number) => ({ ...statuses({ others: status }), nobody: status, revokedToken: status });

export const rows: Record<string, MatrixRow> = {
  health: { send: () => ({ path: '/api/health' }), expect: everybody(200) },
  openApi: { send: () => ({ path: '/api/openapi.json' }), expect: everybody(200) },
  listOutbox: {
    send: () => ({ path: '/api/outbox' }),
    expect: { ...statuses({ others: 403 }), nobody: 200, revokedToken: 200 },
  },
  listLabs: { send: () => ({ path: '/api/labs' }), expect: statuses({ guests: 403, others: 200 }) },
  createLab: {
    send: (f) => ({ path: '/api/labs', json: { name: `Lab ${f.fresh()}` } }),
    expect: statuses({ steward: 201, others: 403 }),
  },
  readLab: { send: (f) => ({ path: `/api/labs/${f.north}` }), expect: statuses({ guests: 403, others: 200 }) },
  changeLab: {
    send: (f) => ({ path: `/api/labs/${f.north}`, json: { place: f.fresh() }, headers: any }),
    expect: northLeads(200, 403),
  },
  listMembers: {
    send: (f) => ({ path: `/api/labs/${f.north}/members` }),
    expect: statuses({ guests: 403, others: 200 }),
  },
  listLabInvitations: { send: (f) => ({ path: `/api/labs/${f.north}/invitations` }), expect: northLeads(200, 403) },
  inviteMember: {
    send: (f) => ({ path: `/api/labs/${f.north}/invitations`, json: { email: address(), role: 'lead' } }),
    expect: northLeads(201, 403),
  },
  revokeInvitation: {
    send: async (f) => ({ path: `/api/invitations/${await invitation(f)}` }),
    expect: northLeads(204, 404),
  },
  readInvitation: {
    send: async (f) => ({ path: `/api/invitations/${await invitation(f)}` }),
    expect: northLeads(200, 404),
  },
  resendInvitation: {
    send: async (f) => ({ path: `/api/invitations/${await invitation(f)}/resend` }),
    expect: northLeads(200, 404),
  },
  previewInvitation: {
    send: () => ({ path: '/api/invitations/preview', json: { token: 'unknown' } }),
    expect: everybody(404),
  },
  acceptInvitation: {
    send: () => ({ path: '/api/invitations/accept', json: { token: 'unknown' } }),
    expect: everybody(404),
  },
  listFolios: { send: () => ({ path: '/api/folios' }), expect: statuses({ others: 200 }) },
  createFolio: {
    send: (f, kind) => ({
      path: '/api/folios',
      json: { name: f.fresh(), lab: kind.startsWith('other') ? f.south : f.north, licence: 'CC0-1.0' },
    }),
    expect: statuses({ guests: 403, readToken: 403, others: 201 }),
  },
  'createFolio, of another lab': {
    send: (f) => ({ path: '/api/folios', json: { name: f.fresh(), lab: f.south, licence: 'CC0-1.0' } }),
    expect: statuses({ guests: 403, northMembers: 403, others: 201 }),
  },
  readFolio: {
    send: (f) => ({ path: `/api/folios/${f.folio}` }),
    expect: statuses({ guests: 404, grantedGuests: 200, southMembers: 404, others: 200 }),
  },
  changeFolio: {
    send: (f) => ({ path: `/api/folios/${f.folio}`, json: { description: f.fresh() }, headers: any }),
    expect: statuses({ guests: 403, readToken: 403, contributor: 403, southMembers: 404, others: 200 }),
  },
  replaceFolioItems: {
    send: (f) => ({ path: `/api/folios/${f.folio}/items`, json: [{ accession: f.open, spectra: 'all' }] }),
    expect: statuses({ guests: 403, readToken: 403, contributor: 403, southMembers: 404, others: 200 }),
  },
  listGrants: { send: (f) => ({ path: `/api/folios/${f.folio}/grants` }), expect: northLeads(200, 404) },
  revokeGrant: {
    send: async (f) => ({ path: `/api/folios/${f.folio}/grants/${await spareGrant(f)}` }),
    expect: northLeads(204, 404),
  },
  readGrant: {
    send: async (f) => ({ path: `/api/folios/${f.folio}/grants/${await spareGrant(f)}` }),
    expect: northLeads(200, 404),
  },
  changeGrant: {
    send: async (f) => ({
      path: `/api/folios/${f.folio}/grants/${await spareGrant(f)}`,
      json: { level: 'download' },
      headers: any,
    }),
    expect: northLeads(200, 404),
  },
  acceptTerms: {
    send: (f) => ({ path: `/api/folios/${f.folio}/terms`, json: { licence: 'CC-BY-4.0' } }),
    expect: statuses({ guests: 404, grantedGuests: 200, readToken: 403, southMembers: 404, others: 403 }),
  },
  askForMore: {
    send: async (f, kind) => ({
      path: `/api/folios/${await guestFolio(f, kind)}/requests`,
      json: { wants: 'longer' },
    }),
    expect: statuses({ guests: 201, guestNoGrant: 404, readToken: 403, southMembers: 404, others: 403 }),
  },
  'askForMore, long after the end': {
    send: (f) => ({ path: `/api/folios/${f.folio}/requests`, json: { wants: 'longer' } }),
    expect: statuses({ guests: 404, grantedGuests: 201, readToken: 403, southMembers: 404, others: 403 }),
  },
  listAccessRequests: { send: (f) => ({ path: `/api/folios/${f.folio}/requests` }), expect: northLeads(200, 404) },
  settleAccessRequest: {
    send: async (f) => ({ path: `/api/requests/${await request(f)}/settle`, json: { outcome: 'declined' } }),
    expect: northLeads(200, 404),
  },
  deleteFolio: {
    send: async (f) => ({ path: `/api/folios/${await northFolio(f)}`, headers: any }),
    expect: statuses({ guests: 403, readToken: 403, contributor: 403, southMembers: 404, others: 204 }),
  },
  'deleteFolio, that guests read': {
    send: (f) => ({ path: `/api/folios/${f.folio}`, headers: any }),
    expect: statuses({ guests: 403, readToken: 403, contributor: 403, southMembers: 404, others: 409 }),
  },
  listFolioInvitations: { send: (f) => ({ path: `/api/folios/${f.folio}/invitations` }), expect: northLeads(200, 404) },
  inviteGuest: {
    send: (f) => ({ path: `/api/folios/${f.folio}/invitations`, json: { email: address(), level: 'view' } }),
    expect: northLeads(201, 404),
  },
  createBundle: {
    send: (f) => ({ path: '/api/bundles', json: { folio: f.folio } }),
    expect: statuses({ guests: 403, guestDownload: 202, readToken: 403, southMembers: 404, others: 202 }),
  },
  'createBundle, of complexes': {
    send: (f) => ({ path: '/api/bundles', json: { complexes: [f.open] } }),
    expect: statuses({ guests: 403, guestDownload: 202, readToken: 403, others: 202 }),
  },
  'createBundle, of what only North sees': {
    send: (f) => ({ path: '/api/bundles', json: { complexes: [f.labOnly] } }),
    expect: statuses({ guests: 403, guestDownload: 422, readToken: 403, southMembers: 422, others: 202 }),
  },
  readBundle: {
    send: async (f, kind) => ({ path: `/api/bundles/${await ownBundle(f, kind)}` }),
    expect: statuses({ guests: 404, grantedGuests: 200, southMembers: 404, others: 200 }),
  },
  "readBundle, another's": {
    send: async (f, kind) => ({ path: `/api/bundles/${await ownBundle(f, kind === 'lead' ? 'steward' : 'lead')}` }),
    expect: statuses({ others: 404 }),
  },
  cancelBundle: {
    send: async (f, kind) => ({ path: `/api/bundles/${await ownBundle(f, kind)}` }),
    expect: statuses({ guests: 404, grantedGuests: 204, readToken: 403, southMembers: 404, others: 204 }),
  },
  readBundleFile: {
    send: async (f, kind) => ({ path: `/api/bundles/${await ownBundle(f, kind)}/file` }),
    expect: statuses({ guests: 404, grantedGuests: 409, southMembers: 404, others: 409 }),
  },
  listTokens: { send: () => ({ path: '/api/tokens' }), expect: statuses({ readToken: 403, others: 200 }) },
  createToken: {
    send: (f) => ({ path: '/api/tokens', json: { name: f.fresh(), scopes: ['read'], expires: soon() } }),
    expect: statuses({ guests: 403, readToken: 403, others: 201 }),
  },
  revokeToken: {
    send: async (f, kind) => ({ path: `/api/tokens/${await tokenOf(f, kind)}` }),
    expect: statuses({ readToken: 403, others: 204 }),
  },
};
