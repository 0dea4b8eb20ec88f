const RAISED: Record<string, string> = {
  '⁰': '0',
  '¹': '1',
  '²': '2',
  '³': '3',
  '⁴': '4',
  '⁵': '5',
  '⁶': '6',
  '⁷': '7',
  '⁸': '8',
  '⁹': '9',
  '⁻': '-',
  '⁺': '',
};

/**
 * A number as people type it: `5e-3`, `0,005`, `5.0 × 10⁻³`, `1 000`.
 *
 * @returns null for an empty text, NaN for one that is no number
 */
export function readNumber(text: string): number | null {
  const plain = text
    .replace(/[⁰¹²³⁴-⁹⁻⁺]/g, (sign) => RAISED[sign] ?? sign)
    .replace(/[−–]/g, '-')
    .replace(/[\s\u202f\u00a0]/g, '')
    .replace(/[×x*·]10\^?/i, 'e')
    .replace(',', '.');
  if (plain === '') return null;
  return /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i.test(plain) ? Number(plain) : Number.NaN;
}

/** A number as a form holds it: every digit that matters, no grouping. Empty for none. */
export const numberText = (value: number | null | undefined): string =>
  value === null || value === undefined ? '' : String(Number(value.toPrecision(12)));
