import { route } from './route.ts';
import {
  CeremonyOptions,
  FactorOverview,
  PasskeyInput,
  PasskeySignIn,
  RecoveryCodes,
  TotpConfirmation,
  TotpInput,
  TotpStarted,
  WithPassword,
} from './second-factor.ts';

const tag = 'Your account';
const own = { tag, who: 'signed-in', sessionOnly: true } as const;
const change = { ...own, method: 'POST', scope: 'write' } as const;
const refusals = {
  403: 'There is a factor, and this session began without one: sign in again with it',
  429: 'Too many attempts',
} as const;

/** Routes of second factors. */
export const secondFactorRoutes = {
  readSecondFactors: route({
    ...own,
    method: 'GET',
    path: '/api/account/second-factor',
    summary: 'Your second factors, and how many recovery codes are left',
    scope: 'read',
    status: 200,
    answers: FactorOverview,
  }),
  startTotp: route({
    ...change,
    path: '/api/account/second-factor/totp',
    summary: 'Begin to set up an authenticator app',
    body: TotpInput,
    status: 201,
    answers: TotpStarted,
    refusals,
  }),
  confirmTotp: route({
    ...change,
    path: '/api/account/second-factor/totp/{id}/confirm',
    summary: 'Confirm an authenticator app by a code of it; the first factor brings recovery codes',
    body: TotpConfirmation,
    status: 200,
    answers: RecoveryCodes,
    refusals: { ...refusals, 409: 'It was confirmed before, or begun more than an hour ago' },
  }),
  startPasskey: route({
    ...change,
    path: '/api/account/second-factor/passkeys/options',
    summary: 'Begin to set up a passkey: what the browser has to ask of it',
    body: WithPassword,
    status: 200,
    answers: CeremonyOptions,
    refusals,
  }),
  addPasskey: route({
    ...change,
    path: '/api/account/second-factor/passkeys',
    summary: 'Set up a passkey by its answer; the first factor brings recovery codes',
    body: PasskeyInput,
    status: 201,
    answers: RecoveryCodes,
    refusals: { ...refusals, 409: 'This passkey is set up already' },
  }),
  removeFactor: route({
    ...change,
    path: '/api/account/second-factor/{id}/remove',
    summary: 'Remove a second factor',
    body: WithPassword,
    status: 204,
    answers: null,
    refusals: { ...refusals, 409: 'The last factor of a steward' },
  }),
  renewRecoveryCodes: route({
    ...change,
    path: '/api/account/second-factor/recovery-codes',
    summary: 'Make new recovery codes; older ones no longer work',
    body: WithPassword,
    status: 200,
    answers: RecoveryCodes,
    refusals: { ...refusals, 409: 'There is no second factor' },
  }),
  startPasskeySignIn: route({
    tag,
    who: 'anyone',
    scope: 'write',
    method: 'POST',
    path: '/api/sign-in/passkey-options',
    summary: 'What the browser has to ask of a passkey to sign in',
    body: PasskeySignIn,
    status: 200,
    answers: CeremonyOptions,
    refusals: {
      401: 'Address and password do not belong together',
      409: 'The account has no passkey',
      429: 'Too many attempts',
    },
  }),
};
