import * as z from 'zod';
import { Email, Instant, LabRef, Name, Paging, pageOf } from './common.ts';
import { route } from './route.ts';

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

export const MemberInvitation = z.strictObject({ email: Email, role: Role, expires: expires.optional() });
export const GuestInvitation = z.strictObject({
  email: Email,
  level: Level.default('view'),
  expires: expires.optional().describe('End of the access given'),
});
export const Acceptance = z.strictObject({
  token: z.string().min(20).max(200),
  name: Name.optional(),
  password: z.string().min(15, 'A password needs at least 15 characters').max(1000).optional(),
});
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
export const LabInput = z.strictObject({
  name: Name,
  place: z.string().max(200).optional(),
  description: z.string().max(2000).optional(),
});
export const LabPatch = LabInput.partial().extend({ outsideAttest: z.boolean().optional() });
export const MemberRecord = z.object({
  id: z.string(),
  name: z.string(),
  email: z.string().nullable().describe('For leads of the lab and stewards'),
  role: Role,
  since: Instant,
});
export type MemberRecord = z.infer<typeof MemberRecord>;

export const FolioItem = z.object({ accession: z.string(), spectra: z.union([z.literal('all'), z.array(z.string())]) });
export const GrantRecord = z.object({
  id: z.string(),
  email: z.string(),
  name: z.string(),
  level: Level,
  expires: Instant,
  revoked: z.boolean(),
});
export const FolioRecord = z
  .object({
    id: z.string(),
    name: z.string(),
    description: z.string().nullable(),
    lab: LabRef,
    items: z.array(FolioItem),
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
    items: z.array(FolioItem).max(5000).default([]),
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
  .union([z.strictObject({ folio: z.string() }), z.strictObject({ complexes: z.array(z.string()).min(1).max(5000) })])
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

export const TokenInput = z.strictObject({
  name: Name,
  scopes: z.array(z.enum(['read', 'write'])).min(1),
  lab: z.string().optional(),
  expires,
});
export const TokenRecord = z.object({
  id: z.string(),
  name: z.string(),
  scopes: z.array(z.enum(['read', 'write'])),
  lab: z.string().nullable(),
  createdAt: Instant,
  expires: Instant,
  lastUsedAt: Instant.nullable(),
  token: z.string().optional().describe('Shown once, when it is made'),
});

export const Health = z.object({
  status: z.enum(['ok', 'unavailable']),
  parts: z.record(z.string(), z.string()).optional().describe('Database, store and mail by name, for a steward'),
});
export const MailRecord = z.object({
  id: z.string(),
  kind: z.string(),
  to: z.string(),
  subject: z.string(),
  text: z.string(),
  state: z.string(),
  createdAt: Instant,
});
export type MailRecord = z.infer<typeof MailRecord>;

const labs = 'Labs and people';
const share = 'Folios and bundles';
const read = { who: 'signed-in', scope: 'read' } as const;
const write = { who: 'member', scope: 'write' } as const;

export const sharingRoutes = {
  health: route({
    method: 'GET',
    path: '/api/health',
    summary: 'Whether requests can be served',
    tag: 'Service',
    who: 'anyone',
    scope: 'read',
    status: 200,
    answers: Health,
    refusals: { 503: 'Database or store cannot' },
  }),
  openApi: route({
    method: 'GET',
    path: '/api/openapi.json',
    summary: 'This document',
    tag: 'Service',
    who: 'anyone',
    scope: 'read',
    status: 200,
    answers: z.looseObject({}),
  }),
  listLabs: route({
    ...read,
    who: 'member',
    method: 'GET',
    path: '/api/labs',
    summary: 'Labs of the programme',
    tag: labs,
    query: Paging,
    status: 200,
    answers: pageOf(LabRecord),
  }),
  createLab: route({
    ...write,
    who: 'steward',
    method: 'POST',
    path: '/api/labs',
    summary: 'Add a lab',
    tag: labs,
    body: LabInput,
    status: 201,
    answers: LabRecord,
  }),
  readLab: route({
    ...read,
    who: 'member',
    method: 'GET',
    path: '/api/labs/{id}',
    summary: 'A lab',
    tag: labs,
    status: 200,
    answers: LabRecord,
  }),
  changeLab: route({
    ...write,
    method: 'PATCH',
    path: '/api/labs/{id}',
    summary: 'Change a lab',
    tag: labs,
    body: LabPatch,
    status: 200,
    answers: LabRecord,
    conditional: true,
  }),
  listMembers: route({
    ...read,
    who: 'member',
    method: 'GET',
    path: '/api/labs/{id}/members',
    summary: 'People of a lab',
    tag: labs,
    status: 200,
    answers: z.array(MemberRecord),
  }),
  listLabInvitations: route({
    ...write,
    scope: 'read',
    sessionOnly: true,
    method: 'GET',
    path: '/api/labs/{id}/invitations',
    summary: 'Invitations into a lab',
    tag: labs,
    status: 200,
    answers: z.array(InvitationRecord),
  }),
  inviteMember: route({
    ...write,
    sessionOnly: true,
    method: 'POST',
    path: '/api/labs/{id}/invitations',
    summary: 'Invite a person into a lab',
    tag: labs,
    body: MemberInvitation,
    status: 201,
    answers: InvitationRecord,
  }),
  revokeInvitation: route({
    ...write,
    sessionOnly: true,
    method: 'DELETE',
    path: '/api/invitations/{id}',
    summary: 'Revoke an invitation that was not accepted',
    tag: labs,
    status: 204,
    answers: null,
  }),
  previewInvitation: route({
    method: 'POST',
    path: '/api/invitations/preview',
    summary: 'What an invitation offers, by its token',
    tag: labs,
    who: 'anyone',
    scope: 'read',
    body: z.strictObject({ token: z.string().min(20).max(200) }),
    status: 200,
    answers: InvitationPreview,
  }),
  acceptInvitation: route({
    method: 'POST',
    path: '/api/invitations/accept',
    summary: 'Accept an invitation by its token',
    tag: labs,
    who: 'anyone',
    scope: 'write',
    body: Acceptance,
    status: 200,
    answers: z.object({ email: z.string(), folio: z.string().nullable() }),
    refusals: { 401: 'The address has an account: sign in first' },
  }),
  listFolios: route({
    ...read,
    method: 'GET',
    path: '/api/folios',
    summary: 'Folios in sight',
    tag: share,
    query: Paging,
    status: 200,
    answers: pageOf(FolioRecord),
  }),
  createFolio: route({
    ...write,
    method: 'POST',
    path: '/api/folios',
    summary: 'Make a folio',
    tag: share,
    body: FolioInput,
    status: 201,
    answers: FolioRecord,
  }),
  readFolio: route({
    ...read,
    method: 'GET',
    path: '/api/folios/{id}',
    summary: 'A folio',
    tag: share,
    status: 200,
    answers: FolioRecord,
  }),
  changeFolio: route({
    ...write,
    method: 'PATCH',
    path: '/api/folios/{id}',
    summary: 'Change a folio',
    tag: share,
    body: FolioPatch,
    status: 200,
    answers: FolioRecord,
    conditional: true,
  }),
  replaceFolioItems: route({
    ...write,
    method: 'PUT',
    path: '/api/folios/{id}/items',
    summary: 'Replace the content of a folio',
    tag: share,
    body: z.array(FolioItem).max(5000),
    status: 200,
    answers: FolioRecord,
  }),
  listGrants: route({
    ...write,
    scope: 'read',
    method: 'GET',
    path: '/api/folios/{id}/grants',
    summary: 'Who may read a folio',
    tag: share,
    status: 200,
    answers: z.array(GrantRecord),
  }),
  revokeGrant: route({
    ...write,
    sessionOnly: true,
    method: 'DELETE',
    path: '/api/folios/{id}/grants/{grant}',
    summary: 'End a guest’s access',
    tag: share,
    status: 204,
    answers: null,
  }),
  listFolioInvitations: route({
    ...write,
    scope: 'read',
    sessionOnly: true,
    method: 'GET',
    path: '/api/folios/{id}/invitations',
    summary: 'Invitations to a folio',
    tag: share,
    status: 200,
    answers: z.array(InvitationRecord),
  }),
  inviteGuest: route({
    ...write,
    sessionOnly: true,
    method: 'POST',
    path: '/api/folios/{id}/invitations',
    summary: 'Invite a guest to a folio',
    tag: share,
    body: GuestInvitation,
    status: 201,
    answers: InvitationRecord,
  }),
  createBundle: route({
    who: 'signed-in',
    scope: 'write',
    method: 'POST',
    path: '/api/bundles',
    summary: 'Make a bundle of a folio or of complexes',
    tag: share,
    body: BundleInput,
    status: 202,
    answers: BundleRecord,
  }),
  readBundle: route({
    ...read,
    method: 'GET',
    path: '/api/bundles/{id}',
    summary: 'How far a bundle is',
    tag: share,
    status: 200,
    answers: BundleRecord,
  }),
  cancelBundle: route({
    who: 'signed-in',
    scope: 'write',
    method: 'DELETE',
    path: '/api/bundles/{id}',
    summary: 'Cancel a bundle that is not ready',
    tag: share,
    status: 204,
    answers: null,
  }),
  readBundleFile: route({
    ...read,
    method: 'GET',
    path: '/api/bundles/{id}/file',
    summary: 'The ZIP file; ranges are served',
    tag: share,
    status: 200,
    answers: 'application/zip',
  }),
  listTokens: route({
    ...read,
    sessionOnly: true,
    method: 'GET',
    path: '/api/tokens',
    summary: 'Own access tokens',
    tag: labs,
    status: 200,
    answers: z.array(TokenRecord),
  }),
  createToken: route({
    who: 'signed-in',
    scope: 'write',
    sessionOnly: true,
    method: 'POST',
    path: '/api/tokens',
    summary: 'Make an access token',
    tag: labs,
    body: TokenInput,
    status: 201,
    answers: TokenRecord,
  }),
  revokeToken: route({
    who: 'signed-in',
    scope: 'write',
    sessionOnly: true,
    method: 'DELETE',
    path: '/api/tokens/{id}',
    summary: 'Revoke an access token',
    tag: labs,
    status: 204,
    answers: null,
  }),
};
