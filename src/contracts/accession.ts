import * as z from 'zod';

const ALPHABET = '0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZ';

/**
 * Check character of ISO 7064 MOD 37,36 over digits and capital letters.
 *
 * Finds every single wrong character and nearly every swap of neighbours.
 * @throws {RangeError} for a character outside 0–9 A–Z
 * @see ISO/IEC 7064:2003, hybrid systems
 */
export function checkCharacter(text: string): string {
  let product = 36;
  for (const character of text) {
    const value = ALPHABET.indexOf(character);
    if (value < 0) throw new RangeError(`"${character}" is not a digit or a capital letter`);
    const sum = (product + value) % 36 || 36;
    product = (2 * sum) % 37;
  }
  return ALPHABET[(37 - product) % 36]!;
}

/** `ZF` and 42 → `ZF000042-X`. */
export function formatAccession(prefix: string, number: number): string {
  const stem = prefix + String(number).padStart(6, '0');
  return `${stem}-${checkCharacter(stem)}`;
}

/**
 * An accession as people type it (any case, with or without hyphen) in its one spelling, or null when it cannot be
 * one: wrong form, or a check character that does not fit.
 */
export function normaliseAccession(typed: string): string | null {
  const match = /^([A-Z]{1,4}\d{6})([0-9A-Z])$/.exec(
    typed
      .trim()
      .toUpperCase()
      .replace(/[-‐–\s]/g, ''),
  );
  if (!match) return null;
  const [, stem, check] = match;
  return checkCharacter(stem!) === check ? `${stem}-${check}` : null;
}

/** An accession in a request; answers the normal spelling. */
export const Accession = z
  .string()
  .transform((typed, context) => {
    const accession = normaliseAccession(typed);
    if (accession === null) {
      context.addIssue({ code: 'custom', message: `"${typed}" is no accession: look for a mistyped character` });
      return z.NEVER;
    }
    return accession;
  })
  .meta({
    id: 'Accession',
    description: 'ZF, six digits, hyphen, ISO 7064 MOD 37,36 check character',
    example: 'ZF000042-X',
  });
