import * as z from 'zod';
import { Id, Instant, listOf, Paging } from './common.ts';

const Day = z.iso.date();
/** A day stands for its first moment in UTC as `from`, for its last as `to`. */
const Moment = z.union([Day, z.iso.datetime()]);

const subjectTypes = [
  'complex',
  'preparation',
  'spectrum',
  'band',
  'folio',
  'bundle',
  'account',
  'lab',
  'invitation',
  'token',
  'registry',
] as const;

/** What is looked for in the trail. */
export const TrailFilter = z.object({
  action: listOf(z.string().max(60)).optional(),
  subjectType: listOf(z.string().max(60)).optional(),
  subject: z.string().max(200).optional().describe('Id of the record'),
  actor: z.string().max(100).optional().describe('Id of the account, or `program`'),
  from: Moment.optional(),
  to: Moment.optional(),
  q: z.string().trim().max(200).optional().describe('In action, record, person, detail, or a hash noted elsewhere'),
});
export type TrailFilter = z.infer<typeof TrailFilter>;
export const TrailQuery = TrailFilter.extend({
  ...Paging.shape,
  sort: z.enum(['seq', '-seq']).default('-seq'),
  facets: z.enum(['0', '1']).default('0'),
});
export type TrailQuery = z.infer<typeof TrailQuery>;

const Person = z.object({ id: z.string(), name: z.string(), email: z.string() });
const Subject = z.object({
  type: z.string().describe(`One of ${subjectTypes.join(', ')}`),
  id: z.string(),
  label: z.string().nullable().describe('As people name it: accession and formula, title, name, address'),
  href: z.string().nullable().describe('Page of the record, where there is one'),
});

export const TrailRow = z
  .object({
    seq: z.number().int(),
    at: Instant,
    actor: Person.nullable().describe('Null for the program itself'),
    token: z.object({ id: z.string(), name: z.string() }).nullable().describe('The access token that was used'),
    action: z.string(),
    subject: Subject,
    detail: z.record(z.string(), z.unknown()),
    hash: z.string(),
  })
  .meta({ id: 'TrailRow' });
export type TrailRow = z.infer<typeof TrailRow>;

export const TrailEntryRecord = TrailRow.extend({
  previousHash: z.string(),
  before: z
    .record(z.string(), z.unknown())
    .describe('What an earlier row of the same record told of the same fields; a field that none told is left out'),
}).meta({ id: 'TrailEntry' });
export type TrailEntryRecord = z.infer<typeof TrailEntryRecord>;

export const TrailVerdict = z
  .object({
    rows: z.number().int(),
    verified: z.boolean(),
    firstBroken: z.number().int().nullable().describe('Number of the first row that does not fit the one before'),
    head: z.string().describe('Hash of the last row; kept elsewhere, it shows later that nothing before it changed'),
  })
  .meta({ id: 'TrailVerdict' });
export type TrailVerdict = z.infer<typeof TrailVerdict>;

const kinds = ['look', 'download'] as const;
const lookedAt = ['complex', 'spectrum', 'folio', 'bundle', 'table'] as const;

export const AccessLogQuery = Paging.extend({
  kind: z.enum(kinds).optional(),
  subjectType: listOf(z.enum(lookedAt)).optional(),
  account: z.string().max(100).optional(),
  complex: z.string().max(40).optional().describe('Accession'),
  spectrum: z.string().max(100).optional(),
  folio: z.string().max(100).optional().describe('The folio and its bundles'),
  from: Day.optional(),
  to: Day.optional(),
  q: z.string().trim().max(200).optional().describe('In the name or address of the person'),
});
export type AccessLogQuery = z.infer<typeof AccessLogQuery>;

export const AccessLogRow = z
  .object({
    account: Person,
    kind: z.enum(kinds),
    subject: Subject,
    day: Day,
    count: z.number().int(),
    firstAt: Instant,
    lastAt: Instant,
  })
  .meta({ id: 'AccessLogRow', description: 'What one person did with one record on one day (UTC)' });
export type AccessLogRow = z.infer<typeof AccessLogRow>;

export const FolioReader = z
  .object({
    account: Person,
    level: z.enum(['view', 'download']),
    expires: Instant,
    ended: z.boolean().describe('The access was revoked, or its time is over'),
    looks: z.number().int(),
    lastLook: Instant.nullable(),
    downloads: z.number().int(),
    lastDownload: Instant.nullable(),
  })
  .meta({ id: 'FolioReader' });
export type FolioReader = z.infer<typeof FolioReader>;

export const FolioReadersQuery = z.object({ folio: Id });

export const RevokeAllQuery = z.object({
  until: z.iso.datetime().optional().describe('Those made until then alone: what a list shown at that moment held'),
});
export type RevokeAllQuery = z.infer<typeof RevokeAllQuery>;
