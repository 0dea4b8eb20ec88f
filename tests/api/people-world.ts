/** Bits that several tests of people share. */
import { call, json } from './harness.ts';

export interface Member {
  id: string;
  name: string;
  email: string | null;
  role: string;
  state: string;
  drafts: { complexes: number; preparations: number; spectra: number } | null;
  onlyLead: boolean;
}

export const memberPath = (lab: string, account: string) => `/api/labs/${lab}/members/${account}`;

/** Send with the ETag of the record as this person reads it now. */
export async function sendFresh(method: string, path: string, session: string, body?: unknown): Promise<Response> {
  const record = path.split('?')[0]!;
  const etag = (await call('GET', record, { session })).headers.get('etag')!;
  return call(method, path, { session, headers: { 'if-match': etag }, ...(body === undefined ? {} : { json: body }) });
}

/** A draft of a complex. @returns its accession */
export async function draftComplex(as: string, lab: string, formula: string): Promise<string> {
  const body = { formula, geometry: 'OC-6', lab, state: 'draft' };
  return (await json<{ accession: string }>(call('POST', '/api/complexes', { as, json: body }), 201)).accession;
}

/** Set a complex, preparation or spectrum back to a draft, straight in the database. */
export async function makeDraft(kind: 'preparations' | 'spectra', id: string): Promise<void> {
  const { database } = await import('#src/server/database.ts');
  const schema = await import('#src/db/schema/index.ts');
  const { eq } = await import('drizzle-orm');
  const table = kind === 'spectra' ? schema.spectra : schema.preparations;
  await (await database()).write((tx) => tx.update(table).set({ state: 'draft' }).where(eq(table.id, id)));
}

/** Rows of the trail about one subject, oldest first. */
export async function trailOf(subjectId: string) {
  const { database } = await import('#src/server/database.ts');
  const { trail } = await import('#src/db/schema/index.ts');
  const { asc, eq } = await import('drizzle-orm');
  return (await database()).db.select().from(trail).where(eq(trail.subjectId, subjectId)).orderBy(asc(trail.seq));
}

/** Mails queued to an address, oldest first. */
export async function mailsTo(email: string) {
  const { database } = await import('#src/server/database.ts');
  const { mails } = await import('#src/db/schema/index.ts');
  const { asc, eq } = await import('drizzle-orm');
  return (await database()).db.select().from(mails).where(eq(mails.to, email)).orderBy(asc(mails.id));
}
