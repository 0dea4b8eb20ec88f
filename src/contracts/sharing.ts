import * as z from 'zod';
import { Accession } from './accession.ts';
import { Email, Instant, LabRef, Name } from './common.ts';

export const Role = z.enum(['contributor', 'lead']);
export const Level = z.enum(['view', 'download']);
const expires = z.union([Instant, z.iso.date().transform((day) => `${day}T23:59:59.999Z`)]);

export const InvitationRecord = z
  .object({
    id: z.string(),
    email: z.string(),
    state: z.enum(['sent', 'accepted', 'lapsed', 'revoked']),
    role: Role.nullable(),
    level: Level.nullable(),
    folio: z.object({ id: z.string(), name: z.string() }).nullable(),
    lab: LabRef.nullable(),
    invitedBy: z.string(),
    createdAt: Instant,
    expiresAt: Instant,
  })
  .meta({ id: 'Invitation' });
export type InvitationRecord = z.infer<typeof InvitationRecord>;

export const MemberInvitation = z
  .strictObject({
    email: Email,
    role: Role,
    expires: expires.optional().describe('When the link stops working, at most 14 days from now'),
  })
  .meta({ id: 'MemberInvitation' });
export type MemberInvitation = z.infer<typeof MemberInvitation>;
export const GuestInvitation = z
  .strictObject({
    email: Email,
    level: Level.default('view'),
    expires: expires.optional().describe('End of the access given; a year from now unless told'),
  })
  .meta({ id: 'GuestInvitation' });
export type GuestInvitation = z.infer<typeof GuestInvitation>;
export const InvitationToken = z.string().min(1).max(200);
export const Acceptance = z
  .strictObject({
    token: InvitationToken,
    name: Name.optional(),
    password: z.string().min(15, 'A password needs at least 15 characters').max(1000).optional(),
  })
  .meta({ id: 'Acceptance', description: 'Name and password are for an address that has no account yet' });
export type Acceptance = z.infer<typeof Acceptance>;
export const InvitationPreview = z.object({
  email: z.string(),
  invitedBy: z.string(),
  lab: LabRef,
  role: Role.nullable(),
  folio: z.object({ name: z.string() }).nullable(),
  level: Level.nullable(),
  hasAccount: z.boolean(),
  expiresAt: Instant,
});
export type InvitationPreview = z.infer<typeof InvitationPreview>;

export const LabRecord = z
  .object({
    id: z.string(),
    name: z.string(),
    place: z.string().nullable(),
    description: z.string().nullable(),
    outsideAttest: z.boolean(),
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
export const GrantRecord = z
  .object({
    id: z.string(),
    email: z.string(),
    name: z.string(),
    level: Level,
    expires: Instant,
    termsAcceptedAt: Instant.nullable(),
    revoked: z.boolean(),
  })
  .meta({ id: 'Grant' });
export type GrantRecord = z.infer<typeof GrantRecord>;
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
    may: z.object({ change: z.boolean(), invite: z.boolean(), download: z.boolean() }),
  })
  .meta({ id: 'Folio' });
export type FolioRecord = z.infer<typeof FolioRecord>;

const licence = z.enum(['CC0-1.0', 'CC-BY-4.0', 'CC-BY-SA-4.0', 'CC-BY-NC-4.0', 'ODbL-1.0', 'PDDL-1.0']);
export const FolioInput = z
  .strictObject({
    name: Name,
    description: z.string().max(5000).optional(),
    lab: z.string(),
    licence,
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
    licence: licence.optional(),
    shows: z.enum(['attested', 'proposed']).optional(),
    embargoUntil: Instant.nullable().optional(),
  })
  .meta({ id: 'FolioPatch' });
export type FolioPatch = z.infer<typeof FolioPatch>;

export const BundleInput = z
  .union([z.strictObject({ folio: z.string() }), z.strictObject({ complexes: z.array(Accession).min(1).max(5000) })])
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
    expires: expires.describe('At most a year from now'),
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
