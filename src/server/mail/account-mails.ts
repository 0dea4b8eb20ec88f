import { compose, type MailContent, mailDay, oneLine } from './templates.ts';

/** "1 December 2026, 09:05 UTC" of an ISO 8601 instant. */
const minute = (iso: string) => `${mailDay(iso)}, ${iso.slice(11, 16)} UTC`;

const NOT_YOU = 'If it was not you, choose a new password at once and tell a steward.';

/** To the address for which somebody asked a new password. */
export function passwordResetLink(facts: { link: string; expiresAt: string }): MailContent {
  return compose('Choose a new password', [
    'Somebody asked for a new password for the Zaffre account of this address.',
    { label: 'Choose a new password', link: facts.link },
    `The link works once, until ${minute(facts.expiresAt)}. A newer one ends it. Second factors stay as they are.`,
    'If you did not ask for it, leave the link alone: your password stays as it is.',
  ]);
}

/** After a password was changed, by its owner or by a link. */
export function passwordChanged(facts: { at: string; byLink: boolean; sessionsEnded: number }): MailContent {
  return compose('Your password was changed', [
    `The password of your Zaffre account was changed ${facts.byLink ? 'by a link sent to this address ' : ''}on ${minute(facts.at)}.`,
    facts.byLink
      ? 'Every browser that was signed in has been signed out. Access tokens and second factors are as they were.'
      : `Browsers signed out by it: ${facts.sessionsEnded}.`,
    NOT_YOU,
  ]);
}

/** To the present address, when another one is asked for. */
export function addressChangeFromOld(facts: { newEmail: string; link: string; expiresAt: string }): MailContent {
  return compose('Confirm the change of your address', [
    `Somebody signed in to your Zaffre account asked to change its address to ${oneLine(facts.newEmail)}.`,
    { label: 'Confirm the change', link: facts.link },
    `It takes effect when the new address has confirmed it, too, by ${minute(facts.expiresAt)} at the latest.`,
    `Until then nothing changes. ${NOT_YOU}`,
  ]);
}

/** To the address that an account shall have. */
export function addressChangeToNew(facts: {
  name: string;
  oldEmail: string;
  link: string;
  expiresAt: string;
}): MailContent {
  return compose('Confirm your new address', [
    `${oneLine(facts.name)} (${oneLine(facts.oldEmail)}) asked to use this address for their Zaffre account.`,
    { label: 'Confirm this address', link: facts.link },
    `It takes effect when the present address has confirmed it, too, by ${minute(facts.expiresAt)} at the latest.`,
    'If that is not you, leave the link alone: without it nothing changes.',
  ]);
}

/** To an address that was asked for and has an account already. */
export function addressHasAccount(facts: { origin: string }): MailContent {
  return compose('This address has an account already', [
    'Somebody asked to use this address for another Zaffre account. It has an account already, so that nothing changes.',
    { label: 'Sign in with it', link: `${facts.origin}/signin` },
  ]);
}

/** To both addresses, after the change. */
export function addressChanged(facts: { oldEmail: string; newEmail: string; at: string }): MailContent {
  return compose('The address of your account was changed', [
    `Since ${minute(facts.at)} your Zaffre account has the address ${oneLine(facts.newEmail)}; before, it had ${oneLine(facts.oldEmail)}. Sign in with the new one.`,
    'Invitations that were sent to the old address are still bound to it.',
    'If it was not you, tell a steward.',
  ]);
}
