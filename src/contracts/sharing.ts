import * as z from 'zod';
import { Accession } from './accession.ts';
import { Expiry, Instant, LabRef, Name } from './common.ts';
import { AskedForMore, GrantRecord, Level, Licence, OwnTerms } from './grants.ts';

export const Role = z.enum(['contributor', 'lead']);
export const AccountState = z.enum(['active', 'deactivated']);

export const LabRecord = z
  .object({
    id: z.string(),
    name: z.string(),
    place: z.string().nullable(),
    description: z.string().nullable(),
    outsideAttest: z.boolean(),
    facility: z.boolean().describe('Measures what other labs made'),
    members: z.number().int(),
    complexes: z.number().int(),
    spectra: z.number().int(),
    role: Role.nullable().describe('The asker’s own role in it'),
  })
  .meta({ id: 'Lab' });
export type LabRecord = z.infer<typeof LabRecord>;
export const LabInput = z
  .strictObject({
    name: Name,
    place: z.string().trim().max(200).optional(),
    description: z.string().trim().max(2000).optional(),
  })
  .meta({ id: 'LabInput' });
export type LabInput = z.infer<typeof LabInput>;
export const LabPatch = z
  .strictObject({
    name: Name.optional(),
    place: z.string().trim().max(200).nullable().optional(),
    description: z.string().trim().max(2000).nullable().optional(),
    outsideAttest: z.boolean().optional(),
    facility: z.boolean().optional(),
  })
  .meta({ id: 'LabPatch' });
export type LabPatch = z.infer<typeof LabPatch>;
export const MemberRecord = z
  .object({
    id: z.string(),
    name: z.string(),
    email: z.string().nullable().describe('For leads of the lab and stewards'),
    role: Role,
    since: Instant,
    state: AccountState.describe('A deactivated account cannot sign in; the person stays on the list'),
  })
  .meta({ id: 'Member' });
export type MemberRecord = z.infer<typeof MemberRecord>;

export const FolioItem = z
  .strictObject({
    accession: Accession,
    spectra: z.union([z.literal('all'), z.array(z.string()).max(5000)]).default('all'),
  })
  .meta({ id: 'FolioItem' });
export type FolioItem = z.infer<typeof FolioItem>;
export const FolioItems = z.array(FolioItem).max(5000).meta({ id: 'FolioItems' });
export const FolioRecord = z
  .object({
    id: z.string(),
    name: z.string(),
    description: z.string().nullable(),
    lab: LabRef,
    items: z.array(z.object({ accession: z.string(), spectra: z.union([z.literal('all'), z.array(z.string())]) })),
    grants: z.array(GrantRecord).describe('For leads of the lab and stewards; empty for others'),
    licence: z.string(),
    embargoUntil: Instant.nullable(),
    shows: z.enum(['attested', 'proposed']),
    edition: z.number().int().nullable(),
    level: Level.nullable().describe('The level at which a guest reads it; null for members'),
    expires: Instant.nullable().describe('When a guest’s access ends'),
    terms: OwnTerms.nullable().describe('What a guest accepted; null for members'),
    contact: z.string().nullable().describe('For a guest: the lead who can be asked'),
    asked: z.array(AskedForMore).describe('A guest’s own requests that wait for an answer'),
    may: z.object({ change: z.boolean(), invite: z.boolean(), download: z.boolean(), delete: z.boolean() }),
  })
  .meta({ id: 'Folio' });
export type FolioRecord = z.infer<typeof FolioRecord>;

export const FolioInput = z
  .strictObject({
    name: Name,
    description: z.string().max(5000).optional(),
    lab: z.string(),
    licence: Licence,
    shows: z.enum(['attested', 'proposed']).default('attested'),
    embargoUntil: Instant.nullable().optional(),
    items: FolioItems.default([]),
  })
  .meta({ id: 'FolioInput' });
export type FolioInput = z.infer<typeof FolioInput>;
export const FolioPatch = z
  .strictObject({
    name: Name.optional(),
    description: z.string().max(5000).nullable().optional(),
    licence: Licence.optional(),
    shows: z.enum(['attested', 'proposed']).optional(),
    embargoUntil: Instant.nullable().optional(),
  })
  .meta({ id: 'FolioPatch' });
export type FolioPatch = z.infer<typeof FolioPatch>;

const notify = z
  .boolean()
  .optional()
  .describe('Send a mail when it is ready; without this one is sent only when it takes longer than a minute');
export const BundleInput = z
  .union([
    z.strictObject({ folio: z.string(), notify }),
    z.strictObject({ complexes: z.array(Accession).min(1).max(5000), notify }),
  ])
  .meta({ id: 'BundleInput' });
export type BundleInput = z.infer<typeof BundleInput>;
export const BundleRecord = z
  .object({
    id: z.string(),
    state: z.enum(['queued', 'running', 'ready', 'failed', 'cancelled']),
    progress: z.number().min(0).max(1),
    size: z.number().int().nullable(),
    sha256: z.string().nullable(),
    folio: z.string().nullable(),
    error: z.string().nullable(),
    createdAt: Instant,
    fileUntil: Instant.nullable().describe('Until when the file of a ready bundle is kept; null once it is gone'),
  })
  .meta({ id: 'Bundle' });
export type BundleRecord = z.infer<typeof BundleRecord>;

const Scope = z.enum(['read', 'write']);
export const TokenInput = z
  .strictObject({
    name: Name,
    scopes: z
      .array(Scope)
      .min(1)
      .max(2)
      .transform((scopes) => [...new Set(scopes)]),
    lab: z.string().optional().describe('Brings the rights of this lab alone'),
    expires: Expiry.describe('At most a year from now'),
  })
  .meta({ id: 'TokenInput' });
export type TokenInput = z.infer<typeof TokenInput>;
export const TokenRecord = z
  .object({
    id: z.string(),
    name: z.string(),
    scopes: z.array(Scope),
    lab: z.string().nullable(),
    createdAt: Instant,
    expires: Instant,
    lastUsedAt: Instant.nullable(),
    token: z.string().optional().describe('Shown once, when it is made'),
  })
  .meta({ id: 'Token' });
export type TokenRecord = z.infer<typeof TokenRecord>;

export const Health = z
  .object({
    status: z.enum(['ok', 'unavailable']),
    parts: z.record(z.string(), z.string()).optional().describe('Database, store and mail by name, for a steward'),
  })
  .meta({ id: 'Health' });
export const MailRecord = z
  .object({
    id: z.string(),
    kind: z.string(),
    to: z.string(),
    subject: z.string(),
    text: z.string(),
    state: z.enum(['queued', 'sent', 'failed']),
    createdAt: Instant,
  })
  .meta({ id: 'Mail' });
export type MailRecord = z.infer<typeof MailRecord>;
