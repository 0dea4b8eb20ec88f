/** One address of a pasted list. */
export interface Address {
  /** As it was typed, with the name beside it. */
  text: string;
  /** The address alone, in small letters. */
  email: string;
  /** What is wrong with it, or null. */
  fault: string | null;
}

/** Most addresses that are invited at once. */
export const MOST_AT_ONCE = 50;

/** The shape that the server asks for, too: a local part of plain characters, a domain with a dot. */
const EMAIL = /^(?!\.)(?!.*\.\.)[a-z0-9_'+\-.]*[a-z0-9_+-]@(?:[a-z0-9][a-z0-9-]*\.)+[a-z]{2,}$/;

/**
 * Read addresses as mail programs write them: parted by commas, semicolons or line breaks, each alone or as
 * `Name <address>`, names in quotes or not. An address that comes twice is taken once.
 */
export function readAddresses(typed: string): Address[] {
  const seen = new Set<string>();
  return entries(typed).flatMap((text) => {
    const address = readOne(text);
    if (seen.has(address.email)) return [];
    seen.add(address.email);
    return [address];
  });
}

function readOne(text: string): Address {
  const inBrackets = /<([^<>]*)>\s*$/.exec(text)?.[1];
  const email = (inBrackets ?? text).trim().toLowerCase();
  if (EMAIL.test(email) && email.length <= 254) return { text, email, fault: null };
  // Nothing is guessed: of "n varga@lab.example" the wrong half would be somebody else.
  const fault = email.includes('@') ? `"${email}" is not an e-mail address` : `"${text}" has no e-mail address`;
  return { text, email, fault };
}

/** The text cut at its separators, but not inside quotes or angle brackets. */
function entries(typed: string): string[] {
  const parts = typed.match(/(?:"[^"\n]*"|<[^<>\n]*>|[^,;\n\t])+/g) ?? [];
  return parts.map((part) => part.trim()).flatMap((part) => (part === '' ? [] : apart(part)));
}

/** Bare addresses with nothing but spaces between them are several. */
function apart(part: string): string[] {
  const words = part.split(/\s+/);
  return words.length > 1 && words.every((word) => EMAIL.test(word.toLowerCase())) ? words : [part];
}

/** The text without one of its addresses. */
export const withoutAddress = (typed: string, email: string): string =>
  readAddresses(typed)
    .filter((address) => address.email !== email)
    .map(({ text }) => text)
    .join(', ');

/** The addresses as an invitation takes them. */
export const toInvite = (addresses: readonly Address[]): { email: string } | { emails: string[] } => {
  const emails = addresses.map(({ email }) => email);
  return emails.length === 1 ? { email: emails[0]! } : { emails };
};

interface Refusal {
  errors: readonly { pointer: string; detail: string }[];
}

/** What the server said of single addresses, by address, from its pointers `#/email` and `#/emails/3`. */
export function refusedAddresses(addresses: readonly Address[], refusal: Refusal | null): Map<string, string> {
  const faults = new Map<string, string>();
  for (const { pointer, detail } of refusal?.errors ?? []) {
    const at = pointer === '#/email' ? 0 : Number(/^#\/emails\/(\d+)$/.exec(pointer)?.[1] ?? Number.NaN);
    const address = addresses[at];
    if (address) faults.set(address.email, detail);
  }
  return faults;
}
