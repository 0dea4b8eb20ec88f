import * as z from 'zod';
import { Expiry, Instant } from './common.ts';

export const Level = z.enum(['view', 'download']);
/** Under which folios may be handed out: SPDX identifiers. */
export const Licence = z.enum(['CC0-1.0', 'CC-BY-4.0', 'CC-BY-SA-4.0', 'CC-BY-NC-4.0', 'ODbL-1.0', 'PDDL-1.0']);

export const GrantRecord = z
  .object({
    id: z.string(),
    email: z.string(),
    name: z.string(),
    level: Level,
    expires: Instant,
    termsAcceptedAt: Instant.nullable(),
    termsLicence: z.string().nullable().describe('The licence that was accepted then'),
    revoked: z.boolean(),
    revokedAt: Instant.nullable(),
    grantedBy: z.string(),
    createdAt: Instant,
  })
  .meta({ id: 'Grant' });
export type GrantRecord = z.infer<typeof GrantRecord>;

export const GrantPatch = z
  .strictObject({
    level: Level.optional(),
    expires: Expiry.optional().describe('Still to come, at most five years from now'),
  })
  .meta({ id: 'GrantPatch' });
export type GrantPatch = z.infer<typeof GrantPatch>;

/** What a guest accepted of a folio, and whether its licence is still that one. */
export const OwnTerms = z.object({
  acceptedAt: Instant.nullable(),
  licence: z.string().nullable(),
  isCurrent: z.boolean(),
});
export type OwnTerms = z.infer<typeof OwnTerms>;

export const TermsAcceptance = z
  .strictObject({ licence: Licence.describe('The licence that was shown, which must be the folio’s present one') })
  .meta({ id: 'TermsAcceptance' });

const wants = z.enum(['download', 'longer', 'other']);
export const AskedForMore = z.object({ id: z.string(), wants, createdAt: Instant });
export type AskedForMore = z.infer<typeof AskedForMore>;

export const AccessRequestInput = z
  .strictObject({ wants, message: z.string().trim().max(2000).optional() })
  .meta({ id: 'AccessRequestInput' });
export type AccessRequestInput = z.infer<typeof AccessRequestInput>;

export const AccessRequestRecord = z
  .object({
    id: z.string(),
    folio: z.object({ id: z.string(), name: z.string() }),
    name: z.string(),
    email: z.string(),
    wants,
    message: z.string().nullable(),
    createdAt: Instant,
    settledAt: Instant.nullable(),
    outcome: z.enum(['granted', 'declined']).nullable(),
    answer: z.string().nullable(),
  })
  .meta({ id: 'AccessRequest', description: 'A guest asks the lab of a folio for more' });
export type AccessRequestRecord = z.infer<typeof AccessRequestRecord>;

export const AccessRequestSettlement = z
  .strictObject({ outcome: z.enum(['granted', 'declined']), answer: z.string().trim().max(2000).optional() })
  .meta({ id: 'AccessRequestSettlement' });
export type AccessRequestSettlement = z.infer<typeof AccessRequestSettlement>;
