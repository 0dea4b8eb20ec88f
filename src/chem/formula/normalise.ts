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
const FRACTIONS: Readonly<Record<string, readonly [number, number]>> = {
  '½': [1, 2],
  '⅓': [1, 3],
  '⅔': [2, 3],
  '¼': [1, 4],
  '¾': [3, 4],
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
    const tag = c === '<' ? MARKUP.exec(typed.slice(i, i + 6)) : null;
    if (tag) {
      if (tag[1] === 'sup') put('^', i);
      i += tag[0].length - 1;
      continue;
    }
    if (c === '{' && (typed[i - 1] === '_' || typed[i - 1] === '^')) {
      markup = true;
    } else if (c === '}' && markup) {
      markup = false;
    } else if (/\s/u.test(c)) {
      const times = TIMES_SIGN.exec(typed.slice(i, i + 12))?.[0];
      if (times !== undefined || partAfterBlank(typed, i, text)) put('·', i);
      if (times !== undefined) i += times.length - 1;
      else if (text !== '' && text.at(-1) !== '^' && spaceBeforeCharge(typed, i)) put('^', i);
    } else if (SUBSCRIPTS.includes(c)) {
      put(String(SUBSCRIPTS.indexOf(c)), i);
    } else if (SUPERSCRIPTS.includes(c)) {
      if (!SUPERSCRIPTS.includes(typed[i - 1] ?? ' ') && text.at(-1) !== '^') put('^', i);
      put('0123456789+-'[SUPERSCRIPTS.indexOf(c)]!, i);
    } else if (c in FRACTIONS) {
      const [top, bottom] = FRACTIONS[c]!;
      const whole = /(?:^|·)(\d+)$/.exec(text)?.[1];
      if (whole === undefined) for (const d of `${top}/${bottom}`) put(d, i);
      else for (const d of `/${bottom}`) put(d, i);
      if (whole !== undefined) {
        // 1½ is three halves: the whole number is written anew over the same places
        const [from, numerator] = [text.length - whole.length - 2, String(Number(whole) * bottom + top)];
        const first = at[from]!;
        text = `${text.slice(0, from)}${numerator}/${bottom}`;
        at.splice(from, at.length - from, ...Array.from(text.slice(from), () => first));
      }
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

/** `<sub>`, `<sup>` and their ends, as pasted from a page. */
const MARKUP = /^<(\/?(?:sub|sup))>/;

/** ` x 3 H2O`: a small x between blanks, before a number. */
const TIMES_SIGN = /^\s+[x×]\s*(?=\d)/u;

/** `Cl3 3 H2O`: the dot left out before a known solvent that ends its component, or before a counted ion. */
function partAfterBlank(typed: string, index: number, before: string): boolean {
  if (before === '' || /[·^([{.]$/.test(before) || /(?:^|·)[\d./]+$/.test(before)) return false;
  if (/[\])}\d][+-]$/.test(before) && /^\s+\d+\s*[A-Z]/.test(typed.slice(index, index + 8))) return true; // `]2+ 2Cl-`
  return SOLVATE_AHEAD.test(typed.slice(index, index + 40));
}
const SOLVATE_AHEAD =
  /^\s+(?:\d+(?:\.\d+)?|\d+\/\d+|\d*[½¼¾⅓⅔])?\s*(?:[HD][2₂]O|MeOH|EtOH|MeCN|CH[2₂]Cl[2₂]|CHCl[3₃]|DMF|dmf|DMSO|dmso|THF|thf|acetone|toluene)\s*(?=$|[·.*•⋅])/u;

/** `SO4 2-` and `[Fe(CN)6] 3-`: a blank, then digits and a sign which end the ion. */
function spaceBeforeCharge(typed: string, index: number): boolean {
  return /^\s+(\d?[+\-−–⁺⁻]|[+\-−–]\d)(?=$|[\s·.*[\](),;])/u.test(typed.slice(index));
}

/** A full stop is a decimal point within the coefficient of a solvate (`·0.5H2O`), else it parts salt and solvate. */
function isDecimalPoint(before: string, next: string | undefined): boolean {
  return next !== undefined && /\d/.test(next) && /(^|·)\d+$/.test(before);
}
