import { DomainError } from '../errors.ts';

/** Text in one alphabet, with the offset in the original of each of its characters (and of its end). */
export interface NormalText {
  text: string;
  at: readonly number[];
}

const SUBSCRIPTS = '₀₁₂₃₄₅₆₇₈₉';
const SUPERSCRIPTS = '⁰¹²³⁴⁵⁶⁷⁸⁹⁺⁻';
const PLAIN: Readonly<Record<string, string>> = {
  '−': '-',
  '–': '-',
  '‐': '-',
  '‑': '-',
  '﹣': '-',
  '－': '-',
  '＋': '+',
  '₊': '+',
  '₋': '-',
  '•': '·',
  '∙': '·',
  '⋅': '·',
  '･': '·',
  '×': '·',
  µ: 'μ',
  '∆': 'Δ',
  "'": '′',
  '’': '′',
  '‘': '′',
  '″': '″',
  '（': '(',
  '）': ')',
};
const INVISIBLE = /[\u200B-\u200D\u2060\uFEFF]/u;

/** Longest text that is read, in characters. */
export const MAX_LENGTH = 500;

/**
 * Bring a typed formula into one alphabet: plain digits and signs, `^` before a raised charge, `·` between salt and
 * solvates. Offsets of the original are kept, so that a refusal can point at what was typed.
 *
 * @throws {DomainError} `empty`; `too-large` above 500 characters
 */
export function normalise(typed: string): NormalText {
  if (typed.trim() === '') throw new DomainError('empty', 'No formula was given', 'formula', 0);
  if (typed.length > MAX_LENGTH) {
    throw new DomainError(
      'too-large',
      `The formula has ${typed.length} characters; ${MAX_LENGTH} are read`,
      'formula',
      MAX_LENGTH,
    );
  }
  let text = '';
  const at: number[] = [];
  const put = (character: string, offset: number) => {
    text += character;
    at.push(offset);
  };
  let markup = false;
  for (let i = 0; i < typed.length; i += 1) {
    const c = typed[i]!;
    if (INVISIBLE.test(c) || c === '_' || c === '$') continue;
    if (c === '{' && (typed[i - 1] === '_' || typed[i - 1] === '^')) {
      markup = true;
    } else if (c === '}' && markup) {
      markup = false;
    } else if (/\s/u.test(c)) {
      if (text !== '' && text.at(-1) !== '^' && spaceBeforeCharge(typed, i)) put('^', i);
    } else if (SUBSCRIPTS.includes(c)) {
      put(String(SUBSCRIPTS.indexOf(c)), i);
    } else if (SUPERSCRIPTS.includes(c)) {
      if (!SUPERSCRIPTS.includes(typed[i - 1] ?? ' ') && text.at(-1) !== '^') put('^', i);
      put('0123456789+-'[SUPERSCRIPTS.indexOf(c)]!, i);
    } else if (c === '*') {
      put(/[Cc]p$/.test(text) ? '*' : '·', i);
    } else if (c === '.') {
      put(isDecimalPoint(text, typed[i + 1]) ? '.' : '·', i);
    } else {
      put(PLAIN[c] ?? c, i);
    }
  }
  at.push(typed.length);
  return { text, at };
}

/** `SO4 2-` and `[Fe(CN)6] 3-`: a blank, then digits and a sign which end the ion. */
function spaceBeforeCharge(typed: string, index: number): boolean {
  return /^\s+(\d?[+\-−–⁺⁻]|[+\-−–]\d)(?=$|[\s·.*[\](),;])/u.test(typed.slice(index));
}

/** A full stop is a decimal point within the coefficient of a solvate (`·0.5H2O`), else it parts salt and solvate. */
function isDecimalPoint(before: string, next: string | undefined): boolean {
  return next !== undefined && /\d/.test(next) && /(^|·)\d+$/.test(before);
}
