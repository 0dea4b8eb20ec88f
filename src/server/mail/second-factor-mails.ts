import { settings } from '../settings.ts';
import { compose, type MailContent, oneLine } from './templates.ts';

const page = () => ({ label: 'Your second factors', link: `${settings().publicOrigin}/account#second-factor` });
const NOT_YOU =
  'If this was not you, somebody knows your password: choose another one at once and tell a steward of your registry.';
const KIND = { totp: 'an authenticator app', passkey: 'a passkey' };

/** To the owner of an account, when a factor begins to count. */
export const factorAdded = ({ kind, name }: { kind: 'totp' | 'passkey'; name: string }): MailContent =>
  compose('A second factor was added to your account', [
    `A second factor was added to your account: ${KIND[kind]}, named "${oneLine(name)}".`,
    'From now on signing in asks for a second factor after the password.',
    page(),
    NOT_YOU,
  ]);

/** To the owner of an account, when one factor was removed. */
export const factorRemoved = (facts: { kind: 'totp' | 'passkey'; name: string; left: number }): MailContent =>
  compose('A second factor was removed from your account', [
    `A second factor was removed from your account: ${KIND[facts.kind]}, named "${oneLine(facts.name)}".`,
    facts.left > 0
      ? 'Signing in still asks for one of those that are left.'
      : 'None is left: your password alone signs you in.',
    page(),
    NOT_YOU,
  ]);

/** To the owner of an account, when the operator took every factor away because one was lost. */
export const factorsReset = (): MailContent =>
  compose('The second factors of your account were removed', [
    'The operator of the registry removed every second factor and recovery code of your account, and signed you out everywhere.',
    'Your password alone signs you in until you set up a second factor again.',
    page(),
    'If you did not ask for this, tell a steward of your registry at once.',
  ]);

/** To the owner of an account, when recovery codes were made anew. */
export const recoveryCodesRenewed = (): MailContent =>
  compose('Your recovery codes were made anew', [
    'New recovery codes were made for your account. The ones you had before no longer work.',
    page(),
    NOT_YOU,
  ]);

/** To the owner of an account, when a recovery code signed somebody in. */
export const recoveryCodeUsed = (left: number): MailContent =>
  compose('A recovery code was used to sign in', [
    `A recovery code of your account was used to sign in. ${left === 1 ? 'One code is' : `${left} codes are`} left.`,
    page(),
    NOT_YOU,
  ]);
