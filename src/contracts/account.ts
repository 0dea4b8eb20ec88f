import * as z from 'zod';
import { Email, Instant, LabRef, Name } from './common.ts';

/** Fewest characters (code points) of a password, the only factor of many accounts (NIST SP 800-63B-4, §3.1.1.2). */
export const SHORTEST_PASSWORD = 15;
/** Most UTF-8 bytes of a password: far above the 64 characters that must be allowed, and no work for a hash. */
export const LONGEST_PASSWORD_BYTES = 1000;

const codePoints = (text: string) => [...text.normalize('NFKC')].length;
const bytes = (text: string) => new TextEncoder().encode(text).length;

/** A password as it was typed: never trimmed, cut or folded. Whether it is easy to guess is judged on the server. */
export const NewPassword = z
  .string()
  .refine((text) => codePoints(text) >= SHORTEST_PASSWORD, {
    message: `A password needs at least ${SHORTEST_PASSWORD} characters`,
  })
  .refine((text) => bytes(text) <= LONGEST_PASSWORD_BYTES, {
    message: `A password has at most ${LONGEST_PASSWORD_BYTES} bytes`,
  })
  .meta({ id: 'NewPassword', description: 'At least 15 characters, spaces and any sign allowed, nothing trimmed' });
/** A password that is there already, whatever the rule was when it was chosen. */
const PresentPassword = z.string().min(1, 'Type your present password').max(LONGEST_PASSWORD_BYTES);

export const FactorKind = z.enum(['totp', 'passkey']);

export const AddressChange = z
  .object({
    newEmail: z.string(),
    oldConfirmed: z.boolean().describe('Whether the link sent to the present address was confirmed'),
    newConfirmed: z.boolean().describe('Whether the link sent to the new address was confirmed'),
    createdAt: Instant,
    expiresAt: Instant,
  })
  .meta({ id: 'AddressChange', description: 'It takes effect when both addresses have confirmed it' });
export type AddressChange = z.infer<typeof AddressChange>;

export const Account = z
  .object({
    id: z.string(),
    name: z.string(),
    email: z.string(),
    steward: z.boolean(),
    labs: z.array(LabRef.extend({ role: z.enum(['lead', 'contributor']) })),
    factors: z.array(FactorKind).describe('Kinds of second factors that are set up'),
    secondFactorRequired: z.boolean().describe('Whether this account has to set one up'),
    addressChange: AddressChange.nullable(),
    createdAt: Instant,
  })
  .meta({ id: 'Account' });
export type Account = z.infer<typeof Account>;

export const AccountPatch = z.strictObject({ name: Name }).meta({ id: 'AccountPatch' });
export type AccountPatch = z.infer<typeof AccountPatch>;

export const SessionRecord = z
  .object({
    id: z.string(),
    current: z.boolean().describe('Whether it is the one that asks'),
    browser: z.string().describe('As the browser named itself, in words: "Firefox on Linux"'),
    address: z.string().nullable().describe('Network address from which it began'),
    secondFactor: z.boolean(),
    createdAt: Instant,
    lastSeenAt: Instant.describe('Last request, to within five minutes'),
    expiresAt: Instant,
  })
  .meta({ id: 'Session' });
export type SessionRecord = z.infer<typeof SessionRecord>;

export const EndSessionsQuery = z.object({
  others: z
    .enum(['0', '1'])
    .default('0')
    .transform((flag) => flag === '1')
    .meta({ description: '1 keeps the session that asks' }),
});

export const PasswordChange = z
  .strictObject({
    current: PresentPassword,
    password: NewPassword,
    endOthers: z.boolean().default(true).describe('End every other session of the account'),
    revokeTokens: z.boolean().default(false).describe('Revoke all access tokens of the account'),
  })
  .meta({ id: 'PasswordChange' });
export type PasswordChange = z.infer<typeof PasswordChange>;
export const PasswordChanged = z.object({ sessionsEnded: z.number().int(), tokensRevoked: z.number().int() });

export const AddressChangeInput = z
  .strictObject({ email: Email, password: PresentPassword })
  .meta({ id: 'AddressChangeInput' });
export type AddressChangeInput = z.infer<typeof AddressChangeInput>;

const LinkToken = z.string().min(1).max(200);
export const LinkTokenInput = z.strictObject({ token: LinkToken }).meta({ id: 'LinkToken' });
export const AddressChangePreview = z.object({
  email: z.string().describe('The address to which this link was sent'),
  newEmail: z.string(),
  confirmed: z.boolean().describe('Whether this address has confirmed'),
  expiresAt: Instant,
});
export type AddressChangePreview = z.infer<typeof AddressChangePreview>;
export const AddressConfirmation = z.object({
  done: z.boolean().describe('Whether the change took effect; if not, the other address has still to confirm'),
  newEmail: z.string(),
});
export type AddressConfirmation = z.infer<typeof AddressConfirmation>;

/** One answer, whether or not the address has an account. */
export const Asked = z.object({ detail: z.string() });
export const PasswordResetRequest = z.strictObject({ email: Email }).meta({ id: 'PasswordResetRequest' });
export const PasswordResetPreview = z.object({ email: z.string(), expiresAt: Instant });
export type PasswordResetPreview = z.infer<typeof PasswordResetPreview>;
export const PasswordReset = z
  .strictObject({ token: LinkToken, password: NewPassword })
  .meta({ id: 'PasswordReset', description: 'It signs nobody in and leaves second factors as they are' });
export type PasswordReset = z.infer<typeof PasswordReset>;
