/** A piece of a mail: plain text, or an address that can be followed. */
export type MailPart = { text: string } | { link: string };

/** Cuts a plain-text mail at its web addresses. A full stop or bracket right after an address is not part of it. */
export function mailParts(text: string): MailPart[] {
  return text
    .split(/(https?:\/\/[^\s<>"]*[^\s<>".,;:!?)\]])/)
    .map((piece, i) => (i % 2 === 1 ? { link: piece } : { text: piece }))
    .filter((part) => 'link' in part || part.text !== '');
}
