import * as z from 'zod';
import { Instant, LabRef, Name, Paging } from './common.ts';
import { AccountState, MemberRecord, Role } from './sharing.ts';

const count = z.number().int();

/** Records that a person began in a lab and did not register. */
export const DraftCounts = z.object({ complexes: count, preparations: count, spectra: count });
export type DraftCounts = z.infer<typeof DraftCounts>;

export const MemberDetail = MemberRecord.extend({
  drafts: DraftCounts.nullable().describe('For the person, leads of the lab and stewards'),
  onlyLead: z.boolean().describe('No other active account leads the lab'),
}).meta({ id: 'MemberDetail' });
export type MemberDetail = z.infer<typeof MemberDetail>;

export const MemberPatch = z.strictObject({ role: Role }).meta({ id: 'MemberPatch' });
export type MemberPatch = z.infer<typeof MemberPatch>;
export const MemberInput = z
  .strictObject({ account: z.string().max(100), role: Role })
  .meta({ id: 'MemberInput', description: 'Somebody who has an account already' });
export type MemberInput = z.infer<typeof MemberInput>;

export const DepartureQuery = z.object({
  draftsTo: z
    .string()
    .max(100)
    .optional()
    .describe('The member who gets the drafts; otherwise the lead who removes, or the lead who is in the lab longest'),
});
export type DepartureQuery = z.infer<typeof DepartureQuery>;
export const Departure = z
  .object({
    drafts: DraftCounts,
    draftsTo: z.object({ id: z.string(), name: z.string() }).nullable().describe('Null where no lead is left'),
    tokens: count.describe('Access tokens for this lab alone that were revoked'),
    invitations: count.describe('Open invitations sent by the person that were revoked'),
  })
  .meta({ id: 'Departure' });
export type Departure = z.infer<typeof Departure>;

const MeasuredCount = z.object({ lab: LabRef, spectra: count });
export const MeasuredRecord = z
  .object({
    forOthers: z.array(MeasuredCount).describe('Spectra this lab measured, by the lab that made the preparation'),
    elsewhere: z.array(MeasuredCount).describe('Spectra of this lab’s preparations, by the lab that measured'),
  })
  .meta({ id: 'Measured' });
export type MeasuredRecord = z.infer<typeof MeasuredRecord>;

export const PersonQuery = Paging.extend({
  q: z.string().trim().max(200).optional().describe('Part of a name or an address'),
  state: AccountState.optional(),
});
export type PersonQuery = z.infer<typeof PersonQuery>;
export const PersonRecord = z
  .object({
    id: z.string(),
    name: z.string(),
    email: z.string(),
    steward: z.boolean(),
    state: AccountState,
    deactivatedAt: Instant.nullable(),
    createdAt: Instant,
    labs: z.array(LabRef.extend({ role: Role, onlyLead: z.boolean() })),
    folios: count.describe('Folios granted that can be read today'),
    lastSignInAt: Instant.nullable().describe('Null where there was none in the last 90 days'),
    secondFactor: z.boolean(),
  })
  .meta({ id: 'Person' });
export type PersonRecord = z.infer<typeof PersonRecord>;
// Without the last sign-in: otherwise every sign-in would make an ETag stale that a steward has just read.
export const PersonDetail = PersonRecord.omit({ lastSignInAt: true })
  .extend({
    drafts: z
      .array(
        z.object({
          kind: z.enum(['complex', 'preparation', 'spectrum']),
          id: z.string(),
          name: z.string(),
          accession: z.string(),
          lab: LabRef,
        }),
      )
      .describe('What the person began and did not register, at most 500; leads of the labs see it as well'),
    tokens: count.describe('Access tokens that work'),
    invitations: count.describe('Invitations sent by the person and still open'),
  })
  .meta({ id: 'PersonDetail' });
export type PersonDetail = z.infer<typeof PersonDetail>;
export const PersonPatch = z
  .strictObject({ state: AccountState.optional(), steward: z.boolean().optional(), name: Name.optional() })
  .meta({ id: 'PersonPatch' });
export type PersonPatch = z.infer<typeof PersonPatch>;
export const SessionsEnded = z.object({ ended: count }).meta({ id: 'SessionsEnded' });
