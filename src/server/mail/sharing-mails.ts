import { compose, type MailContent, mailDay, oneLine } from './templates.ts';

// Mails about invitations, access and bundles. Every instant is ISO 8601; days are told in UTC.

type Level = 'view' | 'download';

const untilDay = (iso: string) => `The link works once, until ${mailDay(iso)} (UTC), and only for this address.`;
const UNEXPECTED = 'If you did not expect this, leave the link alone: without it nothing happens.';
const may = (level: Level) => (level === 'download' ? 'read and download' : 'read');

/** Whom a guest can write to: a lead of the lab, or nobody while the lab has none. */
export interface Contact {
  name: string;
  email: string;
}

const whoRenews = (contact: Contact | null, lab: string): string =>
  contact
    ? `${oneLine(contact.name)} (${contact.email}), ${oneLine(lab)}, can renew it.`
    : `${oneLine(lab)} can renew it.`;

/** To someone asked to join a lab. */
export function memberInvitation(facts: {
  inviter: string;
  lab: string;
  role: 'lead' | 'contributor';
  link: string;
  /** When the link stops working. */
  expiresAt: string;
}): MailContent {
  return compose(`${facts.inviter} invites you to ${facts.lab}`, [
    `${oneLine(facts.inviter)} invites you to join ${oneLine(facts.lab)} as ${facts.role}.`,
    { label: 'Accept the invitation', link: facts.link },
    untilDay(facts.expiresAt),
    UNEXPECTED,
  ]);
}

/** To a partner outside, asked to read a folio. */
export function guestInvitation(facts: {
  inviter: string;
  folio: string;
  level: Level;
  /** SPDX identifier of the folio's licence. */
  licence: string;
  link: string;
  /** When the link stops working. */
  expiresAt: string;
  /** When the access itself will end. */
  accessUntil: string;
}): MailContent {
  return compose(`${facts.inviter} shares "${facts.folio}" with you`, [
    `${oneLine(facts.inviter)} invites you to ${may(facts.level)} the folio "${oneLine(facts.folio)}" until ${mailDay(facts.accessUntil)}, under the licence ${facts.licence}.`,
    { label: 'Open the folio', link: facts.link },
    untilDay(facts.expiresAt),
    UNEXPECTED,
  ]);
}

/** To the one who invited, when links lapsed unused. */
export function invitationsLapsed(facts: {
  addresses: readonly string[];
  /** The lab or the folio. */
  to: string;
  link: string;
}): MailContent {
  const [only, ...more] = facts.addresses;
  const subject = more.length > 0 ? `${facts.addresses.length} invitations` : `Your invitation of ${only}`;
  return compose(`${subject} to "${facts.to}" lapsed`, [
    `Nobody used the link to "${oneLine(facts.to)}" that was sent to ${facts.addresses.join(', ')}. It no longer works.`,
    { label: 'Send it again or leave it', link: facts.link },
  ]);
}

/** To a guest, a week before access ends. */
export function accessEndsSoon(facts: {
  folio: string;
  lab: string;
  expiresAt: string;
  contact: Contact | null;
  link: string;
}): MailContent {
  return compose(`Your access to "${facts.folio}" ends on ${mailDay(facts.expiresAt)}`, [
    `Your access to the folio "${oneLine(facts.folio)}" ends on ${mailDay(facts.expiresAt)} (UTC). ${whoRenews(facts.contact, facts.lab)}`,
    { label: 'Ask for a longer time on the page of the folio', link: facts.link },
  ]);
}

/** To the lead who granted, a week before access ends. */
export function guestsEndSoon(facts: {
  folio: string;
  guests: readonly string[];
  expiresAt: string;
  link: string;
}): MailContent {
  const whose = facts.guests.length === 1 ? facts.guests[0]! : `${facts.guests.length} guests`;
  return compose(`Access of ${whose} to "${facts.folio}" ends on ${mailDay(facts.expiresAt)}`, [
    `Access to the folio "${oneLine(facts.folio)}" ends on ${mailDay(facts.expiresAt)} (UTC) for ${facts.guests.map(oneLine).join(', ')}.`,
    { label: 'Change its end on the page of the folio', link: facts.link },
  ]);
}

/** To a guest whose access ended, by its time or by hand. */
export function accessEnded(facts: {
  folio: string;
  lab: string;
  endedAt: string;
  contact: Contact | null;
  link: string;
}): MailContent {
  return compose(`Your access to "${facts.folio}" ended`, [
    `Your access to the folio "${oneLine(facts.folio)}" ended on ${mailDay(facts.endedAt)} (UTC). ${whoRenews(facts.contact, facts.lab)}`,
    'What you downloaded stays yours to use under the licence that it came with.',
    { label: 'Ask for access again', link: facts.link },
  ]);
}

const WANTS = { download: 'to download files', longer: 'for a longer time', other: 'for something else' } as const;
export type Wants = keyof typeof WANTS;

/** To the leads of a lab, when a guest asks for more. */
export function moreAsked(facts: {
  guest: Contact;
  folio: string;
  wants: Wants;
  message: string | null;
  link: string;
}): MailContent {
  return compose(`${facts.guest.name} asks ${WANTS[facts.wants]}: "${facts.folio}"`, [
    `${oneLine(facts.guest.name)} (${facts.guest.email}) asks ${WANTS[facts.wants]} in the folio "${oneLine(facts.folio)}".`,
    ...(facts.message ? [`They write: ${facts.message}`] : []),
    { label: 'Answer on the page of the folio', link: facts.link },
  ]);
}

/** To the guest, when the lab answered. */
export function requestSettled(facts: {
  folio: string;
  wants: Wants;
  outcome: 'granted' | 'declined';
  answer: string | null;
  by: string;
  /** What holds now, where something was granted. */
  now: { level: Level; expiresAt: string } | null;
  link: string;
}): MailContent {
  return compose(`Your request about "${facts.folio}" was ${facts.outcome}`, [
    `You asked ${WANTS[facts.wants]} in the folio "${oneLine(facts.folio)}". ${oneLine(facts.by)} has ${facts.outcome} it.`,
    ...(facts.now ? [`You may ${may(facts.now.level)} it until ${mailDay(facts.now.expiresAt)} (UTC).`] : []),
    ...(facts.answer ? [`They write: ${facts.answer}`] : []),
    { label: 'The folio', link: facts.link },
  ]);
}

/** To the one who asked for a bundle. */
export function bundleReady(facts: {
  title: string;
  link: string;
  /** Bytes. */
  size: number;
  /** Until when the file is kept. */
  keptUntil: string;
}): MailContent {
  return compose(`Your bundle of "${facts.title}" is ready`, [
    `The bundle of "${oneLine(facts.title)}" is ready, ${(facts.size / 1e6).toFixed(1)} MB. It is kept until ${mailDay(facts.keptUntil)} (UTC).`,
    { label: 'Fetch it (you will be asked to sign in)', link: facts.link },
  ]);
}
