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
export const mailDay = (iso: string) =>
  new Date(iso).toLocaleDateString('en-GB', { day: 'numeric', month: 'long', year: 'numeric', timeZone: 'UTC' });
