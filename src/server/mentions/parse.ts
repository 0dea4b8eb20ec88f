/** Most people that one text tells; the rest of a longer list hear nothing. */
const MOST = 20;

const LOCAL = '[a-z0-9](?:[a-z0-9._+-]*[a-z0-9])?';
const DOMAIN = String.raw`(?:[a-z0-9](?:[a-z0-9-]*[a-z0-9])?\.)+[a-z]{2,}`;
// Nothing of a word before it, so that neither an address alone nor N2@C60 names anybody.
const MENTION = new RegExp(String.raw`(?<![\p{L}\p{N}._%+\]\)-])@(${LOCAL}(?:@${DOMAIN})?)(?![\p{L}\p{N}@])`, 'giu');

/**
 * Whom a text names: `@` and an e-mail address, or the part of one before its own @. Lower case, each once, in the
 * order of the text, at most 20.
 */
export function mentionedIn(text: string | null | undefined): string[] {
  if (!text?.includes('@')) return [];
  const found = [...text.matchAll(MENTION)].map((match) => match[1]!.toLowerCase());
  return [...new Set(found)].slice(0, MOST);
}

const LONGEST = 600;

/** The sentence in which a text first names somebody, cut to 600 characters. */
export function sentenceWith(text: string, handle: string): string {
  const sentences = text.split(/(?<=[.!?])\s+|\s*[\r\n]+\s*/);
  const found = sentences.find((sentence) => mentionedIn(sentence).includes(handle)) ?? text;
  return found.length > LONGEST ? `${found.slice(0, LONGEST - 1)}…` : found;
}
