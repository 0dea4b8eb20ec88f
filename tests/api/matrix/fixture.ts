import { call, json } from '../harness.ts';
import { lab, person } from '../people.ts';

export const askers = [
  'nobody',
  'guestNoGrant',
  'guestView',
  'guestDownload',
  'guestExpired',
  'otherContributor',
  'contributor',
  'lead',
  'otherLead',
  'steward',
  'readToken',
  'revokedToken',
] as const;
export type AskerKind = (typeof askers)[number];
type Person = Awaited<ReturnType<typeof person>>;

export interface Fixture {
  north: string;
  south: string;
  people: Record<Exclude<AskerKind, 'nobody'>, Person>;
  /** Registered by North for the whole programme; the one item of the folio. */
  open: string;
  /** Registered by North for its own people. */
  labOnly: string;
  /** A draft of North's contributor. */
  draft: string;
  folio: string;
  /** A fresh name for what a cell makes. */
  fresh: () => string;
}

/** A row of the matrix: the request, made anew for each cell, and the status each kind of asker must get. */
export interface MatrixRow {
  send: (f: Fixture, kind: AskerKind) => Promise<Sent> | Sent;
  expect: Record<AskerKind, number>;
}
export interface Sent {
  path: string;
  json?: unknown;
  form?: FormData;
  headers?: Record<string, string>;
}

/** Statuses by group, the narrower name winning over the wider. */
export function statuses(
  groups: Partial<
    Record<AskerKind | 'guests' | 'grantedGuests' | 'members' | 'northMembers' | 'southMembers', number>
  > & { others: number },
): Record<AskerKind, number> {
  const wider: Record<AskerKind, readonly (keyof typeof groups)[]> = {
    nobody: [],
    guestNoGrant: ['guests'],
    guestView: ['grantedGuests', 'guests'],
    guestDownload: ['grantedGuests', 'guests'],
    guestExpired: ['guests'],
    otherContributor: ['southMembers', 'members'],
    contributor: ['northMembers', 'members'],
    lead: ['northMembers', 'members'],
    otherLead: ['southMembers', 'members'],
    steward: ['members'],
    // A contributor of North with a token of read scope, and one whose token was revoked.
    readToken: ['northMembers', 'members'],
    revokedToken: [],
  };
  const status = (kind: AskerKind) =>
    [kind, ...wider[kind]].map((name) => groups[name]).find((given) => given !== undefined) ??
    (kind === 'nobody' || kind === 'revokedToken' ? 401 : groups.others);
  return Object.fromEntries(askers.map((kind) => [kind, status(kind)])) as Record<AskerKind, number>;
}

async function grant(
  folioId: string,
  accountId: string,
  grantedBy: string,
  level: 'view' | 'download',
  expiresAt: string,
) {
  const { database } = await import('#src/server/database.ts');
  const { newId, nowIso } = await import('#src/server/ids.ts');
  const { grants } = await import('#src/db/schema/index.ts');
  await (await database()).write((tx) =>
    tx.insert(grants).values({
      id: newId(),
      folioId,
      accountId,
      level,
      expiresAt,
      grantedBy,
      termsAcceptedAt: nowIso(),
      createdAt: nowIso(),
    }),
  );
}

async function revokeTokens(accountId: string) {
  const { database } = await import('#src/server/database.ts');
  const { accessTokens } = await import('#src/db/schema/index.ts');
  const { eq } = await import('drizzle-orm');
  await (await database()).write((tx) =>
    tx.update(accessTokens).set({ revokedAt: new Date().toISOString() }).where(eq(accessTokens.accountId, accountId)),
  );
}

export async function register(as: string, labId: string, body: Record<string, unknown>): Promise<string> {
  const { accession } = await json<{ accession: string }>(
    call('POST', '/api/complexes', { as, json: { lab: labId, geometry: 'OC-6', ...body } }),
    201,
  );
  return accession;
}

/** Two labs, everybody who may ask, and records of every visibility. */
export async function buildFixture(): Promise<Fixture> {
  const [north, south] = [await lab('North Quay'), await lab('South Pier')];
  const people = {
    guestNoGrant: await person('guest without'),
    guestView: await person('guest view'),
    guestDownload: await person('guest download'),
    guestExpired: await person('guest expired'),
    otherContributor: await person('south contributor', { labs: { [south]: 'contributor' } }),
    contributor: await person('north contributor', { labs: { [north]: 'contributor' } }),
    lead: await person('north lead', { labs: { [north]: 'lead' } }),
    otherLead: await person('south lead', { labs: { [south]: 'lead' } }),
    steward: await person('the steward', { steward: true }),
    readToken: await person('north reader', { labs: { [north]: 'contributor' }, scopes: ['read'] }),
    revokedToken: await person('north revoked', { labs: { [north]: 'contributor' } }),
  };
  await revokeTokens(people.revokedToken.id);
  const by = people.contributor.token;
  const open = await register(by, north, { formula: '[Co(NH3)6]3+' });
  const labOnly = await register(by, north, { formula: '[Cr(NH3)6]3+', visibility: 'lab' });
  const draft = await register(by, north, { formula: '[Ni(NH3)6]2+', state: 'draft' });
  const folio = await json<{ id: string }>(
    call('POST', '/api/folios', {
      as: people.lead.token,
      json: {
        name: 'Ammines',
        lab: north,
        licence: 'CC-BY-4.0',
        shows: 'attested',
        items: [{ accession: open, spectra: 'all' }],
      },
    }),
    201,
  );
  await grant(folio.id, people.guestView.id, people.lead.id, 'view', '2999-01-01T00:00:00.000Z');
  await grant(folio.id, people.guestDownload.id, people.lead.id, 'download', '2999-01-01T00:00:00.000Z');
  await grant(folio.id, people.guestExpired.id, people.lead.id, 'download', '2020-01-01T00:00:00.000Z');
  let made = 0;
  return { north, south, people, open, labOnly, draft, folio: folio.id, fresh: () => `cell ${++made}` };
}
