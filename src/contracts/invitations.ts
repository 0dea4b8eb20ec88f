import * as z from 'zod';
import { NewPassword } from './account.ts';
import { Email, Expiry, Instant, LabRef, Name } from './common.ts';
import { Level, Licence } from './grants.ts';

const Role = z.enum(['contributor', 'lead']);

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
    expiresAt: Instant.describe('When the link stops working'),
    accessUntil: Instant.nullable().describe('When the access that it gives will end'),
    sends: z.number().int().describe('How often its mail was sent'),
    sentAt: Instant.describe('When it was sent last'),
    acceptedAt: Instant.nullable(),
    revokedAt: Instant.nullable(),
  })
  .meta({ id: 'Invitation' });
export type InvitationRecord = z.infer<typeof InvitationRecord>;

/** One address, or up to fifty. Addresses that differ in capitals alone are one. */
const addresses = {
  email: Email.optional(),
  emails: z
    .array(Email)
    .min(1)
    .max(50, 'At most 50 addresses at once')
    .transform((all) => [...new Set(all)])
    .optional()
    .describe('Instead of `email`: all of them are invited, or none'),
};
const oneOrMany = ({ email, emails }: { email?: string | undefined; emails?: string[] | undefined }) =>
  (email === undefined) !== (emails === undefined);
const NEITHER = { error: 'Give either `email` or `emails`', path: ['email'] };

export const MemberInvitation = z
  .strictObject({
    ...addresses,
    role: Role,
    expires: Expiry.optional().describe('When the link stops working, at most 14 days from now'),
  })
  .refine(oneOrMany, NEITHER)
  .meta({ id: 'MemberInvitation', example: { email: 'partner@example.org', role: 'contributor' } });
export type MemberInvitation = z.infer<typeof MemberInvitation>;

export const GuestInvitation = z
  .strictObject({
    ...addresses,
    level: Level.default('view'),
    expires: Expiry.optional().describe('End of the access given; a year from now unless told'),
  })
  .refine(oneOrMany, NEITHER)
  .meta({ id: 'GuestInvitation', example: { email: 'partner@example.org', level: 'view' } });
export type GuestInvitation = z.infer<typeof GuestInvitation>;

export const InvitationsSent = z
  .union([InvitationRecord, z.object({ items: z.array(InvitationRecord) })])
  .meta({ description: 'One invitation for `email`, a list for `emails`' });
export type InvitationsSent = z.infer<typeof InvitationsSent>;

export const InvitationToken = z.string().min(1).max(200);
export const Acceptance = z
  .strictObject({
    token: InvitationToken,
    name: Name.optional(),
    password: NewPassword.optional(),
    terms: z
      .literal(true, 'Accepting an invitation to a folio accepts its terms')
      .optional()
      .describe('That the terms were shown; accepting accepts them with or without it'),
    licence: Licence.optional().describe('The licence that was shown: 409 where it changed meanwhile'),
  })
  .meta({ id: 'Acceptance', description: 'Name and password are for an address that has no account yet' });
export type Acceptance = z.infer<typeof Acceptance>;

export const InvitationPreview = z.object({
  email: z.string(),
  invitedBy: z.string(),
  lab: LabRef,
  role: Role.nullable(),
  folio: z.object({ name: z.string(), licence: z.string() }).nullable(),
  level: Level.nullable(),
  hasAccount: z.boolean(),
  expiresAt: Instant.describe('When the link stops working'),
  accessUntil: Instant.nullable().describe('When the access to the folio ends'),
});
export type InvitationPreview = z.infer<typeof InvitationPreview>;
