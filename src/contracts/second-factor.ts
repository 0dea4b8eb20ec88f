import * as z from 'zod';
import { FactorKind } from './account.ts';
import { Email, Instant, Name } from './common.ts';

/** The present password, asked for again before anything about factors changes. */
const Password = z.string().min(1, 'Type your password').max(1000);
const endOthers = z
  .boolean()
  .default(true)
  .describe('With the first factor: end every other session of the account, which began without one');

export const FactorRecord = z
  .object({
    id: z.string(),
    kind: FactorKind,
    name: z.string(),
    createdAt: Instant,
    lastUsedAt: Instant.nullable(),
  })
  .meta({ id: 'SecondFactor' });
export type FactorRecord = z.infer<typeof FactorRecord>;

export const FactorOverview = z
  .object({
    required: z.boolean().describe('Whether this account acts as steward only with a second factor'),
    factors: z.array(FactorRecord).describe('Those that count, oldest first'),
    recoveryCodesLeft: z.number().int(),
  })
  .meta({ id: 'SecondFactors' });
export type FactorOverview = z.infer<typeof FactorOverview>;

export const WithPassword = z.strictObject({ password: Password }).meta({ id: 'WithPassword' });
export type WithPassword = z.infer<typeof WithPassword>;

export const TotpInput = z.strictObject({ password: Password, name: Name }).meta({ id: 'TotpInput' });
export type TotpInput = z.infer<typeof TotpInput>;
export const TotpStarted = z
  .object({
    id: z.string(),
    secret: z.string().describe('Base32 in groups of four, to be typed into an app'),
    uri: z.string().describe('The same as an otpauth: address'),
    qr: z.string().describe('The address as a QR code, SVG text'),
  })
  .meta({ id: 'TotpStarted', description: 'Told this once. It counts when a code of it was confirmed.' });
export type TotpStarted = z.infer<typeof TotpStarted>;
export const TotpConfirmation = z
  .strictObject({ code: z.string().trim().min(1, 'Type the code that the app shows').max(20), endOthers })
  .meta({ id: 'TotpConfirmation' });
export type TotpConfirmation = z.infer<typeof TotpConfirmation>;

const Credential = { id: z.string().max(2000), rawId: z.string().max(2000), type: z.literal('public-key') };
const Encoded = z.string().max(100_000);
export const PasskeyInput = z
  .strictObject({
    name: Name,
    response: z
      .object({
        ...Credential,
        response: z.object({
          clientDataJSON: Encoded,
          attestationObject: Encoded,
          transports: z.array(z.string().max(40)).max(10).optional(),
        }),
      })
      .describe('RegistrationResponseJSON of WebAuthn'),
    endOthers,
  })
  .meta({ id: 'PasskeyInput' });
export type PasskeyInput = z.infer<typeof PasskeyInput>;

/** What a browser is asked to do, passed on as it is. */
export const CeremonyOptions = z
  .looseObject({ challenge: z.string() })
  .meta({ id: 'PasskeyOptions', description: 'Options of WebAuthn as JSON, good for one answer within five minutes' });

export const RecoveryCodes = z
  .object({ recoveryCodes: z.array(z.string()).describe('Ten new codes, told this once; none where there are some') })
  .meta({ id: 'RecoveryCodes' });
export type RecoveryCodes = z.infer<typeof RecoveryCodes>;

export const PasskeySignIn = z.strictObject({ email: Email, password: Password }).meta({ id: 'PasskeySignIn' });
export type PasskeySignIn = z.infer<typeof PasskeySignIn>;
