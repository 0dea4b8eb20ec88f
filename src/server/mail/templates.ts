/** What a mail says, twice: as plain text and as HTML. */
export interface MailContent {
  subject: string;
  text: string;
  html: string;
}

type Block = string | { link: string; label: string };

/** Text as HTML, with nothing left that a browser or mail program would act on. */
export const escapeHtml = (text: string): string =>
  text.replace(/[&<>"']/g, (c) => ({ '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' })[c]!);

/** One line, whatever was typed: a line break in a header would start another header (RFC 5322 §2.2). */
export const oneLine = (text: string): string =>
  // biome-ignore lint/suspicious/noControlCharactersInRegex: control characters are what is taken out
  text.replace(/[\u0000-\u001f\u007f\u0085\u2028\u2029]+/g, ' ').trim();

const CLOSING = 'This mail was sent by Zaffre, a registry of complexes and their spectra. Nobody reads replies to it.';

/** A mail of paragraphs and links, set as text and as HTML from the same words. */
export function compose(subject: string, blocks: Block[]): MailContent {
  const all = [...blocks, CLOSING];
  const text = all.map((block) => (typeof block === 'string' ? block : `${block.label}:\n${block.link}`)).join('\n\n');
  const html = all.map((block) => (typeof block === 'string' ? `<p>${escapeHtml(block)}</p>` : linkHtml(block)));
  const style = 'font-family:sans-serif;line-height:1.5;max-width:36em';
  return {
    subject: oneLine(subject),
    text: `${text}\n`,
    html: `<!doctype html><html lang="en"><head><meta charset="utf-8"><title>${escapeHtml(oneLine(subject))}</title></head><body style="${style}">${html.join('')}</body></html>`,
  };
}

function linkHtml({ link, label }: { link: string; label: string }): string {
  if (!/^https?:\/\//.test(link)) throw new Error('a link in a mail begins with http:// or https://');
  return `<p>${escapeHtml(label)}:<br><a href="${escapeHtml(link)}">${escapeHtml(link)}</a></p>`;
}

/** "1 December 2026" in UTC, of an ISO 8601 instant. */
const day = (iso: string) =>
  new Date(iso).toLocaleDateString('en-GB', { day: 'numeric', month: 'long', year: 'numeric', timeZone: 'UTC' });

const untilDay = (iso: string) => `The link works once, until ${day(iso)} (UTC), and only for this address.`;
const UNEXPECTED = 'If you did not expect this, leave the link alone: without it nothing happens.';

/** To someone asked to join a lab. */
export function memberInvitation(facts: {
  inviter: string;
  lab: string;
  role: 'lead' | 'contributor';
  link: string;
  /** When the link stops working, ISO 8601. */
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
  level: 'view' | 'download';
  link: string;
  /** When the link stops working, ISO 8601. */
  expiresAt: string;
}): MailContent {
  const may = facts.level === 'download' ? 'read and download' : 'read';
  return compose(`${facts.inviter} shares "${facts.folio}" with you`, [
    `${oneLine(facts.inviter)} invites you to ${may} the folio "${oneLine(facts.folio)}".`,
    { label: 'Open the folio', link: facts.link },
    untilDay(facts.expiresAt),
    UNEXPECTED,
  ]);
}

/** To the one who asked for a bundle. */
export function bundleReady(facts: { title: string; link: string; size: number }): MailContent {
  return compose(`Your bundle of "${facts.title}" is ready`, [
    `The bundle of "${oneLine(facts.title)}" is ready, ${(facts.size / 1e6).toFixed(1)} MB.`,
    { label: 'Fetch it (you will be asked to sign in)', link: facts.link },
  ]);
}
